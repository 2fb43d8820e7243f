package iridepth.reading;

import java.util.Arrays;

/**
 * What a sweep carries along from the pixels of a row, in the order of the sweep: for each pixel a number of entries, each with
 * what it has lost on the way, the least loss 0, and a few values more. A pixel that says nothing itself carries what reached
 * it, with the distance to where that came from.
 */
final class SweepRow {
    private final int fields;
    private final byte[] count;
    private final byte[] gap;
    private final float[] authority;
    /** Losses of all entries. */
    float[] loss;
    /** The values of all entries, {@link #fields} each. */
    float[] value;
    private int size;

    /** @param fields values of an entry besides its loss */
    SweepRow(int width, int fields) {
        this.fields = fields;
        this.count = new byte[width];
        this.gap = new byte[width];
        this.authority = new float[width];
        this.loss = new float[2 * width];
        this.value = new float[2 * width * fields];
    }

    private SweepRow(SweepRow other) {
        this.fields = other.fields;
        this.count = other.count.clone();
        this.gap = other.gap.clone();
        this.authority = other.authority.clone();
        this.loss = Arrays.copyOf(other.loss, other.size);
        this.value = Arrays.copyOf(other.value, other.size * fields);
        this.size = other.size;
    }

    /** A copy that stays as it is. */
    SweepRow copy() {
        return new SweepRow(this);
    }

    void clear() {
        size = 0;
    }

    /** Makes room for the entries of the next pixel. */
    void reserve(int entries) {
        if (size + entries > loss.length) {
            int length = Math.max(size + entries, 2 * loss.length);
            loss = Arrays.copyOf(loss, length);
            value = Arrays.copyOf(value, length * fields);
        }
    }

    /** Ends a pixel whose entries have been put in place. */
    void close(int i, int entries, int distance, float itsAuthority) {
        count[i] = (byte) entries;
        gap[i] = (byte) distance;
        authority[i] = itsAuthority;
        size += entries;
    }

    /** Copies the entries of a pixel, which begin at a place in another row or this, to the next pixel. */
    void carry(SweepRow from, int at, int i, int entries, int distance, float itsAuthority) {
        System.arraycopy(from.loss, at, loss, size, entries);
        System.arraycopy(from.value, at * fields, value, size * fields, entries * fields);
        close(i, entries, distance, itsAuthority);
    }

    /** Number of entries of a pixel. */
    int count(int i) {
        return count[i];
    }

    /** How many pixels ago the entries of a pixel come from; 0 for its own. */
    int gap(int i) {
        return gap[i];
    }

    /** How far what a pixel says rests on pixels that leave no choice, up to 1. */
    float authority(int i) {
        return authority[i];
    }
}
