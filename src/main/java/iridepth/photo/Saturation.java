package iridepth.photo;

import java.util.Arrays;

/**
 * The count from which a channel is clipped: the top of the scale, or a level somewhat below it at which samples pile up
 * because the sensor fills before the file's scale does.
 */
final class Saturation {

    /** A sensor that fills below this fraction of the scale is not recognised: the scale should be given instead. */
    private static final double LOWEST = 0.9;
    /** The same for 8-bit photos, whose histograms are peaky by nature. */
    private static final double LOWEST_OF_8_BIT = 0.97;
    private static final int FEWEST = 20;
    private static final double PILE = 10;
    /** JPEG scatters clipped samples by its own error. */
    private static final int LOSSY_MARGIN = 2;

    private Saturation() {
    }

    /** Per channel, the lowest count that is clipped. */
    static int[] of(PhotoFile photo, Encoding encoding) {
        PhotoInfo info = photo.info();
        int top = Math.min(encoding.top(), info.maxCount()) - (info.lossy() ? LOSSY_MARGIN : 0);
        int[][] histogram = new int[info.channels()][info.maxCount() + 1];
        for (Bands.Band sampled : Bands.sample(photo)) {
            Frame band = sampled.frame();
            for (int i = 0; i < band.counts().length; i++) {
                histogram[i % band.channels()][band.counts()[i] & 0xffff]++;
            }
        }
        int[] levels = new int[info.channels()];
        Arrays.setAll(levels, c -> level(histogram[c], top, info.bitDepth()));
        return levels;
    }

    /** The pile-up level of one histogram, or the top. */
    static int level(int[] histogram, int top, int bitDepth) {
        int highest = Math.min(top, histogram.length - 1);
        while (highest > 0 && histogram[highest] == 0) {
            highest--;
        }
        if (highest >= top || highest < (bitDepth == 8 ? LOWEST_OF_8_BIT : LOWEST) * top) {
            return top;
        }
        int window = Math.max(4, top / 50);
        int next = Arrays.stream(histogram, highest - window, highest).max().orElse(0);
        return histogram[highest] >= Math.max(FEWEST, PILE * next) ? highest : top;
    }
}
