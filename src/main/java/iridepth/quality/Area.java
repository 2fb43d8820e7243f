package iridepth.quality;

import iridepth.photo.Region;

/** Some of the pixels of a map. */
@FunctionalInterface
public interface Area {

    /** Takes a pixel. */
    @FunctionalInterface
    interface PixelAction {

        /** Takes the pixel in column x and row y. */
        void accept(int x, int y);
    }

    /** Visits the pixels of a field that lie in the area, row after row; what lies outside the field is left out. */
    void forEachPixel(Field field, PixelAction action);

    /** The pixels of a rectangle. */
    static Area of(Region region) {
        return masked(region.x(), region.y(), region.width(), region.height(), (x, y) -> true);
    }

    /** Tells which pixels of a rectangle belong to an area. */
    @FunctionalInterface
    interface Mask {

        /** Whether the pixel belongs to it; x and y count from the rectangle's upper left. */
        boolean holds(int x, int y);
    }

    /**
     * Some of the pixels of a rectangle, which may reach outside the map.
     *
     * @param left left column
     * @param top top row
     */
    static Area masked(int left, int top, int width, int height, Mask mask) {
        return (field, action) -> {
            for (int y = Math.max(0, top); y < Math.min(field.height(), (long) top + height); y++) {
                for (int x = Math.max(0, left); x < Math.min(field.width(), (long) left + width); x++) {
                    if (mask.holds(x - left, y - top)) {
                        action.accept(x, y);
                    }
                }
            }
        };
    }
}
