package iridepth.calibration;

/**
 * How far the index of a film may lie from the stated Cauchy form A + B / lambda^2, as standard deviations.
 *
 * @param sigmaA of A
 * @param sigmaB of B, um^2
 */
public record IndexPrior(double sigmaA, double sigmaB) {
    /** Resists and polymers of one kind differ by about this much, common practice. */
    public static final IndexPrior DEFAULT = new IndexPrior(0.03, 0.003);

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if one is not above 0, or absurdly large
     */
    public IndexPrior {
        if (!(sigmaA > 0 && sigmaA <= 1 && sigmaB > 0 && sigmaB <= 0.2)) {
            throw new IllegalArgumentException("the spread of the index must be above 0 and at most 1 in A and 0.2 um^2 in B, not "
                    + sigmaA + " and " + sigmaB);
        }
    }
}
