package iridepth.reading;

/**
 * What a jump of thickness between neighbours costs: min(T, jump^2 / (q^2 + 2 u^2)), with u the random uncertainty of the
 * reading and q the change from pixel to pixel that films plausibly have. Truncated, so that a step of the film costs no more
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
    /** 1 / (q^2 + 2 u^2) at each sample of the curve, 1/nm^2. */
    private final float[] stiffness;

    private JumpPenalty(TangentTable table, double q) {
        this.table = table;
        this.stiffness = new float[table.size()];
        for (int k = 0; k < stiffness.length; k++) {
            stiffness[k] = (float) (1 / (q * q + 2 * table.random(k) * table.random(k)));
        }
    }

    static JumpPenalty of(CurveIndex index) {
        double fringe = index.curve().stepNm() * SAMPLES_PER_FRINGE;
        return new JumpPenalty(index.tables()[index.tables().length / 2], fringe / PIXELS_PER_FRINGE);
    }

    /** 1 / (q^2 + 2 u^2) at a thickness, 1/nm^2. */
    float stiffness(float thicknessNm) {
        return stiffness[table.nearest(thicknessNm)];
    }
}
