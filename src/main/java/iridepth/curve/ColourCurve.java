package iridepth.curve;

import iridepth.optics.Reflectance;
import iridepth.spectrum.Grid;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * The expected signal of every channel as a function of film thickness, s_c(d) = sum over wavelength of E_c R(d): a curve in
 * channel space, sampled evenly, with its derivative and the covariance of its systematic errors. Immutable.
 *
 * <p>Between samples the signal is the cubic Hermite interpolant of signal and exact derivative.
 */
public final class ColourCurve {
    private final List<String> channels;
    private final double fromNm;
    private final double stepNm;
    private final int size;
    /** [sample * channels + channel]. */
    private final double[] signal;
    private final double[] slope;
    /** [(sample * channels + row) * channels + column], or empty where nothing systematic is known. */
    private final double[] covariance;

    private ColourCurve(List<String> channels, double fromNm, double stepNm, int size, double[] signal, double[] slope,
                        double[] covariance) {
        this.channels = channels;
        this.fromNm = fromNm;
        this.stepNm = stepNm;
        this.size = size;
        this.signal = signal;
        this.slope = slope;
        this.covariance = covariance;
    }

    /**
     * Computes a curve without systematic errors.
     *
     * @param responses   what the channels integrate
     * @param reflectance the stack's reflectance
     * @param range       thicknesses
     * @param stepNm      spacing of the samples in nm; a whole number of steps spans the range
     */
    public static ColourCurve of(EffectiveResponses responses, Reflectance reflectance, ThicknessRange range, double stepNm) {
        int size = (int) Math.round((range.toNm() - range.fromNm()) / stepNm) + 1;
        int count = responses.count();
        double[][] r = new double[Grid.SIZE][size];
        double[][] dr = new double[Grid.SIZE][size];
        IntStream.range(0, Grid.SIZE).parallel().forEach(i -> reflectance.sweep(i, range.fromNm(), stepNm, r[i], dr[i]));
        double[] signal = new double[size * count];
        double[] slope = new double[size * count];
        for (int c = 0; c < count; c++) {
            for (int i = 0; i < Grid.SIZE; i++) {
                double e = responses.response().get(c).at(i);
                for (int k = 0; k < size; k++) {
                    signal[k * count + c] += e * r[i][k];
                    slope[k * count + c] += e * dr[i][k];
                }
            }
        }
        return new ColourCurve(responses.channels(), range.fromNm(), stepNm, size, signal, slope, new double[0]);
    }

    /**
     * This curve with some of its channels.
     *
     * @param chosen which channels, in the new order
     * @throws IndexOutOfBoundsException if there is no such channel
     */
    public ColourCurve select(int... chosen) {
        int count = chosen.length;
        double[] itsSignal = new double[size * count];
        double[] itsSlope = new double[size * count];
        double[] itsCovariance = new double[covariance.length == 0 ? 0 : size * count * count];
        for (int k = 0; k < size; k++) {
            for (int i = 0; i < count; i++) {
                itsSignal[k * count + i] = signal(k, chosen[i]);
                itsSlope[k * count + i] = slope(k, chosen[i]);
                for (int j = 0; j < count && itsCovariance.length > 0; j++) {
                    itsCovariance[(k * count + i) * count + j] = covariance(k, chosen[i], chosen[j]);
                }
            }
        }
        List<String> names = Arrays.stream(chosen).mapToObj(channels::get).toList();
        return new ColourCurve(names, fromNm, stepNm, size, itsSignal, itsSlope, itsCovariance);
    }

    /**
     * This curve with the covariance of its systematic errors.
     *
     * @param covariance [(sample * channels + row) * channels + column], symmetric and not negative definite; copied
     * @throws IllegalArgumentException if it has another length
     */
    public ColourCurve withCovariance(double[] covariance) {
        if (covariance.length != size * channels() * channels()) {
            throw new IllegalArgumentException("a covariance of " + size + " samples and " + channels() + " channels has "
                    + size * channels() * channels() + " values, not " + covariance.length);
        }
        return new ColourCurve(channels, fromNm, stepNm, size, signal, slope, covariance.clone());
    }

    /** This curve with a constant added to every channel, such as veiling glare, one value per channel. */
    public ColourCurve plus(double[] offset) {
        double[] raised = signal.clone();
        for (int j = 0; j < raised.length; j++) {
            raised[j] += offset[j % channels()];
        }
        return new ColourCurve(channels, fromNm, stepNm, size, raised, slope, covariance);
    }

    /** Names of the channels. */
    public List<String> channelNames() {
        return channels;
    }

    /** Number of channels. */
    public int channels() {
        return channels.size();
    }

    /** Number of samples. */
    public int size() {
        return size;
    }

    /** Spacing of the samples, nm. */
    public double stepNm() {
        return stepNm;
    }

    /** First thickness, nm. */
    public double fromNm() {
        return fromNm;
    }

    /** Last thickness, nm. */
    public double toNm() {
        return fromNm + stepNm * (size - 1);
    }

    /** Thickness of a sample, nm. */
    public double thickness(int sample) {
        return fromNm + stepNm * sample;
    }

    /** Signal of a channel at a sample. */
    public double signal(int sample, int channel) {
        return signal[sample * channels() + channel];
    }

    /** Derivative of a channel's signal at a sample, 1/nm. */
    public double slope(int sample, int channel) {
        return slope[sample * channels() + channel];
    }

    /** Whether systematic errors are known. */
    public boolean hasCovariance() {
        return covariance.length > 0;
    }

    /** Covariance of the systematic errors of two channels at a sample; 0 where none is known. */
    public double covariance(int sample, int row, int column) {
        return covariance.length == 0 ? 0 : covariance[(sample * channels() + row) * channels() + column];
    }

    /**
     * The curve at a thickness between the samples; outside the range the end of the range.
     *
     * @param thicknessNm thickness, nm
     * @param value       receives the signal of every channel
     * @param first       receives the first derivative, 1/nm
     * @param second      receives the second derivative, 1/nm^2
     */
    public void at(double thicknessNm, double[] value, double[] first, double[] second) {
        double place = Math.min(Math.max((thicknessNm - fromNm) / stepNm, 0), size - 1.0);
        int k = Math.min((int) place, size - 2);
        double t = place - k;
        int count = channels();
        for (int c = 0; c < count; c++) {
            double p0 = signal[k * count + c];
            double p1 = signal[(k + 1) * count + c];
            double m0 = slope[k * count + c] * stepNm;
            double m1 = slope[(k + 1) * count + c] * stepNm;
            double a = 2 * (p0 - p1) + m0 + m1;
            double b = 3 * (p1 - p0) - 2 * m0 - m1;
            value[c] = p0 + t * (m0 + t * (b + t * a));
            first[c] = (m0 + t * (2 * b + 3 * t * a)) / stepNm;
            second[c] = (2 * b + 6 * t * a) / (stepNm * stepNm);
        }
    }

    /**
     * Covariance of the systematic errors between the samples, linear.
     *
     * @param thicknessNm thickness, nm
     * @param matrix      receives channels x channels values by rows; zeros where none is known
     */
    public void covarianceAt(double thicknessNm, double[] matrix) {
        if (covariance.length == 0) {
            Arrays.fill(matrix, 0, channels() * channels(), 0);
            return;
        }
        double place = Math.min(Math.max((thicknessNm - fromNm) / stepNm, 0), size - 1.0);
        int k = Math.min((int) place, size - 2);
        double t = place - k;
        int block = channels() * channels();
        for (int j = 0; j < block; j++) {
            matrix[j] = (1 - t) * covariance[k * block + j] + t * covariance[(k + 1) * block + j];
        }
    }
}
