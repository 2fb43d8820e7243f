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
    private final GridSearch search;
    private final Signal line;
    private final CandidateRow found;
    private final byte[] kind;
    private final byte[] level;
    private final boolean[] out;
    private float[] cost;
    private int open;
    private final int[] columns;
    private int pinned;

    /**
     * @param several whether to keep all candidates of a pixel, for the choice of order, or the likeliest alone
     */
    RowReader(SignalSource photo, List<Region> excluded, Pins pins, CurveIndex index, boolean several) {
        this.photo = photo;
        this.excluded = excluded;
        this.pins = pins;
        this.tolerance = JumpPenalty.fringe(index) / 4;
        this.index = index;
        this.several = several;
        this.search = new GridSearch(index);
        this.line = Signal.row(photo.info());
        this.found = new CandidateRow(line.width());
        this.kind = new byte[line.width()];
        this.level = new byte[line.width()];
        this.out = new boolean[line.width()];
        this.columns = new int[line.width()];
        this.cost = new float[line.width() + CandidateRow.MOST];
    }

    /**
     * Finds the candidates of a row.
     *
     * @param counts rows of the photo
     * @param row    which of them
     * @param y      its place in the photo
     */
    PixelRow read(Frame counts, int row, int y) {
        photo.convert(counts, row, y, line);
        found.clear();
        open = 0;
        boolean[] excludedHere = excludedColumns(y);
        boolean plain = isPlain(line.limit());
        boolean pinnedHere = pins.touches(y);
        pinned = 0;
        for (int x = 0; x < kind.length; x++) {
            int itsLevel = index.levels().level(line.light()[x]);
            level[x] = (byte) itsLevel;
            if (excludedHere != null && excludedHere[x]) {
                kind[x] = (byte) ~State.EXCLUDED.code();
            } else if (plain) {
                search.find(line.value(), x, itsLevel, found);
                close(x, pinnedHere ? pins.at(x, y) : Double.NaN);
            } else if (isClipped(x)) {
                kind[x] = (byte) ~State.CLIPPED.code();
            } else {
                search.find(line.value(), line.limit(), x, itsLevel, found);
                close(x, pinnedHere ? pins.at(x, y) : Double.NaN);
            }
        }
        byte[] levels = index.levels().count() == 1 ? new byte[0] : level.clone();
        return new PixelRow(kind.clone(), levels, found.thicknesses(), Arrays.copyOf(cost, open),
                Arrays.copyOf(columns, pinned));
    }

    /** Ends a pixel: keeps the costs of its candidates if there are several, and judges it if there is none. */
    private void close(int x, double known) {
        if (known >= 0 && found.keepNearest(known, tolerance)) {
            columns[pinned++] = x;
        }
        if (!found.explained()) {
            found.withdraw();
            kind[x] = (byte) ~(isDark(x) ? State.DARK : State.OFF_CURVE).code();
            return;
        }
        if (!several) {
            found.keepLikeliest();
        }
        int count = found.close();
        kind[x] = (byte) count;
        if (count > 1) {
            if (open + count > cost.length) {
                cost = Arrays.copyOf(cost, 2 * cost.length);
            }
            for (int k = found.size() - count; k < found.size(); k++) {
                cost[open++] = found.cost(k);
            }
        }
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
