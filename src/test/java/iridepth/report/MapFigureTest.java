package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class MapFigureTest {
    @TempDir
    Path folder;

    private static byte[] states(int size, StateStyle state) {
        byte[] codes = new byte[size];
        Arrays.fill(codes, (byte) state.code());
        return codes;
    }

    /** A map of two halves, 100 nm left and 200 nm right, with a square of each other state. */
    private static MapCells halves(int width, int height, int most) {
        MapCells cells = MapCells.of(width, height, most);
        float[] nm = new float[width * height];
        byte[] state = new byte[width * height];
        int square = width / 12;
        for (int i = 0; i < nm.length; i++) {
            int x = i % width;
            int y = i / width;
            nm[i] = x < width / 2 ? 100 : 200;
            int which = x / square;
            if (y >= height / 4 && y < height / 4 + square && which % 2 == 1 && which / 2 < 5) {
                state[i] = (byte) (which / 2 + 1);
            }
        }
        cells.add(height / 3, Arrays.copyOfRange(nm, height / 3 * width, nm.length),
                Arrays.copyOfRange(state, height / 3 * width, nm.length));
        cells.add(0, Arrays.copyOf(nm, height / 3 * width), Arrays.copyOf(state, height / 3 * width));
        return cells;
    }

    @Test
    void cellsHoldTheMeanOfTheirReadPixels() {
        MapCells cells = MapCells.of(5, 3, 3);
        assertEquals(2, cells.factor());
        assertEquals(3, cells.columns());
        assertEquals(2, cells.rows());
        byte off = (byte) StateStyle.OFF_CURVE.code();
        byte doubtful = (byte) StateStyle.ORDER_DOUBTFUL.code();
        cells.add(1, new float[] {3, 5, Float.NaN, 8, 1, 10, 20, 30, 40, 50}, new byte[] {0, 0, off, 0, off, 0, 0, 0, 0, 0});
        cells.add(0, new float[] {1, Float.NaN, 7, 9, 2}, new byte[] {0, off, doubtful, doubtful, off});
        assertEquals(3, cells.mean(0));
        assertEquals(8, cells.mean(1));
        assertTrue(Double.isNaN(cells.mean(2)));
        assertEquals(15, cells.mean(3));
        assertEquals(50, cells.mean(5));
        assertEquals(StateStyle.READ, cells.state(0));
        assertEquals(StateStyle.ORDER_DOUBTFUL, cells.state(1));
        assertEquals(StateStyle.OFF_CURVE, cells.state(2));
        assertArrayEquals(new long[] {9, 2, 4, 0, 0, 0}, cells.total());
    }

    @Test
    void orderOfTheRowsLeavesNoTrace() {
        MapCells down = MapCells.of(40, 40, 8);
        MapCells up = MapCells.of(40, 40, 8);
        for (int i = 0; i < 40; i++) {
            down.add(i, row(i), states(40, StateStyle.READ));
            up.add(39 - i, row(39 - i), states(40, StateStyle.READ));
        }
        for (int cell = 0; cell < 64; cell++) {
            assertEquals(down.mean(cell), up.mean(cell));
        }
    }

    private static float[] row(int y) {
        float[] nm = new float[40];
        for (int x = 0; x < 40; x++) {
            nm[x] = 1e4f / (1 + x + 7 * y);
        }
        return nm;
    }

    @Test
    void readPixelWithoutThicknessIsRefused() {
        MapCells cells = MapCells.of(1, 1, 10);
        assertThrows(IllegalArgumentException.class, () -> cells.add(0, new float[] {Float.NaN}, new byte[] {0}));
        assertThrows(IllegalArgumentException.class, () -> cells.add(0, new float[] {1}, new byte[] {17}));
        assertThrows(IllegalArgumentException.class, () -> cells.add(1, new float[] {1}, new byte[] {0}));
    }

    @Test
    void scaleSpansTheThicknessesRoundedOutwards() {
        MapFigure figure = MapFigure.of("t", halves(240, 180, 1600), 0.5);
        assertEquals(100, figure.fromNm());
        assertEquals(200, figure.toNm());
        MapCells even = MapCells.of(3, 1, 10);
        even.add(0, new float[] {70.01f, 70.01f, 70.01f}, new byte[3]);
        MapFigure flat = MapFigure.of("t", even, 0.5);
        assertTrue(flat.fromNm() <= 70.01 && flat.toNm() >= 70.01 && flat.toNm() > flat.fromNm());
    }

    @Test
    void pixelsTakeTheColourOfTheirThicknessOrState() throws IOException {
        Path file = folder.resolve("thickness.png");
        new MapFigure("Halves", halves(240, 180, 1600), 0.5, 100, 200).write(file);
        BufferedImage image = ImageIO.read(file.toFile());
        int enlarge = 3;
        ColourScale scale = ColourScale.thickness();
        assertEquals(scale.rgb(0), image.getRGB(96 + 10 * enlarge, 88 + 10 * enlarge) & 0xFFFFFF);
        assertEquals(scale.rgb(255), image.getRGB(96 + 200 * enlarge, 88 + 10 * enlarge) & 0xFFFFFF);
        for (int k = 1; k < 5; k++) {
            int x = 96 + (20 * (2 * k + 1) + 10) * enlarge;
            assertEquals(StateStyle.of(k + 1).rgb(), image.getRGB(x, 88 + 50 * enlarge) & 0xFFFFFF, "state " + (k + 1));
        }
    }

    @Test
    void samePictureGivesTheSameBytesAndIsReadByAnotherReader() throws IOException {
        Path a = folder.resolve("a.png");
        Path b = folder.resolve("b.png");
        MapFigure figure = MapFigure.of("Halves", halves(240, 180, 100), 0.5);
        figure.write(a);
        MapFigure.of("Halves", halves(240, 180, 100), 0.5).write(b);
        assertArrayEquals(Files.readAllBytes(a), Files.readAllBytes(b));
        Picture drawn = figure.draw();
        BufferedImage image = ImageIO.read(a.toFile());
        assertEquals(drawn.width(), image.getWidth());
        int[] read = image.getRGB(0, 0, image.getWidth(), image.getHeight(), null, 0, image.getWidth());
        for (int i = 0; i < read.length; i++) {
            assertEquals(drawn.pixels()[i] & 0xFFFFFF, read[i] & 0xFFFFFF);
        }
    }

    @Test
    void mapWithNothingReadStillMakesAPicture() {
        MapCells cells = MapCells.of(2, 2, 10);
        cells.add(0, new float[4], states(4, StateStyle.DARK));
        Path file = folder.resolve("dark.png");
        MapFigure.of("Nothing", cells, Double.NaN).write(file);
        assertTrue(Files.exists(file));
    }
}
