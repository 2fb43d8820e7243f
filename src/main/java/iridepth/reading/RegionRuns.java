package iridepth.reading;

import java.util.Arrays;

/** To which region each pixel of a picture belongs, or its state where to none, as runs along the rows. */
final class RegionRuns {
    private final int width;
    private final FilmRegion[][] region;
    private final int[][] end;
    private final byte[][] state;
    private FilmRegion[] regions = new FilmRegion[16];
    private int[] ends = new int[16];
    private byte[] states = new byte[16];

    RegionRuns(int width, int height) {
        this.width = width;
        this.region = new FilmRegion[height][];
        this.end = new int[height][];
        this.state = new byte[height][];
    }

    /** Adds a row and counts its pixels to their regions. */
    void add(int y, FilmRegion[] here, ReadRow row) {
        int count = 0;
        int from = 0;
        while (from < width) {
            FilmRegion its = here[from] == null ? null : here[from].root();
            byte code = row.state()[from];
            int to = from + 1;
            while (to < width && (its == null ? here[to] == null && row.state()[to] == code
                    : here[to] != null && (here[to] == its || here[to].root() == its))) {
                to++;
            }
            if (count == ends.length) {
                regions = Arrays.copyOf(regions, 2 * count);
                ends = Arrays.copyOf(ends, 2 * count);
                states = Arrays.copyOf(states, 2 * count);
            }
            regions[count] = its;
            ends[count] = to;
            states[count++] = code;
            if (its != null) {
                count(y, from, to, its, row);
            }
            from = to;
        }
        region[y] = Arrays.copyOf(regions, count);
        end[y] = Arrays.copyOf(ends, count);
        state[y] = Arrays.copyOf(states, count);
    }

    private void count(int y, int from, int to, FilmRegion its, ReadRow row) {
        double sum = 0;
        int settled = 0;
        for (int x = from; x < to; x++) {
            sum += row.thickness()[x];
            settled += row.margin()[x] == Float.POSITIVE_INFINITY ? 1 : 0;
        }
        its.add(y, from, to, sum);
        its.settle(settled);
        its.meet((from > 0 ? 1 : 0) + (to < width ? 1 : 0));
    }

    /** Number of runs in a row. */
    int count(int y) {
        return end[y].length;
    }

    /** Column after the last of a run. */
    int end(int y, int run) {
        return end[y][run];
    }

    /** Region of a run, null where it has none. */
    FilmRegion region(int y, int run) {
        return region[y][run] == null ? null : region[y][run].root();
    }

    /** State of a run without region. */
    State state(int y, int run) {
        return State.of(state[y][run]);
    }
}
