package iridepth.photo;

/** Means of a photo's linear values over a grid of square blocks, gathered band by band. */
final class BlockMeans {

    private static final int MOST_BLOCKS = 128;
    private static final int USUAL_BLOCK = 8;
    private static final int FEWEST_BLOCKS = 16;

    private final int width;
    private final int height;
    private final int block;
    private final int columns;
    private final int rows;
    private final double[][][] mean;
    private final double[] noise;
    private final double[] topFraction;

    private BlockMeans(PhotoInfo info) {
        width = info.width();
        height = info.height();
        int small = Math.max(1, Math.min(USUAL_BLOCK, Math.min(width, height) / FEWEST_BLOCKS));
        block = Math.max(small, (Math.max(width, height) + MOST_BLOCKS - 1) / MOST_BLOCKS);
        columns = (width + block - 1) / block;
        rows = (height + block - 1) / block;
        mean = new double[info.channels()][rows][columns];
        noise = new double[info.channels()];
        topFraction = new double[info.channels()];
    }

    static BlockMeans of(PhotoFile photo, Encoding encoding) {
        PhotoInfo info = photo.info();
        encoding.requireFits(info);
        BlockMeans means = new BlockMeans(info);
        for (int row = 0; row < means.rows; row++) {
            int y = row * means.block;
            means.add(row, photo.rows(y, Math.min(means.block, means.height - y)), encoding);
        }
        double pixels = (double) means.width * means.height;
        for (int c = 0; c < info.channels(); c++) {
            means.topFraction[c] /= pixels;
            double pairs = Math.max(1, (means.width - 1.0) * means.height);
            means.noise[c] = Math.sqrt(means.noise[c] / (2 * pairs));
        }
        return means;
    }

    private void add(int row, Frame band, Encoding encoding) {
        int channels = band.channels();
        int top = Math.min(encoding.top(), band.maxCount());
        for (int c = 0; c < channels; c++) {
            float[] table = encoding.table(c);
            double[] sums = mean[c][row];
            double differences = 0;
            int clipped = 0;
            for (int y = 0; y < band.height(); y++) {
                int at = y * width * channels + c;
                float previous = table[band.counts()[at] & 0xffff];
                for (int x = 0; x < width; x++, at += channels) {
                    int count = band.counts()[at] & 0xffff;
                    float linear = table[count];
                    sums[x / block] += linear;
                    differences += (double) (linear - previous) * (linear - previous);
                    previous = linear;
                    clipped += count >= top ? 1 : 0;
                }
            }
            noise[c] += differences;
            topFraction[c] += clipped;
            for (int column = 0; column < columns; column++) {
                sums[column] /= (double) Math.min(block, width - column * block) * band.height();
            }
        }
    }

    /** Takes the dark away; block means are those of the field at the block's middle. */
    void subtract(ShadingField dark) {
        float[] values = new float[width * mean.length];
        for (int row = 0; row < rows; row++) {
            dark.row(Math.min(height - 1, row * block + block / 2), values);
            for (int column = 0; column < columns; column++) {
                int x = Math.min(width - 1, column * block + block / 2);
                for (int c = 0; c < mean.length; c++) {
                    mean[c][row][column] -= values[x * mean.length + c];
                }
            }
        }
    }

    int width() {
        return width;
    }

    int height() {
        return height;
    }

    int block() {
        return block;
    }

    int channels() {
        return mean.length;
    }

    /** Means of a channel, [block row][block column]. */
    double[][] mean(int channel) {
        return mean[channel];
    }

    /** Standard deviation of a pixel from the differences of neighbours in a row, an upper estimate where there is structure. */
    double noise(int channel) {
        return noise[channel];
    }

    /** Fraction of samples at the top of the scale. */
    double topFraction(int channel) {
        return topFraction[channel];
    }
}
