package iridepth.photo;

import java.util.Arrays;
import java.util.Optional;

/** The linear signal of one photo. */
final class PhotoSignal implements SignalSource {

    private static final int LIGHT_ROWS = 65;

    private final PhotoFile photo;
    private final Encoding encoding;
    private final Optional<ShadingField> dark;
    private final Optional<ShadingField> flat;
    private final NoiseModel noise;
    private final int[] saturation;
    private final double[] darkMean;
    private final double[] flatMean;

    private PhotoSignal(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark, Optional<ShadingField> flat,
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

    static SignalSource open(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark, Optional<ShadingField> flat,
            NoiseModel noise) {
        encoding.requireFits(photo.info());
        dark.ifPresent(field -> field.requireFits(photo.info(), "dark"));
        flat.ifPresent(field -> field.requireFits(photo.info(), "flat"));
        return new PhotoSignal(photo, encoding, dark, flat, noise);
    }

    @Override
    public PhotoInfo info() {
        return photo.info();
    }

    @Override
    public NoiseModel noise() {
        return noise;
    }

    @Override
    public int saturation(int channel) {
        return saturation[channel];
    }

    @Override
    public Frame counts(int frame, int y, int count) {
        return photo.rows(frame, y, count);
    }

    @Override
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

    @Override
    public double variance(int channel, double value, double light) {
        double scale = flatMean[channel] * light;
        double signal = value * scale;
        return noise.variance(channel, signal, encoding.slope(channel, signal + darkMean[channel])) / (scale * scale);
    }

    @Override
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
