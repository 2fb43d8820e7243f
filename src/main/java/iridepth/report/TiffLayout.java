package iridepth.report;

import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;

/**
 * Where everything lies in a one-channel TIFF (TIFF 6.0, Adobe 1992; BigTIFF as in its published extension of 2007): header,
 * directory, the directory's longer values, then the rows without gaps.
 *
 * @param width       pixels per row
 * @param height      rows
 * @param sample      what a pixel is
 * @param palette     red, green and blue of the codes from 0 on, 0xRRGGBB, or empty for grey
 * @param description text for the tag ImageDescription, ASCII
 * @param pixelUm     edge of a pixel in um, or NaN if unknown
 * @param big         whether offsets have 64 bits
 */
record TiffLayout(int width, int height, TiffWriter.Sample sample, List<Integer> palette, String description, double pixelUm,
                  boolean big) {
    private static final int SHORT = 3;
    private static final int LONG = 4;
    private static final int RATIONAL = 5;
    private static final int ASCII = 2;
    private static final int LONG8 = 16;
    /** A strip holds as many rows as fit here: readers that take strip by strip then need little memory. */
    private static final int STRIP_BYTES = 1 << 18;
    private static final long CLASSIC_LIMIT = 0xFFFF_FFFFL;

    TiffLayout {
        if (width < 1 || height < 1) {
            throw new IllegalArgumentException("an image needs at least one pixel, not " + width + " x " + height);
        }
        if (!(Double.isNaN(pixelUm) || pixelUm >= 1e-4 && pixelUm <= 1e5)) {
            throw new IllegalArgumentException("the pixel size must be 0.0001 to 100000 um, not " + pixelUm);
        }
        palette = List.copyOf(palette);
    }

    /** The layout of a file, a BigTIFF only if it must be one. */
    static TiffLayout of(int width, int height, TiffWriter.Sample sample, List<Integer> palette, String description,
                         double pixelUm) {
        TiffLayout classic = new TiffLayout(width, height, sample, palette, description, pixelUm, false);
        return classic.dataOffset() + height * classic.rowBytes() <= CLASSIC_LIMIT ? classic
                : new TiffLayout(width, height, sample, palette, description, pixelUm, true);
    }

    /** A field of the directory; its bytes in little-endian order. */
    private record Field(int tag, int type, long count, ByteBuffer value) {
        static Field shorts(int tag, int... values) {
            ByteBuffer b = ByteBuffer.allocate(2 * values.length).order(ByteOrder.LITTLE_ENDIAN);
            for (int v : values) {
                b.putShort((short) v);
            }
            return new Field(tag, SHORT, values.length, b.flip());
        }

        static Field longs(int tag, int... values) {
            ByteBuffer b = ByteBuffer.allocate(4 * values.length).order(ByteOrder.LITTLE_ENDIAN);
            for (int v : values) {
                b.putInt(v);
            }
            return new Field(tag, LONG, values.length, b.flip());
        }

        static Field rational(int tag, long[] fraction) {
            Field parts = longs(tag, (int) fraction[0], (int) fraction[1]);
            return new Field(tag, RATIONAL, 1, parts.value);
        }

        static Field ascii(int tag, String text) {
            ByteBuffer b = ByteBuffer.wrap((text + "\0").getBytes(StandardCharsets.US_ASCII));
            return new Field(tag, ASCII, b.remaining(), b);
        }
    }

    private int rowsPerStrip() {
        return (int) Math.max(1, Math.min(height, STRIP_BYTES / rowBytes()));
    }

    private int strips() {
        return (height + rowsPerStrip() - 1) / rowsPerStrip();
    }

    /** Length of a row. */
    long rowBytes() {
        return (long) width * sample.bytes;
    }

    /** Place of the first row in the file. */
    long dataOffset() {
        long end = valuesOffset(fields(0));
        for (Field f : fields(0)) {
            end += isInline(f) ? 0 : even(f.value.remaining());
        }
        return (end + 15) / 16 * 16;
    }

    private long valuesOffset(List<Field> fields) {
        return big ? 16 + 8 + 20L * fields.size() + 8 : 8 + 2 + 12L * fields.size() + 4;
    }

    private boolean isInline(Field f) {
        return f.value.remaining() <= (big ? 8 : 4);
    }

    private static long even(long bytes) {
        return (bytes + 1) / 2 * 2;
    }

    private List<Field> fields(long data) {
        boolean mapped = !palette.isEmpty();
        List<Field> fields = new ArrayList<>();
        fields.add(Field.longs(256, width));
        fields.add(Field.longs(257, height));
        fields.add(Field.shorts(258, 8 * sample.bytes));
        fields.add(Field.shorts(259, 1));
        fields.add(Field.shorts(262, mapped ? 3 : 1));
        fields.add(Field.ascii(270, description));
        fields.add(stripField(273, true, data));
        fields.add(Field.shorts(277, 1));
        fields.add(Field.longs(278, rowsPerStrip()));
        fields.add(stripField(279, false, data));
        long[] perCm = Double.isNaN(pixelUm) ? new long[] {1, 1} : pixelsPerCm(pixelUm);
        fields.add(Field.rational(282, perCm));
        fields.add(Field.rational(283, perCm));
        fields.add(Field.shorts(296, Double.isNaN(pixelUm) ? 1 : 3));
        if (mapped) {
            fields.add(Field.shorts(320, colourMap()));
        }
        fields.add(Field.shorts(339, sample == TiffWriter.Sample.FLOAT ? 3 : 1));
        return fields;
    }

    private Field stripField(int tag, boolean offsets, long data) {
        int strips = strips();
        ByteBuffer b = ByteBuffer.allocate((big ? 8 : 4) * strips).order(ByteOrder.LITTLE_ENDIAN);
        for (int s = 0; s < strips; s++) {
            int first = s * rowsPerStrip();
            int rows = Math.min(rowsPerStrip(), height - first);
            long v = offsets ? data + first * rowBytes() : rows * rowBytes();
            if (big) {
                b.putLong(v);
            } else {
                b.putInt((int) v);
            }
        }
        return new Field(tag, big ? LONG8 : LONG, strips, b.flip());
    }

    private int[] colourMap() {
        int[] map = new int[3 * 256];
        for (int code = 0; code < palette.size(); code++) {
            for (int c = 0; c < 3; c++) {
                map[256 * c + code] = 257 * (palette.get(code) >> 16 - 8 * c & 255);
            }
        }
        return map;
    }

    /**
     * Pixels per centimetre, 10000 / pixelUm, as the best fraction with numerator and denominator below 2^32: the continued
     * fraction of the pixel size, cut where it would no longer fit.
     */
    static long[] pixelsPerCm(double pixelUm) {
        long limit = CLASSIC_LIMIT / 10_000;
        long p0 = 1;
        long q0 = 0;
        long p1 = (long) pixelUm;
        long q1 = 1;
        double rest = pixelUm - p1;
        while (rest > 1e-9 && Math.abs((double) p1 / q1 - pixelUm) > 1e-12 * pixelUm) {
            double inverse = 1 / rest;
            long a = (long) inverse;
            if (a > limit || a * p1 + p0 > limit || a * q1 + q0 > limit) {
                break;
            }
            long p2 = a * p1 + p0;
            long q2 = a * q1 + q0;
            p0 = p1;
            q0 = q1;
            p1 = p2;
            q1 = q2;
            rest = inverse - a;
        }
        return new long[] {10_000 * q1, p1};
    }

    /** The file up to its first row. */
    ByteBuffer head() {
        long data = dataOffset();
        List<Field> fields = fields(data);
        ByteBuffer b = ByteBuffer.allocate((int) data).order(ByteOrder.LITTLE_ENDIAN);
        b.put((byte) 'I').put((byte) 'I').putShort((short) (big ? 43 : 42));
        if (big) {
            b.putShort((short) 8).putShort((short) 0).putLong(16).putLong(fields.size());
        } else {
            b.putInt(8).putShort((short) fields.size());
        }
        long values = valuesOffset(fields);
        int slot = big ? 8 : 4;
        for (Field f : fields) {
            b.putShort((short) f.tag).putShort((short) f.type);
            putWord(b, f.count);
            int next = b.position() + slot;
            if (isInline(f)) {
                b.put(f.value.duplicate());
            } else {
                putWord(b, values);
                b.put((int) values, f.value.array(), 0, f.value.remaining());
                values += even(f.value.remaining());
            }
            b.position(next);
        }
        putWord(b, 0);
        return b.rewind();
    }

    private void putWord(ByteBuffer b, long value) {
        if (big) {
            b.putLong(value);
        } else {
            b.putInt((int) value);
        }
    }
}
