package iridepth.reading;

import iridepth.photo.Region;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;

/**
 * The regions of continuous thickness in a picture, gathered row by row from the bottom up: pixels are of one region where a
 * film may go from one to the other, across a gap of {@link Sweep#WIDEST_GAP} pixels at most.
 */
final class Regions {
    /** Pixels below which a region that meets other things is a speck. */
    private static final int SPECK = 5;
    /** Rows after which no pixel can join a speck any more. */
    static final int SPECK_ROWS = SPECK * (Sweep.WIDEST_GAP + 1);
    /** Pixels with one candidate only that settle a region's order. */
    private static final int SETTLING = 20;
    /** So many pixels of a region, and every sixteenth of the rest, tell of other orders. */
    private static final int WITNESSES = 4096;

    private final CurveIndex index;
    private final JumpPenalty penalty;
    private final int width;
    private final FilmRegion[] below;
    private final float[] belowThickness;
    private final byte[] belowGap;
    private final FilmRegion[] here;
    /** [y]: the regions of the row, one a run; where there is no reading, null. */
    private final FilmRegion[][] region;
    /** [y]: where each run ends. */
    private final int[][] end;
    /** [y]: state of each run without reading. */
    private final byte[][] state;
    private final List<FilmRegion> all = new ArrayList<>();

    Regions(CurveIndex index, JumpPenalty penalty, int width, int height) {
        this.index = index;
        this.penalty = penalty;
        this.width = width;
        this.below = new FilmRegion[width];
        this.belowThickness = new float[width];
        this.belowGap = new byte[width];
        this.here = new FilmRegion[width];
        this.region = new FilmRegion[height][];
        this.end = new int[height][];
        this.state = new byte[height][];
    }

    /** Takes the next row upwards. */
    void add(int y, PixelRow pixels, ReadRow row) {
        link(row);
        RunList runs = new RunList(y, pixels, row);
        region[y] = runs.regions();
        end[y] = runs.ends();
        state[y] = runs.states();
        for (int x : pixels.pinned()) {
            if (here[x] != null) {
                here[x].root().pin();
            }
        }
    }

    /** Finds the region of each pixel and leaves it in {@link #here}. */
    private void link(ReadRow row) {
        float[] thickness = row.thickness();
        FilmRegion beside = null;
        float besideThickness = 0;
        int besideAt = -1;
        for (int x = 0; x < width; x++) {
            float d = thickness[x];
            if (d != d) {
                here[x] = null;
                if (below[x] != null && ++belowGap[x] > Sweep.WIDEST_GAP) {
                    below[x] = null;
                }
                continue;
            }
            FilmRegion its = null;
            if (beside != null && x - besideAt <= Sweep.WIDEST_GAP + 1 && penalty.links(besideThickness, d, x - besideAt)) {
                its = beside;
            }
            FilmRegion lower = below[x];
            if (lower != null && penalty.links(belowThickness[x], d, belowGap[x] + 1)) {
                if (its == null) {
                    its = lower.root();
                } else if (its != lower) {
                    its = join(its, lower);
                }
            }
            if (its == null) {
                its = new FilmRegion();
                all.add(its);
            }
            here[x] = its;
            below[x] = its;
            belowThickness[x] = d;
            belowGap[x] = 0;
            beside = its;
            besideThickness = d;
            besideAt = x;
        }
    }

    private static FilmRegion join(FilmRegion a, FilmRegion b) {
        a.join(b);
        return a.root();
    }

    /** The runs of a row: stretches of pixels of one region or one state. */
    private final class RunList {
        private final List<FilmRegion> regions = new ArrayList<>();
        private int[] ends = new int[8];
        private byte[] states = new byte[8];

        RunList(int y, PixelRow pixels, ReadRow row) {
            int from = 0;
            FilmRegion its = root(0);
            for (int x = 1; x <= width; x++) {
                FilmRegion next = x < width ? root(x) : null;
                if (x == width || next != its || its == null && row.state()[x] != row.state()[from]) {
                    close(y, from, x, its, row);
                    from = x;
                    its = next;
                }
            }
            witness(y, pixels, row);
        }

        private FilmRegion root(int x) {
            return here[x] == null ? null : here[x].root();
        }

        private void close(int y, int from, int to, FilmRegion its, ReadRow row) {
            int count = regions.size();
            if (count == ends.length) {
                ends = Arrays.copyOf(ends, 2 * count);
                states = Arrays.copyOf(states, 2 * count);
            }
            regions.add(its);
            ends[count] = to;
            states[count] = row.state()[from];
            if (its != null) {
                double sum = 0;
                int settled = 0;
                for (int x = from; x < to; x++) {
                    sum += row.thickness()[x];
                    settled += row.margin()[x] == Float.POSITIVE_INFINITY ? 1 : 0;
                }
                its.add(y, from, to, to - from, sum);
                its.settle(settled);
                its.meet((from > 0 ? 1 : 0) + (to < width ? 1 : 0));
            }
        }

        FilmRegion[] regions() {
            return regions.toArray(FilmRegion[]::new);
        }

        int[] ends() {
            return Arrays.copyOf(ends, regions.size());
        }

        byte[] states() {
            return Arrays.copyOf(states, regions.size());
        }
    }

    /** Lets the pixels of a row that have several candidates tell of them, in regions that nothing has settled yet. */
    private void witness(int y, PixelRow pixels, ReadRow row) {
        int candidate = 0;
        int open = 0;
        for (int x = 0; x < width; x++) {
            int count = Math.max(0, pixels.kind(x));
            if (count > 1) {
                FilmRegion its = here[x] == null ? null : here[x].root();
                if (its != null && !isSettled(its) && (its.pixels() < WITNESSES || (x & 3) == 0 && (y & 3) == 0)) {
                    its.evidence(index).add(row.thickness()[x], pixels, candidate, open, count);
                }
                open += count;
            }
            candidate += count;
        }
    }

    private static boolean isSettled(FilmRegion region) {
        return region.pinned() || region.settled() >= SETTLING && region.settled() * 1000 >= region.pixels();
    }

    private static boolean isSpeck(FilmRegion region) {
        return region.pixels() < SPECK && region.contacts() > 0;
    }

    /** Takes the readings of specks out of a row that lies {@link #SPECK_ROWS} below the last one added, or of any at the end. */
    ReadRow clean(int y, ReadRow row) {
        ReadRow result = row;
        int from = 0;
        for (int i = 0; i < end[y].length; i++) {
            FilmRegion its = region[y][i];
            if (its != null && isSpeck(its.root())) {
                if (result == row) {
                    result = row.copy();
                }
                for (int x = from; x < end[y][i]; x++) {
                    result.leave(x, State.OFF_CURVE);
                }
            }
            from = end[y][i];
        }
        return result;
    }

    /** Judges all regions when all rows have been added; those in doubt, largest first. */
    List<DoubtfulRegion> judge() {
        List<DoubtfulRegion> doubtful = new ArrayList<>();
        for (FilmRegion its : all) {
            if (its.root() == its && its.pixels() > 0 && !isSpeck(its) && !isSettled(its) && its.hasEvidence()) {
                List<DoubtfulRegion.Alternative> alternatives = its.evidence(index).alternatives(its.pixels());
                if (!alternatives.isEmpty()) {
                    its.setDoubtful();
                    int[] box = its.box();
                    doubtful.add(new DoubtfulRegion(new Region(box[0], box[1], box[2], box[3]), its.pixels(),
                            its.mean(), alternatives));
                }
            }
        }
        doubtful.sort(Comparator.comparingLong(DoubtfulRegion::pixels).reversed());
        return doubtful;
    }

    /** The states of a row, after {@link #judge}. */
    void states(int y, byte[] into, int at) {
        int from = 0;
        for (int i = 0; i < end[y].length; i++) {
            FilmRegion its = region[y][i] == null ? null : region[y][i].root();
            State code = its == null ? State.of(state[y][i]) : isSpeck(its) ? State.OFF_CURVE
                    : its.doubtful() ? State.ORDER_DOUBTFUL : State.READ;
            Arrays.fill(into, at + from, at + end[y][i], code.code());
            from = end[y][i];
        }
    }
}
