package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class ShadingFieldTest {

    private static final Encoding LINEAR = Encoding.linear(65535);

    @TempDir
    private Path folder;

    /** Cosine-fourth fall-off (common knowledge of lens design) that loses 30 % in the corners, and a lamp off the middle. */
    private static double vignette(int x, int y, int width, int height) {
        double u = (x + 0.5) / width - 0.5;
        double v = (y + 0.5) / height - 0.5;
        double tangent2 = (u * u + v * v) / 0.5 * (1 / Math.sqrt(0.7) - 1);
        return 0.6 / ((1 + tangent2) * (1 + tangent2)) * (1 + 0.05 * u - 0.03 * v);
    }

    private ShadingField field(Path path, Optional<ShadingField> dark) {
        try (PhotoFile photo = PhotoFile.open(path)) {
            return ShadingField.flat(photo, LINEAR, dark);
        }
    }

    private static double[] errors(ShadingField field, int width, int height, Camera.Scene truth) {
        float[] row = new float[width];
        double worst = 0;
        double squares = 0;
        for (int y = 0; y < height; y++) {
            field.row(y, 0, row);
            for (int x = 0; x < width; x++) {
                double error = row[x] / truth.at(x, y, 0) - 1;
                worst = Math.max(worst, Math.abs(error));
                squares += error * error;
            }
        }
        return new double[] {worst, Math.sqrt(squares / (width * height))};
    }

    @ParameterizedTest
    @CsvSource({"400, 300", "1000, 700", "257, 391"})
    void vignettingWithoutNoiseIsFollowedToAThousandth(int width, int height) {
        Camera.Scene truth = (x, y, c) -> vignette(x, y, width, height);
        Path path = Camera.linear(1e12, 0, 1).photograph(folder.resolve("flat.tif"), width, height, 1, truth);
        assertTrue(errors(field(path, Optional.empty()), width, height, truth)[0] < 1e-3);
    }

    @Test
    void noiseOfTheFlatIsNotPrintedIntoThePhoto() {
        Camera camera = Camera.linear(20000, 0.001, 2);
        Camera.Scene truth = (x, y, c) -> vignette(x, y, 400, 300);
        ShadingField field = field(camera.photograph(folder.resolve("flat.tif"), 400, 300, 1, truth), Optional.empty());
        double pixel = camera.sigma(0.5) / 0.5;
        double[] errors = errors(field, 400, 300, truth);
        assertTrue(errors[1] < pixel / 20, "rms error " + errors[1] + ", noise of a pixel " + pixel);
        double stated = field.uncertainty(0) / field.mean(0);
        assertTrue(errors[1] < 2 * stated && errors[1] > stated / 2, "rms error " + errors[1] + ", stated " + stated);
        assertTrue(field.residual(0) / field.mean(0) < pixel / 20);
    }

    @Test
    void aLampSpotIsFollowed() {
        Camera camera = Camera.linear(100000, 0, 3);
        Camera.Scene truth = (x, y, c) -> 0.4 + 0.3 * Math.exp(-((x - 120) * (x - 120) + (y - 170) * (y - 170)) / 7200.0);
        ShadingField field = field(camera.photograph(folder.resolve("flat.tif"), 400, 300, 1, truth), Optional.empty());
        assertTrue(errors(field, 400, 300, truth)[1] < 1e-3);
    }

    @Test
    void dustAndHotPixelsDoNotCount() {
        Camera camera = Camera.linear(50000, 0, 4);
        Camera.Scene even = (x, y, c) -> vignette(x, y, 400, 300);
        Camera.Scene dirty = (x, y, c) -> even.at(x, y, c)
                * (Math.hypot(x - 200, y - 90) < 6 ? 0.7 : 1) * (x % 97 == 5 && y % 83 == 7 ? 1.5 : 1);
        ShadingField field = field(camera.photograph(folder.resolve("flat.tif"), 400, 300, 1, dirty), Optional.empty());
        double rms = errors(field, 400, 300, even)[1];
        assertTrue(rms < 5e-4, "rms error " + rms);
        float[] row = new float[400];
        field.row(90, 0, row);
        assertEquals(even.at(200, 90, 0), row[200], 5e-4 * even.at(200, 90, 0));
        double left = field.outlierFraction(0);
        assertTrue(left > 0.005 && left < 0.02, "fraction left out " + left);
    }

    @Test
    void structureFinerThanTheFieldIsReported() {
        Camera camera = Camera.linear(1e6, 0, 5);
        Camera.Scene ripple = (x, y, c) -> 0.5 + 0.01 * Math.sin(2 * Math.PI * x / 19.0);
        ShadingField field = field(camera.photograph(folder.resolve("flat.tif"), 400, 300, 1, ripple), Optional.empty());
        float[] row = new float[400];
        field.row(150, 0, row);
        double left = 0;
        for (int x = 0; x < 400; x++) {
            left += Math.pow(row[x] - ripple.at(x, 150, 0), 2) / 400;
        }
        assertTrue(Math.sqrt(left) > 1e-3, "this test needs a ripple that cannot be followed");
        assertTrue(field.residual(0) > 0.5e-3, "residual " + field.residual(0));
    }

    @Test
    void darkIsTakenAway() {
        Camera camera = new Camera(20000, 0.001, 0.01, 16, false, 6);
        Path darkPath = camera.photograph(folder.resolve("dark.tif"), 200, 160, 2 + 1, (x, y, c) -> 0);
        Path flatPath = camera.photograph(folder.resolve("flat.tif"), 200, 160, 3, (x, y, c) -> 0.2 + 0.1 * c);
        try (PhotoFile dark = PhotoFile.open(darkPath)) {
            ShadingField darkField = ShadingField.dark(dark, LINEAR);
            ShadingField field = field(flatPath, Optional.of(darkField));
            for (int c = 0; c < 3; c++) {
                assertEquals(0.01, darkField.mean(c), 2e-5);
                assertTrue(darkField.uncertainty(c) < 2e-5);
                assertEquals(0.2 + 0.1 * c, field.mean(c), 1e-4);
            }
        }
    }

    @Test
    void smallFlatsAreFitted() {
        Path path = Camera.linear(20000, 0, 7).photograph(folder.resolve("flat.tif"), 5, 3, 1, (x, y, c) -> 0.5);
        ShadingField field = field(path, Optional.empty());
        float[] row = new float[5];
        field.row(2, 0, row);
        assertEquals(0.5, row[4], 0.02);
    }

    @Test
    void overexposedFlatIsRefused() {
        Path path = Pictures.tiff(folder.resolve("flat.tif"), 100, 80, 3, 8, (x, y, c) -> c == 1 && x < 2 ? 255 : 200);
        assertMessage(path + ": is overexposed: 2.0 % of channel 2 is at the top of the scale; take the flat with less light",
                () -> field(path, Encoding.srgb(8)));
    }

    @Test
    void flatNearTheDarkIsRefused() {
        Camera camera = new Camera(1e5, 0.001, 0.01, 16, false, 8);
        Path path = camera.photograph(folder.resolve("flat.tif"), 100, 80, 1, (x, y, c) -> 0.003);
        Path darkPath = camera.photograph(folder.resolve("dark.tif"), 100, 80, 1, (x, y, c) -> 0);
        try (PhotoFile photo = PhotoFile.open(path); PhotoFile dark = PhotoFile.open(darkPath)) {
            String message = assertThrows(PhotoException.class,
                    () -> ShadingField.flat(photo, LINEAR, Optional.of(ShadingField.dark(dark, LINEAR)))).getMessage();
            assertTrue(message.matches(java.util.regex.Pattern.quote(path.toString()) + ": is hardly brighter than the dark in "
                    + "channel 1 \\(0\\.00\\d+ of full scale at its darkest\\); take the flat with more light"), message);
        }
    }

    @Test
    void brightDarkIsRefused() {
        Path path = Pictures.tiff(folder.resolve("dark.tif"), 100, 80, 1, 8, (x, y, c) -> x < 10 ? 255 : 2);
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertMessage(path + ": is no dark frame: part of it is at the top of the scale; take it with the lens covered",
                    () -> ShadingField.dark(photo, Encoding.srgb(8)));
        }
    }

    private ShadingField field(Path path, Encoding encoding) {
        try (PhotoFile photo = PhotoFile.open(path)) {
            return ShadingField.flat(photo, encoding, Optional.empty());
        }
    }

    @Test
    void flatsOfAnotherKindAreTold() {
        Path flat = Pictures.tiff(folder.resolve("flat.tif"), 40, 30, 3, 8, (x, y, c) -> 100);
        ShadingField field = field(flat, Encoding.srgb(8));
        assertMessage(flat + ": this flat has 40 x 30 pixels, but p.tif has 41 x 30; take both with the same camera settings",
                () -> field.requireFits(photo(41, 30, 3, 8), "flat"));
        assertMessage(flat + ": this flat has 3 channels, but p.tif has 1; take both with the same camera settings",
                () -> field.requireFits(photo(40, 30, 1, 8), "flat"));
        assertMessage(flat + ": this flat has 8 bit, but p.tif has 16; take both with the same camera settings",
                () -> field.requireFits(photo(40, 30, 3, 16), "flat"));
        field.requireFits(photo(40, 30, 3, 8), "flat");
    }

    private static PhotoInfo photo(int width, int height, int channels, int bits) {
        return new PhotoInfo(Path.of("p.tif"), width, height, channels, bits, 1, Double.NaN, Optional.empty(), false);
    }

    private static void assertMessage(String expected, org.junit.jupiter.api.function.Executable action) {
        assertEquals(expected, assertThrows(PhotoException.class, action).getMessage());
    }
}
