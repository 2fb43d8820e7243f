package iridepth.photo;

import java.util.Arrays;
import java.util.Optional;

/**
 * A photo as linear signal: value = linear(count) - dark, divided by the flat where there is one, with its variance by
 * the noise model and its censoring at the ends of the scale. Rows may be asked for from several threads.
 */
public final class SignalSource {

    private final PhotoFile photo;
    private final Encoding encoding;
    private final Optional<ShadingField> dark;
    private final Optional<ShadingField> flat;
    private final NoiseModel noise;
    private final int[] saturation;

    private SignalSource(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark, Optional<ShadingField> flat,
            NoiseModel noise) {
        this.photo = photo;
        this.encoding = encoding;
        this.dark = dark;
        this.flat = flat;
        this.noise = noise;
        this.saturation = Saturation.of(photo, encoding);
    }

    /**
     * @param photo the open photo; stays the caller's to close
     * @param encoding how its counts stand for light
     * @param dark field of a dark frame
     * @param flat field of a flat frame above that dark
     * @param noise noise of a pixel, in linear fractions of full scale
     * @return the source
     * @throws PhotoException if encoding, dark or flat do not belong to such a photo
     */
    public static SignalSource of(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark,
            Optional<ShadingField> flat, NoiseModel noise) {
        encoding.requireFits(photo.info());
        dark.ifPresent(field -> field.requireFits(photo.info(), "dark"));
        flat.ifPresent(field -> field.requireFits(photo.info(), "flat"));
        return new SignalSource(photo, encoding, dark, flat, noise);
    }

    /** @return what the photo's header says */
    public PhotoInfo info() {
        return photo.info();
    }

    /** @return the noise model in use */
    public NoiseModel noise() {
        return noise;
    }

    /**
     * @param channel 0 and up
     * @return the lowest count taken as clipped: full scale, or a level just below it at which samples pile up
     */
    public int saturation(int channel) {
        return saturation[channel];
    }

    /**
     * Reads and converts a band of rows.
     *
     * @param frame 0 up to frames - 1
     * @param y first row
     * @param count how many rows
     * @return their signal
     */
    public Signal rows(int frame, int y, int count) {
        return convert(photo.rows(frame, y, count), y);
    }

    /**
     * The signal of a region of the photo.
     *
     * @param frame 0 up to frames - 1
     * @param region rectangle on the photo
     * @return its signal
     * @throws PhotoException if it reaches outside the photo
     */
    public Signal region(int frame, Region region) {
        region.requireWithin(photo.info());
        return rows(frame, region.y(), region.height())
                .crop(new Region(region.x(), 0, region.width(), region.height()));
    }

    /**
     * Converts rows that have been read.
     *
     * @param rows whole rows of the photo
     * @param y the first of them
     * @return their signal
     */
    public Signal convert(Frame rows, int y) {
        int width = rows.width();
        int channels = rows.channels();
        int length = rows.counts().length;
        Signal signal = new Signal(width, rows.height(), channels, new float[length], new float[length], new byte[length]);
        float[] darkRow = new float[width];
        float[] flatRow = new float[width];
        Arrays.fill(flatRow, 1);
        for (int row = 0; row < rows.height(); row++) {
            for (int c = 0; c < channels; c++) {
                if (dark.isPresent()) {
                    dark.get().row(y + row, c, darkRow);
                }
                if (flat.isPresent()) {
                    flat.get().row(y + row, c, flatRow);
                }
                convert(rows.counts(), row * width * channels + c, c, darkRow, flatRow, signal);
            }
        }
        return signal;
    }

    /** Converts one channel of a row that starts at a place in the arrays. */
    private void convert(short[] counts, int start, int channel, float[] darkRow, float[] flatRow, Signal signal) {
        float[] table = encoding.table(channel);
        float[] slopes = encoding.slopes(channel);
        float read = (float) noise.variance(channel, 0);
        float gain = (float) noise.gain(channel);
        float black = (float) noise.black(channel);
        float rounding = (float) noise.countVariance(channel);
        int bottom = encoding.bottom();
        int top = saturation[channel];
        float[] value = signal.value();
        float[] variance = signal.variance();
        byte[] limit = signal.limit();
        int channels = signal.channels();
        for (int x = 0, at = start; x < signal.width(); x++, at += channels) {
            int count = counts[at] & 0xffff;
            float light = table[count] - darkRow[x];
            float slope = slopes[count];
            float scale = 1 / flatRow[x];
            value[at] = light * scale;
            variance[at] = (read + gain * Math.max(0, light - black) + slope * slope * rounding) * scale * scale;
            limit[at] = count >= top ? Signal.AT_LEAST : count <= bottom ? Signal.AT_MOST : Signal.MEASURED;
        }
    }
}
