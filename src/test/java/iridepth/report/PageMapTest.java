package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class PageMapTest {
    @ParameterizedTest
    @CsvSource({"640, 480, 1", "1, 1, 1", "1200, 583, 1", "1201, 10, 2", "6000, 4000, 6", "20000, 3, 17", "40000, 40000, 48"})
    void gridKeepsWithinItsBoundsAndOnThePhoto(int width, int height, int factor) {
        PageGrid grid = PageGrid.of(width, height);
        assertEquals(factor, grid.factor());
        assertTrue(grid.columns() <= PageGrid.LONGEST && grid.rows() <= PageGrid.LONGEST && grid.points() <= PageGrid.MOST);
        assertTrue(grid.columns() >= 1 && grid.rows() >= 1);
        int lastX = grid.firstX() + (grid.columns() - 1) * factor;
        int lastY = grid.firstY() + (grid.rows() - 1) * factor;
        assertTrue(lastX < width && lastX + factor >= width, "columns reach the edge");
        assertTrue(lastY < height && lastY + factor >= height, "rows reach the edge");
    }

    @Test
    void pointsAreTheMiddlePixelsOfTheirBlocks() {
        int width = 2403;
        PageMap map = PageMap.of(width, 5, 1, 1);
        assertEquals(3, map.grid().factor());
        for (int y = 4; y >= 0; y--) {
            float[] nm = new float[width];
            float[] other = new float[width];
            for (int x = 0; x < width; x++) {
                nm[x] = 10_000 * y + x;
                other[x] = nm[x] + 0.5f;
            }
            map.add(y, nm, nm, new byte[width], other);
        }
        assertEquals(801 * 2, map.thickness().length);
        assertEquals(10_001, map.thickness()[0]);
        assertEquals(10_004, map.thickness()[1]);
        assertEquals(40_001 + 3 * 800, map.thickness()[801 + 800]);
        assertEquals(40_001.5f, map.alternatives()[0][801]);
        assertEquals(5L * width, map.total()[0]);
    }

    @Test
    void statesAreCountedOverAllPixelsAndOnlyReadOnesHaveValues() {
        PageMap map = PageMap.of(4, 1, 1, 0);
        map.add(0, new float[] {1, 2, 3, Float.NaN}, new float[] {4, 5, 6, 7}, new byte[] {0, 1, 2, 3});
        assertArrayEquals(new long[] {1, 1, 1, 1, 0, 0}, map.total());
        assertArrayEquals(new float[] {1, 2, Float.NaN, Float.NaN}, map.thickness());
        assertArrayEquals(new float[] {4, 5, Float.NaN, Float.NaN}, map.uncertainty());
    }

    @Test
    void whatDoesNotFitIsRefused() {
        PageMap map = PageMap.of(2, 2, Double.NaN, 1);
        float[] row = {1, 2};
        assertThrows(IllegalArgumentException.class, () -> map.add(0, row, row, new byte[2]));
        assertThrows(IllegalArgumentException.class, () -> map.add(2, row, row, new byte[2], row));
        assertThrows(IllegalArgumentException.class, () -> map.add(0, row, row, new byte[] {0, 9}, row));
        assertThrows(IllegalArgumentException.class, () -> map.add(0, new float[3], row, new byte[3], row));
        assertThrows(IllegalArgumentException.class, () -> map.add(0, new float[] {1, Float.NaN}, row, new byte[2], row));
        assertThrows(IllegalArgumentException.class, () -> PageMap.of(2, 2, 0, 0));
        assertThrows(IllegalArgumentException.class, () -> PageMap.of(0, 2, 1, 0));
    }

    @Test
    void mapOfWhichRowsAreMissingIsNotShown() {
        PageMap map = PageMap.of(2, 3, Double.NaN, 0);
        map.add(2, new float[2], new float[2], new byte[2]);
        map.add(0, new float[2], new float[2], new byte[2]);
        IllegalStateException e = assertThrows(IllegalStateException.class, map::complete);
        assertEquals("row 1 of the map has not been added", e.getMessage());
        map.add(1, new float[2], new float[2], new byte[2]);
        assertEquals(map, map.complete());
    }

    @Test
    void steppedValuesAreRoundedAndMissingOnesStayMissing() {
        int[] steps = PagePlane.stepped(new float[] {1.26f, -0.04f, Float.NaN, Float.POSITIVE_INFINITY, 1e30f}, 0.1);
        assertEquals(13, steps[0]);
        assertEquals(0, steps[1]);
        assertTrue(Arrays.stream(steps, 2, 5).allMatch(v -> v == PagePlane.NONE));
    }
}
