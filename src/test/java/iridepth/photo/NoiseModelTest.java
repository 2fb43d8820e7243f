package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javax.imageio.IIOImage;
import javax.imageio.ImageIO;
import javax.imageio.ImageWriteParam;
import javax.imageio.ImageWriter;
import javax.imageio.stream.ImageOutputStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The truth is the camera that the photos were simulated with: photon and read noise as EMVA Standard 1288 models them. */
class NoiseModelTest {

    private static final int WIDTH = 400;
    private static final int HEIGHT = 300;
    /** Fringes of a wedge that bends: smooth, with every level from dark to bright. */
    private static final Camera.Scene FRINGES =
            (x, y, c) -> 0.35 + 0.28 * Math.sin(2 * Math.PI * (x / (70.0 + 15 * c) + y * y / 90000.0));

    @TempDir
    private Path folder;

    private NoiseModel fromPhoto(Path path, Encoding encoding) {
        try (PhotoFile photo = PhotoFile.open(path)) {
            return NoiseModel.fromPhoto(photo, encoding, Optional.empty());
        }
    }

    private static void assertSigma(double expected, NoiseModel model, int channel, double level, double tolerance) {
        assertEquals(expected, Math.sqrt(model.variance(channel, level)), tolerance * expected, "sigma at " + level);
    }

    @ParameterizedTest
    @CsvSource({"16, false", "16, true", "8, true"})
    void photoOfFringesTellsTheNoiseOfTheCamera(int bits, boolean srgb) {
        Camera camera = new Camera(8000, 0.003, 0, bits, srgb, 1);
        NoiseModel model = fromPhoto(camera.photograph(folder.resolve("p.tif"), WIDTH, HEIGHT, 3, FRINGES),
                camera.encoding());
        for (int c = 0; c < 3; c++) {
            for (double level : new double[] {0.1, 0.3, 0.6}) {
                assertSigma(camera.sigma(level), model, c, level, 0.05);
            }
            assertEquals(0, model.correlation(c), 0.03);
        }
        assertFalse(model.correlated());
    }

    @Test
    void edgesAndTextureDoNotCount() {
        Camera camera = Camera.linear(8000, 0.003, 2);
        Camera.Scene scene = (x, y, c) -> {
            boolean textured = x < 120;
            double texture = textured ? 0.05 * Math.sin(1.9 * x + 0.7 * y) * Math.sin(0.4 * x - 2.3 * y) : 0;
            return 0.1 + 0.1 * ((x / 29 + y / 37) % 6) + texture;
        };
        NoiseModel model = fromPhoto(camera.photograph(folder.resolve("p.tif"), WIDTH, HEIGHT, 1, scene), camera.encoding());
        assertSigma(camera.sigma(0.2), model, 0, 0.2, 0.08);
        assertSigma(camera.sigma(0.5), model, 0, 0.5, 0.08);
    }

    @Test
    void nearlyConstantPhotoTellsTheNoiseAtItsLevel() {
        Camera camera = Camera.linear(20000, 0, 3);
        NoiseModel model = fromPhoto(camera.photograph(folder.resolve("p.tif"), 120, 90, 1, (x, y, c) -> 0.5),
                camera.encoding());
        assertSigma(camera.sigma(0.5), model, 0, 0.5, 0.05);
    }

    /** Noise of 0.3 counts rms: with the rounding the error of a count is sqrt(0.3^2 + 1/12) = 0.417 counts rms. */
    @Test
    void noiseBelowTheRoundingStepIsNotTakenAsNone() {
        double sigma = 0.3 / 255;
        Camera camera = new Camera(1e9, sigma, 0, 8, false, 4);
        Path path = camera.photograph(folder.resolve("p.tif"), WIDTH, HEIGHT, 1, (x, y, c) -> 0.2 + 0.0013 * x + 0.0007 * y);
        NoiseModel model = fromPhoto(path, Encoding.linear(255));
        double total = Math.sqrt(model.variance(0, 0.5, 1 / 255.0)) * 255;
        assertEquals(0.417, total, 0.06);
    }

    @Test
    void photoWithoutAnyNoiseHasThatOfRounding() {
        Path path = Pictures.tiff(folder.resolve("p.tif"), 64, 64, 1, 8, (x, y, c) -> 128);
        NoiseModel model = fromPhoto(path, Encoding.linear(255));
        assertEquals(1 / (12 * 255.0 * 255.0), model.variance(0, 0.5, 1 / 255.0), 1e-12);
    }

    @Test
    void pedestalWithoutADarkShowsAsBlackLevel() {
        Camera camera = new Camera(8000, 0, 0.1, 16, false, 5);
        NoiseModel model = fromPhoto(camera.photograph(folder.resolve("p.tif"), WIDTH, HEIGHT, 1, FRINGES),
                camera.encoding());
        assertEquals(0.1, model.black(0), 0.02);
        assertSigma(camera.sigma(0.5), model, 0, 0.6, 0.04);
    }

    @Test
    void differencesOfFlatsTellTheNoiseWhateverTheScene() {
        Camera.Scene rough = (x, y, c) -> 0.1 + 0.1 * ((x * 7 + y * 13) % 8);
        List<PhotoFile> flats = new ArrayList<>();
        for (int i = 0; i < 3; i++) {
            flats.add(PhotoFile.open(new Camera(8000, 0.003, 0, 16, false, 10 + i)
                    .photograph(folder.resolve(i + ".tif"), 160, 120, 1, rough)));
        }
        NoiseModel model = NoiseModel.fromFlats(flats, Encoding.linear(65535), Optional.empty());
        flats.forEach(PhotoFile::close);
        assertSigma(Camera.linear(8000, 0.003, 0).sigma(0.45), model, 0, 0.45, 0.03);
        assertEquals(0, model.correlation(0), 0.03);
    }

    @Test
    void darkAndFlatTogetherTellReadNoiseAndFullWell() {
        Camera camera = new Camera(20000, 0.002, 0.02, 16, false, 6);
        Path darkPath = camera.photograph(folder.resolve("d.tif"), WIDTH, HEIGHT, 1, (x, y, c) -> 0);
        Path flatPath = camera.photograph(folder.resolve("f.tif"), WIDTH, HEIGHT, 1, (x, y, c) -> 0.6 - 0.0004 * x);
        try (PhotoFile dark = PhotoFile.open(darkPath); PhotoFile flat = PhotoFile.open(flatPath)) {
            Optional<ShadingField> field = Optional.of(ShadingField.dark(dark, camera.encoding()));
            NoiseModel model = NoiseModel.fit(PhotonTransfer.of(dark, camera.encoding(), field)
                    .and(PhotonTransfer.of(flat, camera.encoding(), field)));
            assertEquals(0.002, model.readNoise(0), 0.02 * 0.002);
            assertEquals(20000, 1 / model.gain(0), 0.03 * 20000);
            assertEquals(0, model.black(0));
        }
    }

    /** Noise passed through a smoothing window keeps the sum of squared weights as its variance. */
    @ParameterizedTest
    @ValueSource(doubles = {0.6, 0.8, 1.2})
    void smoothedNoiseIsRecognisedAndItsVarianceNotMissed(double blur) {
        Camera camera = Camera.linear(5000, 0, 7);
        double[] noisy = camera.linear(WIDTH, HEIGHT, 1, (x, y, c) -> 0.5);
        double[] weights = new double[9];
        double sum = 0;
        for (int i = 0; i < 9; i++) {
            weights[i] = Math.exp(-(i - 4) * (i - 4) / (2 * blur * blur));
            sum += weights[i];
        }
        double squares = 0;
        double products = 0;
        for (int i = 0; i < 9; i++) {
            weights[i] /= sum;
            squares += weights[i] * weights[i];
            products += i > 0 ? weights[i] * weights[i - 1] : 0;
        }
        Path path = Pictures.tiff(folder.resolve("p.tif"), WIDTH - 8, HEIGHT - 8, 1, 16, (x, y, c) -> {
            double smooth = 0;
            for (int i = 0; i < 81; i++) {
                smooth += weights[i % 9] * weights[i / 9] * noisy[(y + i / 9) * WIDTH + x + i % 9];
            }
            return camera.count(smooth);
        });
        NoiseModel model = fromPhoto(path, Encoding.linear(65535));
        assertEquals(camera.sigma(0.5) * squares, Math.sqrt(model.variance(0, 0.5)), 0.12 * camera.sigma(0.5) * squares);
        assertEquals(products / squares, model.correlation(0), 0.06);
        assertTrue(model.correlated());
    }

    @ParameterizedTest
    @ValueSource(floats = {0.95f, 0.85f, 0.6f})
    void errorOfJpegIsStatedToAQuarter(float quality) throws IOException {
        Camera camera = new Camera(8000, 0.003, 0, 8, true, 8);
        double[] noisy = camera.linear(WIDTH, HEIGHT, 3, FRINGES);
        Path path = folder.resolve("p.jpg");
        ImageWriter writer = ImageIO.getImageWritersByFormatName("jpeg").next();
        try (ImageOutputStream out = ImageIO.createImageOutputStream(path.toFile())) {
            writer.setOutput(out);
            ImageWriteParam param = writer.getDefaultWriteParam();
            param.setCompressionMode(ImageWriteParam.MODE_EXPLICIT);
            param.setCompressionQuality(quality);
            writer.write(null, new IIOImage(Pictures.image(WIDTH, HEIGHT, 3, 8,
                    (x, y, c) -> camera.count(noisy[(y * WIDTH + x) * 3 + c])), null, null), param);
        } finally {
            writer.dispose();
        }
        try (PhotoFile photo = PhotoFile.open(path)) {
            Encoding srgb = camera.encoding();
            NoiseModel model = NoiseModel.fromPhoto(photo, srgb, Optional.empty());
            assertTrue(model.correlated());
            Frame frame = photo.all();
            for (int c = 0; c < 3; c++) {
                double ratio = 0;
                for (int i = 0; i < WIDTH * HEIGHT; i++) {
                    int count = frame.count(i % WIDTH, i / WIDTH, c);
                    double light = FRINGES.at(i % WIDTH, i / WIDTH, c);
                    ratio += Math.pow(srgb.linear(c, count) - light, 2)
                            / model.variance(c, light, srgb.slope(c, light)) / (WIDTH * HEIGHT);
                }
                assertEquals(1, Math.sqrt(ratio), 0.25, "true error over stated error in channel " + c);
            }
        }
    }

    /** EMVA Standard 1288: the variance in electrons is read noise squared plus the number of electrons. */
    @Test
    void givenFiguresAreInElectrons() {
        NoiseModel model = NoiseModel.of(10, 10000);
        double electrons = 0.25 * 10000;
        assertEquals((100 + electrons) / 1e8, model.variance(2, 0.25), 1e-15);
        assertEquals(100 / 1e8, model.variance(0, -0.1), 1e-15);
        assertEquals(0.001, model.readNoise(0), 1e-15);
    }

    @Test
    void impossibleFiguresAreTold() {
        assertEquals("a read noise of -1.0 and a full well of 100.0 electrons are not possible: give 0 <= read noise < full well",
                assertThrows(IllegalArgumentException.class, () -> NoiseModel.of(-1, 100)).getMessage());
        assertEquals("no flat is given: give one or more", assertThrows(IllegalArgumentException.class,
                () -> NoiseModel.fromFlats(List.of(), Encoding.linear(1), Optional.empty())).getMessage());
    }

    @Test
    void clippedPhotosAreRefused() {
        Path path = Pictures.tiff(folder.resolve("p.tif"), 64, 64, 1, 8, (x, y, c) -> x % 3 == 0 ? 255 : 100);
        assertEquals(path + ": has too few parts that are clipped nowhere in channel 1 to tell its noise; give the camera's "
                + "read noise and full well",
                assertThrows(PhotoException.class, () -> fromPhoto(path, Encoding.linear(255))).getMessage());
    }

    @Test
    void photosOfTwoKindsAreRefused() {
        Path one = Pictures.tiff(folder.resolve("1.tif"), 64, 64, 1, 8, (x, y, c) -> 100);
        Path two = Pictures.tiff(folder.resolve("2.tif"), 64, 65, 1, 8, (x, y, c) -> 100);
        try (PhotoFile a = PhotoFile.open(one); PhotoFile b = PhotoFile.open(two)) {
            assertEquals(two + ": differs from " + one + " in size, channels or bit depth; give two photos with the same "
                    + "camera settings", assertThrows(PhotoException.class,
                            () -> NoiseModel.fromFlats(List.of(a, b), Encoding.linear(255), Optional.empty())).getMessage());
        }
    }

    @Test
    void curvesOfDifferentChannelsAreNotJoined() {
        Path grey = Pictures.tiff(folder.resolve("1.tif"), 64, 64, 1, 8, (x, y, c) -> 100);
        Path rgb = Pictures.tiff(folder.resolve("2.tif"), 64, 64, 3, 8, (x, y, c) -> 100);
        try (PhotoFile a = PhotoFile.open(grey); PhotoFile b = PhotoFile.open(rgb)) {
            Encoding linear = Encoding.linear(255);
            assertEquals("curves of 1 and 3 channels cannot be joined; use photos of one camera",
                    assertThrows(IllegalArgumentException.class, () -> PhotonTransfer.of(a, linear, Optional.empty())
                            .and(PhotonTransfer.of(b, linear, Optional.empty()))).getMessage());
        }
    }
}
