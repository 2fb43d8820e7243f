package iridepth.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * Round numbers along an axis: whole multiples of 1, 2 or 5 times a power of ten.
 *
 * @param step distance of two ticks
 * @param at   their values, rising, all within the axis
 */
record Ticks(double step, List<Double> at) {
    /** Ends of an axis may miss a round number by rounding. */
    private static final double HAIR = 1e-9;

    /**
     * Ticks of an axis.
     *
     * @param from lower end
     * @param to   upper end, above it
     * @param most how many ticks there may be at most, 2 or more
     */
    static Ticks of(double from, double to, int most) {
        double step = step((to - from) / most);
        List<Double> at = new ArrayList<>();
        for (long k = (long) Math.ceil(from / step - HAIR); k * step <= to + HAIR * step; k++) {
            at.add(k * step);
        }
        return new Ticks(step, List.copyOf(at));
    }

    /** The least of 1, 2, 5 times a power of ten that is not below a length above 0. */
    static double step(double least) {
        if (!(least > 0) || Double.isInfinite(least)) {
            throw new IllegalArgumentException("an axis must have a length above 0");
        }
        double power = Math.pow(10, Math.floor(Math.log10(least)));
        for (double factor : new double[] {1, 2, 5}) {
            if (factor * power >= least * (1 - HAIR)) {
                return factor * power;
            }
        }
        return 10 * power;
    }

    /** A tick's label, with as many decimals as the step needs. */
    String label(double value) {
        int decimals = Math.max(0, -(int) Math.floor(Math.log10(step) + HAIR));
        String text = String.format(Locale.ROOT, "%." + Math.min(decimals, 9) + "f", value);
        return text.matches("-0(\\.0*)?") ? text.substring(1) : text.replace('-', '\u2212');
    }
}
