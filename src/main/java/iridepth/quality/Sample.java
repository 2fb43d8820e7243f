package iridepth.quality;

import java.util.Arrays;

/** A handful of values without NaN; mean and deviations in two passes, so that a large common offset costs no digits. */
record Sample(double... values) {

    /** Arithmetic mean; NaN if empty. */
    double mean() {
        double rough = Arrays.stream(values).sum() / values.length;
        return rough + Arrays.stream(values).map(v -> v - rough).sum() / values.length;
    }

    /** Each value less the mean. */
    double[] deviations() {
        double mean = mean();
        return Arrays.stream(values).map(v -> v - mean).toArray();
    }

    /** Sum of the squared deviations from the mean. */
    double squares() {
        return Arrays.stream(deviations()).map(d -> d * d).sum();
    }

    /** Standard deviation with the divisor n - 1; NaN for fewer than two values. */
    double standardDeviation() {
        return values.length < 2 ? Double.NaN : Math.sqrt(squares() / (values.length - 1));
    }
}
