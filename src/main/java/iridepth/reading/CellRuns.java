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

    /** Values a run takes when packed: first and last sample, the first as its complement where the run is not straight. */
    static final int PACKED = 2;

    /** How the curve goes along a run. */
    interface Course {
        /** Whether it bends gently and nowhere comes to a halt, so that it is straight in parts. */
        boolean isSmooth(int first, int last);

        /** The last sample up to which a smooth run is straight from the first on. */
        int straightUpTo(int first, int last);
    }

    /** The runs of all cells, those that are straight in parts cut into these. */
    void pack(Course course, PackedRuns into) {
        int[] order = new int[16];
        for (int cell = 0; cell < newest.length; cell++) {
            int count = 0;
            for (int run = newest[cell]; run != NONE; run = previous[run]) {
                if (count == order.length) {
                    order = Arrays.copyOf(order, 2 * count);
                }
                order[count++] = run;
            }
            while (--count >= 0) {
                pack(first[order[count]], last[order[count]], course, into);
            }
            into.endCell(cell);
        }
    }

    private static void pack(int from, int to, Course course, PackedRuns into) {
        if (!course.isSmooth(from, to)) {
            into.add(~from, to);
            return;
        }
        int first = from;
        while (first <= to) {
            int last = course.straightUpTo(first, to);
            into.add(first, last);
            first = last + 1;
        }
    }

    /** Receives runs cell by cell. */
    static final class PackedRuns {
        private final int[] start;
        private int[] runs = new int[1024];
        private int size;

        PackedRuns(int cells) {
            start = new int[cells + 1];
        }

        private void add(int first, int last) {
            if (size + PACKED > runs.length) {
                runs = Arrays.copyOf(runs, 2 * runs.length);
            }
            runs[size] = first;
            runs[size + 1] = last;
            size += PACKED;
        }

        private void endCell(int cell) {
            start[cell + 1] = size;
        }

        /** Where the runs of each cell begin, one more entry at the end. */
        int[] start() {
            return start;
        }

        /** {@link #PACKED} values a run: first sample, last sample, and the bits of a float, 0 where it is straight. */
        int[] runs() {
            return Arrays.copyOf(runs, size);
        }
    }
}
