package iridepth.report;

import iridepth.reading.State;

/**
 * How the {@link State} of a pixel is shown in pictures, in the order of its codes. The tones are neutral: greys differ from every colour of the thickness scale for normal and colour-blind eyes,
 * and from each other in lightness.
 */
public enum StateStyle {
    /** A thickness is read: shown in its colour of the scale. */
    READ(State.READ, 0x2F6FB0),
    /** A thickness is read, but another order fits about as well: its colour of the scale, hatched. */
    ORDER_DOUBTFUL(State.ORDER_DOUBTFUL, 0xF0C04A),
    /** No thickness explains the colour. */
    OFF_CURVE(State.OFF_CURVE, 0xD9D9D9),
    /** Too little light. */
    DARK(State.DARK, 0x000000),
    /** Too much light. */
    CLIPPED(State.CLIPPED, 0xFFFFFF),
    /** Left out on request. */
    EXCLUDED(State.EXCLUDED, 0x4A4A4A);

    private static final StateStyle[] ALL = values();

    private final State state;
    private final int rgb;

    StateStyle(State state, int rgb) {
        this.state = state;
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
        return state.label();
    }

    /** Code in the state map. */
    public int code() {
        return state.code();
    }

    /** Whether a pixel of this state has a thickness. */
    public boolean hasThickness() {
        return state.hasThickness();
    }

    /** Colour in a map of states, 0xRRGGBB; in a thickness map that of pixels without thickness. */
    public int rgb() {
        return rgb;
    }
}
