package iridepth.photo;

import java.util.Arrays;

/**
 * What a region of a signal amounts to in one channel. Samples at either end of the scale are left out of the mean, the
 * median and the scatter.
 *
 * @param mean mean after leaving out samples farther from the median than 4 robust standard deviations; NaN if none is left
 * @param median median; NaN if none is left
 * @param standardDeviation robust scatter of a sample, 1.4826 times the median absolute deviation, or the plain standard
 *     deviation of the samples kept where more than half are equal
 * @param standardError standard uncertainty of the mean: the larger of scatter / sqrt(samples) and what the means of
 *     8 x 8 blocks scatter, so that correlated noise and unevenness count
 * @param samples samples in the mean
 * @param topFraction fraction of the region's samples at the top of the scale, 0 to 1
 * @param bottomFraction fraction at the bottom, 0 to 1
 */
public record RegionStatistics(double mean, double median, double standardDeviation, double standardError, int samples,
        double topFraction, double bottomFraction) {

    private static final int BLOCK = 8;
    private static final int FEWEST_BLOCKS = 6;
    private static final double OUTLIER = 4;
    /** Median absolute deviation to standard deviation of a normal distribution. */
    private static final double MAD_TO_SIGMA = 1.4826;

    /**
     * @param signal the whole of it is the region; see {@link Signal#crop}
     * @return statistics of each channel
     */
    public static RegionStatistics[] of(Signal signal) {
        RegionStatistics[] all = new RegionStatistics[signal.channels()];
        Arrays.setAll(all, channel -> of(signal, channel));
        return all;
    }

    private static RegionStatistics of(Signal signal, int channel) {
        int pixels = signal.width() * signal.height();
        float[] sorted = new float[pixels];
        int n = 0;
        int top = 0;
        int bottom = 0;
        for (int i = 0; i < pixels; i++) {
            int at = i * signal.channels() + channel;
            switch (signal.limit()[at]) {
                case Signal.AT_LEAST -> top++;
                case Signal.AT_MOST -> bottom++;
                default -> sorted[n++] = signal.value()[at];
            }
        }
        double topFraction = (double) top / pixels;
        double bottomFraction = (double) bottom / pixels;
        if (n == 0) {
            return new RegionStatistics(Double.NaN, Double.NaN, Double.NaN, Double.NaN, 0, topFraction, bottomFraction);
        }
        double median = median(sorted, n);
        float[] deviations = new float[n];
        for (int i = 0; i < n; i++) {
            deviations[i] = (float) Math.abs(sorted[i] - median);
        }
        double scatter = MAD_TO_SIGMA * median(deviations, n);
        double reach = scatter > 0 ? OUTLIER * scatter : Double.POSITIVE_INFINITY;
        Kept kept = new Kept(signal, channel, median, reach);
        double sigma = scatter > 0 ? scatter : kept.deviation();
        double plain = sigma / Math.sqrt(kept.samples);
        return new RegionStatistics(kept.mean(), median, sigma, Math.max(plain, kept.errorOfBlocks()), kept.samples,
                topFraction, bottomFraction);
    }

    private static double median(float[] values, int n) {
        Arrays.sort(values, 0, n);
        return 0.5 * (values[(n - 1) / 2] + (double) values[n / 2]);
    }

    /** Sums over the samples within reach of the median, in whole and in blocks. */
    private static final class Kept {

        private final double median;
        private double sum;
        private double squares;
        private int samples;
        private double blockSum;
        private double blockSquares;
        private int blocks;

        Kept(Signal signal, int channel, double median, double reach) {
            this.median = median;
            for (int top = 0; top < signal.height(); top += BLOCK) {
                for (int left = 0; left < signal.width(); left += BLOCK) {
                    add(signal, channel, reach, left, top);
                }
            }
        }

        private void add(Signal signal, int channel, double reach, int left, int top) {
            double sumOfBlock = 0;
            int n = 0;
            int right = Math.min(left + BLOCK, signal.width());
            int bottom = Math.min(top + BLOCK, signal.height());
            for (int y = top; y < bottom; y++) {
                for (int x = left; x < right; x++) {
                    int at = (y * signal.width() + x) * signal.channels() + channel;
                    double difference = signal.value()[at] - median;
                    if (signal.limit()[at] == Signal.MEASURED && Math.abs(difference) <= reach) {
                        sumOfBlock += difference;
                        squares += difference * difference;
                        n++;
                    }
                }
            }
            sum += sumOfBlock;
            samples += n;
            if (n >= BLOCK * BLOCK / 2) {
                double mean = sumOfBlock / n;
                blockSum += mean;
                blockSquares += mean * mean;
                blocks++;
            }
        }

        double mean() {
            return median + sum / samples;
        }

        double deviation() {
            double mean = sum / samples;
            return Math.sqrt(Math.max(0, squares / samples - mean * mean));
        }

        /** Standard error of the mean from the scatter of block means, 0 where there are too few blocks to tell. */
        double errorOfBlocks() {
            if (blocks < FEWEST_BLOCKS) {
                return 0;
            }
            double mean = blockSum / blocks;
            return Math.sqrt(Math.max(0, (blockSquares / blocks - mean * mean) / (blocks - 1)));
        }
    }
}
