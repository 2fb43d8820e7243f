package iridepth.simulation;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.file.Files;
import java.nio.file.Path;

/** Writes uncompressed little-endian TIFF files of one strip, by the TIFF 6.0 specification. */
public final class TiffFile {
    private static final int SHORT = 3;
    private static final int LONG = 4;

    private TiffFile() {
    }

    /** Writes a photograph of 16 bits: grey for one channel, else RGB with further channels as extra samples. */
    public static void write(Path file, Photograph photo) throws IOException {
        ByteBuffer pixels = ByteBuffer.allocate(2 * photo.counts().length).order(ByteOrder.LITTLE_ENDIAN);
        pixels.asShortBuffer().put(photo.counts());
        write(file, photo.width(), photo.height(), photo.channels(), 16, 1, pixels.array());
    }

    /** Writes one value per pixel as 32-bit floating point. */
    public static void write(Path file, int width, int height, double[] values) throws IOException {
        ByteBuffer pixels = ByteBuffer.allocate(4 * values.length).order(ByteOrder.LITTLE_ENDIAN);
        for (double value : values) {
            pixels.putFloat((float) value);
        }
        write(file, width, height, 1, 32, 3, pixels.array());
    }

    private static void write(Path file, int width, int height, int channels, int bits, int format, byte[] pixels)
            throws IOException {
        int extra = Math.max(0, channels - 3);
        int entries = extra > 0 ? 11 : 10;
        int arrays = 8 + 2 + 12 * entries + 4;
        int data = arrays + (2 * 2 + extra) * 2 * channels;
        ByteBuffer head = ByteBuffer.allocate(data).order(ByteOrder.LITTLE_ENDIAN);
        head.put((byte) 'I').put((byte) 'I').putShort((short) 42).putInt(8).putShort((short) entries);
        entry(head, 256, LONG, 1, width);
        entry(head, 257, LONG, 1, height);
        perChannel(head, 258, channels, bits, arrays);
        entry(head, 259, SHORT, 1, 1);
        entry(head, 262, SHORT, 1, channels == 1 ? 1 : 2);
        entry(head, 273, LONG, 1, data);
        entry(head, 277, SHORT, 1, channels);
        entry(head, 278, LONG, 1, height);
        entry(head, 279, LONG, 1, pixels.length);
        if (extra > 0) {
            perChannel(head, 338, extra, 0, arrays + 4 * channels);
        }
        perChannel(head, 339, channels, format, arrays + 2 * channels);
        head.putInt(0);
        Files.write(file, ByteBuffer.allocate(data + pixels.length).put(head.array()).put(pixels).array());
    }

    private static void entry(ByteBuffer head, int tag, int type, int count, int value) {
        head.putShort((short) tag).putShort((short) type).putInt(count).putInt(value);
    }

    /** An entry of one short per channel: up to two stand in the entry itself, more in an array at the given offset. */
    private static void perChannel(ByteBuffer head, int tag, int count, int value, int offset) {
        if (count <= 2) {
            entry(head, tag, SHORT, count, count == 1 ? value : value | value << 16);
            return;
        }
        entry(head, tag, SHORT, count, offset);
        for (int i = 0; i < count; i++) {
            head.putShort(offset + 2 * i, (short) value);
        }
    }
}
