package iridepth.reading;

/**
 * What a jump of thickness between neighbours costs: min(T, jump^2 / (q^2 + 2 u^2)), with u the random uncertainty of the
 * reading, near an extremum also across it, and q the change from pixel to pixel that films plausibly have. Truncated, so that a step of the film costs no more
 * than T however high it is.
 *
 * <p>q is a sixteenth of the finest fringe, half the shortest wavelength in the film: a lens and pixels that show fringes at
 * all spread each over several pixels (common practice).
 */
final class JumpPenalty {
    /** T, on the scale of -2 ln likelihood. */
    static final float TRUNCATION = 9;
    private static final double PIXELS_PER_FRINGE = 16;

    /** Samples of a colour curve per finest fringe; see {@link iridepth.curve.ThicknessRange#step}. */
    private static final double SAMPLES_PER_FRINGE = 64;

    private final TangentTable table;
    private final float jump;
    /** 1 / (q^2 + 2 u^2) at each sample of the curve, 1/nm^2. */
    private final float[] stiffness;

    private JumpPenalty(TangentTable table, double q) {
        this.table = table;
        this.jump = (float) (q * Math.sqrt(TRUNCATION));
        this.stiffness = new float[table.size()];
        for (int k = 0; k < stiffness.length; k++) {
            stiffness[k] = (float) (1 / (q * q + 2 * table.spread(k)));
        }
    }

    static JumpPenalty of(CurveIndex index) {
        return new JumpPenalty(index.middle(), steepest(index));
    }

    /** The finest fringe of a curve, nm. */
    static double fringe(CurveIndex index) {
        return index.curve().stepNm() * SAMPLES_PER_FRINGE;
    }

    /** q, nm from pixel to pixel. */
    static double steepest(CurveIndex index) {
        return fringe(index) / PIXELS_PER_FRINGE;
    }

    /** The least jump that costs T, nm. */
    float jump() {
        return jump;
    }

    /** Whether a film may go from one thickness to another over so many pixels: it costs less than T. */
    boolean links(float fromNm, float toNm, int pixels) {
        float difference = Math.abs(toNm - fromNm);
        return difference <= jump || difference * difference * stiffness(toNm) < TRUNCATION * pixels;
    }

    /** 1 / (q^2 + 2 u^2) at a thickness, 1/nm^2. */
    float stiffness(float thicknessNm) {
        return stiffness[table.nearest(thicknessNm)];
    }
}
