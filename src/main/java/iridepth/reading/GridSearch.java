package iridepth.reading;

/**
 * Finds candidates by the runs of the curve that a pixel's cell lists: in a straight run by Newton steps from sample to sample
 * until the nearest is found, in others by looking along it. Pixels with censored channels go to the exhaustive search.
 */
final class GridSearch implements CandidateSearch {
    private static final int HOPS = 8;
    /** A minimum may lie this many samples off the nearest one, since the tangents of neighbours differ a little. */
    private static final float SLACK = 0.6f;
    /** Share of a distance that is skipped: the metric changes somewhat along the curve. */
    private static final float SKIPPED = 0.8f;
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
                int k = probe.nearest(runs[i], runs[i + 1], HOPS);
                accept(k, probe.distance(k));
            } else {
                look(runs[i], runs[i + 1], Float.intBitsToFloat(runs[i + 2]));
            }
        }
    }

    /** Keeps the minimum t samples beyond k, unless it lies beyond what k stands for or does not explain the pixel. */
    private void accept(int k, float t) {
        float held = t;
        if (k == 0 && t < 0 || k == size - 1 && t > 0) {
            held = 0;
        } else if (t < -SLACK || t > SLACK) {
            return;
        }
        float chiSquare = probe.chiSquare(k, held);
        if (chiSquare <= threshold) {
            result.add((float) probe.table().thickness(k, held), chiSquare + probe.table().logDeterminant(k),
                    chiSquare <= acceptance);
        }
    }

    /**
     * Looks along a run, at every sample where a candidate can be and in leaps where it is far: the root of chi-square falls no
     * faster than the length of the curve that is passed.
     */
    private void look(int first, int last, float slowness) {
        int k = first;
        int lowest = first;
        float least = Float.POSITIVE_INFINITY;
        boolean falling = false;
        while (true) {
            float here = probe.chiSquare(k);
            if (falling && here >= least) {
                settle(lowest);
            }
            falling = here < least;
            least = here;
            lowest = k;
            if (k == last) {
                break;
            }
            int step = here <= threshold ? 1 : Math.max(1, (int) (((float) Math.sqrt(here) - reach) * SKIPPED * slowness));
            k = Math.min(last, k + step);
        }
        if (falling && last == size - 1) {
            settle(last);
        }
    }

    /** Walks down to the minimum near a sample and places it by the parabola through its neighbours. */
    private void settle(int near) {
        int k = near;
        float here = probe.chiSquare(k);
        while (k > 0 && probe.chiSquare(k - 1) < here) {
            here = probe.chiSquare(--k);
        }
        while (k < size - 1 && probe.chiSquare(k + 1) < here) {
            here = probe.chiSquare(++k);
        }
        if (k == 0 || k == size - 1) {
            float t = probe.distance(k);
            accept(k, k == 0 ? Math.min(t, SLACK) : Math.max(t, -SLACK));
            return;
        }
        float before = probe.chiSquare(k - 1);
        float after = probe.chiSquare(k + 1);
        float bend = after - 2 * here + before;
        float t = bend > 0 ? (before - after) / (2 * bend) : 0;
        float chiSquare = Math.max(0, here - (before - after) * t / 4);
        if (chiSquare <= threshold) {
            result.addOnce((float) probe.table().thickness(k, t), chiSquare + probe.table().logDeterminant(k),
                    chiSquare <= acceptance);
        }
    }
}
