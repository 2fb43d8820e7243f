package iridepth.quality;

/**
 * The pixels whose centres lie within a radius of a point.
 *
 * @param centre it may lie between pixels or outside the map
 * @param radius pixels, positive
 */
public record Disk(Position centre, double radius) implements Area {

    public Disk {
        if (!(radius > 0 && radius < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("disk of radius " + radius + " pixels: give a positive finite radius");
        }
    }

    /** Mean over the disk; empty where nothing is read. A disk smaller than a pixel may hold none. */
    public Average average(MeasuredField field) {
        Average.Sum sum = new Average.Sum(field);
        forEachPixel(field.thickness(), sum::addPixel);
        return sum.average();
    }

    @Override
    public void forEachPixel(Field field, PixelAction action) {
        int top = (int) Math.max(0, Math.ceil(centre.y() - radius));
        int bottom = (int) Math.min(field.height() - 1, Math.floor(centre.y() + radius));
        for (int y = top; y <= bottom; y++) {
            double half = Math.sqrt(Math.max(0, radius * radius - (y - centre.y()) * (y - centre.y())));
            int left = (int) Math.max(0, Math.ceil(centre.x() - half));
            int right = (int) Math.min(field.width() - 1, Math.floor(centre.x() + half));
            for (int x = left; x <= right; x++) {
                action.accept(x, y);
            }
        }
    }
}
