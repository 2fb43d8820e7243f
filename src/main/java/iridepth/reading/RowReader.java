package iridepth.reading;

import iridepth.photo.Frame;
import iridepth.photo.Region;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import java.util.Arrays;
import java.util.List;

/** Turns rows of counts into rows of candidates. Serves one thread. */
final class RowReader {
    /** A channel is dark when its signal is within so many standard deviations of none. */
    private static final double DARK_SIGMAS = 3;

    private final SignalSource photo;
    private final List<Region> excluded;
    private final Pins pins;
    /** How far a candidate may lie from the thickness that is known, nm. */
    private final double tolerance;
    private final CurveIndex index;
    private final boolean several;
    private final boolean notesAll;
    private final GridSearch search;
    private final Signal line;
    private final CandidateRow found;
    private final byte[] kind;
    private final byte[] level;
    private final float[] single;
    private final int[] censored;
    private final int[] column;
    private final int[] start;
    private final int[] pinned;
    private final boolean[] out;
    private int notedCount;
    private int pinnedCount;
    private boolean anyCensored;

    /**
     * @param several whether to keep all candidates of a pixel, for the choice of order, or the likeliest alone
     */
    RowReader(SignalSource photo, List<Region> excluded, Pins pins, CurveIndex index, boolean several) {
        this.several = several;
        this.photo = photo;
        this.excluded = excluded;
        this.pins = pins;
        this.tolerance = JumpPenalty.fringe(index) / 4;
        this.index = index;
        this.notesAll = index.turnsBack();
        this.search = new GridSearch(index);
        this.line = Signal.row(photo.info());
        int width = line.width();
        this.found = new CandidateRow(width);
        this.kind = new byte[width];
        this.level = new byte[width];
        this.single = new float[width];
        this.censored = new int[width];
        this.column = new int[width];
        this.start = new int[width + 1];
        this.pinned = new int[width];
        this.out = new boolean[width];
    }

    /**
     * Finds the candidates of a row.
     *
     * @param counts rows of the photo
     * @param row    which of them
     * @param y      its place in the photo
     */
    PixelRow read(Frame counts, int row, int y) {
        begin(counts, row, y);
        boolean[] excludedHere = excludedColumns(y);
        boolean pinnedHere = pins.touches(y);
        if (excludedHere == null && !pinnedHere && isPlain(line.limit())) {
            for (int from = 0; from < kind.length; from += GridSearch.AT_ONCE) {
                int to = Math.min(kind.length, from + GridSearch.AT_ONCE);
                search.locate(line.value(), from, to - from);
                for (int x = from; x < to; x++) {
                    search.find(line.value(), x, level[x], from, found);
                    close(x);
                }
            }
        } else {
            for (int x = 0; x < kind.length; x++) {
                read(x, excludedHere != null && excludedHere[x], pinnedHere ? pins.at(x, y) : Double.NaN);
            }
        }
        return row();
    }

    private void begin(Frame counts, int row, int y) {
        photo.convert(counts, row, y, line);
        found.clear();
        notedCount = 0;
        pinnedCount = 0;
        if (anyCensored) {
            Arrays.fill(censored, 0);
            anyCensored = false;
        }
        if (index.levels().count() > 1) {
            for (int x = 0; x < level.length; x++) {
                level[x] = (byte) index.levels().level(line.light()[x]);
            }
        }
    }

    private PixelRow row() {
        start[notedCount] = found.size();
        byte[] levels = index.levels().count() == 1 ? new byte[0] : level.clone();
        int[] limits = anyCensored ? censored.clone() : new int[0];
        return new PixelRow(kind.clone(), levels, limits, single.clone(), Arrays.copyOf(column, notedCount),
                Arrays.copyOf(start, notedCount + 1), found.thicknesses(), found.costs(), Arrays.copyOf(pinned, pinnedCount));
    }

    /**
     * Finds the candidates of some pixels of a row. The others are as if they were excluded, but not noted.
     *
     * @param counts rows of the photo
     * @param row    which of them
     * @param y      its place in the photo
     * @param first  column of the first of the pixels
     * @param step   columns from one to the next
     */
    PixelRow read(Frame counts, int row, int y, int first, int step) {
        begin(counts, row, y);
        Arrays.fill(kind, (byte) ~State.EXCLUDED.code());
        Arrays.fill(single, Float.NaN);
        boolean[] excludedHere = excludedColumns(y);
        for (int x = first; x < kind.length; x += step) {
            read(x, excludedHere != null && excludedHere[x], Double.NaN);
        }
        return row();
    }

    private void read(int x, boolean isExcluded, double known) {
        if (isExcluded) {
            leave(x, State.EXCLUDED);
        } else if (isClipped(x)) {
            leave(x, State.CLIPPED);
        } else {
            censored[x] = CensoredSearch.mask(line.limit(), x, line.channels());
            anyCensored |= censored[x] != 0;
            search.find(line.value(), line.limit(), x, level[x], found);
            if (known >= 0 && found.keepNearest(known, tolerance)) {
                pinned[pinnedCount++] = x;
            }
            close(x);
        }
    }

    /** Ends a pixel that has been searched: keeps its candidate or notes them, or judges it if there is none. */
    private void close(int x) {
        if (!several && found.explained()) {
            found.keepLikeliest();
        }
        int count = found.pending();
        if (!found.explained()) {
            found.withdraw();
            leave(x, isDark(x) ? State.DARK : State.OFF_CURVE);
            return;
        }
        kind[x] = (byte) count;
        single[x] = count == 1 ? found.thickness(found.size() - 1) : Float.NaN;
        if (count > 1 || notesAll) {
            note(x, found.size() - count);
            found.close();
        } else {
            found.withdraw();
        }
    }

    private void leave(int x, State why) {
        kind[x] = (byte) ~why.code();
        single[x] = Float.NaN;
        note(x, found.size());
    }

    private void note(int x, int candidates) {
        column[notedCount] = x;
        start[notedCount++] = candidates;
    }

    private boolean[] excludedColumns(int y) {
        boolean any = false;
        for (Region region : excluded) {
            if (y >= region.y() && y < region.y() + region.height()) {
                if (!any) {
                    Arrays.fill(out, false);
                    any = true;
                }
                Arrays.fill(out, Math.min(out.length, region.x()), Math.min(out.length, region.x() + region.width()), true);
            }
        }
        return any ? out : null;
    }

    private static boolean isPlain(byte[] limits) {
        int any = 0;
        for (byte limit : limits) {
            any |= limit;
        }
        return any == 0;
    }

    private boolean isClipped(int x) {
        int channels = line.channels();
        for (int c = 0; c < channels; c++) {
            if (line.limit()[x * channels + c] <= 0) {
                return false;
            }
        }
        return true;
    }

    private boolean isDark(int x) {
        int channels = line.channels();
        for (int c = 0; c < channels; c++) {
            double sigma = Math.sqrt(index.noise().variance(c, 0, line.light()[x]));
            if (line.value()[x * channels + c] > DARK_SIGMAS * sigma) {
                return false;
            }
        }
        return true;
    }
}
