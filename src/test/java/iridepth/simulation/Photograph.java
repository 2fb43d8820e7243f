package iridepth.simulation;

/**
 * A picture as a file holds it.
 *
 * @param width pixels
 * @param height pixels
 * @param channels samples per pixel
 * @param fullScale largest count: 65535 or 255
 * @param counts unsigned counts, row by row, the channels of a pixel side by side
 */
public record Photograph(int width, int height, int channels, int fullScale, short[] counts) {

    /** The count of a channel at a pixel. */
    public int count(int x, int y, int channel) {
        return Short.toUnsignedInt(counts[(y * width + x) * channels + channel]);
    }

    /** Mean count of a channel over a rectangle. */
    public double mean(int channel, int x, int y, int w, int h) {
        double sum = 0;
        for (int j = y; j < y + h; j++) {
            for (int i = x; i < x + w; i++) {
                sum += count(i, j, channel);
            }
        }
        return sum / (w * (double) h);
    }
}
