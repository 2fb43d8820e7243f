package iridepth.quality;

import java.util.Arrays;

/**
 * Analysis of variance of groups of values: how much of their scatter lies between the groups and how much within.
 * Sums are of squared deviations from the grand mean, and from the mean of each group.
 *
 * @param between between the groups, tested against {@code within}
 * @param within within the groups; its mean square is the pooled variance of repeated values
 */
public record OneWayAnova(VarianceSource between, VarianceSource within) {

    /**
     * Analyses groups, which need not be of one size.
     *
     * @param groups nm, at least one value each; one group alone gives {@code within} only, {@code between} holds NaN
     * @throws IllegalArgumentException if there is no group, an empty one, a NaN, or no group of at least two values
     */
    public static OneWayAnova of(double[]... groups) {
        double[] all = Arrays.stream(groups).flatMapToDouble(Arrays::stream).toArray();
        if (groups.length == 0 || Arrays.stream(groups).anyMatch(group -> group.length == 0)
                || all.length == groups.length || Arrays.stream(all).anyMatch(Double::isNaN)) {
            throw new IllegalArgumentException(groups.length + " groups with " + all.length
                    + " values: analysis of variance needs a value in each group, two in at least one, and no NaN");
        }
        double grand = new Sample(all).mean();
        double between = 0;
        double within = 0;
        for (double[] group : groups) {
            Sample sample = new Sample(group);
            double deviation = sample.mean() - grand;
            between += group.length * deviation * deviation;
            within += sample.squares();
        }
        VarianceSource error = VarianceSource.untested("within", all.length - groups.length, within);
        VarianceSource effect = VarianceSource.untested("between", groups.length - 1, between);
        return new OneWayAnova(groups.length == 1 ? effect : effect.against(error), error);
    }

    /** Standard deviation within the groups, nm. */
    public double residualStandardDeviation() {
        return Math.sqrt(within.meanSquare());
    }

    /** Share of the sum of squares that lies between the groups. */
    public double rSquared() {
        return between.sumOfSquares() / (between.sumOfSquares() + within.sumOfSquares());
    }
}
