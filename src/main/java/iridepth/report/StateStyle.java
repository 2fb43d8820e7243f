package iridepth.report;

/**
 * How the state of a pixel is coded in files and shown in pictures. The codes are those of the state map: 0 for read, then in
 * this order. The tones are neutral: greys differ from every colour of the thickness scale for normal and colour-blind eyes,
 * and from each other in lightness.
 */
public enum StateStyle {
    /** A thickness is read: shown in its colour of the scale. */
    READ("read", 0x2F6FB0),
    /** A thickness is read, but another order fits about as well: its colour of the scale, hatched. */
    ORDER_DOUBTFUL("order-doubtful", 0xF0C04A),
    /** No thickness explains the colour. */
    OFF_CURVE("off-curve", 0xD9D9D9),
    /** Too little light. */
    DARK("dark", 0x000000),
    /** Too much light. */
    CLIPPED("clipped", 0xFFFFFF),
    /** Left out on request. */
    EXCLUDED("excluded", 0x4A4A4A);

    private static final StateStyle[] ALL = values();

    private final String label;
    private final int rgb;

    StateStyle(String label, int rgb) {
        this.label = label;
        this.rgb = rgb;
    }

    /** Style of a code. */
    static StateStyle of(int code) {
        if (code < 0 || code >= ALL.length) {
            throw new IllegalArgumentException("state code " + code + " is none of 0 to " + (ALL.length - 1));
        }
        return ALL[code];
    }

    /** The word for the state. */
    public String label() {
        return label;
    }

    /** Code in the state map. */
    public int code() {
        return ordinal();
    }

    /** Whether a pixel of this state has a thickness. */
    public boolean hasThickness() {
        return this == READ || this == ORDER_DOUBTFUL;
    }

    /** Colour in a map of states, 0xRRGGBB; in a thickness map that of pixels without thickness. */
    public int rgb() {
        return rgb;
    }
}
