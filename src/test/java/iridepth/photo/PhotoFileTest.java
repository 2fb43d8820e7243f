package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.image.BufferedImage;
import java.awt.image.IndexColorModel;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Iterator;
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

class PhotoFileTest {

    @TempDir
    private Path folder;

    @ParameterizedTest
    @CsvSource({"1, 8", "1, 16", "3, 8", "3, 16"})
    void pngGivesTheCountsThatWereWritten(int channels, int bits) {
        Pictures.Counts counts = Pictures.scrambled(bits);
        Path path = Pictures.png(folder.resolve("a.png"), 37, 23, channels, bits, counts);
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(new PhotoInfo(path, 37, 23, channels, bits, 1, Double.NaN, java.util.Optional.empty(), false),
                    photo.info());
            assertTrue(Pictures.holds(photo.all(), 0, counts));
            assertTrue(Pictures.holds(photo.rows(20, 3), 20, counts));
            assertTrue(Pictures.holds(photo.rows(0, 5), 0, counts));
        }
    }

    /** Written by the TIFF writer of the JDK, an implementation of the compressions other than ours. */
    @ParameterizedTest
    @CsvSource({"None, 3, 16", "LZW, 3, 16", "LZW, 1, 8", "LZW, 3, 8", "LZW, 1, 16", "Deflate, 3, 16", "ZLib, 3, 8",
        "ZLib, 1, 16", "PackBits, 3, 8", "PackBits, 3, 16", "PackBits, 1, 8"})
    void tiffGivesTheCountsThatWereWritten(String compression, int channels, int bits) throws IOException {
        Pictures.Counts smooth = (x, y, c) -> (x * x + 3 * y + 40 * c) & (1 << bits) - 1;
        Pictures.Counts scrambled = Pictures.scrambled(bits);
        Pictures.Counts counts = (x, y, c) -> (x / 16 + y / 8) % 2 == 0 ? smooth.at(x, y, c) : scrambled.at(x, y, c);
        Path path = folder.resolve("a.tif");
        write(path, "tiff", compression, Pictures.image(150, 90, channels, bits, counts));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(150, photo.info().width());
            assertEquals(90, photo.info().height());
            assertEquals(channels, photo.info().channels());
            assertEquals(bits, photo.info().bitDepth());
            assertTrue(Pictures.holds(photo.all(), 0, counts));
            for (int y = 83; y >= 0; y -= 7) {
                assertTrue(Pictures.holds(photo.rows(y, 7), y, counts), "rows from " + y);
            }
        }
    }

    private static void write(Path path, String format, String compression, BufferedImage image) throws IOException {
        Iterator<ImageWriter> writers = ImageIO.getImageWritersByFormatName(format);
        ImageWriter writer = writers.next();
        while (!writer.getClass().getName().startsWith("com.sun.")) {
            writer = writers.next(); // the JDK's own also writes 16-bit RGB
        }
        try (ImageOutputStream out = ImageIO.createImageOutputStream(path.toFile())) {
            writer.setOutput(out);
            ImageWriteParam param = writer.getDefaultWriteParam();
            if (compression.equals("None")) {
                param.setCompressionMode(ImageWriteParam.MODE_DISABLED);
            } else {
                param.setCompressionMode(ImageWriteParam.MODE_EXPLICIT);
                param.setCompressionType(compression);
            }
            if (format.equals("jpeg")) {
                param.setCompressionQuality(1);
            }
            writer.write(null, new IIOImage(image, null, null), param);
        } finally {
            writer.dispose();
        }
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 3})
    void jpegGivesCountsNearThoseThatWereWritten(int channels) throws IOException {
        Pictures.Counts counts = (x, y, c) -> 60 + x + y + 20 * c;
        Path path = folder.resolve("a.jpg");
        write(path, "jpeg", "JPEG", Pictures.image(40, 30, channels, 8, counts));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(channels, photo.info().channels());
            assertEquals(8, photo.info().bitDepth());
            assertTrue(photo.info().lossy());
            Frame frame = photo.rows(10, 20);
            for (int y = 0; y < 20; y++) {
                for (int x = 0; x < 40; x++) {
                    for (int c = 0; c < channels; c++) {
                        assertEquals(counts.at(x, y + 10, c), frame.count(x, y, c), 6);
                    }
                }
            }
        }
    }

    @Test
    void opaqueAlphaOfAPngIsDropped() {
        Pictures.Counts counts = Pictures.scrambled(8);
        Path path = Pictures.png(folder.resolve("a.png"), 9, 7, 4, 8, (x, y, c) -> c == 3 ? 255 : counts.at(x, y, c));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(3, photo.info().channels());
            assertTrue(Pictures.holds(photo.all(), 0, counts));
        }
    }

    @Test
    void transparentPixelsOfAPngAreRefused() {
        Path path = Pictures.png(folder.resolve("a.png"), 9, 7, 4, 8, (x, y, c) -> c == 3 && x == 4 ? 254 : 255);
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertMessage(path + ": has transparent pixels; save it without an alpha channel", photo::all);
        }
    }

    @Test
    void missingFileIsTold() {
        Path path = folder.resolve("no.tif");
        assertMessage(path + ": there is no such file; check the path", () -> PhotoFile.open(path));
    }

    @Test
    void folderIsTold() {
        assertMessage(folder + ": is a folder, not a photo; give a TIFF, PNG or JPEG file", () -> PhotoFile.open(folder));
    }

    @Test
    void emptyFileIsTold() throws IOException {
        Path path = Files.write(folder.resolve("a.png"), new byte[0]);
        assertMessage(path + ": is empty; give a TIFF, PNG or JPEG file", () -> PhotoFile.open(path));
    }

    @Test
    void otherFilesAreTold() throws IOException {
        Path path = Files.writeString(folder.resolve("a.tif"), "not a picture at all");
        assertMessage(path + ": is not a TIFF, PNG or JPEG image; save the photo as one of these",
                () -> PhotoFile.open(path));
        Path tiny = Files.writeString(folder.resolve("b.tif"), "II");
        assertMessage(tiny + ": is not a TIFF, PNG or JPEG image; save the photo as one of these",
                () -> PhotoFile.open(tiny));
    }

    @Test
    void paletteImagesAreRefused() throws IOException {
        byte[] ramp = {0, 50, 100, (byte) 200};
        BufferedImage image = new BufferedImage(8, 8, BufferedImage.TYPE_BYTE_INDEXED,
                new IndexColorModel(8, 4, ramp, ramp, ramp));
        Path png = folder.resolve("a.png");
        ImageIO.write(image, "png", png.toFile());
        assertMessage(png + ": is a palette image, whose counts are no measure of light; save the camera's photo as grey or RGB",
                () -> PhotoFile.open(png));
        Path tiff = folder.resolve("a.tif");
        ImageIO.write(image, "tiff", tiff.toFile());
        assertMessage(tiff + ": is a palette image, whose counts are no measure of light; save the camera's photo as grey or RGB",
                () -> PhotoFile.open(tiff));
    }

    @Test
    void bilevelPngIsRefused() throws IOException {
        Path png = folder.resolve("a.png");
        ImageIO.write(new BufferedImage(8, 8, BufferedImage.TYPE_BYTE_BINARY), "png", png.toFile());
        byte[] bytes = Files.readAllBytes(png);
        bytes[25] = 0; // colour type grey instead of palette
        Files.write(png, bytes);
        assertMessage(png + ": has a bit depth of 1, which is not supported; save it as 8 or 16 bit",
                () -> PhotoFile.open(png));
    }

    @Test
    void zeroSizedPngIsTold() throws IOException {
        Path png = Pictures.png(folder.resolve("a.png"), 5, 4, 1, 8, (x, y, c) -> 9);
        byte[] bytes = Files.readAllBytes(png);
        bytes[19] = 0;
        Files.write(png, bytes);
        assertMessage(png + ": has a size of 0 x 4; export the photo again", () -> PhotoFile.open(png));
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.02, 0.3, 0.6, 0.9})
    void truncatedFilesAreTold(double fraction) throws IOException {
        for (String format : new String[] {"png", "jpeg", "tiff"}) {
            Path path = folder.resolve("a." + format);
            ImageIO.write(Pictures.image(120, 100, 3, 8, Pictures.scrambled(8)), format, path.toFile());
            byte[] bytes = Files.readAllBytes(path);
            Files.write(path, Arrays.copyOf(bytes, (int) (fraction * bytes.length)));
            PhotoException e = assertThrows(PhotoException.class, () -> {
                try (PhotoFile photo = PhotoFile.open(path)) {
                    photo.all();
                }
            }, format);
            assertEquals(path + ": is truncated; copy or export the photo again", e.getMessage());
        }
    }

    @Test
    void damagedPngIsTold() throws IOException {
        Path path = Pictures.png(folder.resolve("a.png"), 60, 60, 3, 8, Pictures.scrambled(8));
        byte[] bytes = Files.readAllBytes(path);
        Arrays.fill(bytes, 200, 1200, (byte) 0x55);
        Files.write(path, bytes);
        try (PhotoFile photo = PhotoFile.open(path)) {
            String message = assertThrows(PhotoException.class, photo::all).getMessage();
            assertTrue(message.startsWith(path + ": is ") && message.endsWith("copy or export the photo again"), message);
        }
    }

    @Test
    void fourChannelJpegIsRefused() throws IOException {
        Path path = folder.resolve("a.jpg");
        ImageIO.write(Pictures.image(16, 16, 3, 8, (x, y, c) -> 100), "jpeg", path.toFile());
        byte[] bytes = Files.readAllBytes(path);
        bytes[startOfFrame(bytes) + 9] = 4;
        Files.write(path, bytes);
        assertMessage(path + ": is a CMYK image, made for print; save the camera's photo as RGB",
                () -> PhotoFile.open(path));
    }

    @Test
    void twelveBitJpegIsRefused() throws IOException {
        Path path = folder.resolve("a.jpg");
        ImageIO.write(Pictures.image(16, 16, 3, 8, (x, y, c) -> 100), "jpeg", path.toFile());
        byte[] bytes = Files.readAllBytes(path);
        bytes[startOfFrame(bytes) + 4] = 12;
        Files.write(path, bytes);
        assertMessage(path + ": has a bit depth of 12, which is not supported; save it as 8 or 16 bit",
                () -> PhotoFile.open(path));
    }

    private static int startOfFrame(byte[] jpeg) {
        for (int i = 2; ; i++) {
            if (jpeg[i] == (byte) 0xff && (jpeg[i + 1] == (byte) 0xc0)) {
                return i;
            }
        }
    }

    @Test
    void rowsThatDoNotExistAreTold() {
        Path path = Pictures.png(folder.resolve("a.png"), 5, 4, 1, 8, (x, y, c) -> 9);
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals("2 rows from row 3 asked for, but " + path + " has 4",
                    assertThrows(IllegalArgumentException.class, () -> photo.rows(3, 2)).getMessage());
            assertEquals("frame 1 asked for, but " + path + " has 1 (counted from 0)",
                    assertThrows(IllegalArgumentException.class, () -> photo.rows(1, 0, 1)).getMessage());
        }
    }

    private static void assertMessage(String expected, org.junit.jupiter.api.function.Executable action) {
        assertEquals(expected, assertThrows(PhotoException.class, action).getMessage());
    }
}
