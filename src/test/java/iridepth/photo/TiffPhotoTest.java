package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.io.FileSaver;
import ij.measure.Calibration;
import ij.process.ShortProcessor;
import java.io.IOException;
import java.nio.ByteOrder;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class TiffPhotoTest {

    private static final ByteOrder LITTLE = ByteOrder.LITTLE_ENDIAN;
    private static final int WIDTH = 21;
    private static final int HEIGHT = 13;

    @TempDir
    private Path folder;

    private final Pictures.Counts counts = Pictures.scrambled(16);

    private static TiffBytes plain(int samples, int bits) {
        int[] zeros = new int[WIDTH * HEIGHT * samples];
        return new TiffBytes(LITTLE, false).page(WIDTH, HEIGHT, samples, bits, TiffBytes.bytes(LITTLE, bits, zeros));
    }

    @ParameterizedTest
    @CsvSource({"true, false, 1, 16", "true, true, 3, 16", "false, false, 3, 16", "false, true, 1, 16", "false, false, 3, 8",
        "true, true, 1, 8"})
    void stripsOfEitherByteOrderAndSizeAreRead(boolean little, boolean big, int samples, int bits) throws IOException {
        ByteOrder order = little ? ByteOrder.LITTLE_ENDIAN : ByteOrder.BIG_ENDIAN;
        Pictures.Counts own = Pictures.scrambled(bits);
        byte[][] strips = new byte[3][];
        for (int s = 0; s < 3; s++) {
            int top = 5 * s;
            strips[s] = TiffBytes.bytes(order, bits, Pictures.counts(WIDTH, Math.min(5, HEIGHT - top), samples,
                    (x, y, c) -> own.at(x, y + top, c)));
        }
        Path path = new TiffBytes(order, big).page(WIDTH, HEIGHT, samples, bits, strips).set(278, TiffBytes.LONG, 5)
                .write(folder.resolve("a.tif"));
        assertRowsInAnyOrder(path, own);
    }

    @ParameterizedTest
    @CsvSource({"false, false", "true, false", "false, true", "true, true"})
    void tilesInOneOrSeparatePlanesAreRead(boolean planar, boolean big) throws IOException {
        int planes = planar ? 3 : 1;
        int together = planar ? 1 : 3;
        byte[][] tiles = new byte[planes * 2 * 1 * 1][];
        for (int i = 0; i < tiles.length; i++) {
            int plane = i / 2;
            int left = 16 * (i % 2);
            tiles[i] = TiffBytes.bytes(LITTLE, 16, Pictures.counts(16, 16, together,
                    (x, y, c) -> left + x < WIDTH && y < HEIGHT ? counts.at(left + x, y, planar ? plane : c) : 7));
        }
        Path path = new TiffBytes(LITTLE, big).page(WIDTH, HEIGHT, 3, 16, tiles).tiles(16, 16)
                .set(284, TiffBytes.SHORT, planar ? 2 : 1).write(folder.resolve("a.tif"));
        assertRowsInAnyOrder(path, counts);
    }

    @Test
    void separatePlanesOfStripsAreRead() throws IOException {
        byte[][] strips = new byte[3][];
        Arrays.setAll(strips, plane -> TiffBytes.bytes(LITTLE, 16, Pictures.counts(WIDTH, HEIGHT, 1,
                (x, y, c) -> counts.at(x, y, plane))));
        Path path = new TiffBytes(LITTLE, false).page(WIDTH, HEIGHT, 3, 16, strips).set(284, TiffBytes.SHORT, 2)
                .write(folder.resolve("a.tif"));
        assertRowsInAnyOrder(path, counts);
    }

    private static void assertRowsInAnyOrder(Path path, Pictures.Counts counts) {
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertTrue(Pictures.holds(photo.all(), 0, counts));
            for (int y = HEIGHT - 3; y >= 0; y--) {
                assertTrue(Pictures.holds(photo.rows(y, 3), y, counts), "rows from " + y);
            }
        }
    }

    @Test
    void differencedDeflatedTilesAreReadFromSeveralThreads() throws IOException {
        int size = 64;
        byte[][] tiles = new byte[16][];
        for (int i = 0; i < 16; i++) {
            int left = 16 * (i % 4);
            int top = 16 * (i / 4);
            tiles[i] = deflate(TiffBytes.bytes(LITTLE, 16, Pictures.counts(16, 16, 3, (x, y, c) ->
                    counts.at(left + x, top + y, c) - (x == 0 ? 0 : counts.at(left + x - 1, top + y, c)))));
        }
        Path path = new TiffBytes(LITTLE, false).page(size, size, 3, 16, tiles).tiles(16, 16)
                .set(259, TiffBytes.SHORT, 8).set(317, TiffBytes.SHORT, 2).write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertTrue(IntStream.range(0, 64 - 9).parallel()
                    .allMatch(y -> Pictures.holds(photo.rows(y, 10), y, counts)));
        }
    }

    private static byte[] deflate(byte[] plain) {
        java.util.zip.Deflater deflater = new java.util.zip.Deflater();
        deflater.setInput(plain);
        deflater.finish();
        byte[] packed = new byte[2 * plain.length + 64];
        int length = deflater.deflate(packed);
        deflater.end();
        return Arrays.copyOf(packed, length);
    }

    @Test
    void pagesAreFramesAndReducedCopiesAreNot() throws IOException {
        TiffBytes file = new TiffBytes(LITTLE, false);
        for (int page = 0; page < 3; page++) {
            int value = 100 * page;
            file.page(4, 2, 1, 8, TiffBytes.bytes(LITTLE, 8, Pictures.counts(4, 2, 1, (x, y, c) -> value + x)));
        }
        file.page(2, 1, 1, 8, new byte[2]).set(254, TiffBytes.LONG, 1);
        try (PhotoFile photo = PhotoFile.open(file.write(folder.resolve("a.tif")))) {
            assertEquals(3, photo.info().frames());
            assertEquals(203, photo.rows(2, 1, 1).count(3, 0, 0));
            assertEquals(101, photo.rows(1, 0, 2).count(1, 1, 0));
        }
    }

    @Test
    void pagesOfSeveralSizesAreRefused() throws IOException {
        Path path = new TiffBytes(LITTLE, false).page(4, 2, 1, 8, new byte[8]).page(2, 1, 1, 8, new byte[2])
                .write(folder.resolve("a.tif"));
        assertRefused(path, "has pages of several kinds (page 2 is 2 x 1, the first 4 x 2); save each as a file of its own");
    }

    @Test
    void whiteIsZeroIsTurnedOver() throws IOException {
        Path path = new TiffBytes(LITTLE, false).page(2, 1, 1, 16, TiffBytes.bytes(LITTLE, 16, 0, 65000))
                .set(262, TiffBytes.SHORT, 0).write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(65535, photo.all().count(0, 0, 0));
            assertEquals(535, photo.all().count(1, 0, 0));
        }
    }

    @ParameterizedTest
    @CsvSource({"255, true", "254, false"})
    void alphaIsDroppedOnlyWhereOpaque(int alpha, boolean accepted) throws IOException {
        Path path = new TiffBytes(LITTLE, false).page(2, 1, 4, 8,
                TiffBytes.bytes(LITTLE, 8, 1, 2, 3, 255, 4, 5, 6, alpha)).set(338, TiffBytes.SHORT, 2)
                .write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(3, photo.info().channels());
            if (accepted) {
                assertArrayEquals(new short[] {1, 2, 3, 4, 5, 6}, photo.all().counts());
            } else {
                assertEquals(path + ": has transparent pixels; save it without an alpha channel",
                        assertThrows(PhotoException.class, photo::all).getMessage());
            }
        }
    }

    @Test
    void filesOfImageJAreReadWithTheirPixelPitch() {
        short[] pixels = new short[WIDTH * HEIGHT];
        for (int i = 0; i < pixels.length; i++) {
            pixels[i] = (short) counts.at(i % WIDTH, i / WIDTH, 0);
        }
        ImagePlus image = new ImagePlus("a", new ShortProcessor(WIDTH, HEIGHT, pixels, null));
        Calibration calibration = new Calibration();
        calibration.setUnit("\u00b5m");
        calibration.pixelWidth = 0.65;
        calibration.pixelHeight = 0.65;
        image.setCalibration(calibration);
        Path path = folder.resolve("a.tif");
        assertTrue(new FileSaver(image).saveAsTiff(path.toString()));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(0.65, photo.info().pixelUm(), 1e-6);
            assertTrue(Pictures.holds(photo.all(), 0, (x, y, c) -> counts.at(x, y, 0)));
        }
        assertEquals(counts.at(3, 2, 0), IJ.openImage(path.toString()).getProcessor().get(3, 2));
    }

    @Test
    void sixteenBitRgbOfImageJIsPutTogether() {
        ij.ImageStack stack = new ij.ImageStack(WIDTH, HEIGHT);
        for (int c = 0; c < 3; c++) {
            short[] pixels = new short[WIDTH * HEIGHT];
            for (int i = 0; i < pixels.length; i++) {
                pixels[i] = (short) counts.at(i % WIDTH, i / WIDTH, c);
            }
            stack.addSlice("channel " + c, new ShortProcessor(WIDTH, HEIGHT, pixels, null));
        }
        ImagePlus image = new ImagePlus("a", stack);
        image.setDimensions(3, 1, 1);
        Path path = folder.resolve("a.tif");
        assertTrue(new FileSaver(new ij.CompositeImage(image, ij.CompositeImage.COMPOSITE)).saveAsTiffStack(path.toString()));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(3, photo.info().channels());
            assertEquals(1, photo.info().frames());
        }
        assertRowsInAnyOrder(path, counts);
    }

    @ParameterizedTest
    @CsvSource({"2, 25400, 1, 1.0", "3, 20000, 1, 0.5", "2, 300, 1, NaN", "2, 72, 1, NaN", "2, 96, 1, NaN", "1, 2, 1, NaN",
        "2, 1, 1, NaN", "2, 5, 0, NaN"})
    void resolutionGivesThePixelPitchUnlessItSaysNothing(int unit, int numerator, int denominator, double um)
            throws IOException {
        Path path = plain(1, 8).set(296, TiffBytes.SHORT, unit).rational(282, numerator, denominator)
                .rational(283, numerator, denominator).write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(um, photo.info().pixelUm(), 1e-9);
        }
    }

    @Test
    void omeMetadataGiveThePixelPitch() throws IOException {
        Path path = plain(1, 8).text(270, "<?xml version=\"1.0\"?><OME><Image><Pixels PhysicalSizeX=\"325\" "
                + "PhysicalSizeXUnit=\"nm\"/></Image></OME>").write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(0.325, photo.info().pixelUm(), 1e-12);
        }
    }

    @Test
    void kindsThatAreNoMeasureOfLightAreRefused() throws IOException {
        assertRefused(plain(4, 8).set(262, TiffBytes.SHORT, 5), "is a CMYK image, made for print; save the camera's photo as RGB");
        assertRefused(plain(1, 8).set(262, TiffBytes.SHORT, 3), "is a palette image, whose counts are no measure of light; "
                + "save the camera's photo as grey or RGB");
        assertRefused(plain(1, 16).set(262, TiffBytes.SHORT, 32803),
                "is a raw sensor mosaic; develop it to linear RGB first");
        assertRefused(plain(3, 8).set(262, TiffBytes.SHORT, 6),
                "has TIFF colour kind 6, which is not supported; save it as grey or RGB");
    }

    @Test
    void otherDepthsAndSampleFormatsAreRefused() throws IOException {
        assertRefused(plain(1, 8).set(258, TiffBytes.SHORT, 1),
                "has a bit depth of 1, which is not supported; save it as 8 or 16 bit");
        assertRefused(plain(1, 16).set(258, TiffBytes.SHORT, 12),
                "has a bit depth of 12, which is not supported; save it as 8 or 16 bit");
        assertRefused(plain(3, 8).set(258, TiffBytes.SHORT, 5, 6, 5),
                "has a bit depth of 5/6, which is not supported; save it as 8 or 16 bit");
        assertRefused(plain(1, 16).set(258, TiffBytes.SHORT, 32).set(339, TiffBytes.SHORT, 3),
                "holds 32-bit signed or floating-point samples; save the counts as unsigned 8 or 16 bit");
        assertRefused(plain(1, 16).set(339, TiffBytes.SHORT, 2),
                "holds 16-bit signed or floating-point samples; save the counts as unsigned 8 or 16 bit");
    }

    @Test
    void extraChannelsAreRefused() throws IOException {
        assertRefused(plain(6, 8), "has 6 samples a pixel, 3 (RGB) expected; save it as grey or RGB without extra channels");
        assertRefused(plain(3, 8).set(262, TiffBytes.SHORT, 1),
                "has 3 samples a pixel, 1 (grey) expected; save it as grey or RGB without extra channels");
    }

    @Test
    void otherCompressionsAreRefused() throws IOException {
        assertRefused(plain(1, 8).set(259, TiffBytes.SHORT, 7),
                "has TIFF compression 7, which is not supported; save it uncompressed or with LZW, deflate or PackBits");
        assertRefused(plain(1, 8).set(317, TiffBytes.SHORT, 3),
                "has a TIFF predictor or fill order that is not supported; save it uncompressed");
    }

    @Test
    void damagedFilesAreTold() throws IOException {
        assertRefused(plain(1, 8).set(256, TiffBytes.LONG, 0), "has a width of 0; export the photo again");
        assertRefused(plain(1, 8).set(278, TiffBytes.LONG, 4),
                "is damaged (1 strips or tiles where 4 are needed); export the photo again");
        assertRefused(plain(1, 8).set(257, TiffBytes.LONG, 1000).set(278, TiffBytes.LONG, 1000),
                "is truncated; copy or export the photo again");
        assertRefused(plain(1, 8).set(254, TiffBytes.LONG, 1),
                "holds only reduced copies or masks of a picture; export the photo again");
    }

    @Test
    void emptyListOfPagesIsTold() throws IOException {
        Path path = Files.write(folder.resolve("a.tif"), new byte[] {'I', 'I', 42, 0, 0, 0, 0, 0});
        assertRefused(path, "is a TIFF file without a picture; export the photo again");
    }

    @Test
    void pagesThatRunInACircleAreTold() throws IOException {
        byte[] file = plain(1, 8).build();
        int directory = 8 + WIDTH * HEIGHT;
        int entries = file[directory] & 0xff;
        int link = directory + 2 + 12 * entries;
        file[link] = (byte) directory;
        file[link + 1] = (byte) (directory >> 8);
        assertRefused(Files.write(folder.resolve("a.tif"), file),
                "is damaged (its list of pages runs in a circle); export the photo again");
    }

    private void assertRefused(TiffBytes file, String message) throws IOException {
        assertRefused(file.write(folder.resolve("refused.tif")), message);
    }

    private static void assertRefused(Path path, String message) {
        assertEquals(path + ": " + message, assertThrows(PhotoException.class, () -> PhotoFile.open(path)).getMessage());
    }
}
