package iridepth.quality;

import org.apache.commons.math3.distribution.NormalDistribution;

/**
 * Limits on thickness, and the rule by which a reading with uncertainty is judged against them.
 *
 * <p>The decision rule is that of ISO 14253-1 and of JCGM 106:2012, 8.3 (from memory of both): a guard band g on either side
 * of each limit. Proven in tolerance: lower + g &lt;= x &lt;= upper - g. Proven out of tolerance: x &lt; lower - g or
 * x &gt; upper + g. Otherwise nothing is proven. The guard band is commonly the expanded uncertainty (coverage factor 2). If
 * 2 g is more than the tolerance, no value can be proven in tolerance: the measurement is too coarse for the task.
 *
 * @param lower lower limit, nm; negative infinity for none
 * @param upper upper limit, nm; positive infinity for none
 * @param requiredShare share of the pixels that must lie within the limits for the field to be in tolerance, 0 to 1
 */
public record Tolerance(double lower, double upper, double requiredShare) {

    /** Unless said otherwise 99 % of the pixels must lie within the limits, so that dust does not condemn a film. */
    public static final double USUAL_SHARE = 0.99;

    private static final NormalDistribution NORMAL = new NormalDistribution(null, 0, 1);

    public Tolerance {
        if (!(lower < upper) || Double.isInfinite(lower) && Double.isInfinite(upper)) {
            throw new IllegalArgumentException("tolerance " + lower + " to " + upper
                    + " nm: give the lower limit first, the upper above it, at least one of them finite");
        }
        if (!(requiredShare > 0 && requiredShare <= 1)) {
            throw new IllegalArgumentException(
                    "tolerance requires a share of " + requiredShare + " of the pixels: give more than 0 and at most 1");
        }
    }

    /**
     * How a map stands against a tolerance. Shares are of the pixels that were read; they are NaN, and the verdicts
     * {@link Verdict#UNDECIDED}, if there are none.
     *
     * @param below share below the lower limit, as read
     * @param inside share within the limits, as read
     * @param above share above the upper limit, as read
     * @param provenInside share within the limits by at least the guard band of the field
     * @param provenOutside share outside the limits by more than the guard band of the field
     * @param mean verdict on the mean thickness
     * @param field verdict on the field: PASS if the share proven inside reaches the required share, FAIL if the share proven
     *     outside is so large that it cannot
     */
    public record Judgement(double below, double inside, double above, double provenInside, double provenOutside,
            Verdict mean, Verdict field) {

        /** Mean and field together: in tolerance only if both are, out of tolerance if either is. */
        public Verdict verdict() {
            return mean.and(field);
        }
    }

    /** Both limits, nm, and the usual share. */
    public static Tolerance between(double lower, double upper) {
        return new Tolerance(lower, upper, USUAL_SHARE);
    }

    /** A lower limit only, nm, and the usual share. */
    public static Tolerance atLeast(double lower) {
        return between(lower, Double.POSITIVE_INFINITY);
    }

    /** An upper limit only, nm, and the usual share. */
    public static Tolerance atMost(double upper) {
        return between(Double.NEGATIVE_INFINITY, upper);
    }

    /** The same limits with another share of pixels required within them, 0 to 1. */
    public Tolerance requiring(double share) {
        return new Tolerance(lower, upper, share);
    }

    /**
     * Verdict on one value.
     *
     * @param value nm; NaN gives {@link Verdict#UNDECIDED}
     * @param guard guard band, nm, not negative; usually the expanded uncertainty of the value
     */
    public Verdict verdict(double value, double guard) {
        checkGuard(guard);
        if (value >= lower + guard && value <= upper - guard) {
            return Verdict.PASS;
        }
        return value < lower - guard || value > upper + guard ? Verdict.FAIL : Verdict.UNDECIDED;
    }

    /**
     * Probability that the true value lies within the limits, for a reading with a normal distribution:
     * Phi((upper - x) / u) - Phi((lower - x) / u) (JCGM 106:2012, 7.3 and 7.4, from memory).
     *
     * @param value x, nm; NaN gives NaN
     * @param uncertainty standard uncertainty u, nm, positive
     * @return 0 to 1
     */
    public double conformance(double value, double uncertainty) {
        if (!(uncertainty > 0)) {
            throw new IllegalArgumentException("standard uncertainty " + uncertainty + " nm: give a positive one");
        }
        return Double.isNaN(value) ? Double.NaN
                : normal((upper - value) / uncertainty) - normal((lower - value) / uncertainty);
    }

    /**
     * Judges a map.
     *
     * @param distribution thickness of the pixels that were read
     * @param meanGuard guard band for the mean, nm: its expanded uncertainty, nearly all systematic
     * @param fieldGuard guard band for single pixels, nm: the expanded uncertainty of one reading
     */
    public Judgement judge(Distribution distribution, double meanGuard, double fieldGuard) {
        checkGuard(fieldGuard);
        double inside = distribution.shareWithin(lower, upper);
        double above = 1 - distribution.shareWithin(Double.NEGATIVE_INFINITY, upper);
        double provenInside = distribution.shareWithin(lower + fieldGuard, upper - fieldGuard);
        double perhapsInside = distribution.shareWithin(lower - fieldGuard, upper + fieldGuard);
        Verdict field = provenInside >= requiredShare ? Verdict.PASS
                : perhapsInside < requiredShare ? Verdict.FAIL : Verdict.UNDECIDED;
        return new Judgement(Math.max(0, 1 - inside - above), inside, above, provenInside, 1 - perhapsInside,
                verdict(distribution.mean(), meanGuard), field);
    }

    private static double normal(double z) {
        return Double.isInfinite(z) ? (z > 0 ? 1 : 0) : NORMAL.cumulativeProbability(z);
    }

    private static void checkGuard(double guard) {
        if (!(guard >= 0)) {
            throw new IllegalArgumentException("guard band " + guard + " nm: give one that is not negative");
        }
    }
}
