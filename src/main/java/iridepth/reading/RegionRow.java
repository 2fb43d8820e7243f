package iridepth.reading;

import java.util.Arrays;

/**
 * To which region each pixel of a row belongs, or its state where to none, as runs from left to right.
 *
 * @param end    column after the last of each run
 * @param region its region, null where it has none; what it has become part of is its root
 * @param state  its state where it has none
 */
record RegionRow(int[] end, FilmRegion[] region, byte[] state) {
    /** Number of runs. */
    int runs() {
        return end.length;
    }

    /** First column of a run. */
    int from(int run) {
        return run == 0 ? 0 : end[run - 1];
    }

    /** Region of a run as it is now, null where it has none. */
    FilmRegion root(int run) {
        return region[run] == null ? null : region[run].root();
    }

    /** Run of a column. */
    int run(int x) {
        int found = Arrays.binarySearch(end, x);
        return found >= 0 ? found + 1 : -found - 1;
    }

    /** Cuts a row into runs of continuous thickness or one state; their regions are still to be found. */
    static RegionRow of(ReadRow row, JumpPenalty penalty) {
        float[] d = row.thickness();
        float jump = penalty.jump();
        int[] end = new int[16];
        byte[] state = new byte[16];
        int count = 0;
        for (int from = 0; from < d.length; ) {
            int to = from + 1;
            byte code = State.READ.code();
            if (Float.isNaN(d[from])) {
                code = row.state(from).code();
                while (to < d.length && Float.isNaN(d[to]) && row.state(to).code() == code) {
                    to++;
                }
            } else {
                while (to < d.length && (Math.abs(d[to] - d[to - 1]) <= jump || penalty.links(d[to - 1], d[to], 1))) {
                    to++;
                }
            }
            if (count == end.length) {
                end = Arrays.copyOf(end, 2 * count);
                state = Arrays.copyOf(state, 2 * count);
            }
            end[count] = to;
            state[count++] = code;
            from = to;
        }
        return new RegionRow(Arrays.copyOf(end, count), new FilmRegion[count], Arrays.copyOf(state, count));
    }
}
