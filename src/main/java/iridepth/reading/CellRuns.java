package iridepth.reading;

import java.util.Arrays;

/** The runs of samples that cells list, while they are gathered: for every cell a linked list, the newest run first. */
final class CellRuns {
    private static final int NONE = -1;

    private final int[] newest;
    private int[] previous = new int[1024];
    private int[] first = new int[1024];
    private int[] last = new int[1024];
    private int count;

    CellRuns(int cells) {
        newest = new int[cells];
        Arrays.fill(newest, NONE);
    }

    /** Adds the piece from sample k to k + 1; pieces come in rising order. */
    void add(int cell, int k) {
        int run = newest[cell];
        if (run != NONE && last[run] == k) {
            last[run] = k + 1;
            return;
        }
        if (count == first.length) {
            previous = Arrays.copyOf(previous, 2 * count);
            first = Arrays.copyOf(first, 2 * count);
            last = Arrays.copyOf(last, 2 * count);
        }
        previous[count] = run;
        first[count] = k;
        last[count] = k + 1;
        newest[cell] = count++;
    }

    /** Values a run takes when packed: first and last sample, and how slowly the curve goes. */
    static final int PACKED = 3;

    /** Where each cell's runs begin when they stand one after another, rising; one more entry at the end. */
    int[] starts() {
        int[] start = new int[newest.length + 1];
        int at = 0;
        for (int cell = 0; cell < newest.length; cell++) {
            start[cell] = at;
            for (int run = newest[cell]; run != NONE; run = previous[run]) {
                at += PACKED;
            }
        }
        start[newest.length] = at;
        return start;
    }

    /** How slowly the curve goes along a run. */
    @FunctionalInterface
    interface Slowness {
        /** 0 where the run is straight, else samples per standard deviation of the noise where the curve goes fastest. */
        float of(int first, int last);
    }

    /** The runs of all cells. */
    int[] packed(Slowness slowness) {
        int[] start = starts();
        int[] packed = new int[start[newest.length]];
        for (int cell = 0; cell < newest.length; cell++) {
            int at = start[cell + 1];
            for (int run = newest[cell]; run != NONE; run = previous[run]) {
                at -= PACKED;
                packed[at] = first[run];
                packed[at + 1] = last[run];
                packed[at + 2] = Float.floatToIntBits(slowness.of(first[run], last[run]));
            }
        }
        return packed;
    }
}
