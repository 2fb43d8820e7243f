package iridepth.photo;

import java.util.Arrays;
import java.util.Optional;

/**
 * A photo as linear signal: value = linear(count) - dark, divided by the flat where there is one, with its censoring at
 * the ends of the scale and the variance of its noise. Rows may be asked for from several threads.
 */
public final class SignalSource {

    private static final int LIGHT_ROWS = 65;

    private final PhotoFile photo;
    private final Encoding encoding;
    private final Optional<ShadingField> dark;
    private final Optional<ShadingField> flat;
    private final NoiseModel noise;
    private final int[] saturation;
    private final double[] darkMean;
    private final double[] flatMean;

    private SignalSource(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark, Optional<ShadingField> flat,
            NoiseModel noise) {
        this.photo = photo;
        this.encoding = encoding;
        this.dark = dark;
        this.flat = flat;
        this.noise = noise;
        this.saturation = Saturation.of(photo, encoding);
        this.darkMean = means(dark, photo.info().channels(), 0);
        this.flatMean = means(flat, photo.info().channels(), 1);
    }

    private static double[] means(Optional<ShadingField> field, int channels, double otherwise) {
        double[] means = new double[channels];
        Arrays.setAll(means, c -> field.isPresent() ? field.get().mean(c) : otherwise);
        return means;
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
     * Reads the counts of a band of rows, to be converted row by row.
     *
     * @param frame 0 up to frames - 1
     * @param y first row
     * @param count how many rows
     * @return their counts
     */
    public Frame counts(int frame, int y, int count) {
        return photo.rows(frame, y, count);
    }

    /**
     * Converts rows that have been read.
     *
     * @param rows whole rows of the photo
     * @param y the first of them
     * @return their signal
     */
    public Signal convert(Frame rows, int y) {
        Signal signal = Signal.blank(rows.width(), rows.height(), rows.channels());
        Signal line = Signal.row(info());
        int width = rows.width();
        for (int row = 0; row < rows.height(); row++) {
            convert(rows, row, y + row, line);
            System.arraycopy(line.value(), 0, signal.value(), row * line.value().length, line.value().length);
            System.arraycopy(line.limit(), 0, signal.limit(), row * line.limit().length, line.limit().length);
            System.arraycopy(line.light(), 0, signal.light(), row * width, width);
        }
        return signal;
    }

    /**
     * Converts one row.
     *
     * @param rows rows of the photo
     * @param row which of them
     * @param y its place in the photo
     * @param line receives its signal: of the photo's width, one row high
     */
    public void convert(Frame rows, int row, int y, Signal line) {
        int width = rows.width();
        int channels = rows.channels();
        float[] light = line.light();
        float[] darkRow = new float[width];
        float[] flatRow = new float[width];
        Arrays.fill(flatRow, 1);
        Arrays.fill(light, flat.isPresent() ? 0 : 1);
        for (int c = 0; c < channels; c++) {
            if (dark.isPresent()) {
                dark.get().row(y, c, darkRow);
            }
            if (flat.isPresent()) {
                flat.get().row(y, c, flatRow);
                float weight = (float) (1 / (channels * flatMean[c]));
                for (int x = 0; x < width; x++) {
                    light[x] += weight * flatRow[x];
                }
            }
            convert(rows.counts(), row * width * channels, c, darkRow, flatRow, line);
        }
    }

    /** Converts one channel of a row that starts at a place in the counts. */
    private void convert(short[] counts, int start, int channel, float[] darkRow, float[] flatRow, Signal line) {
        float[] table = encoding.table(channel);
        int bottom = encoding.bottom();
        int top = saturation[channel];
        float[] value = line.value();
        byte[] limit = line.limit();
        int channels = line.channels();
        for (int x = 0, at = channel; x < line.width(); x++, at += channels) {
            int count = counts[start + at] & 0xffff;
            value[at] = (table[count] - darkRow[x]) / flatRow[x];
            limit[at] = count >= top ? Signal.AT_LEAST : count <= bottom ? Signal.AT_MOST : Signal.MEASURED;
        }
    }

    /**
     * Variance of the noise where a value is expected: by the noise model at the light that gives this value, with the
     * rounding to counts, without the uncertainty of the flat itself. The light is taken to fall off alike in all channels.
     *
     * @param channel 0 and up
     * @param value expected signal
     * @param light light over its mean in the picture, above 0, and 1 without a flat; see {@link Signal#light}
     * @return variance of the value, above 0
     */
    public double variance(int channel, double value, double light) {
        double scale = flatMean[channel] * light;
        double signal = value * scale;
        return noise.variance(channel, signal, encoding.slope(channel, signal + darkMean[channel])) / (scale * scale);
    }

    /**
     * @return the least and the most of {@link Signal#light} in the picture, on a grid of rows fine enough for a smooth field
     */
    public double[] lightRange() {
        double[] range = {1, 1};
        if (flat.isEmpty()) {
            return range;
        }
        int channels = info().channels();
        float[] row = new float[info().width()];
        for (int i = 0; i < LIGHT_ROWS; i++) {
            int y = (int) ((info().height() - 1L) * i / (LIGHT_ROWS - 1));
            float[] light = new float[row.length];
            for (int c = 0; c < channels; c++) {
                flat.get().row(y, c, row);
                for (int x = 0; x < row.length; x++) {
                    light[x] += row[x] / (float) (channels * flatMean[c]);
                }
            }
            for (float l : light) {
                range[0] = Math.min(range[0], l);
                range[1] = Math.max(range[1], l);
            }
        }
        return range;
    }
}
