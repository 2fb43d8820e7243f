package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.quality.Distribution;
import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class HistogramFigureTest {
    private static final int INSIDE = 0x4A86B8;
    private static final int OUTSIDE = 0xD55E00;

    @TempDir
    Path folder;

    /** One value in [280, 281), two in [281, 282) and so on to ten in [289, 290). */
    private static Distribution staircase() {
        Distribution distribution = Distribution.over(0, 1000);
        for (int i = 0; i < 10; i++) {
            for (int k = 0; k <= i; k++) {
                distribution.add(280.5 + i);
            }
        }
        return distribution;
    }

    private static HistogramFigure figure(Tolerance tolerance) {
        Distribution distribution = staircase();
        return new HistogramFigure("Stairs", List.of("55 pixels"), Histogram.of(distribution, 1), distribution,
                Optional.ofNullable(tolerance));
    }

    private static int pixel(Picture picture, double x, double y) {
        return picture.pixels()[(int) y * picture.width() + (int) x] & 0xFFFFFF;
    }

    private static long count(Picture picture, int rgb) {
        long count = 0;
        for (int v : picture.pixels()) {
            count += (v & 0xFFFFFF) == rgb ? 1 : 0;
        }
        return count;
    }

    @Test
    void barsBeyondTheLimitsHaveAnotherColour() {
        Picture picture = figure(Tolerance.between(283, 300)).draw();
        double share = (double) count(picture, OUTSIDE) / (count(picture, OUTSIDE) + count(picture, INSIDE));
        assertEquals((1 + 2 + 3) / 55.0, share, 0.03);
        assertEquals(0, count(figure(null).draw(), OUTSIDE));
    }

    @Test
    void areasOfTheBarsAreAsTheirCounts() {
        HistogramFigure figure = figure(null);
        Picture picture = figure.draw();
        int top = 0;
        while (pixel(picture, 600, 110 + top) != 0x1A1A1A) {
            top++;
        }
        Axes axes = figure.axes(picture, 110 + top + 1);
        for (int i = 0; i < 10; i++) {
            assertEquals(INSIDE, pixel(picture, axes.px(280.3 + i), axes.py(i + 0.7)), "bar " + i + " reaches up");
            assertTrue(INSIDE != pixel(picture, axes.px(280.3 + i), axes.py(i + 1.25)), "bar " + i + " ends");
        }
    }

    @Test
    void limitFarAwayDoesNotSquashTheBars() {
        HistogramFigure figure = figure(Tolerance.atLeast(5));
        Axes axes = figure.axes(new Picture(1200, 800), 100);
        assertTrue(axes.x0() > 270, "the axis begins at " + axes.x0());
        assertTrue(figure(Tolerance.atLeast(275)).axes(new Picture(1200, 800), 100).x0() < 275);
    }

    @Test
    void fewStrayPixelsDoNotSquashTheBars() {
        Distribution distribution = Distribution.over(0, 1000);
        for (int i = 0; i < 10_000; i++) {
            distribution.add(285 + i % 10);
        }
        distribution.add(900);
        HistogramFigure figure = new HistogramFigure("Stray", List.of(), Histogram.of(distribution, 1), distribution,
                Optional.empty());
        Axes axes = figure.axes(new Picture(1200, 800), 100);
        assertTrue(axes.x1() < 310, "the axis ends at " + axes.x1());
        assertTrue(figure.csv().toString().contains("900,901,1,"), "the table keeps it");
    }

    @Test
    void tableHoldsEveryBin() {
        List<String> lines = figure(null).csv().toString().lines().filter(l -> !l.startsWith("#")).toList();
        assertEquals("from_nm,to_nm,pixels,share", lines.get(0));
        assertEquals(11, lines.size());
        assertEquals("280,281,1,0.01818181818", lines.get(1));
        assertEquals("289,290,10,0.1818181818", lines.get(10));
    }

    @Test
    void mapWithNothingReadStillMakesAPictureAndATable() throws IOException {
        Distribution none = Distribution.over(0, 10);
        HistogramFigure figure = new HistogramFigure("Nothing", List.of(), Histogram.of(none), none,
                Optional.of(Tolerance.between(1, 2)));
        figure.write(folder.resolve("a.png"));
        figure.write(folder.resolve("b.png"));
        assertArrayEquals(Files.readAllBytes(folder.resolve("a.png")), Files.readAllBytes(folder.resolve("b.png")));
        assertTrue(figure.csv().toString().endsWith("from_nm,to_nm,pixels,share\n"));
    }
}
