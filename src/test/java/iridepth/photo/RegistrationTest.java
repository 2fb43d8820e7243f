package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class RegistrationTest {

    private static final int WIDTH = 320;
    private static final int HEIGHT = 280;

    @TempDir
    private Path folder;

    /** A film with fringes that depend on the light, an uncoated step and some specks of dust, moved by (dx, dy). */
    private static Camera.Scene film(double wavelength, double dx, double dy) {
        Random random = new Random(1);
        double[] specks = random.doubles(60).toArray();
        return (x, y, c) -> {
            double u = x - dx;
            double v = y - dy;
            double thickness = 250 + 0.6 * u + 0.001 * v * v;
            double light = 0.35 + 0.25 * Math.cos(4 * Math.PI * 1.46 * thickness / wavelength);
            double coated = 1 / (1 + Math.exp((v - 190 - 0.1 * u) / 0.7));
            light = coated * light + (1 - coated) * 0.6;
            for (int i = 0; i < specks.length; i += 2) {
                double distance = Math.hypot(u - WIDTH * specks[i], v - HEIGHT * specks[i + 1]);
                light *= 1 - 0.6 / (1 + Math.exp((distance - 3) / 0.7));
            }
            return light;
        };
    }

    private Path photograph(String name, Camera.Scene scene, long seed) {
        return Camera.linear(10000, 0.002, seed).photograph(folder.resolve(name), WIDTH, HEIGHT, 1, scene);
    }

    private Registration register(Camera.Scene first, Camera.Scene second) {
        try (PhotoFile a = PhotoFile.open(photograph("a.tif", first, 1));
                PhotoFile b = PhotoFile.open(photograph("b.tif", second, 2))) {
            return Registration.of(a, b);
        }
    }

    @ParameterizedTest
    @CsvSource({"0, 0", "0.5, 0", "0.3, -0.7", "1.25, 2.5", "-7.4, 3.6", "40, -25"})
    void shiftIsFoundUnderOneLight(double dx, double dy) {
        Registration found = register(film(550, 0, 0), film(550, dx, dy));
        assertEquals(dx, found.dx(), 0.2);
        assertEquals(dy, found.dy(), 0.2);
        assertTrue(found.known());
    }

    @ParameterizedTest
    @CsvSource({"0, 0", "0.5, -0.4", "1.25, 2.5", "-7.4, 3.6"})
    void shiftIsFoundUnderTwoLights(double dx, double dy) {
        Registration found = register(film(550, 0, 0), film(640, dx, dy));
        assertEquals(dx, found.dx(), 0.2);
        assertEquals(dy, found.dy(), 0.2);
    }

    @Test
    void photosWithoutStructureTellNothing() {
        Registration found = register((x, y, c) -> 0.5, (x, y, c) -> 0.5);
        assertFalse(found.known());
        assertTrue(Double.isNaN(found.dx()) && Double.isNaN(found.dy()));
    }

    @Test
    void shiftedPhotosAreRefused() {
        Path first = photograph("a.tif", film(550, 0, 0), 1);
        Path second = photograph("b.tif", film(550, 2, -3), 2);
        Path close = photograph("c.tif", film(640, 0.3, 0.2), 3);
        try (PhotoFile a = PhotoFile.open(first); PhotoFile b = PhotoFile.open(second); PhotoFile c = PhotoFile.open(close)) {
            assertEquals(second + ": is shifted by 2.0 columns and -3.0 rows against " + first
                    + "; take the photos without moving camera or sample",
                    assertThrows(PhotoException.class, () -> Registration.require(a, b)).getMessage());
            assertEquals(0.3, Registration.require(a, c).dx(), 0.2);
        }
    }

    @Test
    void otherSizesAndSmallPhotosAreRefused() {
        Path first = Pictures.tiff(folder.resolve("a.tif"), 30, 30, 1, 8, (x, y, c) -> 100);
        Path second = Pictures.tiff(folder.resolve("b.tif"), 31, 30, 1, 8, (x, y, c) -> 100);
        try (PhotoFile a = PhotoFile.open(first); PhotoFile b = PhotoFile.open(second)) {
            assertEquals(second + ": has 31 x 30 pixels, but " + first + " has 30 x 30; take all photos of a field with the "
                    + "same camera settings", assertThrows(PhotoException.class, () -> Registration.of(a, b)).getMessage());
            assertEquals(first + ": is too small to be registered; give photos of 32 x 32 pixels or more",
                    assertThrows(PhotoException.class, () -> Registration.of(a, a)).getMessage());
        }
    }
}
