package iridepth.reading;

import java.util.Arrays;

/** The runs of samples that cells list, while they are gathered: for every cell a linked list, the newest run first. */
final class CellRuns {
    private static final int NONE = -1;

    private final int[] newest;
    private int[] previous = new int[1024];
    private int[] first = new int[1024];
    private int[] last = new int[1024];
    private boolean[] straight = new boolean[1024];
    private int count;

    CellRuns(int cells) {
        newest = new int[cells];
        Arrays.fill(newest, NONE);
    }

    /** Adds the piece from sample k to k + 1; pieces come in rising order. */
    void add(int cell, int k, boolean isStraight) {
        int run = newest[cell];
        if (run != NONE && last[run] == k) {
            last[run] = k + 1;
            straight[run] &= isStraight;
            return;
        }
        if (count == first.length) {
            previous = Arrays.copyOf(previous, 2 * count);
            first = Arrays.copyOf(first, 2 * count);
            last = Arrays.copyOf(last, 2 * count);
            straight = Arrays.copyOf(straight, 2 * count);
        }
        previous[count] = run;
        first[count] = k;
        last[count] = k + 1;
        straight[count] = isStraight;
        newest[cell] = count++;
    }

    /** Where each cell's runs begin when pairs stand one after another, rising. */
    int[] starts() {
        int[] start = new int[newest.length + 1];
        int at = 0;
        for (int cell = 0; cell < newest.length; cell++) {
            start[cell] = at;
            for (int run = newest[cell]; run != NONE; run = previous[run]) {
                at += 2;
            }
        }
        start[newest.length] = at;
        return start;
    }

    /** The runs as pairs of first and last sample, the last as its complement where the run is not straight. */
    int[] packed(int[] start) {
        int[] packed = new int[start[newest.length]];
        for (int cell = 0; cell < newest.length; cell++) {
            int at = start[cell + 1];
            for (int run = newest[cell]; run != NONE; run = previous[run]) {
                packed[--at] = straight[run] ? last[run] : ~last[run];
                packed[--at] = first[run];
            }
        }
        return packed;
    }
}
