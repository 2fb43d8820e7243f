package iridepth.simulation;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;

/** Writes uncompressed little-endian TIFF files of one strip a page, by the TIFF 6.0 specification. */
public final class TiffFile {
    private static final int SHORT = 3;
    private static final int LONG = 4;
    /** Bytes of a directory with its arrays, and one to fill up to an even place, at most. */
    private static final int MOST_HEAD = 400;

    private TiffFile() {
    }

    /** Writes photographs of 16 bits, one page each: grey for one channel, else RGB with further channels as extra samples. */
    public static void write(Path file, Photograph... photos) throws IOException {
        ByteBuffer out = ByteBuffer.allocate(Arrays.stream(photos).mapToInt(p -> 2 * p.counts().length + MOST_HEAD).sum() + 8);
        begin(out);
        for (int i = 0; i < photos.length; i++) {
            Photograph photo = photos[i];
            ByteBuffer pixels = ByteBuffer.allocate(2 * photo.counts().length).order(ByteOrder.LITTLE_ENDIAN);
            pixels.asShortBuffer().put(photo.counts());
            page(out, photo.width(), photo.height(), photo.channels(), 16, 1, pixels.array(), i == photos.length - 1);
        }
        Files.write(file, Arrays.copyOf(out.array(), out.position()));
    }

    /** Writes one value per pixel as 32-bit floating point. */
    public static void write(Path file, int width, int height, double[] values) throws IOException {
        ByteBuffer pixels = ByteBuffer.allocate(4 * values.length).order(ByteOrder.LITTLE_ENDIAN);
        for (double value : values) {
            pixels.putFloat((float) value);
        }
        ByteBuffer out = ByteBuffer.allocate(pixels.capacity() + MOST_HEAD + 8);
        begin(out);
        page(out, width, height, 1, 32, 3, pixels.array(), true);
        Files.write(file, Arrays.copyOf(out.array(), out.position()));
    }

    private static void begin(ByteBuffer out) {
        out.order(ByteOrder.LITTLE_ENDIAN).put((byte) 'I').put((byte) 'I').putShort((short) 42).putInt(8);
    }

    /** A page's directory, the arrays that it names, its pixels. */
    private static void page(ByteBuffer out, int width, int height, int channels, int bits, int format, byte[] pixels,
            boolean last) {
        int extra = Math.max(0, channels - 3);
        int entries = extra > 0 ? 11 : 10;
        int arrays = out.position() + 2 + 12 * entries + 4;
        int data = arrays + (2 * 2 + extra) * 2 * channels;
        out.putShort((short) entries);
        entry(out, 256, LONG, 1, width);
        entry(out, 257, LONG, 1, height);
        perChannel(out, 258, channels, bits, arrays);
        entry(out, 259, SHORT, 1, 1);
        entry(out, 262, SHORT, 1, channels == 1 ? 1 : 2);
        entry(out, 273, LONG, 1, data);
        entry(out, 277, SHORT, 1, channels);
        entry(out, 278, LONG, 1, height);
        entry(out, 279, LONG, 1, pixels.length);
        if (extra > 0) {
            perChannel(out, 338, extra, 0, arrays + 4 * channels);
        }
        perChannel(out, 339, channels, format, arrays + 2 * channels);
        int next = data + pixels.length + pixels.length % 2;
        out.putInt(last ? 0 : next);
        out.position(data);
        out.put(pixels);
        out.position(next);
    }

    private static void entry(ByteBuffer out, int tag, int type, int count, int value) {
        out.putShort((short) tag).putShort((short) type).putInt(count).putInt(value);
    }

    /** An entry of one short per channel: up to two stand in the entry itself, more in an array at the given offset. */
    private static void perChannel(ByteBuffer out, int tag, int count, int value, int offset) {
        if (count <= 2) {
            entry(out, tag, SHORT, count, count == 1 ? value : value | value << 16);
            return;
        }
        entry(out, tag, SHORT, count, offset);
        for (int i = 0; i < count; i++) {
            out.putShort(offset + 2 * i, (short) value);
        }
    }
}
