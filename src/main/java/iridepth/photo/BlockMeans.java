package iridepth.photo;

import java.util.stream.IntStream;

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
        double[][] squares = new double[means.rows][info.channels()];
        int[][] clipped = new int[means.rows][info.channels()];
        IntStream.range(0, means.rows).parallel().forEach(row -> {
            int y = row * means.block;
            Frame band = photo.rows(y, Math.min(means.block, means.height - y));
            for (int c = 0; c < info.channels(); c++) {
                means.add(row, band, c, encoding, squares, clipped);
            }
        });
        double pixels = (double) means.width * means.height;
        double pairs = Math.max(1, (means.width - 1.0) * means.height);
        for (int c = 0; c < info.channels(); c++) {
            double sum = 0;
            long top = 0;
            for (int row = 0; row < means.rows; row++) {
                sum += squares[row][c];
                top += clipped[row][c];
            }
            means.noise[c] = Math.sqrt(sum / (2 * pairs));
            means.topFraction[c] = top / pixels;
        }
        return means;
    }

    private void add(int row, Frame band, int channel, Encoding encoding, double[][] squares, int[][] clipped) {
        float[] table = encoding.table(channel);
        int top = Math.min(encoding.top(), band.maxCount());
        short[] counts = band.counts();
        double[] sums = mean[channel][row];
        double differences = 0;
        int atTop = 0;
        for (int y = 0; y < band.height(); y++) {
            int at = y * width * band.channels() + channel;
            float previous = table[counts[at] & 0xffff];
            for (int column = 0; column < columns; column++) {
                double sum = 0;
                int end = Math.min(block, width - column * block);
                for (int x = 0; x < end; x++, at += band.channels()) {
                    int count = counts[at] & 0xffff;
                    float linear = table[count];
                    float step = linear - previous;
                    sum += linear;
                    differences += step * step;
                    previous = linear;
                    atTop += count >= top ? 1 : 0;
                }
                sums[column] += sum;
            }
        }
        for (int column = 0; column < columns; column++) {
            sums[column] /= (double) Math.min(block, width - column * block) * band.height();
        }
        squares[row][channel] = differences;
        clipped[row][channel] = atTop;
    }

    /** Takes the dark away; block means are those of the field at the block's middle. */
    void subtract(ShadingField dark) {
        float[] values = new float[width];
        for (int c = 0; c < mean.length; c++) {
            for (int row = 0; row < rows; row++) {
                dark.row(Math.min(height - 1, row * block + block / 2), c, values);
                for (int column = 0; column < columns; column++) {
                    mean[c][row][column] -= values[Math.min(width - 1, column * block + block / 2)];
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
