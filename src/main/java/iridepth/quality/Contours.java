package iridepth.quality;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * Lines of equal thickness by marching squares (the planar form of Lorensen and Cline, Marching cubes, Computer Graphics 21,
 * 1987): in each square of four neighbouring pixels the line crosses those edges on which the thickness passes the level, at
 * the point of linear interpolation. Squares with a pixel without a value hold no line. Where a square could be crossed in two
 * ways, the mean of its corners decides whether its thick corners join.
 *
 * <p>Every line has the thicker film on its right as one goes along it (y points downwards). Memory grows with the length of
 * the lines, not with the map; on a noisy map lines are long and ragged, so smooth or bin it first.
 */
public final class Contours {

    /** Corners of a square: top left, top right, bottom right, bottom left; edge i joins corner i and the next. */
    private static final int CORNERS = 4;

    private final Field field;
    private final double level;
    /** For each crossed edge the edge that the line goes on to; in the order of rows, for results that do not vary. */
    private final Map<Long, Long> next = new LinkedHashMap<>();

    private Contours(Field field, double level) {
        this.field = field;
        this.level = level;
    }

    /**
     * Traces lines.
     *
     * @param field thickness, nm
     * @param levels nm, finite
     * @return the lines of the first level, then those of the second, and so on
     */
    public static List<Contour> of(Field field, double... levels) {
        List<Contour> contours = new ArrayList<>();
        for (double level : levels) {
            if (!Double.isFinite(level)) {
                throw new IllegalArgumentException("contour at " + level + " nm: give a finite thickness");
            }
            contours.addAll(new Contours(field, level).trace());
        }
        return contours;
    }

    private List<Contour> trace() {
        for (int y = 0; y + 1 < field.height(); y++) {
            for (int x = 0; x + 1 < field.width(); x++) {
                crossSquare(x, y);
            }
        }
        List<Contour> contours = new ArrayList<>();
        Set<Long> entered = new HashSet<>(next.values());
        for (long edge : List.copyOf(next.keySet())) {
            if (!entered.contains(edge)) {
                contours.add(follow(edge));
            }
        }
        while (!next.isEmpty()) {
            contours.add(follow(next.keySet().iterator().next()));
        }
        return contours;
    }

    /** Takes a line off, from an edge on. */
    private Contour follow(long start) {
        List<Position> points = new ArrayList<>();
        long edge = start;
        while (next.containsKey(edge)) {
            points.add(crossing(edge));
            edge = next.remove(edge);
        }
        boolean closed = edge == start;
        if (!closed) {
            points.add(crossing(edge));
        }
        return new Contour(level, points, closed);
    }

    private void crossSquare(int x, int y) {
        double topLeft = field.at(x, y);
        double topRight = field.at(x + 1, y);
        double bottomRight = field.at(x + 1, y + 1);
        double bottomLeft = field.at(x, y + 1);
        boolean thick = thick(topLeft);
        double mean = (topLeft + topRight + bottomRight + bottomLeft) / CORNERS;
        boolean uncrossed = thick == thick(topRight) && thick == thick(bottomRight) && thick == thick(bottomLeft);
        if (uncrossed || !Double.isFinite(mean)) {
            return;
        }
        double[] corners = {topLeft, topRight, bottomRight, bottomLeft};
        for (int edge = 0; edge < CORNERS; edge++) {
            // The line enters where, going clockwise, the film turns from thick to thin, so that the thick side is on its right.
            if (thick(corners[edge]) && !thick(corners[(edge + 1) % CORNERS])) {
                next.put(id(x, y, edge), id(x, y, exit(corners, edge, thick(mean))));
            }
        }
    }

    /** The edge by which a line leaves: the next one clockwise, or anticlockwise, where the film turns from thin to thick. */
    private int exit(double[] corners, int entry, boolean thickCornersJoin) {
        int step = thickCornersJoin ? 1 : CORNERS - 1;
        int edge = (entry + step) % CORNERS;
        while (thick(corners[edge]) || !thick(corners[(edge + 1) % CORNERS])) {
            edge = (edge + step) % CORNERS;
        }
        return edge;
    }

    private boolean thick(double thickness) {
        return thickness >= level;
    }

    /** A number for an edge that is the same from both squares that share it: horizontal ones even, vertical ones odd. */
    private long id(int x, int y, int edge) {
        long column = edge == 1 ? x + 1 : x;
        long row = edge == 2 ? y + 1 : y;
        return 2 * (row * field.width() + column) + edge % 2;
    }

    private Position crossing(long id) {
        int x = (int) (id / 2 % field.width());
        int y = (int) (id / 2 / field.width());
        boolean vertical = id % 2 == 1;
        double from = field.at(x, y);
        double to = vertical ? field.at(x, y + 1) : field.at(x + 1, y);
        double share = (level - from) / (to - from);
        return vertical ? new Position(x, y + share) : new Position(x + share, y);
    }
}
