package iridepth.photo;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/** Writes TIFF files byte by byte as TIFF 6.0 sections 2 and 15 lay them out, so that odd ones can be made. */
final class TiffBytes {

    static final int ASCII = 2;
    static final int SHORT = 3;
    static final int LONG = 4;
    static final int RATIONAL = 5;
    static final int UNDEFINED = 7;
    static final int LONG8 = 16;

    private record Field(int type, long count, byte[] value) {
    }

    private final ByteOrder order;
    private final boolean big;
    private final List<Map<Integer, Field>> pages = new ArrayList<>();
    private final List<byte[][]> chunks = new ArrayList<>();

    TiffBytes(ByteOrder order, boolean big) {
        this.order = order;
        this.big = big;
    }

    /** A plain grey or RGB page; its fields may be changed afterwards. */
    TiffBytes page(int width, int height, int samples, int bits, byte[]... data) {
        pages.add(new TreeMap<>());
        chunks.add(data);
        long[] depths = new long[samples];
        java.util.Arrays.fill(depths, bits);
        return set(256, LONG, width).set(257, LONG, height).set(258, SHORT, depths).set(259, SHORT, 1)
                .set(262, SHORT, samples >= 3 ? 2 : 1).set(277, SHORT, samples).set(278, LONG, height)
                .set(273, LONG, new long[data.length]).set(279, LONG, lengths(data));
    }

    private static long[] lengths(byte[][] data) {
        return java.util.Arrays.stream(data).mapToLong(chunk -> chunk.length).toArray();
    }

    /** Says that the page's chunks are tiles. */
    TiffBytes tiles(int width, int height) {
        byte[][] data = chunks.get(chunks.size() - 1);
        last().remove(273);
        last().remove(278);
        last().remove(279);
        return set(322, SHORT, width).set(323, SHORT, height).set(324, big ? LONG8 : LONG, new long[data.length])
                .set(325, LONG, lengths(data));
    }

    TiffBytes set(int tag, int type, long... values) {
        int size = type == SHORT ? 2 : type == LONG ? 4 : 8;
        ByteBuffer buffer = ByteBuffer.allocate(values.length * size).order(order);
        for (long value : values) {
            switch (type) {
                case SHORT -> buffer.putShort((short) value);
                case LONG -> buffer.putInt((int) value);
                default -> buffer.putLong(value);
            }
        }
        last().put(tag, new Field(type, values.length, buffer.array()));
        return this;
    }

    TiffBytes rational(int tag, int numerator, int denominator) {
        ByteBuffer buffer = ByteBuffer.allocate(8).order(order).putInt(numerator).putInt(denominator);
        last().put(tag, new Field(RATIONAL, 1, buffer.array()));
        return this;
    }

    TiffBytes text(int tag, String text) {
        byte[] bytes = (text + "\0").getBytes(StandardCharsets.UTF_8);
        last().put(tag, new Field(ASCII, bytes.length, bytes));
        return this;
    }

    TiffBytes bytes(int tag, byte[] bytes) {
        last().put(tag, new Field(UNDEFINED, bytes.length, bytes));
        return this;
    }

    TiffBytes remove(int tag) {
        last().remove(tag);
        return this;
    }

    private Map<Integer, Field> last() {
        return pages.get(pages.size() - 1);
    }

    /** Puts header, then for each page its chunks, its directory and the values of its fields. */
    byte[] build() {
        int size = 64;
        for (int i = 0; i < pages.size(); i++) {
            size += 64 + java.util.Arrays.stream(chunks.get(i)).mapToInt(chunk -> chunk.length).sum()
                    + pages.get(i).values().stream().mapToInt(field -> field.value.length + 40).sum();
        }
        ByteBuffer file = ByteBuffer.allocate(size).order(order);
        file.put(order == ByteOrder.LITTLE_ENDIAN ? new byte[] {'I', 'I'} : new byte[] {'M', 'M'});
        file.putShort((short) (big ? 43 : 42));
        if (big) {
            file.putShort((short) 8).putShort((short) 0);
        }
        int link = file.position();
        offset(file, 0);
        for (int i = 0; i < pages.size(); i++) {
            link = page(file, pages.get(i), chunks.get(i), link);
        }
        byte[] bytes = new byte[file.position()];
        file.get(0, bytes);
        return bytes;
    }

    private int page(ByteBuffer file, Map<Integer, Field> fields, byte[][] data, int link) {
        int offsetsTag = fields.containsKey(324) ? 324 : 273;
        Field offsets = fields.get(offsetsTag);
        ByteBuffer places = ByteBuffer.wrap(offsets.value).order(order);
        for (byte[] chunk : data) {
            if (offsets.type == LONG8) {
                places.putLong(file.position());
            } else {
                places.putInt(file.position());
            }
            file.put(chunk);
        }
        int inline = big ? 8 : 4;
        int directory = file.position();
        patch(file, link, directory);
        int values = directory + (big ? 8 : 2) + fields.size() * (big ? 20 : 12) + inline;
        if (big) {
            file.putLong(fields.size());
        } else {
            file.putShort((short) fields.size());
        }
        for (Map.Entry<Integer, Field> entry : fields.entrySet()) {
            Field field = entry.getValue();
            file.putShort(entry.getKey().shortValue()).putShort((short) field.type);
            offset(file, field.count);
            if (field.value.length <= inline) {
                file.put(field.value).position(file.position() + inline - field.value.length);
            } else {
                offset(file, values);
                file.put(values, field.value);
                values += field.value.length;
            }
        }
        int next = file.position();
        offset(file, 0);
        file.position(values);
        return next;
    }

    private void offset(ByteBuffer file, long value) {
        if (big) {
            file.putLong(value);
        } else {
            file.putInt((int) value);
        }
    }

    private void patch(ByteBuffer file, int at, int value) {
        if (big) {
            file.putLong(at, value);
        } else {
            file.putInt(at, value);
        }
    }

    Path write(Path path) throws IOException {
        return Files.write(path, build());
    }

    /** Counts as bytes in the order of the file. */
    static byte[] bytes(ByteOrder order, int bits, int... counts) {
        ByteBuffer buffer = ByteBuffer.allocate(counts.length * bits / 8).order(order);
        for (int count : counts) {
            if (bits == 16) {
                buffer.putShort((short) count);
            } else {
                buffer.put((byte) count);
            }
        }
        return buffer.array();
    }
}
