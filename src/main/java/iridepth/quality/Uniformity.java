package iridepth.quality;

import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleUnaryOperator;

/**
 * How even a film is: the usual location and spread of its thickness, all in nm.
 *
 * <p>For an empty set every number is NaN; for one value the standard deviation is. The ratios in per cent are in
 * {@link NonUniformity}.
 *
 * @param count number of values; NaN is not counted
 * @param mean arithmetic mean
 * @param median the 50 % percentile
 * @param standardDeviation with the divisor n - 1; it holds the noise of the reading as well as the film's own spread
 * @param min least value
 * @param max greatest value
 * @param percentiles at {@link #PERCENTS}, in rising order
 */
public record Uniformity(long count, double mean, double median, double standardDeviation, double min, double max,
        List<Percentile> percentiles) {

    /** The percentages at which percentiles are given. */
    public static final List<Double> PERCENTS = List.of(0.1, 1.0, 5.0, 25.0, 75.0, 95.0, 99.0, 99.9);

    /**
     * The value below which a percentage of all values lies.
     *
     * @param percent 0 to 100
     * @param value nm
     */
    public record Percentile(double percent, double value) {
    }

    public Uniformity {
        percentiles = List.copyOf(percentiles);
    }

    /** Uniformity of a map, from its distribution: percentiles within 0.05 nm, the rest exact. */
    public static Uniformity of(Distribution distribution) {
        return new Uniformity(distribution.count(), distribution.mean(), distribution.percentile(50),
                distribution.standardDeviation(), distribution.min(), distribution.max(),
                percentiles(distribution::percentile));
    }

    /**
     * Uniformity of a few values, such as sites on a wafer; percentiles by the same definition as
     * {@link Distribution#percentile}, without its bins.
     *
     * @param values nm; NaN is skipped
     */
    public static Uniformity of(double... values) {
        double[] sorted = Arrays.stream(values).filter(v -> !Double.isNaN(v)).sorted().toArray();
        int n = sorted.length;
        Sample sample = new Sample(sorted);
        return new Uniformity(n, sample.mean(), percentile(sorted, 50), sample.standardDeviation(),
                n == 0 ? Double.NaN : sorted[0], n == 0 ? Double.NaN : sorted[n - 1],
                percentiles(percent -> percentile(sorted, percent)));
    }

    /**
     * The percentile at one of {@link #PERCENTS}, nm.
     *
     * @throws IllegalArgumentException for any other percentage
     */
    public double percentile(double percent) {
        return percentiles.stream().filter(p -> p.percent() == percent).findFirst()
                .orElseThrow(() -> new IllegalArgumentException(
                        "percentile " + percent + " is not kept: choose one of " + PERCENTS))
                .value();
    }

    private static List<Percentile> percentiles(DoubleUnaryOperator percentile) {
        return PERCENTS.stream().map(p -> new Percentile(p, percentile.applyAsDouble(p))).toList();
    }

    private static double percentile(double[] sorted, double percent) {
        if (sorted.length == 0) {
            return Double.NaN;
        }
        double position = (sorted.length - 1) * (percent / 100);
        int rank = (int) position;
        double next = sorted[Math.min(rank + 1, sorted.length - 1)];
        return sorted[rank] + (position - rank) * (next - sorted[rank]);
    }
}
