package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * How badly a thickness explains one pixel: chi^2(d) = (v - s(d))^T C(d)^-1 (v - s(d)) with C = N + S, the noise that is
 * expected at s(d) and the covariance of the curve's systematic errors.
 *
 * <p>Twice the negative log likelihood of a Gaussian model is chi^2 + ln det C, up to a constant. A channel at the end of its
 * scale is censored: it counts only where the curve contradicts it. An object serves one pixel at a time and one thread:
 * {@link #load} a pixel, then ask.
 */
final class Misfit {
    private static final int SECTIONS = 32;
    private static final double GOLDEN = (Math.sqrt(5) - 1) / 2;

    private final ColourCurve curve;
    private final ExpectedNoise noise;
    private final int channels;
    private final double[] value;
    private final byte[] limit;
    private double light;
    private final double[] signal;
    private final double[] first;
    private final double[] second;
    private final double[] systematic;
    private final int[] active;
    private final double[] residual;
    private final double[] scratch;
    private final double[] covariance;
    private final Cholesky cholesky;
    private int count;
    private int measured;

    Misfit(ColourCurve curve, ExpectedNoise noise) {
        this.curve = curve;
        this.noise = noise;
        this.channels = curve.channels();
        this.value = new double[channels];
        this.limit = new byte[channels];
        this.signal = new double[channels];
        this.first = new double[channels];
        this.second = new double[channels];
        this.systematic = new double[channels * channels];
        this.active = new int[channels];
        this.residual = new double[channels];
        this.scratch = new double[channels];
        this.covariance = new double[channels * channels];
        this.cholesky = new Cholesky(channels);
    }

    /**
     * Takes a pixel.
     *
     * @param values  signals, interleaved by channel
     * @param limits  0 for a plain value, +1 for 'at least', -1 for 'at most'
     * @param pixel   which pixel of the arrays
     * @param itsLight light at the pixel over its mean in the picture
     */
    void load(float[] values, byte[] limits, int pixel, double itsLight) {
        for (int c = 0; c < channels; c++) {
            value[c] = values[pixel * channels + c];
            limit[c] = limits[pixel * channels + c];
        }
        light = itsLight;
    }

    /** Chi-square at a thickness. */
    double chiSquare(double thicknessNm) {
        curve.at(thicknessNm, signal, first, second);
        curve.covarianceAt(thicknessNm, systematic);
        count = 0;
        for (int c = 0; c < channels; c++) {
            if (limit[c] == 0) {
                activate(c);
            }
        }
        measured = count;
        for (int c = 0; c < channels; c++) {
            if (limit[c] * (value[c] - signal[c]) > 0) {
                activate(c);
            }
        }
        for (int i = 0; i < count; i++) {
            for (int j = 0; j < count; j++) {
                covariance[i * count + j] = systematic[active[i] * channels + active[j]];
            }
            covariance[i * count + i] += noise.variance(active[i], signal[active[i]], light);
        }
        cholesky.factor(covariance, count);
        return cholesky.quadratic(residual, scratch);
    }

    private void activate(int channel) {
        active[count] = channel;
        residual[count++] = value[channel] - signal[channel];
    }

    /** Chi-square + ln det C at a thickness, the determinant over the channels that are not censored. */
    double cost(double thicknessNm) {
        return chiSquare(thicknessNm) + cholesky.logDeterminant(measured);
    }

    /**
     * The minimum of chi-square in a bracket that holds one, by golden sections.
     *
     * @return its thickness, nm
     */
    double minimum(double lowNm, double highNm) {
        double low = lowNm;
        double high = highNm;
        double left = high - GOLDEN * (high - low);
        double right = low + GOLDEN * (high - low);
        double atLeft = chiSquare(left);
        double atRight = chiSquare(right);
        for (int i = 0; i < SECTIONS; i++) {
            if (atLeft <= atRight) {
                high = right;
                right = left;
                atRight = atLeft;
                left = high - GOLDEN * (high - low);
                atLeft = chiSquare(left);
            } else {
                low = left;
                left = right;
                atLeft = atRight;
                right = low + GOLDEN * (high - low);
                atRight = chiSquare(right);
            }
        }
        double middle = (low + high) / 2;
        double end = lowNm == curve.fromNm() ? lowNm : highNm;
        return chiSquare(end) <= chiSquare(middle) ? end : middle;
    }
}
