package iridepth.simulation;

import java.util.stream.IntStream;

/**
 * The signals s_c(d) of a film as a function of its thickness: cubic Hermite pieces between nodes 1 nm apart, with
 * slopes from fourth-order differences. The error, largest for the finest
 * fringes, is 2e-7 of full reflectance at most in the rigs of {@link Rigs}.
 */
public final class SignalCurve {
    private static final int MARGIN = 2;
    private final double from;
    private final double[][] values;
    private final double[][] slopes;

    private SignalCurve(double from, double[][] values) {
        this.from = from;
        this.values = values;
        this.slopes = new double[values.length][values[0].length];
        for (int c = 0; c < values.length; c++) {
            double[] v = values[c];
            for (int i = MARGIN; i < v.length - MARGIN; i++) {
                slopes[c][i] = (v[i - 2] - 8 * v[i - 1] + 8 * v[i + 1] - v[i + 2]) / 12;
            }
        }
    }

    /**
     * The curve of a film over a range of thickness.
     *
     * @param stack what reflects; without a film the curve is constant
     * @param view directions of the light
     * @param responses effective responses, one row per channel
     * @param from smallest thickness, nm
     * @param to largest thickness, nm
     */
    public static SignalCurve of(FilmStack stack, View view, double[][] responses, double from, double to) {
        int count = (int) Math.ceil(to - from) + 1 + 2 * MARGIN;
        double[][] r = FilmReflectance.of(stack, view, from - MARGIN, 1, count).values();
        double[][] values = IntStream.range(0, responses.length).mapToObj(c -> {
            double[] sum = new double[count];
            for (int i = 0; i < r.length; i++) {
                for (int d = 0; d < count; d++) {
                    sum[d] += responses[c][i] * r[i][d];
                }
            }
            return sum;
        }).toArray(double[][]::new);
        return new SignalCurve(from, values);
    }

    /** Signal of a channel at a thickness in nm. */
    public double signal(int channel, double thickness) {
        int i = node(thickness);
        double t = place(thickness) - i;
        double a = values[channel][i];
        double b = values[channel][i + 1];
        double p = slopes[channel][i];
        double q = slopes[channel][i + 1];
        return a + t * (p + t * (3 * (b - a) - 2 * p - q + t * (2 * (a - b) + p + q)));
    }

    /** Slope of a channel's signal per nm of thickness. */
    public double slope(int channel, double thickness) {
        int i = node(thickness);
        double t = place(thickness) - i;
        double rise = values[channel][i + 1] - values[channel][i];
        double p = slopes[channel][i];
        double q = slopes[channel][i + 1];
        return p + t * (2 * (3 * rise - 2 * p - q) + 3 * t * (p + q - 2 * rise));
    }

    private double place(double thickness) {
        return thickness - from + MARGIN;
    }

    private int node(double thickness) {
        double place = place(thickness);
        int last = values[0].length - 1 - MARGIN;
        if (!(place >= MARGIN - 1e-9 && place <= last + 1e-9)) {
            throw new IllegalArgumentException("thickness " + thickness + " nm lies outside the curve, which runs from "
                    + from + " nm to " + (from + last - MARGIN) + " nm");
        }
        return Math.max(MARGIN, Math.min((int) place, last - 1));
    }
}
