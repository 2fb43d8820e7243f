package iridepth.quality;

import java.util.List;

/**
 * A line of equal thickness.
 *
 * @param level thickness, nm
 * @param points the corners of the line, in order; of a closed line the first is not repeated at its end
 * @param closed whether the line returns to its start; an open one ends at the edge of the map or where nothing is read
 */
public record Contour(double level, List<Position> points, boolean closed) {

    public Contour {
        points = List.copyOf(points);
    }

    /** Length of the line, pixels. */
    public double length() {
        double length = closed ? points.get(points.size() - 1).distanceTo(points.get(0)) : 0;
        for (int i = 1; i < points.size(); i++) {
            length += points.get(i - 1).distanceTo(points.get(i));
        }
        return length;
    }
}
