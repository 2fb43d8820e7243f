package iridepth.reading;

import iridepth.photo.Region;
import java.util.List;

/**
 * What is known of the film's thickness at places of the picture, to settle its order.
 *
 * @param points places of known thickness
 * @param zero   regions where the film falls to nothing, such as a column at the picture's edge
 */
public record Pins(List<Point> points, List<Region> zero) {
    /** Pixels to each side of a known point that it speaks for. */
    private static final int AROUND = 2;

    /**
     * A place of known thickness.
     *
     * @param x           column
     * @param y           row
     * @param thicknessNm thickness, nm, good to a fraction of a fringe
     */
    public record Point(int x, int y, double thicknessNm) {
        /** The pixels that it speaks for. */
        Region region() {
            int left = Math.max(0, x - AROUND);
            int top = Math.max(0, y - AROUND);
            return new Region(left, top, x + AROUND + 1 - left, y + AROUND + 1 - top);
        }
    }

    /** Keeps copies of the lists. */
    public Pins {
        points = List.copyOf(points);
        zero = List.copyOf(zero);
    }

    /** Nothing known. */
    public static Pins none() {
        return new Pins(List.of(), List.of());
    }

    /** Whether nothing is known. */
    public boolean isEmpty() {
        return points.isEmpty() && zero.isEmpty();
    }

    /** The thickness known at a pixel, or NaN. */
    double at(int x, int y) {
        for (Point point : points) {
            if (contains(point.region(), x, y)) {
                return point.thicknessNm();
            }
        }
        for (Region region : zero) {
            if (contains(region, x, y)) {
                return 0;
            }
        }
        return Double.NaN;
    }

    /** Whether something is known in a row. */
    boolean touches(int y) {
        return points.stream().anyMatch(p -> touches(p.region(), y)) || zero.stream().anyMatch(r -> touches(r, y));
    }

    private static boolean touches(Region region, int y) {
        return y >= region.y() && y < region.y() + region.height();
    }

    private static boolean contains(Region region, int x, int y) {
        return touches(region, y) && x >= region.x() && x < region.x() + region.width();
    }
}
