package iridepth.photo;

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
        int channels = rows.channels();
        int rowLength = rows.width() * channels;
        float[] value = new float[rows.counts().length];
        float[] variance = new float[value.length];
        byte[] limit = new byte[value.length];
        float[] darkRow = new float[rowLength];
        float[] flatRow = new float[rowLength];
        for (int row = 0; row < rows.height(); row++) {
            int line = y + row;
            dark.ifPresent(field -> field.row(line, darkRow));
            flat.ifPresent(field -> field.row(line, flatRow));
            for (int c = 0; c < channels; c++) {
                convert(rows.counts(), row * rowLength, c, channels, rowLength, darkRow, flatRow, value, variance, limit);
            }
        }
        return new Signal(rows.width(), rows.height(), channels, value, variance, limit);
    }

    private void convert(short[] counts, int start, int c, int channels, int rowLength, float[] darkRow, float[] flatRow,
            float[] value, float[] variance, byte[] limit) {
        float[] table = encoding.table(c);
        float[] slopes = encoding.slopes(c);
        float read = (float) noise.variance(c, 0);
        float gain = (float) noise.gain(c);
        float black = (float) noise.black(c);
        int bottom = encoding.bottom();
        int top = saturation[c];
        for (int i = c; i < rowLength; i += channels) {
            int count = counts[start + i] & 0xffff;
            float signal = table[count] - darkRow[i];
            float slope = slopes[count];
            float v = read + gain * Math.max(0, signal - black) + slope * slope * (1f / 12);
            if (flat.isPresent()) {
                float reciprocal = 1 / flatRow[i];
                signal *= reciprocal;
                v *= reciprocal * reciprocal;
            }
            value[start + i] = signal;
            variance[start + i] = v;
            limit[start + i] = count >= top ? Signal.AT_LEAST : count <= bottom ? Signal.AT_MOST : Signal.MEASURED;
        }
    }
}
