package iridepth.photo;

/**
 * Linear signal of a block of pixels with its noise: what readers of photos take.
 *
 * @param width pixels a row
 * @param height rows
 * @param channels samples a pixel
 * @param value interleaved: linear light above the dark, as a fraction of full scale; with a flat, divided by the flat's
 * @param variance interleaved: variance of the value by the noise model, without the flat's own uncertainty
 * @param limit interleaved: {@link #MEASURED}, {@link #AT_LEAST} at the top of the scale, {@link #AT_MOST} at the bottom
 */
public record Signal(int width, int height, int channels, float[] value, float[] variance, byte[] limit) {

    /** The value is a measurement. */
    public static final byte MEASURED = 0;
    /** The sample is at the top of the scale: the light is at least the value. */
    public static final byte AT_LEAST = 1;
    /** The sample is at the bottom of the scale: the light is at most the value. */
    public static final byte AT_MOST = -1;

    /** Checks that the arrays fit the shape; they are not copied. */
    public Signal {
        long length = (long) width * height * channels;
        if (width < 1 || height < 1 || channels < 1 || value.length != length || variance.length != length
                || limit.length != length) {
            throw new IllegalArgumentException("a signal of " + width + " x " + height + " pixels and " + channels
                    + " channels does not fit its arrays");
        }
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
        float[] s = new float[v.length];
        byte[] l = new byte[v.length];
        for (int row = 0; row < region.height(); row++) {
            int from = ((region.y() + row) * width + region.x()) * channels;
            System.arraycopy(value, from, v, row * length, length);
            System.arraycopy(variance, from, s, row * length, length);
            System.arraycopy(limit, from, l, row * length, length);
        }
        return new Signal(region.width(), region.height(), channels, v, s, l);
    }
}
