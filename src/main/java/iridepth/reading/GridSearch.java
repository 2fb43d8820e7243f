package iridepth.reading;

/**
 * Finds candidates by the runs of the curve that a pixel's cell lists: in a straight run by Newton steps from sample to sample
 * until the nearest is found, in others by looking along it. Pixels with censored channels go to the {@link CensoredSearch}.
 */
final class GridSearch implements CandidateSearch {
    static final int AT_ONCE = 256;
    private static final float HALF = 0.5f;
    /** Chi-square by the tangent of a sample may exceed that of the minimum by this factor. */
    private static final float FAR = 1.5f;
    /** Curvature times residual below which the tangent of one sample does. */
    private static final float BENT = 0.15f;
    private final TangentTable[] tables;
    private final CurveCells cells;
    private final float threshold;
    private final float acceptance;
    private final TangentProbe probe;
    private final CensoredSearch censored;
    private final int channels;
    private final int size;

    private final int[] begin = new int[AT_ONCE];
    private final int[] end = new int[AT_ONCE];
    private final int[] lead = new int[AT_ONCE];
    private CandidateRow result;

    GridSearch(CurveIndex index) {
        this.tables = index.tables();
        this.cells = index.cells();
        this.threshold = (float) index.threshold();
        this.acceptance = (float) index.acceptance();
        this.channels = index.curve().channels();
        this.size = tables[0].size();
        this.probe = channels == 3 ? new ThreeChannelProbe() : new AnyChannelProbe(channels);
        this.censored = new CensoredSearch(index);
    }

    @Override
    public void find(float[] values, byte[] limits, int pixel, int level, CandidateRow into) {
        for (int c = 0; c < channels; c++) {
            if (limits[pixel * channels + c] != 0) {
                censored.find(values, limits, pixel, level, into);
                return;
            }
        }
        find(values, pixel, level, into);
    }

    /** Finds the candidates of a pixel without censored channels. */
    void find(float[] values, int pixel, int level, CandidateRow into) {
        locate(values, pixel, 1);
        find(values, pixel, level, pixel, into);
    }

    /** Finds the candidates of a row's pixels without censored channels, from one on, {@link #AT_ONCE} at most. */
    void locate(float[] values, int first, int count) {
        int[] runs = cells.runs();
        for (int i = 0; i < count; i++) {
            int cell = cells.cell(values, (first + i) * channels);
            begin[i] = cell < 0 ? 0 : cells.start(cell);
            end[i] = cell < 0 ? 0 : cells.start(cell + 1);
        }
        for (int i = 0; i < count; i++) {
            lead[i] = begin[i] < end[i] ? runs[begin[i]] : 0;
        }
    }

    void find(float[] values, int pixel, int level, int located, CandidateRow into) {
        int i = begin[pixel - located];
        int last = end[pixel - located];
        if (i == last) {
            return;
        }
        probe.load(tables[level], values, pixel * channels);
        result = into;
        int[] runs = cells.runs();
        int first = lead[pixel - located];
        while (true) {
            if (first >= 0) {
                straight(first, runs[i + 1]);
            } else {
                look(~first, runs[i + 1]);
            }
            i += CellRuns.PACKED;
            if (i == last) {
                return;
            }
            first = runs[i];
        }
    }

    /**
     * The minimum along a straight run. Where the curve bends, the tangent of a sample misses it by a share that grows with
     * the residual; then that of the next sample beyond it tells where it lies between the two.
     */
    private void straight(int first, int last) {
        float chiSquare = probe.settle(first, last, (first + last) >>> 1);
        if (chiSquare > FAR * threshold) {
            return;
        }
        int k = probe.sample();
        float t = probe.offset();
        float bend = probe.table().curvature(k);
        if (t <= HALF && t >= -HALF && k > 0 && k < size - 1 && bend * bend * chiSquare < BENT * BENT) {
            keep(k, t, chiSquare);
        } else if (t > 0) {
            float beyond = k < size - 1 ? probe.distance(k + 1) : 0;
            if (beyond < 0) {
                between(k, t, beyond);
            } else if (k == size - 1) {
                keep(k, 0, probe.chiSquare(k));
            }
        } else {
            float before = k > 0 ? probe.distance(k - 1) : 0;
            if (before > 0) {
                between(k - 1, before, t);
            } else if (k == 0) {
                keep(k, 0, probe.chiSquare(k));
            }
        }
    }

    /** Keeps a minimum unless it does not explain the pixel. */
    private void keep(int k, float t, float chiSquare) {
        if (chiSquare <= threshold) {
            TangentTable table = probe.table();
            float least = Math.max(0, chiSquare);
            result.addOnce(table.thickness(k, t), table.spacing(k), least + table.logDeterminant(k), least <= acceptance);
        }
    }

    /** Looks along a run, sample by sample, and on from its ends where chi-square falls there. */
    private void look(int first, int last) {
        float before = chiSquareAt(first - 1);
        float here = probe.chiSquare(first);
        int k = first;
        while (before < here && k > 0) {
            here = before;
            before = chiSquareAt(--k - 1);
        }
        for (; ; k++) {
            float after = chiSquareAt(k + 1);
            if (here < before && here <= after) {
                place(k, before, here, after);
            }
            if (k >= last && after >= here) {
                return;
            }
            before = here;
            here = after;
        }
    }

    private float chiSquareAt(int k) {
        return k < 0 || k >= size ? Float.POSITIVE_INFINITY : probe.chiSquare(k);
    }

    /** Places the minimum near a sample by the parabola through it and its neighbours. */
    private void place(int k, float before, float here, float after) {
        if (k == 0 || k == size - 1) {
            float t = Math.max(-HALF, Math.min(HALF, probe.distance(k)));
            float held = k == 0 ? Math.max(0, t) : Math.min(0, t);
            keep(k, held, here - (2 * probe.distance(k) - held) * held * probe.table().information(k));
        } else {
            float bend = after - 2 * here + before;
            float t = bend > 0 ? (before - after) / (2 * bend) : 0;
            keep(k, t, here - (before - after) * t / 4);
        }
    }

    /**
     * The minimum between sample k and the next, whose feet lie t samples beyond the one and -beyond before the other: that of
     * the cubic with the values and slopes, -2 a t, of chi-square at both.
     */
    private void between(int k, float t, float beyond) {
        float here = probe.chiSquare(k);
        float rise = probe.chiSquare(k + 1) - here;
        float slope = -2 * t * probe.table().information(k);
        float slopeBeyond = -2 * beyond * probe.table().information(k + 1);
        float square = 3 * rise - 2 * slope - slopeBeyond;
        float cube = slope + slopeBeyond - 2 * rise;
        float root = (float) Math.sqrt(Math.max(0, square * square - 3 * cube * slope));
        float place = square > 0 ? -slope / (square + root) : (root - square) / (3 * cube);
        float held = Math.max(0, Math.min(1, place));
        keep(k, held, here + held * (slope + held * (square + held * cube)));
    }
}
