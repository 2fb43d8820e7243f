package iridepth.quality;

import java.util.Arrays;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;

/** Pairs (x, y) of which both have a value, with the sums that straight lines through them need. */
record Pairs(Sample x, Sample y) {

    /**
     * The pairs without those in which x or y is NaN.
     *
     * @throws IllegalArgumentException if x and y differ in length, or fewer than {@code least} pairs are left
     */
    static Pairs of(double[] x, double[] y, int least) {
        if (x.length != y.length) {
            throw new IllegalArgumentException(
                    x.length + " values cannot be paired with " + y.length + ": give as many of each");
        }
        Pairs pairs = chosen(x, y, i -> !Double.isNaN(x[i]) && !Double.isNaN(y[i]));
        if (pairs.count() < least) {
            throw new IllegalArgumentException(pairs.count() + " of " + x.length
                    + " pairs have both values: at least " + least + " are needed");
        }
        return pairs;
    }

    private static Pairs chosen(double[] x, double[] y, IntPredicate choice) {
        int[] indices = IntStream.range(0, x.length).filter(choice).toArray();
        return new Pairs(new Sample(Arrays.stream(indices).mapToDouble(i -> x[i]).toArray()),
                new Sample(Arrays.stream(indices).mapToDouble(i -> y[i]).toArray()));
    }

    int count() {
        return x.values().length;
    }

    /** The same pairs but the i-th. */
    Pairs without(int i) {
        return chosen(x.values(), y.values(), j -> j != i);
    }

    /** Sum of (x - mean x) (y - mean y). */
    double products() {
        double[] dx = x.deviations();
        double[] dy = y.deviations();
        return IntStream.range(0, dx.length).mapToDouble(i -> dx[i] * dy[i]).sum();
    }

    /** Slope of y on x by least squares, with its standard error from the residuals (n - 2 degrees of freedom). */
    Estimate slope() {
        double[] dx = x.deviations();
        double[] dy = y.deviations();
        double sxx = x.squares();
        double slope = products() / sxx;
        double residuals = IntStream.range(0, dx.length).mapToDouble(i -> dy[i] - slope * dx[i]).map(r -> r * r).sum();
        return Estimate.of(slope, Math.sqrt(residuals / (count() - 2) / sxx), count() - 2);
    }
}
