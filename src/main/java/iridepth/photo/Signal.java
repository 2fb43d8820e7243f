package iridepth.photo;

/**
 * Linear signal of a block of pixels: what readers of photos take. Its noise depends on the light that fell there: see
 * {@link SignalSource#variance}.
 *
 * @param width pixels a row
 * @param height rows
 * @param channels samples a pixel
 * @param value interleaved: linear light above the dark, as a fraction of full scale; with a flat, divided by the flat's
 * @param light one value a pixel: light that falls there over its mean in the picture, as the flat shows it, averaged over
 *     the channels; 1 without a flat
 * @param limit interleaved: {@link #MEASURED}, {@link #AT_LEAST} at the top of the scale, {@link #AT_MOST} at the bottom
 */
public record Signal(int width, int height, int channels, float[] value, float[] light, byte[] limit) {

    /** The value is a measurement. */
    public static final byte MEASURED = 0;
    /** The sample is at the top of the scale: the light is at least the value. */
    public static final byte AT_LEAST = 1;
    /** The sample is at the bottom of the scale: the light is at most the value. */
    public static final byte AT_MOST = -1;

    /** Checks that the arrays fit the shape; they are not copied. */
    public Signal {
        long length = (long) width * height * channels;
        if (width < 1 || height < 1 || channels < 1 || value.length != length || light.length != (long) width * height
                || limit.length != length) {
            throw new IllegalArgumentException("a signal of " + width + " x " + height + " pixels and " + channels
                    + " channels does not fit its arrays");
        }
    }

    /** A block to be filled. */
    static Signal blank(int width, int height, int channels) {
        int pixels = width * height;
        return new Signal(width, height, channels, new float[pixels * channels], new float[pixels], new byte[pixels * channels]);
    }

    /**
     * A row to be filled again and again by {@link SignalSource#convert(Frame, int, int, Signal)}.
     *
     * @param photo the photo whose rows it takes
     */
    public static Signal row(PhotoInfo photo) {
        return blank(photo.width(), 1, photo.channels());
    }

    /**
     * The part of this block under a rectangle.
     *
     * @param region rectangle in pixels of this block
     * @return a copy of that part
     */
    public Signal crop(Region region) {
        region.requireWithin(width, height, "the signal");
        int length = region.width() * channels;
        float[] v = new float[length * region.height()];
        float[] s = new float[region.width() * region.height()];
        byte[] l = new byte[v.length];
        for (int row = 0; row < region.height(); row++) {
            int from = ((region.y() + row) * width + region.x()) * channels;
            System.arraycopy(value, from, v, row * length, length);
            System.arraycopy(light, from / channels, s, row * region.width(), region.width());
            System.arraycopy(limit, from, l, row * length, length);
        }
        return new Signal(region.width(), region.height(), channels, v, s, l);
    }
}
