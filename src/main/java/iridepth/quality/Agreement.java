package iridepth.quality;

import java.util.stream.IntStream;

/**
 * How well readings agree with those of a reference instrument at the same places, by the method of Bland and Altman
 * (Statistical methods for assessing agreement between two methods of clinical measurement, The Lancet 327, 307-310, 1986).
 *
 * <p>With d the differences reading - reference of n pairs, all in nm:
 * bias = mean d, with standard error s / sqrt(n); s = standard deviation of d; limits of agreement = bias -+ 2 s, each with
 * standard error sqrt(3 s^2 / n). About 95 % of further differences lie between the limits, if d is about normal and does not
 * depend on the thickness. Whether it does, the proportional bias tells: the slope of d on (reading + reference) / 2, which
 * is near 0 where the bias is the same everywhere. All intervals are 95 %, by Student's t.
 *
 * @param pairs number n of pairs in which both values are present
 * @param bias mean difference, nm
 * @param standardDeviation of the differences, nm; NaN for one pair
 * @param lowerLimit lower limit of agreement, nm
 * @param upperLimit upper limit of agreement, nm
 * @param proportionalBias slope of the differences on the means, nm per nm; its errors are NaN for two pairs, all of it for one
 */
public record Agreement(int pairs, Estimate bias, double standardDeviation, Estimate lowerLimit, Estimate upperLimit,
        Estimate proportionalBias) {

    /** Standard deviations from the bias to either limit, as in the paper of 1986. */
    private static final double REACH = 2;

    /**
     * Compares readings with references.
     *
     * @param readings nm
     * @param references nm, as many; a pair in which either is NaN is skipped
     * @throws IllegalArgumentException if the lengths differ or no pair is left
     */
    public static Agreement of(double[] readings, double[] references) {
        Pairs pairs = Pairs.of(readings, references, 1);
        int n = pairs.count();
        double[] x = pairs.x().values();
        double[] y = pairs.y().values();
        Sample differences = new Sample(IntStream.range(0, n).mapToDouble(i -> x[i] - y[i]).toArray());
        Sample means = new Sample(IntStream.range(0, n).mapToDouble(i -> (x[i] + y[i]) / 2).toArray());
        double bias = differences.mean();
        double s = differences.standardDeviation();
        double errorOfLimit = Math.sqrt(3 * s * s / n);
        return new Agreement(n, Estimate.of(bias, s / Math.sqrt(n), n - 1), s,
                Estimate.of(bias - REACH * s, errorOfLimit, n - 1), Estimate.of(bias + REACH * s, errorOfLimit, n - 1),
                new Pairs(means, differences).slope());
    }

    /** Root mean square of the differences about zero, nm: bias and scatter in one number. */
    public double rootMeanSquare() {
        double scatter = pairs < 2 ? 0 : standardDeviation * standardDeviation * (pairs - 1) / pairs;
        return Math.sqrt(bias.value() * bias.value() + scatter);
    }
}
