package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;

class ContoursTest {

    @Test
    void aConeHasClosedCirclesOfTheRightRadiusAndLength() {
        Position centre = new Position(50.3, 49.8);
        List<Contour> contours = Contours.of(cone(centre), 40, 20);
        assertEquals(2, contours.size());
        for (Contour contour : contours) {
            assertTrue(contour.closed());
            for (Position point : contour.points()) {
                assertEquals(contour.level(), centre.distanceTo(point), 0.01);
            }
            assertEquals(2 * Math.PI * contour.level(), contour.length(), 0.003 * contour.length());
        }
        assertEquals(40, contours.get(0).level());
    }

    @Test
    void thickerFilmLiesOnTheRight() {
        // Signed area by the shoelace formula is positive for a turn from x to y: thick outside the circle lies to the left then.
        List<Position> points = Contours.of(cone(new Position(50, 50)), 30).get(0).points();
        double area = 0;
        for (int i = 0; i < points.size(); i++) {
            Position p = points.get(i);
            Position q = points.get((i + 1) % points.size());
            area += (p.x() * q.y() - q.x() * p.y()) / 2;
        }
        assertEquals(-Math.PI * 900, area, 5);
    }

    @Test
    void aLineThatLeavesTheMapIsOpen() {
        Field wedge = Field.of(3, 3, new float[] {0, 10, 20, 0, 10, 20, 0, 10, 20});
        Contour contour = Contours.of(wedge, 15).get(0);
        assertFalse(contour.closed());
        assertEquals(List.of(new Position(1.5, 2), new Position(1.5, 1), new Position(1.5, 0)), contour.points());
        assertEquals(2, contour.length(), 1e-12);
    }

    @Test
    void aHoleBreaksTheLine() {
        float nan = Float.NaN;
        Field wedge = Field.of(2, 5, new float[] {0, 10, 0, 10, nan, 10, 0, 10, 0, 10});
        List<Contour> contours = Contours.of(wedge, 4);
        assertEquals(2, contours.size());
        assertTrue(contours.stream().noneMatch(Contour::closed));
        assertEquals(2, contours.stream().mapToDouble(Contour::length).sum(), 1e-12);
    }

    @Test
    void theMeanDecidesWhetherDiagonalCornersJoin() {
        // Thick 10 top left and bottom right, thin elsewhere: level 4 below the mean 5, level 6 above it.
        Field saddle = Field.of(2, 2, new float[] {10, 0, 0, 10});
        List<Contour> joined = Contours.of(saddle, 4);
        List<Contour> apart = Contours.of(saddle, 6);
        assertEquals(2, joined.size());
        assertEquals(2, apart.size());
        // Each line cuts off a corner: a thin one (0.4 from it) or a thick one (0.4 from it).
        assertEquals(List.of(new Position(0.6, 0), new Position(1, 0.4)), joined.get(0).points());
        assertEquals(List.of(new Position(0.4, 0), new Position(0, 0.4)), apart.get(0).points());
    }

    @Test
    void aLevelThatPixelsHaveExactlyIsStillOneClosedLine() {
        Field peak = Field.of(5, 5, new float[] {0, 0, 0, 0, 0, 0, 1, 1, 1, 0, 0, 1, 2, 1, 0, 0, 1, 1, 1, 0, 0, 0, 0, 0, 0});
        List<Contour> contours = Contours.of(peak, 1);
        assertEquals(1, contours.size());
        assertTrue(contours.get(0).closed());
        assertEquals(8, contours.get(0).length(), 1e-12);
    }

    @Test
    void levelsThatAreNotReachedHaveNoLine() {
        assertEquals(List.of(), Contours.of(Field.constant(5, 5, 3), 4, 3));
        assertEquals(List.of(), Contours.of(Field.constant(1, 5, 3), 3));
        assertThrows(IllegalArgumentException.class, () -> Contours.of(Field.constant(5, 5, 3), Double.NaN));
    }

    private static Field cone(Position apex) {
        float[] values = new float[101 * 101];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) apex.distanceTo(new Position(i % 101, i / 101));
        }
        return Field.of(101, 101, values);
    }
}
