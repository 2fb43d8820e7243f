package iridepth.recipe;

import iridepth.calibration.StepSignal;
import iridepth.photo.SignalSource;
import java.util.Arrays;
import java.util.Locale;

/**
 * The pixels of a photo that were read as being of nearly one thickness.
 *
 * <p>Their mean signal leaves out pixels that stand out in a channel, such as those whose order was misread: more than a few
 * standard deviations from the median, by the noise or by the median absolute deviation, whichever is larger.
 */
final class FilmSlice {
    private static final double OUTLYING = 4;
    /** Standard deviation of a normal variable over its median absolute deviation. */
    private static final double NORMAL = 1.4826;
    private static final int FEWEST_PIXELS = 20;
    /** The thickness of a film counts as known to no better than this, so that a first calibration's error cannot set. */
    private static final double LEAST_UNCERTAINTY_NM = 3;
    private static final double SIGMAS = 3;

    private final double thicknessNm;
    private final int channels;
    private float[] values;
    private int count;
    private double combined;
    private double systematic;

    FilmSlice(double thicknessNm, int channels) {
        this.thicknessNm = thicknessNm;
        this.channels = channels;
        this.values = new float[64 * channels];
    }

    /** Adds a pixel: its signal, interleaved by channel, and the uncertainty of its reading, nm. */
    void add(float[] signal, int pixel, double random, double itsSystematic) {
        if ((count + 1) * channels > values.length) {
            values = Arrays.copyOf(values, 2 * values.length);
        }
        System.arraycopy(signal, pixel * channels, values, count * channels, channels);
        count++;
        combined += Math.hypot(random, itsSystematic);
        systematic += itsSystematic;
    }

    /** Whether there are enough pixels for a mean. */
    boolean counts() {
        return count >= FEWEST_PIXELS;
    }

    /** Mean systematic uncertainty of the readings, nm. */
    double systematicNm() {
        return systematic / count;
    }

    /** The slice as a film of roughly known thickness. */
    StepSignal film(SignalSource photo) {
        double[] middle = new double[channels];
        double[] reach = new double[channels];
        for (int c = 0; c < channels; c++) {
            int channel = c;
            double[] own = new double[count];
            Arrays.setAll(own, i -> values[i * channels + channel]);
            middle[c] = median(own);
            Arrays.setAll(own, i -> Math.abs(own[i] - middle[channel]));
            reach[c] = OUTLYING * Math.max(NORMAL * median(own), Math.sqrt(photo.variance(c, middle[c], 1)));
        }
        double[] mean = new double[channels];
        double[] square = new double[channels];
        int kept = 0;
        for (int i = 0; i < count; i++) {
            if (isNear(i, middle, reach)) {
                kept++;
                for (int c = 0; c < channels; c++) {
                    double off = values[i * channels + c] - middle[c];
                    mean[c] += off;
                    square[c] += off * off;
                }
            }
        }
        for (int c = 0; c < channels; c++) {
            mean[c] /= kept;
            square[c] = Math.max(0, square[c] / kept - mean[c] * mean[c]) / kept;
            mean[c] += middle[c];
        }
        return film(thicknessNm, combined / count, mean, square);
    }

    /**
     * A film of roughly known thickness.
     *
     * @param thicknessNm as read, nm
     * @param uncertainty standard uncertainty of that, nm
     * @param mean        mean signal
     * @param variance    of that mean
     */
    static StepSignal film(double thicknessNm, double uncertainty, double[] mean, double[] variance) {
        return new StepSignal(String.format(Locale.ROOT, "film of the photo of about %.0f nm", thicknessNm), thicknessNm,
                Math.max(LEAST_UNCERTAINTY_NM, SIGMAS * uncertainty), mean, variance, false);
    }

    private boolean isNear(int pixel, double[] middle, double[] reach) {
        for (int c = 0; c < channels; c++) {
            if (Math.abs(values[pixel * channels + c] - middle[c]) > reach[c]) {
                return false;
            }
        }
        return true;
    }

    private static double median(double[] values) {
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        return (sorted[(sorted.length - 1) / 2] + sorted[sorted.length / 2]) / 2;
    }
}
