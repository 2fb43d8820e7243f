package iridepth.quality;

import java.util.stream.IntStream;

/**
 * The straight line y = intercept + slope x through pairs that both carry error, for a known ratio
 * delta = (error variance of y) / (error variance of x):
 * slope = (w + sqrt(w^2 + 4 delta Sxy^2)) / (2 Sxy) with w = Syy - delta Sxx (Deming, Statistical Adjustment of Data, 1943).
 * With delta = 1 it is the orthogonal regression of Pearson (1901). Standard errors are by the jackknife and intervals by
 * Student's t with n - 2 degrees of freedom, as Linnet advises (Clinical Chemistry 39, 424-432, 1993).
 *
 * @param pairs number of pairs in which both values are present
 * @param varianceRatio delta, dimensionless
 * @param slope dimensionless; 1 for instruments on one scale
 * @param intercept nm; 0 for instruments with one zero
 */
public record DemingRegression(int pairs, double varianceRatio, Estimate slope, Estimate intercept) {

    /**
     * Fits the line.
     *
     * @param x nm, for instance the reference
     * @param y nm, as many; a pair in which either is NaN is skipped
     * @param varianceRatio error variance of y over error variance of x, positive; 1 where both are about as good
     * @throws IllegalArgumentException if the lengths differ, fewer than three pairs are left, the ratio is not positive and
     *     finite, or x and y do not vary together, which leaves the slope open
     */
    public static DemingRegression fit(double[] x, double[] y, double varianceRatio) {
        if (!(varianceRatio > 0 && varianceRatio < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    "ratio of error variances " + varianceRatio + ": give a positive finite number");
        }
        Pairs pairs = Pairs.of(x, y, 3);
        int n = pairs.count();
        double slope = slope(pairs, varianceRatio);
        if (!Double.isFinite(slope)) {
            throw new IllegalArgumentException(n + " pairs do not vary together, which leaves the slope of the line open:"
                    + " give points over a wider range of thickness");
        }
        double[] slopes = new double[n];
        double[] intercepts = new double[n];
        for (int i = 0; i < n; i++) {
            Pairs rest = pairs.without(i);
            slopes[i] = slope(rest, varianceRatio);
            intercepts[i] = intercept(rest, slopes[i]);
        }
        return new DemingRegression(n, varianceRatio, jackknife(slope, slopes),
                jackknife(intercept(pairs, slope), intercepts));
    }

    /** The line at x. */
    public double at(double x) {
        return intercept.value() + slope.value() * x;
    }

    private static double slope(Pairs pairs, double delta) {
        double sxy = pairs.products();
        double w = pairs.y().squares() - delta * pairs.x().squares();
        double root = Math.hypot(w, 2 * Math.sqrt(delta) * sxy);
        // Two forms of one root: each subtracts nothing where it is used.
        return w > 0 ? (w + root) / (2 * sxy) : 2 * delta * sxy / (root - w);
    }

    private static double intercept(Pairs pairs, double slope) {
        return pairs.y().mean() - slope * pairs.x().mean();
    }

    private static Estimate jackknife(double whole, double[] leftOneOut) {
        int n = leftOneOut.length;
        double[] pseudoValues = IntStream.range(0, n).mapToDouble(i -> n * whole - (n - 1) * leftOneOut[i]).toArray();
        return Estimate.of(whole, new Sample(pseudoValues).standardDeviation() / Math.sqrt(n), n - 2);
    }
}
