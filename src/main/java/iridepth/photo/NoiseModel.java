package iridepth.photo;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;

/**
 * The photon-transfer model of EMVA Standard 1288 (release 4.0, section 2), per channel, in linear fractions of full scale:
 * variance(s) = read^2 + gain max(0, s - black) + slope^2 / 12, where s is the signal above the dark, gain = 1 / full
 * well in electrons, and the last term is the rounding to whole counts (slope = d(linear) / d(count)); for a JPEG, 1/12
 * grows by the rounding of its coefficients. Immutable.
 */
public final class NoiseModel {

    /** Variance of an error that is spread evenly over one count. */
    static final double ROUNDING = 1 / 12.0;

    private static final double NOTABLE_CORRELATION = 0.1;
    private static final double LARGEST_CORRELATION = 0.95;

    private final double[] readVariance;
    private final double[] gain;
    private final double[] black;
    private final double[] correlation;
    private final double[] countVariance;

    private NoiseModel(double[] readVariance, double[] gain, double[] black, double[] correlation, double[] countVariance) {
        this.readVariance = readVariance;
        this.gain = gain;
        this.black = black;
        this.correlation = correlation;
        this.countVariance = countVariance;
    }

    /**
     * A camera whose figures are known; serves any number of channels.
     *
     * @param readNoise noise without light in electrons, 0 or more
     * @param fullWell electrons at full scale, above 0
     * @return the model
     */
    public static NoiseModel of(double readNoise, double fullWell) {
        if (!(readNoise >= 0 && readNoise < fullWell && fullWell < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("a read noise of " + readNoise + " and a full well of " + fullWell
                    + " electrons are not possible: give 0 <= read noise < full well");
        }
        double read = readNoise / fullWell;
        return new NoiseModel(new double[] {read * read}, new double[] {1 / fullWell}, new double[1], new double[1],
                new double[] {ROUNDING});
    }

    /**
     * The model through a measured photon-transfer curve.
     *
     * @param curve from photos of one camera with one setting
     * @return the model, with as many channels as the curve
     */
    public static NoiseModel fit(PhotonTransfer curve) {
        int n = curve.channels();
        TransferFit[] fits = new TransferFit[n];
        Arrays.setAll(fits, c -> TransferFit.of(curve.points(c)));
        double[] correlation = new double[n];
        Arrays.setAll(correlation, curve::correlation);
        double[] rounding = new double[n];
        Arrays.setAll(rounding, curve::countVariance);
        return new NoiseModel(Arrays.stream(fits).mapToDouble(TransferFit::readVariance).toArray(),
                Arrays.stream(fits).mapToDouble(TransferFit::gain).toArray(),
                Arrays.stream(fits).mapToDouble(TransferFit::black).toArray(), correlation, rounding);
    }

    /**
     * The noise of any photo from itself: parts of it must be smooth, but need not be even.
     *
     * @param photo a photo, or a single flat
     * @param encoding how its counts stand for light
     * @param dark dark field, if there is one
     * @return the model
     * @throws PhotoException if too little of the photo is free of clipping
     */
    public static NoiseModel fromPhoto(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark) {
        return fit(PhotonTransfer.of(photo, encoding, dark));
    }

    /**
     * The noise from two or more flats taken with the same settings, by their differences; from a single flat as from
     * any photo.
     *
     * @param flats one or more flats
     * @param encoding how their counts stand for light
     * @param dark dark field, if there is one
     * @return the model
     * @throws PhotoException if the flats differ in kind or are clipped
     */
    public static NoiseModel fromFlats(List<PhotoFile> flats, Encoding encoding, Optional<ShadingField> dark) {
        if (flats.isEmpty()) {
            throw new IllegalArgumentException("no flat is given: give one or more");
        }
        if (flats.size() == 1) {
            return fromPhoto(flats.get(0), encoding, dark);
        }
        PhotonTransfer curve = PhotonTransfer.ofDifference(flats.get(0), flats.get(1), encoding, dark);
        for (int i = 2; i < flats.size(); i++) {
            curve = curve.and(PhotonTransfer.ofDifference(flats.get(i - 1), flats.get(i), encoding, dark));
        }
        return fit(curve);
    }

    /** The noise of photos that are read jointly: the channels of one behind those of the other. */
    static NoiseModel jointly(List<NoiseModel> models, int[] channels) {
        return new NoiseModel(joined(models, channels, m -> m.readVariance), joined(models, channels, m -> m.gain),
                joined(models, channels, m -> m.black), joined(models, channels, m -> m.correlation),
                joined(models, channels, m -> m.countVariance));
    }

    private static double[] joined(List<NoiseModel> models, int[] channels, Function<NoiseModel, double[]> figure) {
        double[] all = new double[Arrays.stream(channels).sum()];
        for (int m = 0, at = 0; m < channels.length; m++) {
            for (int c = 0; c < channels[m]; c++) {
                all[at++] = of(figure.apply(models.get(m)), c);
            }
        }
        return all;
    }

    private static double of(double[] values, int channel) {
        return values[values.length == 1 ? 0 : channel];
    }

    /**
     * Variance without the rounding.
     *
     * @param channel 0 and up
     * @param signal linear signal above the dark
     * @return variance, a squared linear fraction
     */
    public double variance(int channel, double signal) {
        return of(readVariance, channel) + of(gain, channel) * Math.max(0, signal - of(black, channel));
    }

    /**
     * Variance with the rounding to counts.
     *
     * @param channel 0 and up
     * @param signal linear signal above the dark
     * @param slope d(linear) / d(count) there
     * @return variance, a squared linear fraction, above 0
     */
    public double variance(int channel, double signal, double slope) {
        return variance(channel, signal) + slope * slope * of(countVariance, channel);
    }

    /**
     * @param channel 0 and up
     * @return noise without light, a linear fraction of full scale
     */
    public double readNoise(int channel) {
        return Math.sqrt(of(readVariance, channel));
    }

    /**
     * @param channel 0 and up
     * @return growth of the variance with the signal, the reciprocal of the full well in electrons
     */
    public double gain(int channel) {
        return of(gain, channel);
    }

    /**
     * @param channel 0 and up
     * @return the signal at which photon noise begins: above 0 where a pedestal shows that no dark frame has taken away
     */
    public double black(int channel) {
        return of(black, channel);
    }

    /**
     * @param channel 0 and up
     * @return correlation of the noise of neighbouring pixels, mean of across and down: 0 for a plain sensor, above where
     *     demosaicing, JPEG or noise reduction has mixed pixels, so that averages gain less than the root of their number
     */
    public double correlation(int channel) {
        return of(correlation, channel);
    }

    /**
     * Whether the noise of neighbouring pixels hangs together, by JPEG, demosaicing or noise reduction: then the mean of n
     * pixels is less sure than sigma / sqrt(n).
     *
     * @return true if so in any channel
     */
    public boolean correlated() {
        return Arrays.stream(correlation).anyMatch(r -> Math.abs(r) > NOTABLE_CORRELATION)
                || Arrays.stream(countVariance).anyMatch(v -> v > ROUNDING);
    }

    /**
     * How many neighbouring pixels share one random error: ((1 + r) / (1 - r))^2 with r the largest correlation of neighbours,
     * which is what the mean of a large area loses where correlation falls off geometrically along x and y (the variance of the
     * mean of a first-order autoregressive series, in each direction).
     *
     * @return 1 for a plain sensor, more where pixels hang together
     */
    public double correlatedPixels() {
        double r = Math.min(LARGEST_CORRELATION, Arrays.stream(correlation).map(v -> Math.max(0, v)).max().orElse(0));
        return Math.pow((1 + r) / (1 - r), 2);
    }

    /**
     * @param channel 0 and up
     * @return variance of the counts by rounding, squared counts: 1/12, and for a JPEG the error of its coefficients
     */
    public double countVariance(int channel) {
        return of(countVariance, channel);
    }

    /** @return read noise, full well and correlation of each channel on one line */
    @Override
    public String toString() {
        StringBuilder text = new StringBuilder();
        for (int c = 0; c < readVariance.length; c++) {
            text.append(String.format(java.util.Locale.ROOT, "%s read noise %.3g, full well %.4g e, correlation %.2f",
                    c == 0 ? "" : ";", readNoise(c), 1 / gain[c], correlation[c]));
        }
        return text.toString().strip();
    }

    /** @return number of channels described, 1 where one serves all */
    public int channels() {
        return Arrays.stream(new int[] {readVariance.length, gain.length, black.length}).max().orElse(1);
    }
}
