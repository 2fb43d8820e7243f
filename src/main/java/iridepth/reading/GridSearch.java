package iridepth.reading;

/**
 * Finds candidates by the runs of the curve that a pixel's cell lists: in a straight run by Newton steps from sample to sample
 * until the nearest is found, in others by looking along it. Pixels with censored channels go to the exhaustive search.
 */
final class GridSearch implements CandidateSearch {
    private static final float HALF = 0.5f;
    /** Chi-square by the tangent of a sample may exceed that of the minimum by this factor. */
    private static final float FAR = 1.5f;
    /** Curvature times residual below which the tangent of one sample does. */
    private static final float BENT = 0.15f;
    /** Share of a distance that is skipped: the metric changes somewhat along the curve. */
    private static final float SKIPPED = 0.8f;
    /** Over the threshold, chi-square beyond which no longer leaps are made. */
    private static final float FARTHEST = 9;
    private final TangentTable[] tables;
    private final CurveCells cells;
    private final float threshold;
    private final float acceptance;
    private final float reach;
    private final TangentProbe probe;
    private final ExhaustiveSearch exhaustive;
    private final int channels;
    private final int size;

    private CandidateRow result;
    /** Where the last pixel was found, from which to start in the next. */
    private int recent;

    GridSearch(CurveIndex index) {
        this.tables = index.tables();
        this.cells = index.cells();
        this.threshold = (float) index.threshold();
        this.acceptance = (float) index.acceptance();
        this.reach = (float) Math.sqrt(index.threshold());
        this.channels = index.curve().channels();
        this.size = tables[0].size();
        this.probe = channels == 3 ? new ThreeChannelProbe() : new AnyChannelProbe(channels);
        this.exhaustive = new ExhaustiveSearch(index);
    }

    /** Begins a row: where the last pixel was found is of no use any more. */
    void begin() {
        recent = -1;
    }

    @Override
    public void find(float[] values, byte[] limits, int pixel, int level, CandidateRow into) {
        for (int c = 0; c < channels; c++) {
            if (limits[pixel * channels + c] != 0) {
                exhaustive.find(values, limits, pixel, level, into);
                return;
            }
        }
        find(values, pixel, level, into);
    }

    /** Finds the candidates of a pixel without censored channels. */
    void find(float[] values, int pixel, int level, CandidateRow into) {
        int at = pixel * channels;
        int cell = cells.cell(values, at);
        if (cell < 0) {
            return;
        }
        int[] runs = cells.runs();
        int i = cells.start(cell);
        int end = cells.start(cell + 1);
        if (i == end) {
            return;
        }
        probe.load(tables[level], values, at);
        result = into;
        for (; i < end; i += CellRuns.PACKED) {
            if (runs[i + 2] == 0) {
                straight(runs[i], runs[i + 1]);
            } else {
                look(runs[i], runs[i + 1], Float.intBitsToFloat(runs[i + 2]));
            }
        }
    }

    /**
     * The minimum along a straight run. Where the curve bends, the tangent of a sample misses it by a share that grows with
     * the residual; then the tangent of the next sample beyond it tells where it lies between the two.
     */
    private void straight(int first, int last) {
        float chiSquare = probe.settle(first, last, recent >= first && recent <= last ? recent : (first + last) >>> 1);
        if (chiSquare > FAR * threshold) {
            return;
        }
        int k = probe.sample();
        float t = probe.offset();
        recent = k;
        boolean isSure = t <= HALF && t >= -HALF && k > first && k < last
                && probe.table().curvature(k) * probe.table().curvature(k) * chiSquare < BENT * BENT;
        if (isSure || k == 0 && t < 0 || k == size - 1 && t > 0) {
            float held = k == 0 ? Math.max(0, t) : k == size - 1 ? Math.min(0, t) : t;
            keep(k, held, chiSquare + (t - held) * (t - held) * probe.table().information(k));
            return;
        }
        int next = t > 0 ? k + 1 : k - 1;
        if (next < 0 || next >= size) {
            return;
        }
        float beyond = probe.distance(next);
        if (t * beyond <= 0) {
            float share = t == 0 ? 0 : t / (t - beyond);
            float drop = t * share * (next - k) * probe.table().information(k);
            keep(k, share * (next - k), chiSquare + t * t * probe.table().information(k) - drop);
        }
    }

    /** Keeps the minimum t samples beyond k, or the end of the curve where it would lie beyond that. */
    private void accept(int k, float t) {
        float held = k == 0 ? Math.max(0, t) : k == size - 1 ? Math.min(0, t) : t;
        keep(k, held, probe.chiSquare(k, held));
    }

    /** Keeps a minimum unless it does not explain the pixel. */
    private void keep(int k, float t, float chiSquare) {
        if (chiSquare <= threshold) {
            TangentTable table = probe.table();
            float least = Math.max(0, chiSquare);
            result.addOnce((float) table.thickness(k, t), table.spacing(k), least + table.logDeterminant(k), least <= acceptance);
        }
    }

    /**
     * Looks along a run, at every sample where a candidate can be and in leaps where it is far: the root of chi-square falls no
     * faster than the length of the curve that is passed. The root is taken by its chord, which lies below it.
     */
    private void look(int first, int last, float slowness) {
        float leap = SKIPPED * slowness / ((1 + (float) Math.sqrt(FARTHEST)) * reach);
        int k = first;
        int lowest = first;
        float least = Float.POSITIVE_INFINITY;
        boolean falling = false;
        while (true) {
            float here = probe.chiSquare(k, 0);
            if (falling && here >= least) {
                settle(lowest);
            }
            falling = here < least;
            least = here;
            lowest = k;
            if (k == last) {
                break;
            }
            int step = here <= threshold ? 1 : Math.max(1, (int) ((Math.min(here, FARTHEST * threshold) - threshold) * leap));
            k = Math.min(last, k + step);
        }
        if (falling && last == size - 1) {
            settle(last);
        }
    }

    /** Walks down to the minimum near a sample and places it by the parabola through its neighbours. */
    private void settle(int near) {
        int k = near;
        float here = probe.chiSquare(k, 0);
        while (k > 0 && probe.chiSquare(k - 1, 0) < here) {
            here = probe.chiSquare(--k, 0);
        }
        while (k < size - 1 && probe.chiSquare(k + 1, 0) < here) {
            here = probe.chiSquare(++k, 0);
        }
        if (k == 0 || k == size - 1) {
            accept(k, Math.max(-HALF, Math.min(HALF, probe.distance(k))));
            return;
        }
        float before = probe.chiSquare(k - 1, 0);
        float after = probe.chiSquare(k + 1, 0);
        float bend = after - 2 * here + before;
        float t = bend > 0 ? (before - after) / (2 * bend) : 0;
        keep(k, t, here - (before - after) * t / 4);
    }
}
