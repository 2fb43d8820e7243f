package iridepth.photo;

import java.util.Arrays;

/**
 * Blocks of one channel, cut from pictures: the level of each, the variance of what a cubic surface leaves of it, the
 * variance that rounding to counts gives it, and the products of neighbours.
 */
final class NoiseBlocks {

    private final BlockResidual residual;
    private float[] level = new float[256];
    private float[] variance = new float[256];
    private float[] rounding = new float[256];
    private float[] products;
    private int count;

    NoiseBlocks(BlockResidual residual) {
        this.residual = residual;
        this.products = new float[256 * residual.distances()];
    }

    /**
     * Adds the blocks of a band of rows that have no sample at either end of the scale.
     *
     * @param a the band
     * @param b the same band of another photo of the same thing, or null: then the noise is that of (a - b) / sqrt 2
     * @param dark dark field of these rows, channel after channel, row after row, or null
     */
    void add(Frame a, Frame b, int channel, Encoding encoding, int top, float[][] dark) {
        int size = residual.size();
        double[] block = new double[size * size];
        for (int y = 0; y + size <= a.height(); y += size) {
            for (int x = 0; x + size <= a.width(); x += size) {
                add(a, b, channel, encoding, top, dark, x, y, block);
            }
        }
    }

    private void add(Frame a, Frame b, int channel, Encoding encoding, int top, float[][] dark, int left, int upper,
            double[] block) {
        float[] table = encoding.table(channel);
        float[] slopes = encoding.slopes(channel);
        int size = residual.size();
        double sum = 0;
        double slopeSquares = 0;
        for (int i = 0; i < block.length; i++) {
            int x = left + i % size;
            int y = upper + i / size;
            int at = (y * a.width() + x) * a.channels() + channel;
            int n = a.counts()[at] & 0xffff;
            int m = b == null ? n : b.counts()[at] & 0xffff;
            if (Math.max(n, m) >= top || Math.min(n, m) <= encoding.bottom()) {
                return;
            }
            block[i] = b == null ? table[n] : (table[n] - table[m]) * Math.sqrt(0.5);
            sum += 0.5 * (table[n] + table[m]) - (dark == null ? 0 : dark[channel * a.height() + y][x]);
            slopeSquares += slopes[n] * slopes[n];
        }
        residual.apply(block);
        double squares = Arrays.stream(block).map(v -> v * v).sum();
        grow();
        level[count] = (float) (sum / block.length);
        variance[count] = (float) (squares / residual.freedom());
        rounding[count] = (float) (slopeSquares / block.length / 12);
        residual.addProducts(block, products, count * residual.distances());
        count++;
    }

    private void grow() {
        if (count == level.length) {
            level = Arrays.copyOf(level, 2 * count);
            variance = Arrays.copyOf(variance, 2 * count);
            rounding = Arrays.copyOf(rounding, 2 * count);
            products = Arrays.copyOf(products, 2 * count * residual.distances());
        }
    }

    int count() {
        return count;
    }

    double level(int i) {
        return level[i];
    }

    double variance(int i) {
        return variance[i];
    }

    double rounding(int i) {
        return rounding[i];
    }

    double product(int i, int distance) {
        return products[i * residual.distances() + distance];
    }

    BlockResidual residual() {
        return residual;
    }
}
