package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.report.LineFigure.Curve;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class LineFigureTest {
    private static final double[] X = {0, 10, 20, 30, 40};

    @TempDir
    Path folder;

    private static LineFigure level(double[] y) {
        return LineFigure.of("Level", "x (nm)", "y (nm)").with(Curve.line("level", X, y).inColour(0xFF0000));
    }

    private static long count(Picture picture, int rgb) {
        long count = 0;
        for (int v : picture.pixels()) {
            count += (v & 0xFFFFFF) == rgb ? 1 : 0;
        }
        return count;
    }

    @Test
    void missingValuesInterruptACurve() {
        long whole = count(level(new double[] {5, 5, 5, 5, 5}).draw(), 0xFF0000);
        long half = count(level(new double[] {5, 5, Double.NaN, 5, 5}).draw(), 0xFF0000);
        assertTrue(whole > 1000, "the curve is drawn");
        assertEquals(0.5, (double) half / whole, 0.05);
    }

    @Test
    void bandLiesUnderItsCurve() {
        double[] y = {5, 6, 7, 8, 9};
        LineFigure plain = level(y);
        LineFigure banded = LineFigure.of("Level", "x (nm)", "y (nm)")
                .with(Curve.line("level", X, y).withHalfWidth(new double[] {1, 1, 1, 1, 1}).inColour(0xFF0000));
        int pale = 0xFFC7C7;
        assertTrue(count(plain.draw(), pale) < 100, "no band where none is known");
        assertTrue(count(banded.draw(), pale) > 10_000);
    }

    @Test
    void limitBeyondTheCurveIsHeldByTheAxis() {
        LineFigure figure = level(new double[] {5, 5.1, 5, 5.1, 5}).yLimit("upper limit", 9);
        assertTrue(count(figure.draw(), 0x8A2500) > 300, "the limit is drawn");
        assertTrue(count(level(new double[] {5, 5.1, 5, 5.1, 5}).yLimit("none", Double.NaN).draw(), 0x8A2500) < 100,
                "a limit without a value is not");
    }

    @Test
    void curvesWithoutValuesStillMakeAPicture() throws IOException {
        double[] none = {Double.NaN, Double.NaN, Double.NaN, Double.NaN, Double.NaN};
        level(none).write(folder.resolve("a.png"));
        level(none).write(folder.resolve("b.png"));
        assertArrayEquals(Files.readAllBytes(folder.resolve("a.png")), Files.readAllBytes(folder.resolve("b.png")));
        LineFigure.of("Nothing", "x", "y").draw();
    }

    @Test
    void valuesThatDoNotBelongTogetherAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> Curve.line("c", X, new double[4]));
    }
}
