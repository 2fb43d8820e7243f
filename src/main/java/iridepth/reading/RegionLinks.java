package iridepth.reading;

/**
 * Links the runs of each row to the regions of the rows below it: where a film may go from a pixel to one beside or below, also
 * across a gap of {@link Sweep#WIDEST_GAP} pixels without reading at most.
 */
final class RegionLinks {
    private final JumpPenalty penalty;
    /** What lies below pixels without reading: region, thickness, and rows down to it. */
    private final FilmRegion[] under;
    private final float[] underThickness;
    private final int[] underDepth;

    RegionLinks(JumpPenalty penalty, int width) {
        this.penalty = penalty;
        this.under = new FilmRegion[width];
        this.underThickness = new float[width];
        this.underDepth = new int[width];
    }

    /**
     * Finds the region of each run of a row.
     *
     * @param runs     the row's runs, whose regions are put in place
     * @param row      its readings
     * @param runsBelow runs of the row below, null in the first
     * @param rowBelow its readings
     */
    void link(RegionRow runs, ReadRow row, RegionRow runsBelow, ReadRow rowBelow) {
        int below = 0;
        int last = -1;
        for (int i = 0; i < runs.runs(); i++) {
            int from = runs.from(i);
            int to = runs.end()[i];
            if (Float.isNaN(row.thickness()[from])) {
                continue;
            }
            FilmRegion its = last < 0 ? null : acrossGap(runs, row, last, from);
            if (runsBelow != null) {
                while (runsBelow.end()[below] <= from) {
                    below++;
                }
                for (int j = below; j < runsBelow.runs() && runsBelow.from(j) < to; j++) {
                    its = toBelow(its, row, Math.max(from, runsBelow.from(j)), Math.min(to, runsBelow.end()[j]),
                            runsBelow.root(j), rowBelow);
                }
            }
            runs.region()[i] = its == null ? new FilmRegion() : its;
            last = i;
        }
        remember(runs, row, runsBelow, rowBelow);
    }

    /** The region of the run before where the film goes on from there, else null. */
    private FilmRegion acrossGap(RegionRow runs, ReadRow row, int before, int from) {
        int end = runs.end()[before] - 1;
        boolean isNear = from - end <= Sweep.WIDEST_GAP + 1 && from - end > 1;
        return isNear && penalty.links(row.thickness()[end], row.thickness()[from], from - end) ? runs.root(before) : null;
    }

    /** Links a stretch of a run to what lies below it; the run's region then. */
    private FilmRegion toBelow(FilmRegion its, ReadRow row, int from, int to, FilmRegion regionBelow, ReadRow rowBelow) {
        float[] d = row.thickness();
        if (regionBelow == null) {
            FilmRegion linked = its;
            for (int x = from; x < to; x++) {
                if (under[x] != null && penalty.links(underThickness[x], d[x], underDepth[x])) {
                    linked = join(linked, under[x]);
                }
            }
            return linked;
        }
        if (its != null && its.root() == regionBelow) {
            return regionBelow;
        }
        for (int x = from; x < to; x++) {
            if (penalty.links(rowBelow.thickness()[x], d[x], 1)) {
                return join(its, regionBelow);
            }
        }
        return its;
    }

    private static FilmRegion join(FilmRegion a, FilmRegion b) {
        return a == null ? b.root() : a.join(b);
    }

    /** Notes what lies below the pixels of this row that have no reading, for the next. */
    private void remember(RegionRow runs, ReadRow row, RegionRow runsBelow, ReadRow rowBelow) {
        for (int i = 0; i < runs.runs(); i++) {
            if (!Float.isNaN(row.thickness()[runs.from(i)])) {
                continue;
            }
            int below = runsBelow == null ? 0 : runsBelow.run(runs.from(i));
            for (int x = runs.from(i); x < runs.end()[i]; x++) {
                if (runsBelow == null) {
                    under[x] = null;
                    continue;
                }
                while (runsBelow.end()[below] <= x) {
                    below++;
                }
                if (runsBelow.region()[below] != null) {
                    under[x] = runsBelow.root(below);
                    underThickness[x] = rowBelow.thickness()[x];
                    underDepth[x] = 2;
                } else if (under[x] != null && ++underDepth[x] > Sweep.WIDEST_GAP + 1) {
                    under[x] = null;
                }
            }
        }
    }
}
