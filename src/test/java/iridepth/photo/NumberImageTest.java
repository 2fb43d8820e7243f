package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.io.FileSaver;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Files written by ImageJ, a program apart, are read as it wrote them. */
class NumberImageTest {
    @TempDir
    private Path folder;

    private Path saved(String name, ImagePlus image) {
        Path file = folder.resolve(name);
        assertTrue(new FileSaver(image).saveAsTiff(file.toString()));
        return file;
    }

    private Path map() {
        ImagePlus image = new ImagePlus("map", new FloatProcessor(3, 2, new float[] {1.5f, -2, Float.NaN, 4, 1e-20f, 6}));
        return saved("map.tif", image);
    }

    private String refusal(Path file) {
        String message = assertThrows(PhotoException.class, () -> NumberImage.open(file)).getMessage();
        assertEquals(1, message.lines().count());
        return message;
    }

    @Test
    void numbersAreThoseThatWereSaved() {
        NumberImage image = NumberImage.open(map());
        assertEquals(3, image.width());
        assertEquals(2, image.height());
        assertEquals(1.5f, image.at(0, 0));
        assertEquals(-2f, image.at(1, 0));
        assertTrue(Float.isNaN(image.at(2, 0)));
        assertEquals(4f, image.at(0, 1));
        assertEquals(1e-20f, image.at(1, 1));
        assertEquals(6f, image.at(2, 1));
    }

    @Test
    void codesOfEightBitsAreWholeNumbers() {
        NumberImage image = NumberImage.open(saved("codes.tif", new ImagePlus("", new ByteProcessor(2, 2,
                new byte[] {0, 5, 127, (byte) 200}))));
        assertEquals(5, image.at(1, 0));
        assertEquals(127, image.at(0, 1));
        assertEquals(200, image.at(1, 1));
    }

    @Test
    void whatIsNoMapIsRefused() throws IOException {
        assertTrue(refusal(folder.resolve("none.tif")).contains("no such file"));
        assertTrue(refusal(Files.writeString(folder.resolve("a.tif"), "thickness")).contains("not a TIFF"));
        assertTrue(refusal(Files.writeString(folder.resolve("b.tif"), "II")).contains("truncated"));
        assertTrue(refusal(saved("rgb.tif", new ImagePlus("", new ColorProcessor(3, 2)))).contains("32-bit floating-point"));
        byte[] whole = Files.readAllBytes(map());
        Path half = Files.write(folder.resolve("half.tif"), Arrays.copyOf(whole, whole.length - 5));
        assertTrue(refusal(half).contains("truncated"));
    }
}
