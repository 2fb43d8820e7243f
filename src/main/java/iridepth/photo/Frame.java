package iridepth.photo;

/**
 * A block of counts as they stand in the file, row by row, channels interleaved.
 *
 * @param width pixels a row
 * @param height rows
 * @param channels samples a pixel
 * @param bitDepth 8 or 16
 * @param counts unsigned counts, length width x height x channels; 8-bit photos keep 0..255. Not copied: do not change it
 */
public record Frame(int width, int height, int channels, int bitDepth, short[] counts) {

    /** Checks that the array fits the shape. */
    public Frame {
        if (width < 1 || height < 1 || channels < 1 || counts.length != (long) width * height * channels) {
            throw new IllegalArgumentException("a frame of " + width + " x " + height + " pixels and " + channels
                    + " channels does not fit an array of " + counts.length + " counts");
        }
        if (bitDepth != 8 && bitDepth != 16) {
            throw new IllegalArgumentException("a bit depth of " + bitDepth + " is not supported: give 8 or 16");
        }
    }

    /**
     * @param x column, 0 at the left
     * @param y row, 0 at the top
     * @param channel 0 up to channels - 1
     * @return the count, 0 to 2^bitDepth - 1
     */
    public int count(int x, int y, int channel) {
        return counts[(y * width + x) * channels + channel] & 0xffff;
    }

    /** @return the highest possible count, 255 or 65535 */
    public int maxCount() {
        return (1 << bitDepth) - 1;
    }
}
