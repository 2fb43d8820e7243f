package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * How badly a thickness explains one pixel: chi^2(d) = (v - s(d))^T C(d)^-1 (v - s(d)) with C = noise + calibration covariance.
 *
 * <p>Twice the negative log likelihood of a Gaussian model is chi^2 + ln det C; {@link #cost} gives that less the part that
 * does not depend on thickness. A channel at the end of its scale is censored: it counts only where the curve contradicts it.
 * An object serves one pixel at a time and one thread: {@link #load} a pixel, then ask.
 */
final class Misfit {
    private static final int NEWTON_STEPS = 6;
    private static final double CONVERGED_NM = 1e-4;

    private final ColourCurve curve;
    private final int channels;
    private final double[] value;
    private final double[] variance;
    private final byte[] limit;
    private final double[] signal;
    private final double[] first;
    private final double[] second;
    private final double[] systematic;
    private final int[] active;
    private final double[] residual;
    private final double[] solved;
    private final double[] factor;
    private final double[] column;
    private int count;
    private double logDeterminant;

    Misfit(ColourCurve curve) {
        this.curve = curve;
        this.channels = curve.channels();
        this.value = new double[channels];
        this.variance = new double[channels];
        this.limit = new byte[channels];
        this.signal = new double[channels];
        this.first = new double[channels];
        this.second = new double[channels];
        this.systematic = new double[channels * channels];
        this.active = new int[channels];
        this.residual = new double[channels];
        this.solved = new double[channels];
        this.factor = new double[channels * channels];
        this.column = new double[channels];
    }

    /**
     * Takes a pixel.
     *
     * @param values    signals, interleaved by channel
     * @param variances their noise variances
     * @param limits    0 for a plain value, +1 for 'at least', -1 for 'at most'
     * @param pixel     which pixel of the arrays
     */
    void load(float[] values, float[] variances, byte[] limits, int pixel) {
        for (int c = 0; c < channels; c++) {
            value[c] = values[pixel * channels + c];
            variance[c] = variances[pixel * channels + c];
            limit[c] = limits[pixel * channels + c];
        }
    }

    /** Chi-square at a thickness. */
    double chiSquare(double thicknessNm) {
        curve.at(thicknessNm, signal, first, second);
        curve.covarianceAt(thicknessNm, systematic);
        return solve();
    }

    /** Chi-square plus ln det C at a thickness, less ln of the product of the noise variances. */
    double cost(double thicknessNm) {
        return chiSquare(thicknessNm) + logDeterminant;
    }

    /** Chi-square at a sample of the curve, without interpolation. */
    double atSample(int sample) {
        for (int c = 0; c < channels; c++) {
            signal[c] = curve.signal(sample, c);
        }
        if (curve.hasCovariance()) {
            for (int j = 0; j < systematic.length; j++) {
                systematic[j] = curve.covariance(sample, j / channels, j % channels);
            }
        }
        return solve();
    }

    /** Chooses the channels that count, factors their covariance (Cholesky) and returns chi-square. */
    private double solve() {
        count = 0;
        for (int c = 0; c < channels; c++) {
            double r = value[c] - signal[c];
            if (limit[c] == 0 || limit[c] > 0 && r > 0 || limit[c] < 0 && r < 0) {
                active[count] = c;
                residual[count++] = r;
            }
        }
        logDeterminant = 0;
        double chiSquare = 0;
        for (int i = 0; i < count; i++) {
            double r = residual[i];
            for (int j = 0; j <= i; j++) {
                double sum = systematic[active[i] * channels + active[j]] + (i == j ? variance[active[i]] : 0);
                for (int k = 0; k < j; k++) {
                    sum -= factor[i * channels + k] * factor[j * channels + k];
                }
                factor[i * channels + j] = i == j ? Math.sqrt(sum) : sum / factor[j * channels + j];
                if (j < i) {
                    r -= factor[i * channels + j] * solved[j];
                }
            }
            solved[i] = r / factor[i * channels + i];
            chiSquare += solved[i] * solved[i];
            double diagonal = factor[i * channels + i];
            logDeterminant += Math.log(diagonal * diagonal / variance[active[i]]);
        }
        return chiSquare;
    }

    /** Solves L x = b for the factored covariance, b given by channel. */
    private void forward(double[] b, double[] x) {
        for (int i = 0; i < count; i++) {
            double sum = b[active[i]];
            for (int k = 0; k < i; k++) {
                sum -= factor[i * channels + k] * x[k];
            }
            x[i] = sum / factor[i * channels + i];
        }
    }

    /**
     * The minimum of chi-square near a thickness, by Gauss-Newton steps kept inside a bracket.
     *
     * @return its thickness, nm
     */
    double refine(double startNm, double lowNm, double highNm) {
        double d = startNm;
        for (int step = 0; step < NEWTON_STEPS; step++) {
            chiSquare(d);
            forward(first, column);
            double gradient = 0;
            double curvature = 0;
            for (int i = 0; i < count; i++) {
                gradient += column[i] * solved[i];
                curvature += column[i] * column[i];
            }
            if (!(curvature > 0)) {
                return d;
            }
            double next = Math.min(Math.max(d + gradient / curvature, lowNm), highNm);
            if (Math.abs(next - d) < CONVERGED_NM) {
                return next;
            }
            d = next;
        }
        return d;
    }

    /**
     * Standard uncertainty of a thickness read from this pixel.
     *
     * <p>The reading is the generalised least-squares estimate d = a^T v with a = C^-1 s' / (s'^T C^-1 s'), so its random part
     * is a^T N a with N the noise and its systematic part a^T S a (JCGM 100, 5.1). Where the curve turns back on itself s'
     * vanishes; there the half-width at which chi-square rises by 1 to second order, A x + B x^2 = 1 with x = u^2,
     * A = s'^T C^-1 s' and B = s''^T C^-1 s'' / 4, takes the place of 1 / A.
     *
     * @param thicknessNm the reading
     * @param result      receives the random and the systematic standard uncertainty, nm
     */
    void uncertainty(double thicknessNm, double[] result) {
        chiSquare(thicknessNm);
        forward(second, column);
        double bend = 0;
        for (int i = 0; i < count; i++) {
            bend += column[i] * column[i] / 4;
        }
        forward(first, column);
        double information = 0;
        for (int i = 0; i < count; i++) {
            information += column[i] * column[i];
        }
        double total = 2 / (information + Math.sqrt(information * information + 4 * bend));
        double share = information > 0 ? systematicShare(information) : 0;
        result[0] = Math.sqrt(total * (1 - share));
        result[1] = Math.sqrt(total * share);
    }

    /** Share of the systematic part in the variance of the estimate, 0 to 1. */
    private double systematicShare(double information) {
        // Back substitution: w = C^-1 s' = L^-T (L^-1 s').
        for (int i = count - 1; i >= 0; i--) {
            double sum = column[i];
            for (int k = i + 1; k < count; k++) {
                sum -= factor[k * channels + i] * solved[k];
            }
            solved[i] = sum / factor[i * channels + i];
        }
        double random = 0;
        for (int i = 0; i < count; i++) {
            random += solved[i] * solved[i] * variance[active[i]];
        }
        return Math.min(1, Math.max(0, 1 - random / information));
    }
}
