package iridepth.reading;

import java.util.Arrays;

/**
 * What a sweep carries along from the pixels of a row: for each the thicknesses it may have and what each has lost on the way,
 * the least loss 0. In the order of the sweep. A pixel that says nothing itself carries what reached it, with the distance to
 * where that came from.
 */
final class SweepRow {
    private final byte[] count;
    private final byte[] gap;
    private float[] thickness;
    private float[] loss;
    private int size;

    SweepRow(int width) {
        this.count = new byte[width];
        this.gap = new byte[width];
        this.thickness = new float[2 * width];
        this.loss = new float[2 * width];
    }

    private SweepRow(SweepRow other) {
        this.count = other.count.clone();
        this.gap = other.gap.clone();
        this.thickness = Arrays.copyOf(other.thickness, other.size);
        this.loss = Arrays.copyOf(other.loss, other.size);
        this.size = other.size;
    }

    /** A copy that stays as it is. */
    SweepRow copy() {
        return new SweepRow(this);
    }

    void clear() {
        size = 0;
    }

    /** Makes room for entries of the next pixel; where they begin. */
    int reserve(int entries) {
        if (size + entries > thickness.length) {
            int length = Math.max(size + entries, 2 * thickness.length);
            thickness = Arrays.copyOf(thickness, length);
            loss = Arrays.copyOf(loss, length);
        }
        return size;
    }

    /** Ends a pixel whose entries have been put in place. */
    void close(int i, int entries, int distance) {
        count[i] = (byte) entries;
        gap[i] = (byte) distance;
        size += entries;
    }

    int count(int i) {
        return count[i];
    }

    int gap(int i) {
        return gap[i];
    }

    float[] thickness() {
        return thickness;
    }

    float[] loss() {
        return loss;
    }
}
