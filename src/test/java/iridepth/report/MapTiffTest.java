package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.twelvemonkeys.imageio.plugins.tiff.TIFFImageReaderSpi;
import ij.ImagePlus;
import ij.io.Opener;
import ij.measure.Calibration;
import java.awt.image.Raster;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import javax.imageio.ImageReader;
import javax.imageio.stream.FileImageInputStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * Files are read back by two independent readers: ImageJ 1.54p, in which they must open calibrated, and the TIFF reader of
 * the TwelveMonkeys ImageIO library, which also reads BigTIFF.
 */
class MapTiffTest {
    private static final int WIDTH = 301;
    private static final int HEIGHT = 457;

    @TempDir
    Path folder;

    private static float value(int x, int y) {
        return x == 7 ? Float.NaN : 0.25f * x + 1000f * y;
    }

    private static float[] rows(int first, int count) {
        float[] v = new float[count * WIDTH];
        for (int i = 0; i < v.length; i++) {
            v[i] = value(i % WIDTH, first + i / WIDTH);
        }
        return v;
    }

    private static void writeBottomUp(TiffWriter writer) {
        for (int end = HEIGHT; end > 0; end -= 50) {
            int first = Math.max(0, end - 50);
            writer.writeRows(first, rows(first, end - first));
        }
    }

    private Path thickness(double pixelUm) {
        Path file = folder.resolve("thickness.tif");
        try (TiffWriter writer = MapTiff.nanometres(file, WIDTH, HEIGHT, pixelUm)) {
            writeBottomUp(writer);
        }
        return file;
    }

    private static Raster raster(Path file) throws IOException {
        ImageReader reader = new TIFFImageReaderSpi().createReaderInstance(null);
        try (FileImageInputStream in = new FileImageInputStream(file.toFile())) {
            reader.setInput(in);
            return reader.canReadRaster() ? reader.readRaster(0, null) : reader.read(0).getRaster();
        } finally {
            reader.dispose();
        }
    }

    @Test
    void imageJReadsValuesPixelSizeAndUnits() {
        ImagePlus image = new Opener().openImage(thickness(0.65).toString());
        assertEquals(32, image.getBitDepth());
        float[] pixels = (float[]) image.getProcessor().getPixels();
        assertArrayEquals(rows(0, HEIGHT), pixels);
        Calibration c = image.getCalibration();
        assertEquals("\u00b5m", c.getUnit());
        assertEquals(0.65, c.pixelWidth, 1e-12);
        assertEquals(0.65, c.pixelHeight, 1e-12);
        assertEquals("nm", c.getValueUnit());
        assertEquals(WIDTH * 0.65, c.getX(image.getWidth()), 1e-9);
    }

    @Test
    void imageJShowsPixelsWhereTheirSizeIsUnknown() {
        Calibration c = new Opener().openImage(thickness(Double.NaN).toString()).getCalibration();
        assertEquals("pixel", c.getUnit());
        assertEquals(1, c.pixelWidth);
        assertEquals("nm", c.getValueUnit());
    }

    @Test
    void pixelSizesOfAnyMagnitudeKeepTheirDigits() {
        for (double um : new double[] {0.0123, 0.1, 1 / 3.0, 0.6450001, 1, 2.2, Math.PI, 12.5, 1234.5}) {
            long[] perCm = TiffLayout.pixelsPerCm(um);
            assertTrue(perCm[0] > 0 && perCm[0] < 1L << 32 && perCm[1] > 0 && perCm[1] < 1L << 32);
            assertEquals(um, 10_000.0 * perCm[1] / perCm[0], 1e-9 * um);
        }
        assertArrayEquals(new long[] {200_000, 13}, TiffLayout.pixelsPerCm(0.65));
        assertThrows(IllegalArgumentException.class, () -> thickness(0));
    }

    @Test
    void otherReaderReadsTheSameValues() throws IOException {
        Raster raster = raster(thickness(0.65));
        assertArrayEquals(rows(0, HEIGHT), raster.getSamples(0, 0, WIDTH, HEIGHT, 0, (float[]) null));
    }

    @Test
    void imageJReadsRawStateCodes() throws IOException {
        Path file = folder.resolve("state.tif");
        byte[] codes = new byte[WIDTH * HEIGHT];
        for (int i = 0; i < codes.length; i++) {
            codes[i] = (byte) (i % StateStyle.values().length);
        }
        try (TiffWriter writer = MapTiff.states(file, WIDTH, HEIGHT, 0.65)) {
            writer.writeRows(1, Arrays.copyOfRange(codes, WIDTH, codes.length));
            writer.writeRows(0, Arrays.copyOf(codes, WIDTH));
        }
        ImagePlus image = new Opener().openImage(file.toString());
        assertEquals(8, image.getBitDepth());
        assertArrayEquals(codes, (byte[]) image.getProcessor().getPixels());
        assertEquals("\u00b5m", image.getCalibration().getUnit());
        assertNull(image.getCalibration().getCTable(), "codes are not calibrated values");
        assertEquals(StateStyle.CLIPPED.rgb(), image.getProcessor().getColorModel().getRGB(4) & 0xFFFFFF);
        assertTrue(((String) image.getCalibration().info).contains("1 order-doubtful"));
        int[] other = raster(file).getSamples(0, 0, WIDTH, HEIGHT, 0, (int[]) null);
        assertEquals(codes[12345], other[12345]);
    }

    @Test
    void bigTiffIsReadByTheOtherReader() throws IOException {
        Path file = folder.resolve("big.tif");
        TiffLayout big = new TiffLayout(WIDTH, HEIGHT, TiffWriter.Sample.FLOAT, List.of(), "ImageJ=1.54p\nunit=um\n", 0.65, true);
        try (TiffWriter writer = TiffWriter.create(file, big)) {
            writeBottomUp(writer);
        }
        byte[] bytes = Files.readAllBytes(file);
        assertArrayEquals(new byte[] {'I', 'I', 43, 0, 8, 0, 0, 0}, Arrays.copyOf(bytes, 8));
        assertArrayEquals(rows(0, HEIGHT), raster(file).getSamples(0, 0, WIDTH, HEIGHT, 0, (float[]) null));
    }

    @Test
    void fileBecomesBigTiffOnlyWhenItWouldExceedFourGibibytes() {
        assertEquals(false, TiffLayout.of(32768, 32700, TiffWriter.Sample.FLOAT, List.of(), "", 1).big());
        assertEquals(true, TiffLayout.of(32768, 32768, TiffWriter.Sample.FLOAT, List.of(), "", 1).big());
        assertEquals(false, TiffLayout.of(32768, 32768, TiffWriter.Sample.BYTE, List.of(), "", 1).big());
    }

    @Test
    void missingRowIsAnError() {
        TiffWriter writer = MapTiff.nanometres(folder.resolve("t.tif"), WIDTH, HEIGHT, 1);
        writer.writeRows(0, rows(0, 10));
        writer.writeRows(11, rows(11, HEIGHT - 11));
        assertTrue(assertThrows(IllegalStateException.class, writer::close).getMessage().contains("row 10"));
    }

    @Test
    void rowsOutsideTheImageAreRefused() {
        try (TiffWriter writer = MapTiff.nanometres(folder.resolve("t.tif"), WIDTH, HEIGHT, 1)) {
            writer.writeRows(0, rows(0, HEIGHT));
            assertThrows(IllegalArgumentException.class, () -> writer.writeRows(1, rows(0, HEIGHT)));
            assertThrows(IllegalArgumentException.class, () -> writer.writeRows(0, new float[WIDTH - 1]));
            assertThrows(IllegalArgumentException.class, () -> writer.writeRows(0, new byte[WIDTH]));
        }
    }

    @Test
    void placeThatCannotBeWrittenIsOneLine() {
        OutputException e = assertThrows(OutputException.class,
                () -> MapTiff.nanometres(folder.resolve("missing/t.tif"), 1, 1, 1));
        assertTrue(e.getMessage().contains("no such folder"), e.getMessage());
    }
}
