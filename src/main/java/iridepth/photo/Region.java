package iridepth.photo;

/**
 * A rectangle of pixels.
 *
 * @param x left column, 0 and up
 * @param y top row, 0 and up
 * @param width columns, 1 and up
 * @param height rows, 1 and up
 */
public record Region(int x, int y, int width, int height) {

    /** Checks that the rectangle can exist. */
    public Region {
        if (x < 0 || y < 0 || width < 1 || height < 1) {
            throw new IllegalArgumentException("the region [" + x + ", " + y + ", " + width + ", " + height
                    + "] is not possible: x and y must be 0 or more, width and height 1 or more");
        }
    }

    /**
     * Checks that the rectangle lies on a photo.
     *
     * @param photo the photo
     * @return this region
     * @throws PhotoException if part of it lies outside
     */
    public Region requireWithin(PhotoInfo photo) {
        return requireWithin(photo.width(), photo.height(), photo.path().toString());
    }

    Region requireWithin(int photoWidth, int photoHeight, String name) {
        if ((long) x + width > photoWidth || (long) y + height > photoHeight) {
            throw new PhotoException(name + ": the region " + this + " reaches outside its " + photoWidth + " x "
                    + photoHeight + " pixels; give [x, y, width, height] within them");
        }
        return this;
    }

    @Override
    public String toString() {
        return "[" + x + ", " + y + ", " + width + ", " + height + "]";
    }
}
