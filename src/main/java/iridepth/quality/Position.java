package iridepth.quality;

/**
 * A point on a map in pixel coordinates, see {@link Field}.
 *
 * @param x column, to the right
 * @param y row, downwards
 */
public record Position(double x, double y) {

    public Position {
        if (!Double.isFinite(x) || !Double.isFinite(y)) {
            throw new IllegalArgumentException("position (" + x + ", " + y + "): give finite coordinates");
        }
    }

    /** Distance to another point, pixels. */
    public double distanceTo(Position other) {
        return Math.hypot(other.x - x, other.y - y);
    }
}
