package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.zip.CRC32;
import java.util.zip.Deflater;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A profile is found in each format, and the counts stay as they are in the file. */
class EmbeddedProfileTest {

    private static final byte[] PROFILE = ProfileBytes.rgb(ProfileBytes.sampled(512)).build();

    @TempDir
    private Path folder;

    private final Pictures.Counts counts = Pictures.scrambled(8);

    private static void assertProfile(PhotoFile photo) {
        assertEquals(0.25, photo.info().profile().orElseThrow().linear(1, 0.5), 1e-12);
    }

    @Test
    void ofTiff() throws IOException {
        int[] all = Pictures.counts(6, 5, 3, counts);
        Path path = new TiffBytes(ByteOrder.BIG_ENDIAN, false).page(6, 5, 3, 8, TiffBytes.bytes(ByteOrder.BIG_ENDIAN, 8, all))
                .bytes(34675, PROFILE).write(folder.resolve("a.tif"));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertProfile(photo);
            assertTrue(Pictures.holds(photo.all(), 0, counts));
        }
    }

    @Test
    void ofPng() throws IOException {
        Path path = withChunk("iCCP", packed(PROFILE));
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertProfile(photo);
            assertTrue(Pictures.holds(photo.all(), 0, counts));
        }
    }

    private static byte[] packed(byte[] profile) {
        Deflater deflater = new Deflater();
        deflater.setInput(profile);
        deflater.finish();
        byte[] buffer = new byte[4096];
        int length = deflater.deflate(buffer);
        deflater.end();
        ByteArrayOutputStream content = new ByteArrayOutputStream();
        content.writeBytes("camera\0\0".getBytes(StandardCharsets.US_ASCII));
        content.write(buffer, 0, length);
        return content.toByteArray();
    }

    /** A PNG with a chunk put after its header. */
    private Path withChunk(String name, byte[] content) throws IOException {
        Path path = Pictures.png(folder.resolve("a.png"), 6, 5, 3, 8, counts);
        byte[] plain = Files.readAllBytes(path);
        ByteBuffer chunk = ByteBuffer.allocate(12 + content.length).putInt(content.length)
                .put(name.getBytes(StandardCharsets.US_ASCII)).put(content);
        CRC32 crc = new CRC32();
        crc.update(chunk.array(), 4, 4 + content.length);
        chunk.putInt((int) crc.getValue());
        ByteArrayOutputStream file = new ByteArrayOutputStream();
        file.write(plain, 0, 33);
        file.writeBytes(chunk.array());
        file.write(plain, 33, plain.length - 33);
        return Files.write(path, file.toByteArray());
    }

    @Test
    void profileOfAPngThatIsCutShortIsTold() throws IOException {
        byte[] content = packed(PROFILE);
        Path path = withChunk("iCCP", Arrays.copyOf(content, content.length / 2));
        assertEquals(path + ": is damaged (its colour profile is cut short); copy or export the photo again",
                assertThrows(PhotoException.class, () -> PhotoFile.open(path)).getMessage());
    }

    @Test
    void transparentColourOfAPngIsRefused() throws IOException {
        Path path = withChunk("tRNS", new byte[6]);
        assertEquals(path + ": has a transparent colour; save it without transparency",
                assertThrows(PhotoException.class, () -> PhotoFile.open(path)).getMessage());
    }

    @Test
    void pitchOfAPngIsRead() throws IOException {
        Path path = withChunk("pHYs", ByteBuffer.allocate(9).putInt(2_000_000).putInt(2_000_000).put((byte) 1).array());
        try (PhotoFile photo = PhotoFile.open(path)) {
            assertEquals(0.5, photo.info().pixelUm(), 1e-9);
        }
    }

    @Test
    void ofJpegInSeveralParts() throws IOException {
        Path plain = folder.resolve("plain.jpg");
        ImageIO.write(Pictures.image(32, 24, 3, 8, (x, y, c) -> 4 * x + 3 * y + 9 * c), "jpeg", plain.toFile());
        int half = PROFILE.length / 2;
        Path path = withParts(plain, 2, part(2, 2, Arrays.copyOfRange(PROFILE, half, PROFILE.length)),
                part(1, 2, Arrays.copyOf(PROFILE, half)));
        try (PhotoFile photo = PhotoFile.open(path); PhotoFile without = PhotoFile.open(plain)) {
            assertProfile(photo);
            assertTrue(without.info().profile().isEmpty());
            Frame expected = without.all();
            assertTrue(Pictures.holds(photo.all(), 0, expected::count));
        }
    }

    @Test
    void missingPartOfAJpegProfileIsTold() throws IOException {
        Path plain = folder.resolve("plain.jpg");
        ImageIO.write(Pictures.image(8, 8, 3, 8, (x, y, c) -> 100), "jpeg", plain.toFile());
        Path path = withParts(plain, 2, part(2, 2, PROFILE));
        assertEquals(path + ": has only 1 of the 2 parts of its colour profile; export the photo again",
                assertThrows(PhotoException.class, () -> PhotoFile.open(path)).getMessage());
    }

    private static byte[] part(int number, int of, byte[] bytes) {
        return ByteBuffer.allocate(18 + bytes.length).putShort((short) 0xffe2).putShort((short) (16 + bytes.length))
                .put("ICC_PROFILE\0".getBytes(StandardCharsets.US_ASCII)).put((byte) number).put((byte) of).put(bytes).array();
    }

    private Path withParts(Path plain, int after, byte[]... parts) throws IOException {
        byte[] bytes = Files.readAllBytes(plain);
        ByteArrayOutputStream file = new ByteArrayOutputStream();
        file.write(bytes, 0, after);
        for (byte[] part : parts) {
            file.writeBytes(part);
        }
        file.write(bytes, after, bytes.length - after);
        return Files.write(folder.resolve("a.jpg"), file.toByteArray());
    }
}
