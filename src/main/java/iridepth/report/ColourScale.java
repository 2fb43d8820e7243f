package iridepth.report;

import iridepth.colour.Lab;
import iridepth.colour.Srgb;

/**
 * The colour scale of thickness maps, from dark blue through purple and orange to light yellow, computed from CIELAB.
 *
 * <p>The path is a helix in CIELAB about the axis of greys: lightness rises from 14 to 92, the hue angle turns by 175 degrees
 * from blue to yellow, and the chroma is a parabola between its values at the ends and in the middle, chosen so that every
 * colour lies in the sRGB gamut. It is then walked in equal steps of CIEDE2000, so that equal differences of thickness look
 * equally large. Lightness rises all along, also for readers with red-green colour blindness, and the colours are told apart
 * from the greys of {@link StateStyle}.
 */
public final class ColourScale {
    /** Number of colours. */
    public static final int SIZE = 256;

    private static final ColourScale THICKNESS = new ColourScale();
    private static final double FIRST_LIGHTNESS = 14;
    private static final double LAST_LIGHTNESS = 92;
    private static final double FIRST_HUE_DEG = 290;
    private static final double TURN_DEG = 175;
    private static final double FIRST_CHROMA = 36;
    private static final double MIDDLE_CHROMA = 60;
    private static final double LAST_CHROMA = 55;
    /** Straight pieces over which the length of the path is summed. */
    private static final int PIECES = 1024;

    private final Lab[] lab = new Lab[SIZE];
    private final int[] rgb = new int[SIZE];

    private ColourScale() {
        double[] length = new double[PIECES + 1];
        for (int i = 1; i <= PIECES; i++) {
            length[i] = length[i - 1] + path((i - 1.0) / PIECES).deltaE2000(path((double) i / PIECES));
        }
        int piece = 0;
        for (int k = 0; k < SIZE; k++) {
            double wanted = length[PIECES] * k / (SIZE - 1);
            while (piece < PIECES - 1 && length[piece + 1] < wanted) {
                piece++;
            }
            double share = (wanted - length[piece]) / (length[piece + 1] - length[piece]);
            lab[k] = path((piece + share) / PIECES);
            rgb[k] = Srgb.of(lab[k].toXyz(Srgb.WHITE)).toRgb();
        }
    }

    private static Lab path(double t) {
        double lightness = FIRST_LIGHTNESS + t * (LAST_LIGHTNESS - FIRST_LIGHTNESS);
        double hue = Math.toRadians(FIRST_HUE_DEG + t * TURN_DEG);
        double bend = 4 * MIDDLE_CHROMA - 2 * FIRST_CHROMA - 2 * LAST_CHROMA;
        double chroma = FIRST_CHROMA + t * (LAST_CHROMA - FIRST_CHROMA + bend * (1 - t));
        return new Lab(lightness, chroma * Math.cos(hue), chroma * Math.sin(hue));
    }

    /** The scale of thickness maps. */
    public static ColourScale thickness() {
        return THICKNESS;
    }

    /**
     * Index of the colour at a share of the scale.
     *
     * @param share 0 for the first colour, 1 for the last; beyond them the nearer of the two
     * @return 0 to {@link #SIZE} - 1
     * @throws IllegalArgumentException if the share is NaN: what has no value has no colour of the scale
     */
    public static int index(double share) {
        if (Double.isNaN(share)) {
            throw new IllegalArgumentException("a value that is missing has no place on the colour scale");
        }
        return (int) Math.round(Math.min(1, Math.max(0, share)) * (SIZE - 1));
    }

    /** Colour of an index as 0xRRGGBB. */
    public int rgb(int index) {
        return rgb[index];
    }

    /** Colour of an index in CIELAB under the white of sRGB, before rounding to 8 bits. */
    public Lab lab(int index) {
        return lab[index];
    }
}
