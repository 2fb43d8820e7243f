package iridepth.photo;

import java.io.EOFException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.FileChannel.MapMode;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;

/**
 * A picture of one number a pixel, 32-bit IEEE 754 or a whole number of 8 bits, in a TIFF or BigTIFF file without compression
 * whose rows follow each other without gaps. The file is mapped into memory, so that a large picture takes no room of the
 * program's own. Safe for several threads.
 */
public final class NumberImage {

    private static final int FLOAT_BYTES = 4;
    private static final int IEEE = 3;
    /** Bytes that are mapped in one piece at most. */
    private static final long WINDOW = 1L << 30;

    private final int width;
    private final int height;
    private final int bytes;
    private final int windowRows;
    private final ByteBuffer[] windows;

    private NumberImage(int width, int height, int bytes, int windowRows, ByteBuffer[] windows) {
        this.width = width;
        this.height = height;
        this.bytes = bytes;
        this.windowRows = windowRows;
        this.windows = windows;
    }

    /**
     * Opens a file.
     *
     * @throws PhotoException if it is missing, damaged or of another kind
     */
    public static NumberImage open(Path path) {
        if (!Files.isRegularFile(path)) {
            throw new PhotoException(path, "there is no such file; check the path");
        }
        try (FileChannel channel = FileChannel.open(path, StandardOpenOption.READ)) {
            int magic = TiffDirectory.read(channel, 0, 8).getInt(0);
            if (magic != 0x49492a00 && magic != 0x4d4d002a && magic != 0x49492b00 && magic != 0x4d4d002b) {
                throw new PhotoException(path, "is not a TIFF file; give a map of 32-bit numbers");
            }
            return open(path, channel, TiffDirectory.readAll(path, channel).get(0));
        } catch (EOFException e) {
            throw new PhotoException(path, "is truncated; make or copy it again");
        } catch (IOException e) {
            throw new PhotoException(path, "cannot be read (" + String.valueOf(e.getMessage()).replaceAll("\\s+", " ") + ")");
        }
    }

    private static NumberImage open(Path path, FileChannel channel, TiffDirectory tags) throws IOException {
        long bits = tags.integer(TiffDirectory.BITS_PER_SAMPLE, 1);
        boolean ieee = tags.integer(TiffDirectory.SAMPLE_FORMAT, 1) == IEEE;
        boolean numbers = ieee ? bits == 8 * FLOAT_BYTES : bits == 8;
        if (!numbers || tags.integer(TiffDirectory.SAMPLES_PER_PIXEL, 1) != 1 || tags.integer(TiffDirectory.COMPRESSION, 1) != 1) {
            throw new PhotoException(path, "is not a map of 32-bit floating-point or 8-bit numbers without compression; save it "
                    + "as one");
        }
        int bytes = ieee ? FLOAT_BYTES : 1;
        long width = tags.integer(TiffDirectory.IMAGE_WIDTH, 0);
        long height = tags.integer(TiffDirectory.IMAGE_LENGTH, 0);
        long rowBytes = bytes * width;
        if (width < 1 || height < 1 || height > Integer.MAX_VALUE || rowBytes > WINDOW) {
            throw new PhotoException(path, "is " + width + " x " + height + " pixels large, which cannot be read");
        }
        long start = start(path, tags);
        if (start < 0 || start > channel.size() - rowBytes * height) {
            throw new EOFException();
        }
        int rows = (int) Math.min(height, Math.max(1, WINDOW / rowBytes));
        ByteBuffer[] windows = new ByteBuffer[(int) ((height + rows - 1) / rows)];
        for (int i = 0; i < windows.length; i++) {
            long first = (long) i * rows;
            long size = Math.min(rows, height - first) * rowBytes;
            windows[i] = channel.map(MapMode.READ_ONLY, start + first * rowBytes, size).order(tags.order());
        }
        return new NumberImage((int) width, (int) height, bytes, rows, windows);
    }

    /** Where the rows begin; refuses strips that do not follow each other, and tiles. */
    private static long start(Path path, TiffDirectory tags) {
        long[] offsets = tags.integers(TiffDirectory.STRIP_OFFSETS);
        long[] counts = tags.integers(TiffDirectory.STRIP_BYTE_COUNTS);
        boolean gapless = offsets.length > 0 && counts.length == offsets.length;
        for (int i = 1; gapless && i < offsets.length; i++) {
            gapless = offsets[i] == offsets[i - 1] + counts[i - 1];
        }
        if (!gapless) {
            throw new PhotoException(path, "does not hold its rows in one piece; save it again from ImageJ");
        }
        return offsets[0];
    }

    /** @return pixels a row */
    public int width() {
        return width;
    }

    /** @return rows */
    public int height() {
        return height;
    }

    /**
     * @param x column, 0 up to width - 1
     * @param y row, 0 up to height - 1
     * @return the number there
     */
    public float at(int x, int y) {
        ByteBuffer window = windows[y / windowRows];
        int at = bytes * (y % windowRows * width + x);
        return bytes == 1 ? window.get(at) & 0xff : window.getFloat(at);
    }
}
