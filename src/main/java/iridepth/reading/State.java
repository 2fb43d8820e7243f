package iridepth.reading;

/** What became of a pixel; the codes in files are 0 for read and so on in this order. */
public enum State {
    /** A thickness was read. */
    READ("read"),
    /** A thickness was read, but another interference order fits about as well. */
    ORDER_DOUBTFUL("order-doubtful"),
    /** No thickness explains the colour: dust, scratch, stain, other material. */
    OFF_CURVE("off-curve"),
    /** No light to speak of in any channel. */
    DARK("dark"),
    /** Every channel at the end of its scale. */
    CLIPPED("clipped"),
    /** Left out by the recipe. */
    EXCLUDED("excluded");


    private final String label;

    State(String label) {
        this.label = label;
    }

    /** The word for it in files and messages. */
    public String label() {
        return label;
    }

    /** The code in {@code state.tif}, 0 to 5. */
    public byte code() {
        return (byte) ordinal();
    }

    /** The state of a code. */
    public static State of(int code) {
        return values()[code];
    }

    /** Whether a pixel of this state has a thickness. */
    public boolean hasThickness() {
        return this == READ || this == ORDER_DOUBTFUL;
    }
}
