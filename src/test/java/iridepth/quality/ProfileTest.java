package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;

class ProfileTest {

    /** A wedge of 2 nm per pixel to the right and 1 nm per pixel downwards, random part 0.4 nm, systematic part 0.3 nm. */
    private static final MeasuredField WEDGE = wedge(1);

    @Test
    void aWedgeIsALineOfItsSlope() {
        // From (2, 1) towards (5, 5), length 5: slope (2 * 3 + 1 * 4) / 5 = 2 nm per pixel.
        Profile p = Profile.along(WEDGE, new Position(2, 1), new Position(5, 5), 1);
        assertEquals(6, p.points().size());
        for (Profile.Point point : p.points()) {
            assertEquals(105 + 2 * point.distance(), point.average().thickness(), 1e-4);
        }
        assertEquals(5, p.points().get(5).distance(), 1e-12);
    }

    @Test
    void theLastPointIsTheEndOfALineOfBrokenLength() {
        Profile p = Profile.along(WEDGE, new Position(0, 0), new Position(2.5, 0), 1);
        assertEquals(List.of(0.0, 1.0, 2.0, 2.5), p.points().stream().map(Profile.Point::distance).toList());
        assertEquals(105, p.points().get(3).average().thickness(), 1e-4);
    }

    @Test
    void widthShrinksTheRandomPartAndNotTheSystematicOne() {
        // JCGM 100, 4.2.3 and 5.2.2: 0.4 / sqrt(4) = 0.2; 0.3 remains; combined sqrt(0.13).
        Average a = Profile.along(WEDGE, new Position(2, 4), new Position(8, 4), 4).points().get(3).average();
        assertEquals(4, a.count());
        assertEquals(100 + 2 * 5 + 4, a.thickness(), 1e-4);
        assertEquals(0.2, a.random(), 1e-7);
        assertEquals(0.3, a.systematic(), 1e-7);
        assertEquals(Math.sqrt(0.13), a.standardUncertainty(), 1e-7);
        // Samples at -1.5, -0.5, 0.5 and 1.5 nm about the mean.
        assertEquals(Math.sqrt(5 / 3.0), a.spread(), 1e-4);
    }

    @Test
    void correlatedNeighboursShrinkTheRandomPartLess() {
        // Nine samples of which nine share one error count as one; with two sharing, as four and a half.
        Position start = new Position(1, 5);
        Position end = new Position(9, 5);
        assertEquals(0.4, Profile.along(wedge(9), start, end, 9).points().get(2).average().random(), 1e-7);
        assertEquals(0.4 / Math.sqrt(4.5), Profile.along(wedge(2), start, end, 9).points().get(2).average().random(), 1e-7);
        assertEquals(0.4, Profile.along(wedge(100), start, end, 9).points().get(2).average().random(), 1e-7);
    }

    @Test
    void holesAndTheOutsideAreEmpty() {
        float[] values = {1, 2, Float.NaN, Float.NaN, 5};
        MeasuredField f = MeasuredField.of(Field.of(5, 1, values), Field.constant(5, 1, 1), Field.constant(5, 1, 1));
        Profile p = Profile.along(f, new Position(0, 0), new Position(6, 0), 1);
        assertEquals(List.of(1L, 1L, 0L, 0L, 1L, 0L, 0L), p.points().stream().map(q -> q.average().count()).toList());
        Average hole = p.points().get(2).average();
        assertTrue(Double.isNaN(hole.thickness()) && Double.isNaN(hole.standardUncertainty()));
    }

    @Test
    void ringsOfAConeHaveTheMeanOfTheirRadii() {
        // 300 - 2 r nm; the mean radius over a ring from a to b is 2 (b^3 - a^3) / (3 (b^2 - a^2)).
        float[] cone = new float[201 * 201];
        for (int i = 0; i < cone.length; i++) {
            cone[i] = (float) (300 - 2 * Math.hypot(i % 201 - 100, i / 201 - 100));
        }
        MeasuredField f = MeasuredField.of(Field.of(201, 201, cone), Field.constant(201, 201, 1),
                Field.constant(201, 201, 0.1));
        Profile p = Profile.radial(f, new Position(100, 100), 80, 20);
        assertEquals(4, p.points().size());
        for (int i = 0; i < 4; i++) {
            double a = 20 * i;
            double b = a + 20;
            Profile.Point point = p.points().get(i);
            double meanRadius = 2 * (b * b * b - a * a * a) / (3 * (b * b - a * a));
            assertEquals(a + 10, point.distance());
            assertEquals(300 - 2 * meanRadius, point.average().thickness(), 0.2);
            assertEquals(Math.PI * (b * b - a * a), point.average().count(), 0.02 * Math.PI * b * b);
            assertEquals(1 / Math.sqrt(point.average().count()), point.average().random(), 1e-9);
            assertEquals(0.1, point.average().systematic(), 1e-7);
        }
    }

    @Test
    void everyPixelLiesInOneRing() {
        Profile p = Profile.radial(WEDGE, new Position(4.3, 5.1), 20, 1.5);
        assertEquals(11 * 11, p.points().stream().mapToLong(point -> point.average().count()).sum());
    }

    @Test
    void linesAndRingsWithoutExtentAreRefused() {
        Position here = new Position(1, 1);
        assertThrows(IllegalArgumentException.class, () -> Profile.along(WEDGE, here, here, 1));
        assertThrows(IllegalArgumentException.class, () -> Profile.along(WEDGE, here, new Position(2, 2), 0));
        assertThrows(IllegalArgumentException.class, () -> Profile.radial(WEDGE, here, 0, 1));
        assertThrows(IllegalArgumentException.class, () -> Profile.radial(WEDGE, here, 1, 2));
        assertThrows(IllegalArgumentException.class, () -> new Position(Double.NaN, 0));
    }

    private static MeasuredField wedge(double correlatedPixels) {
        float[] values = new float[11 * 11];
        for (int i = 0; i < values.length; i++) {
            values[i] = 100 + 2 * (i % 11) + i / 11;
        }
        return new MeasuredField(Field.of(11, 11, values), Field.constant(11, 11, 0.4), Field.constant(11, 11, 0.3),
                correlatedPixels);
    }
}
