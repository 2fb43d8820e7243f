package iridepth.report;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.channels.FileChannel;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.BitSet;

/**
 * Writes a one-channel TIFF (TIFF 6.0, Adobe 1992) with uncompressed strips, its rows in any order: the directory stands in
 * front, the rows behind it without gaps, so that every row has its place from the start. A file that would reach 4 GiB
 * becomes a BigTIFF. Little-endian. Safe for use by several threads.
 */
public final class TiffWriter implements AutoCloseable {
    /** What a pixel is. */
    public enum Sample {
        /** 32-bit IEEE 754. */
        FLOAT(4),
        /** Unsigned 8-bit. */
        BYTE(1);

        final int bytes;

        Sample(int bytes) {
            this.bytes = bytes;
        }
    }

    /** Bytes that go to the file at once. */
    private static final int CHUNK = 1 << 20;

    private final Path file;
    private final TiffLayout layout;
    private final long data;
    private final FileChannel channel;
    private final ByteBuffer buffer;
    private final BitSet written = new BitSet();

    private TiffWriter(Path file, TiffLayout layout, FileChannel channel) {
        this.file = file;
        this.layout = layout;
        this.data = layout.dataOffset();
        this.channel = channel;
        this.buffer = ByteBuffer.allocateDirect(CHUNK).order(ByteOrder.LITTLE_ENDIAN);
    }

    /**
     * Starts a file; one that stands there is overwritten.
     *
     * @throws OutputException if it cannot be written
     */
    static TiffWriter create(Path file, TiffLayout layout) {
        FileChannel channel = null;
        try {
            channel = FileChannel.open(file, StandardOpenOption.CREATE, StandardOpenOption.READ, StandardOpenOption.WRITE,
                    StandardOpenOption.TRUNCATE_EXISTING);
            ByteBuffer head = layout.head();
            while (head.hasRemaining()) {
                channel.write(head);
            }
            return new TiffWriter(file, layout, channel);
        } catch (IOException e) {
            closeQuietly(channel);
            throw OutputException.of(file, e);
        }
    }

    private static void closeQuietly(FileChannel channel) {
        if (channel != null) {
            try {
                channel.close();
            } catch (IOException e) {
                // the failure that led here is the one to tell
            }
        }
    }

    /**
     * Writes whole rows of a float image.
     *
     * @param firstRow row of the first value
     * @param values   rows x width values, row after row; NaN is written as NaN
     * @throws IllegalArgumentException if they are no whole rows of the image
     * @throws OutputException          if the file cannot be written
     */
    public synchronized void writeRows(int firstRow, float[] values) {
        long at = place(Sample.FLOAT, firstRow, values.length);
        for (int done = 0; done < values.length; ) {
            int count = Math.min(CHUNK / Float.BYTES, values.length - done);
            buffer.clear();
            buffer.asFloatBuffer().put(values, done, count);
            at = flush(at, count * Float.BYTES);
            done += count;
        }
        written.set(firstRow, firstRow + values.length / layout.width());
    }

    /**
     * Writes whole rows of an 8-bit image.
     *
     * @param firstRow row of the first value
     * @param values   rows x width values, row after row
     * @throws IllegalArgumentException if they are no whole rows of the image
     * @throws OutputException          if the file cannot be written
     */
    public synchronized void writeRows(int firstRow, byte[] values) {
        long at = place(Sample.BYTE, firstRow, values.length);
        for (int done = 0; done < values.length; ) {
            int count = Math.min(CHUNK, values.length - done);
            buffer.clear();
            buffer.put(values, done, count);
            at = flush(at, count);
            done += count;
        }
        written.set(firstRow, firstRow + values.length / layout.width());
    }

    /**
     * Reads rows of a float image back that have been written.
     *
     * @param firstRow row of the first value
     * @param values   receives rows x width values
     * @throws OutputException if the file cannot be read
     */
    public synchronized void readRows(int firstRow, float[] values) {
        long at = place(Sample.FLOAT, firstRow, values.length);
        for (int done = 0; done < values.length; ) {
            int count = Math.min(CHUNK / Float.BYTES, values.length - done);
            buffer.clear().limit(count * Float.BYTES);
            try {
                while (buffer.hasRemaining()) {
                    if (channel.read(buffer, at + buffer.position()) < 0) {
                        throw new IllegalStateException("row " + firstRow + " of " + file.getFileName() + " has not been written");
                    }
                }
            } catch (IOException e) {
                throw OutputException.of(file, e);
            }
            buffer.flip();
            buffer.asFloatBuffer().get(values, done, count);
            at += (long) count * Float.BYTES;
            done += count;
        }
    }

    private long place(Sample sample, int firstRow, int count) {
        int rows = count / layout.width();
        if (sample != layout.sample() || rows * layout.width() != count || firstRow < 0 || rows > layout.height() - firstRow) {
            throw new IllegalArgumentException(count + " " + sample + " values from row " + firstRow + " on are no whole rows of an "
                    + "image of " + layout.width() + " x " + layout.height() + " " + layout.sample());
        }
        return data + firstRow * layout.rowBytes();
    }

    private long flush(long at, int bytes) {
        buffer.position(0).limit(bytes);
        long to = at;
        try {
            while (buffer.hasRemaining()) {
                to += channel.write(buffer, to);
            }
        } catch (IOException e) {
            throw OutputException.of(file, e);
        }
        return to;
    }

    /**
     * Ends the file.
     *
     * @throws IllegalStateException if a row has not been written, since it would read as zeros
     * @throws OutputException       if the system could not store it
     */
    @Override
    public synchronized void close() {
        try {
            channel.close();
        } catch (IOException e) {
            throw OutputException.of(file, e);
        }
        int missing = written.nextClearBit(0);
        if (missing < layout.height()) {
            throw new IllegalStateException("row " + missing + " of " + file.getFileName() + " has not been written");
        }
    }
}
