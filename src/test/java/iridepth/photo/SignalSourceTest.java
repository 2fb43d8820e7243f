package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class SignalSourceTest {

    private static final NoiseModel NOISE = NoiseModel.of(20, 20000);

    @TempDir
    private Path folder;

    @Test
    void withoutDarkAndFlatTheValueIsTheLinearCount() {
        Path path = Pictures.tiff(folder.resolve("a.tif"), 4, 2, 1, 16, (x, y, c) -> 1000 * (1 + x + 4 * y));
        try (PhotoFile photo = PhotoFile.open(path)) {
            SignalSource source = SignalSource.of(photo, Encoding.linear(65535), Optional.empty(), Optional.empty(), NOISE);
            Signal signal = source.rows(0, 1, 1);
            assertEquals(6000 / 65535.0, signal.value()[1], 1e-7);
            double variance = 1e-6 + 6000 / 65535.0 / 20000 + 1 / (12 * 65535.0 * 65535.0);
            assertEquals(variance, source.variance(0, signal.value()[1], 1), 1e-6 * variance);
            assertArrayEquals(new byte[4], signal.limit());
        }
    }

    /** A uniform rounding error of one count has a variance of 1/12 count^2; sRGB counts are 2.4/1.055/255 apart near white. */
    @Test
    void roundingCountsWithTheSlopeOfTheEncoding() {
        Path path = Pictures.tiff(folder.resolve("a.tif"), 2, 1, 1, 8, (x, y, c) -> x == 0 ? 254 : 5);
        try (PhotoFile photo = PhotoFile.open(path)) {
            NoiseModel silent = NoiseModel.of(0, 1e12);
            SignalSource source = SignalSource.of(photo, Encoding.srgb(8), Optional.empty(), Optional.empty(), silent);
            Signal signal = source.rows(0, 0, 1);
            double step = 2.4 / 1.055 / 255 * Math.pow((254 / 255.0 + 0.055) / 1.055, 1.4);
            assertEquals(step * step / 12, source.variance(0, signal.value()[0], 1), 1e-4 * step * step / 12);
            double dark = 1 / 12.92 / 255;
            assertEquals(dark * dark / 12, source.variance(0, signal.value()[1], 1), 1e-3 * dark * dark / 12);
        }
    }

    @Test
    void darkAndFlatGiveTheRatioToTheFlatSurface() {
        Camera.Scene shade = (x, y, c) -> 0.5 - 0.001 * x + 0.0005 * y + 0.05 * c;
        Path darkPath = new Camera(1e12, 0, 0.02, 16, false, 1).photograph(folder.resolve("d.tif"), 96, 64, 3, (x, y, c) -> 0);
        Path flatPath = new Camera(1e12, 0, 0.02, 16, false, 1).photograph(folder.resolve("f.tif"), 96, 64, 3, shade);
        Camera camera = new Camera(20000, 0.001, 0.02, 16, false, 2);
        Path photoPath = camera.photograph(folder.resolve("p.tif"), 96, 64, 3, (x, y, c) -> 0.7 * shade.at(x, y, c));
        Encoding linear = Encoding.linear(65535);
        try (PhotoFile dark = PhotoFile.open(darkPath); PhotoFile flat = PhotoFile.open(flatPath);
                PhotoFile photo = PhotoFile.open(photoPath)) {
            ShadingField darkField = ShadingField.dark(dark, linear);
            ShadingField flatField = ShadingField.flat(flat, linear, Optional.of(darkField));
            SignalSource source = SignalSource.of(photo, linear, Optional.of(darkField), Optional.of(flatField),
                    NoiseModel.of(20, 20000));
            Signal signal = source.rows(0, 0, 64);
            double squares = 0;
            for (int i = 0; i < signal.value().length; i++) {
                squares += Math.pow(signal.value()[i] - 0.7, 2) / source.variance(i % 3, 0.7, signal.light()[i / 3]);
            }
            int n = signal.value().length;
            assertEquals(1, squares / n, 4 * Math.sqrt(2.0 / n), "squared error in units of the stated variance");
            assertEquals(0.7, RegionStatistics.of(signal)[1].mean(), 4 * RegionStatistics.of(signal)[1].standardError());
        }
    }

    @Test
    void bothEndsOfTheScaleAreLimits() {
        int[] counts = {0, 1, 254, 255};
        Path path = Pictures.tiff(folder.resolve("a.tif"), 4, 1, 1, 8, (x, y, c) -> counts[x]);
        try (PhotoFile photo = PhotoFile.open(path)) {
            Signal signal = SignalSource.of(photo, Encoding.srgb(8), Optional.empty(), Optional.empty(), NOISE).rows(0, 0, 1);
            assertArrayEquals(new byte[] {Signal.AT_MOST, Signal.MEASURED, Signal.MEASURED, Signal.AT_LEAST}, signal.limit());
        }
    }

    @Test
    void countsAboveTheGivenFullScaleAreClipped() {
        int[] counts = {4094, 4095, 5000};
        Path path = Pictures.tiff(folder.resolve("a.tif"), 3, 1, 1, 16, (x, y, c) -> counts[x]);
        try (PhotoFile photo = PhotoFile.open(path)) {
            SignalSource source = SignalSource.of(photo, Encoding.linear(4095), Optional.empty(), Optional.empty(), NOISE);
            assertArrayEquals(new byte[] {0, 1, 1}, source.rows(0, 0, 1).limit());
        }
    }

    @Test
    void aSensorThatFillsBelowFullScaleIsClippedWhereItPilesUp() {
        Camera camera = Camera.linear(20000, 0.001, 3);
        double[] light = camera.linear(200, 100, 1, (x, y, c) -> 0.2 + 0.005 * x);
        Path path = Pictures.tiff(folder.resolve("a.tif"), 200, 100, 1, 16,
                (x, y, c) -> Math.min(61200, camera.count(light[y * 200 + x])));
        try (PhotoFile photo = PhotoFile.open(path)) {
            SignalSource source = SignalSource.of(photo, Encoding.linear(65535), Optional.empty(), Optional.empty(), NOISE);
            assertEquals(61200, source.saturation(0));
            assertEquals(Signal.AT_LEAST, source.rows(0, 50, 1).limit()[199]);
            assertEquals(Signal.MEASURED, source.rows(0, 50, 1).limit()[100]);
        }
    }

    @Test
    void aPhotoThatDoesNotPileUpIsClippedAtFullScaleOnly() {
        Path path = Camera.linear(20000, 0.001, 4).photograph(folder.resolve("a.tif"), 200, 100, 1, (x, y, c) -> 0.95);
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(65535, SignalSource.of(photo, Encoding.linear(65535), Optional.empty(), Optional.empty(), NOISE)
                    .saturation(0));
        }
    }

    @Test
    void bandsInAnyOrderAndFromSeveralThreadsGiveTheSame() {
        Path path = Camera.linear(20000, 0.001, 5).photograph(folder.resolve("a.tif"), 50, 60, 3,
                (x, y, c) -> 0.3 + 0.01 * x);
        try (PhotoFile photo = PhotoFile.open(path)) {
            Encoding linear = Encoding.linear(65535);
            ShadingField flat = ShadingField.flat(photo, linear, Optional.empty());
            SignalSource source = SignalSource.of(photo, linear, Optional.empty(), Optional.of(flat), NOISE);
            Signal all = source.rows(0, 0, 60);
            assertTrue(IntStream.range(0, 60).parallel().allMatch(y -> {
                float[] row = source.rows(0, y, 1).value();
                return java.util.Arrays.equals(row, 0, 150, all.value(), y * 150, y * 150 + 150);
            }));
            Signal part = source.region(0, new Region(7, 11, 5, 6));
            assertEquals(all.value()[(13 * 50 + 9) * 3 + 2], part.value()[(2 * 5 + 2) * 3 + 2]);
        }
    }

    @Test
    void partsThatDoNotBelongTogetherAreRefused() {
        Path path = Pictures.tiff(folder.resolve("a.tif"), 40, 30, 1, 8, (x, y, c) -> 100);
        Path other = Pictures.tiff(folder.resolve("b.tif"), 40, 31, 1, 8, (x, y, c) -> 100);
        try (PhotoFile photo = PhotoFile.open(path); PhotoFile flat = PhotoFile.open(other)) {
            ShadingField field = ShadingField.flat(flat, Encoding.srgb(8), Optional.empty());
            assertEquals(other + ": this flat has 40 x 31 pixels, but " + path + " has 40 x 30; take both with the same camera "
                    + "settings", assertThrows(PhotoException.class, () -> SignalSource.of(photo, Encoding.srgb(8),
                            Optional.empty(), Optional.of(field), NOISE)).getMessage());
            SignalSource source = SignalSource.of(photo, Encoding.srgb(8), Optional.empty(), Optional.empty(), NOISE);
            assertEquals(path + ": the region [30, 0, 11, 5] reaches outside its 40 x 30 pixels; give [x, y, width, height] "
                    + "within them", assertThrows(PhotoException.class, () -> source.region(0, new Region(30, 0, 11, 5)))
                            .getMessage());
        }
    }
}
