package iridepth.report;

import java.util.Base64;
import java.util.zip.Deflater;

/**
 * One number per point, packed into text for a page. A value becomes a 32-bit integer: its own IEEE 754 bits, which loses
 * nothing, or the nearest multiple of a step. Each integer is replaced by its difference from the one to its left (in the first
 * column, from the one above), modulo 2^32; the sign goes to the lowest bit; then come the lowest bytes of all, the next, and so
 * on, compressed by DEFLATE (RFC 1951) and written in Base64 (RFC 4648).
 */
final class PagePlane {
    /** Stands for 'no value' where values are multiples of a step. */
    static final int NONE = Integer.MIN_VALUE;

    private static final int LEVEL = 5;

    private PagePlane() {
    }

    /** The integers of floats kept whole. */
    static int[] exact(float[] values) {
        int[] bits = new int[values.length];
        for (int i = 0; i < bits.length; i++) {
            bits[i] = Float.floatToIntBits(values[i]);
        }
        return bits;
    }

    /** The integers of floats rounded to a step; what is not finite or beyond 2^31 steps has no value. */
    static int[] stepped(float[] values, double step) {
        int[] steps = new int[values.length];
        for (int i = 0; i < steps.length; i++) {
            double v = values[i] / step;
            steps[i] = Math.abs(v) < Integer.MAX_VALUE ? (int) Math.rint(v) : NONE;
        }
        return steps;
    }

    /** The integers of codes. */
    static int[] codes(byte[] values) {
        int[] codes = new int[values.length];
        for (int i = 0; i < codes.length; i++) {
            codes[i] = values[i];
        }
        return codes;
    }

    /**
     * Packs the integers.
     *
     * @param columns points per row
     */
    static String pack(int[] values, int columns) {
        int n = values.length;
        byte[] planes = new byte[4 * n];
        for (int i = 0; i < n; i++) {
            int before = i % columns != 0 ? values[i - 1] : i > 0 ? values[i - columns] : 0;
            int difference = values[i] - before;
            int folded = difference << 1 ^ difference >> 31;
            for (int b = 0; b < 4; b++) {
                planes[b * n + i] = (byte) (folded >>> 8 * b);
            }
        }
        return Base64.getEncoder().encodeToString(deflated(planes));
    }

    private static byte[] deflated(byte[] bytes) {
        Deflater deflater = new Deflater(LEVEL, true);
        try {
            deflater.setInput(bytes);
            deflater.finish();
            byte[] packed = new byte[bytes.length + bytes.length / 1000 + 64];
            int length = 0;
            while (!deflater.finished()) {
                length += deflater.deflate(packed, length, packed.length - length);
            }
            return java.util.Arrays.copyOf(packed, length);
        } finally {
            deflater.end();
        }
    }
}
