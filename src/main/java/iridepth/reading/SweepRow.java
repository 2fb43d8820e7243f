package iridepth.reading;

import java.util.Arrays;

/**
 * What a sweep carries along from the noted pixels of a row: for each a number of entries, each with what it has lost on the
 * way, the least loss 0, and a few values more. A pixel without candidates carries what reached it, with the distance to where
 * that came from. Pixels that are not noted have but one entry, their thickness, and have lost nothing.
 */
final class SweepRow {
    private final int fields;
    private PixelRow pixels;
    /** Where the entries of each noted pixel begin, and how many it has. */
    private int[] start = new int[0];
    private int[] count = new int[0];
    private byte[] gap = new byte[0];
    private float[] authority = new float[0];
    /** Losses of all entries. */
    float[] loss = new float[0];
    /** The values of all entries, some to each. */
    float[] value = new float[0];
    private int size;

    /** @param fields values of an entry besides its loss */
    SweepRow(int fields) {
        this.fields = fields;
    }

    private SweepRow(SweepRow other) {
        int noted = other.pixels == null ? 0 : other.pixels.noted();
        this.fields = other.fields;
        this.pixels = other.pixels;
        this.start = Arrays.copyOf(other.start, noted);
        this.count = Arrays.copyOf(other.count, noted);
        this.gap = Arrays.copyOf(other.gap, noted);
        this.authority = Arrays.copyOf(other.authority, noted);
        this.loss = Arrays.copyOf(other.loss, other.size);
        this.value = Arrays.copyOf(other.value, other.size * fields);
        this.size = other.size;
    }

    /** A copy that stays as it is. */
    SweepRow copy() {
        return new SweepRow(this);
    }

    /** Begins with the pixels of a row. */
    void begin(PixelRow row) {
        pixels = row;
        size = 0;
        int noted = row.noted();
        if (count.length < noted) {
            start = new int[2 * noted];
            count = new int[2 * noted];
            gap = new byte[2 * noted];
            authority = new float[2 * noted];
        }
        reserve(row.cost().length);
    }

    /** The row's pixels, null before the first row. */
    PixelRow pixels() {
        return pixels;
    }

    /** Makes room for more entries. */
    void reserve(int entries) {
        if (size + entries > loss.length) {
            int length = Math.max(size + entries, 2 * loss.length);
            loss = Arrays.copyOf(loss, length);
            value = Arrays.copyOf(value, length * fields);
        }
    }

    /** Where the entries of the next pixel will begin. */
    int next() {
        return size;
    }

    /** Ends a noted pixel whose entries have been put in place. */
    void close(int noted, int entries, float itsAuthority) {
        start[noted] = size;
        count[noted] = entries;
        gap[noted] = 0;
        authority[noted] = itsAuthority;
        size += entries;
    }

    /** A noted pixel to which nothing comes. */
    void leave(int noted) {
        start[noted] = size;
        count[noted] = 0;
        gap[noted] = 0;
    }

    /** Lets what reached a noted pixel in a row, this or another, pass on to the next. */
    void carry(SweepRow from, int index, int noted, int distance) {
        int entries = from.count[index];
        reserve(entries);
        System.arraycopy(from.loss, from.start[index], loss, size, entries);
        System.arraycopy(from.value, from.start[index] * fields, value, size * fields, entries * fields);
        close(noted, entries, from.authority[index]);
        gap[noted] = (byte) distance;
    }

    /** Lets the one thickness of a pixel that is not noted pass on to the next. */
    void carry(float thickness, int noted) {
        reserve(1);
        loss[size] = 0;
        value[size * fields] = thickness;
        close(noted, 1, 1);
        gap[noted] = 1;
    }

    /** Where the entries of a noted pixel begin. */
    int start(int noted) {
        return start[noted];
    }

    /** Number of entries of a noted pixel. */
    int count(int noted) {
        return count[noted];
    }

    /** How many pixels ago the entries of a noted pixel come from; 0 for its own. */
    int gap(int noted) {
        return gap[noted];
    }

    /** How far what a noted pixel says rests on pixels that leave no choice, up to 1. */
    float authority(int noted) {
        return authority[noted];
    }
}
