package iridepth.quality;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * Thickness along a line, or in rings about a centre, with its uncertainty.
 *
 * @param points in order of distance; where nothing is read the average is empty
 */
public record Profile(List<Point> points) {
    /** A length this close above a whole number of pixels is that number. */
    private static final double HAIR = 1e-9;

    /**
     * A point of a profile.
     *
     * @param distance pixels from the start of the line, or from the centre to the middle of the ring
     * @param average of the readings across the line, or in the ring
     */
    public record Point(double distance, Average average) {
    }

    public Profile {
        points = List.copyOf(points);
    }

    /**
     * Profile along a line, one point per pixel of length from the start on, and one at the end. Each is the mean of samples one
     * pixel apart across the line, each sample bilinear.
     *
     * @param field what is sampled
     * @param start where the line starts; parts outside the map are empty
     * @param end where it ends, not at the start
     * @param width number of samples across, 1 or more; an odd number holds the line itself
     */
    public static Profile along(MeasuredField field, Position start, Position end, int width) {
        double length = start.distanceTo(end);
        if (!(length > 0) || width < 1) {
            throw new IllegalArgumentException("profile of length " + length + " and width " + width
                    + " pixels: give two different points and a width of 1 or more");
        }
        double dx = (end.x() - start.x()) / length;
        double dy = (end.y() - start.y()) / length;
        List<Point> points = new ArrayList<>();
        for (int i = 0; i <= length; i++) {
            points.add(acrossLine(field, start, dx, dy, i, width));
        }
        if (length - Math.floor(length) > HAIR) {
            points.add(acrossLine(field, start, dx, dy, length, width));
        }
        return new Profile(points);
    }

    /**
     * Radial profile: ring i holds the pixels whose centres lie from i to less than i + 1 ring widths from the centre; the last
     * ring is cut at the radius.
     *
     * @param field what is sampled
     * @param centre of the rings; it may lie between pixels or outside the map
     * @param radius largest distance, pixels, positive
     * @param ringWidth pixels, positive, at most the radius
     */
    public static Profile radial(MeasuredField field, Position centre, double radius, double ringWidth) {
        if (!(ringWidth > 0 && ringWidth <= radius && radius / ringWidth <= 1e6)) {
            throw new IllegalArgumentException("radial profile to " + radius + " pixels in rings of " + ringWidth
                    + ": give a positive radius and rings no wider, at most a million of them");
        }
        List<Average.Sum> rings = Stream.generate(() -> new Average.Sum(field))
                .limit((long) Math.ceil(radius / ringWidth)).toList();
        new Disk(centre, radius).forEachPixel(field.thickness(), (x, y) -> {
            int ring = (int) (Math.hypot(x - centre.x(), y - centre.y()) / ringWidth);
            if (ring < rings.size()) {
                rings.get(ring).addPixel(x, y);
            }
        });
        return new Profile(IntStream.range(0, rings.size())
                .mapToObj(i -> new Point((i + 0.5) * ringWidth, rings.get(i).average())).toList());
    }

    private static Point acrossLine(MeasuredField field, Position start, double dx, double dy, double distance, int width) {
        Average.Sum sum = new Average.Sum(field);
        for (int i = 0; i < width; i++) {
            double across = i - (width - 1) / 2.0;
            sum.addPoint(start.x() + distance * dx - across * dy, start.y() + distance * dy + across * dx);
        }
        return new Point(distance, sum.average());
    }
}
