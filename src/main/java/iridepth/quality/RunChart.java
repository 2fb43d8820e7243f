package iridepth.quality;

import java.util.Arrays;

/**
 * Values in the order in which they came, with the limits within which they vary by chance: the chart for individuals and moving
 * range of Shewhart (ISO 7870-2). With MR the mean of the absolute differences of successive values, the limits are
 * mean +- 3 MR / d2, and d2 = 1.128 is the mean range of two normal values in units of their standard deviation.
 *
 * <p>Control limits say what the process does, a tolerance what it should do; neither follows from the other. They mean little
 * for fewer than about twenty values (common practice).
 *
 * @param values in order; NaN is 'no value' and is passed over, so that its neighbours are successive
 * @param mean centre line; NaN if there is no value
 * @param lower lower control limit; NaN for fewer than two values
 * @param upper upper control limit; NaN for fewer than two values
 */
public record RunChart(double[] values, double mean, double lower, double upper) {

    /** 2 / sqrt(pi) = 1.1284: expected range of two standard normal values. */
    private static final double D2 = 2 / Math.sqrt(Math.PI);

    /** The chart of some values. */
    public static RunChart of(double... values) {
        double[] present = Arrays.stream(values).filter(v -> !Double.isNaN(v)).toArray();
        double mean = Arrays.stream(present).average().orElse(Double.NaN);
        double ranges = 0;
        for (int i = 1; i < present.length; i++) {
            ranges += Math.abs(present[i] - present[i - 1]);
        }
        double reach = present.length < 2 ? Double.NaN : 3 / D2 * ranges / (present.length - 1);
        return new RunChart(values.clone(), mean, mean - reach, mean + reach);
    }

    /** Whether a value lies beyond the limits. */
    public boolean isBeyond(int i) {
        return values[i] < lower || values[i] > upper;
    }
}
