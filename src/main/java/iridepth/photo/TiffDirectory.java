package iridepth.photo;

import java.io.EOFException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * An image file directory: the fields that describe one page of a TIFF file. TIFF 6.0 (Adobe, 1992) section 2; BigTIFF
 * has the same structure with 64-bit counts and offsets.
 */
final class TiffDirectory {

    static final int NEW_SUBFILE_TYPE = 254;
    static final int IMAGE_WIDTH = 256;
    static final int IMAGE_LENGTH = 257;
    static final int BITS_PER_SAMPLE = 258;
    static final int COMPRESSION = 259;
    static final int PHOTOMETRIC = 262;
    static final int FILL_ORDER = 266;
    static final int IMAGE_DESCRIPTION = 270;
    static final int STRIP_OFFSETS = 273;
    static final int SAMPLES_PER_PIXEL = 277;
    static final int ROWS_PER_STRIP = 278;
    static final int STRIP_BYTE_COUNTS = 279;
    static final int X_RESOLUTION = 282;
    static final int Y_RESOLUTION = 283;
    static final int PLANAR_CONFIGURATION = 284;
    static final int RESOLUTION_UNIT = 296;
    static final int PREDICTOR = 317;
    static final int TILE_WIDTH = 322;
    static final int TILE_LENGTH = 323;
    static final int TILE_OFFSETS = 324;
    static final int TILE_BYTE_COUNTS = 325;
    static final int SAMPLE_FORMAT = 339;
    static final int ICC_PROFILE = 34675;

    private static final Set<Integer> WANTED = Set.of(NEW_SUBFILE_TYPE, IMAGE_WIDTH, IMAGE_LENGTH, BITS_PER_SAMPLE,
            COMPRESSION, PHOTOMETRIC, FILL_ORDER, IMAGE_DESCRIPTION, STRIP_OFFSETS, SAMPLES_PER_PIXEL, ROWS_PER_STRIP,
            STRIP_BYTE_COUNTS, X_RESOLUTION, Y_RESOLUTION, PLANAR_CONFIGURATION, RESOLUTION_UNIT, PREDICTOR, TILE_WIDTH,
            TILE_LENGTH, TILE_OFFSETS, TILE_BYTE_COUNTS, SAMPLE_FORMAT, ICC_PROFILE);

    /** Bytes of one value of each field type, 0 where there is no such type. */
    private static final int[] TYPE_BYTES = {0, 1, 1, 2, 4, 8, 1, 1, 2, 4, 8, 4, 8, 4, 0, 0, 8, 8, 8};

    private record Field(int type, ByteBuffer value) {
    }

    private final ByteOrder order;
    private final Map<Integer, Field> fields = new HashMap<>();

    private TiffDirectory(ByteOrder order) {
        this.order = order;
    }

    /**
     * Reads every directory of the main chain.
     *
     * @throws PhotoException if the chain loops, is empty or a field runs past the end of the file
     */
    static List<TiffDirectory> readAll(Path path, FileChannel channel) throws IOException {
        ByteBuffer header = read(channel, 0, 8);
        ByteOrder order = header.get(0) == 'I' ? ByteOrder.LITTLE_ENDIAN : ByteOrder.BIG_ENDIAN;
        header.order(order);
        boolean big = header.getShort(2) == 43;
        long next = big ? read(channel, 8, 8).order(order).getLong(0) : header.getInt(4) & 0xffffffffL;
        List<TiffDirectory> directories = new ArrayList<>();
        Set<Long> seen = new HashSet<>();
        while (next != 0) {
            if (!seen.add(next)) {
                throw new PhotoException(path, "is damaged (its list of pages runs in a circle); export the photo again");
            }
            TiffDirectory directory = new TiffDirectory(order);
            next = directory.read(path, channel, next, big);
            directories.add(directory);
        }
        if (directories.isEmpty()) {
            throw new PhotoException(path, "is a TIFF file without a picture; export the photo again");
        }
        return directories;
    }

    private long read(Path path, FileChannel channel, long position, boolean big) throws IOException {
        int countBytes = big ? 8 : 2;
        int entryBytes = big ? 20 : 12;
        int inlineBytes = big ? 8 : 4;
        ByteBuffer head = read(channel, position, countBytes).order(order);
        long entries = big ? head.getLong(0) : head.getShort(0) & 0xffff;
        if (entries < 0 || entries > 0xffff) {
            throw new PhotoException(path, "is damaged (a page with " + entries + " fields); export the photo again");
        }
        ByteBuffer table = read(channel, position + countBytes, (int) entries * entryBytes + inlineBytes).order(order);
        for (int i = 0; i < entries; i++) {
            int at = i * entryBytes;
            int tag = table.getShort(at) & 0xffff;
            int type = table.getShort(at + 2) & 0xffff;
            if (!WANTED.contains(tag) || type >= TYPE_BYTES.length || TYPE_BYTES[type] == 0) {
                continue;
            }
            long count = big ? table.getLong(at + 4) : table.getInt(at + 4) & 0xffffffffL;
            int valueAt = at + entryBytes - inlineBytes;
            if (count < 0 || count > Math.min(channel.size(), 1L << 27)) {
                throw new EOFException("field " + tag + " is longer than the file");
            }
            int bytes = Math.toIntExact(count * TYPE_BYTES[type]);
            ByteBuffer value = bytes <= inlineBytes ? table.slice(valueAt, bytes)
                    : read(channel, offset(table, valueAt, big), bytes);
            fields.put(tag, new Field(type, value.order(order)));
        }
        return offset(table, (int) entries * entryBytes, big);
    }

    private static long offset(ByteBuffer buffer, int at, boolean big) {
        return big ? buffer.getLong(at) : buffer.getInt(at) & 0xffffffffL;
    }

    /** Reads bytes exactly or fails as truncated. */
    static ByteBuffer read(FileChannel channel, long position, int bytes) throws IOException {
        if (position < 0 || position > channel.size() - bytes) {
            throw new EOFException("bytes past the end of the file");
        }
        ByteBuffer buffer = ByteBuffer.allocate(bytes);
        while (buffer.hasRemaining()) {
            if (channel.read(buffer, position + buffer.position()) < 0) {
                throw new EOFException("bytes past the end of the file");
            }
        }
        return buffer.flip();
    }

    ByteOrder order() {
        return order;
    }

    boolean has(int tag) {
        return fields.containsKey(tag);
    }

    /** Integer values of a field, unsigned; empty where the field is missing or is not of an integer type. */
    long[] integers(int tag) {
        Field field = fields.get(tag);
        int size = field == null ? 0 : switch (field.type) {
            case 1, 3, 4, 13, 16, 18 -> TYPE_BYTES[field.type];
            default -> 0;
        };
        if (size == 0) {
            return new long[0];
        }
        long[] values = new long[field.value.limit() / size];
        for (int i = 0; i < values.length; i++) {
            values[i] = switch (size) {
                case 1 -> field.value.get(i) & 0xff;
                case 2 -> field.value.getShort(2 * i) & 0xffff;
                case 4 -> field.value.getInt(4 * i) & 0xffffffffL;
                default -> field.value.getLong(8 * i);
            };
        }
        return values;
    }

    /** First integer value of a field, or the given default. */
    long integer(int tag, long otherwise) {
        long[] values = integers(tag);
        return values.length == 0 ? otherwise : values[0];
    }

    /** First value of an unsigned rational field, NaN where it is missing or has no value. */
    double rational(int tag) {
        Field field = fields.get(tag);
        if (field == null || field.type != 5 || field.value.limit() < 8) {
            return Double.NaN;
        }
        double numerator = field.value.getInt(0) & 0xffffffffL;
        double denominator = field.value.getInt(4) & 0xffffffffL;
        return denominator == 0 ? Double.NaN : numerator / denominator;
    }

    /** Bytes of a field, empty where it is missing. */
    byte[] bytes(int tag) {
        Field field = fields.get(tag);
        if (field == null) {
            return new byte[0];
        }
        byte[] bytes = new byte[field.value.limit()];
        field.value.get(0, bytes);
        return bytes;
    }

    /** Text of a field without its closing zero, empty where it is missing. */
    String text(int tag) {
        return new String(bytes(tag), StandardCharsets.UTF_8).replace("\0", "");
    }
}
