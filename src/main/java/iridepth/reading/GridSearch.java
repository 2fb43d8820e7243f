package iridepth.reading;

/**
 * Finds candidates by the runs of the curve that a pixel's cell lists: in a straight run by Newton steps from sample to sample
 * until the nearest is found, in others by looking at every sample. Pixels with censored channels go to the exhaustive search.
 */
final class GridSearch implements CandidateSearch {
    private static final int HOPS = 8;
    /** A minimum may lie this many samples off the nearest one, since the tangents of neighbours differ a little. */
    private static final float SLACK = 0.6f;

    private final TangentTable[] tables;
    private final CurveCells cells;
    private final float threshold;
    private final int channels;
    private final ExhaustiveSearch exhaustive;
    private final float[] value;
    private final float[] residual;
    private float[] scan = new float[64];

    private TangentTable table;
    private float[] samples;
    private int stride;
    private CandidateRow result;

    GridSearch(CurveIndex index) {
        this.tables = index.tables();
        this.cells = index.cells();
        this.threshold = (float) index.threshold();
        this.channels = index.curve().channels();
        this.exhaustive = new ExhaustiveSearch(index);
        this.value = new float[channels];
        this.residual = new float[channels];
    }

    @Override
    public void find(float[] values, byte[] limits, int pixel, int level, CandidateRow into) {
        int at = pixel * channels;
        for (int c = 0; c < channels; c++) {
            if (limits[at + c] != 0) {
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
        System.arraycopy(values, at, value, 0, channels);
        table = tables[level];
        samples = table.samples();
        stride = table.stride();
        result = into;
        int[] runs = cells.runs();
        for (int i = cells.start(cell), end = cells.start(cell + 1); i < end; i += 2) {
            if (runs[i + 1] >= 0) {
                straight(runs[i], runs[i + 1]);
            } else {
                folded(runs[i], ~runs[i + 1]);
            }
        }
    }

    /** Distance to the nearest thickness along the tangent of a sample, in samples; leaves the residual. */
    private float distance(int k) {
        int at = k * stride;
        float t = 0;
        for (int c = 0; c < channels; c++) {
            residual[c] = value[c] - samples[at + c];
            t += residual[c] * samples[at + channels + c];
        }
        return t;
    }

    /** Chi-square at the nearest thickness along the tangent of a sample, from the residual that {@link #distance} left. */
    private float least(int k) {
        int at = k * stride + 2 * channels;
        float sum = 0;
        for (int i = 0; i < channels; i++) {
            for (int j = i; j < channels; j++) {
                sum += samples[at++] * residual[i] * residual[j];
            }
        }
        return sum;
    }

    private void straight(int first, int last) {
        int k = (first + last) >>> 1;
        float t = distance(k);
        for (int hop = 0; hop < HOPS; hop++) {
            int next = step(k, t, first, last);
            if (next == k) {
                break;
            }
            k = next;
            t = distance(k);
        }
        accept(k, t);
    }

    /** The sample nearest to t samples beyond k, inside the run. */
    private static int step(int k, float t, int first, int last) {
        float place = k + t + 0.5f;
        return place < first ? first : place > last ? last : (int) place;
    }

    /** Keeps the minimum t samples beyond k, unless it lies beyond what k stands for or does not explain the pixel. */
    private void accept(int k, float t) {
        float held = t;
        if (k == 0 && t < 0 || k == table.size() - 1 && t > 0) {
            held = 0;
        } else if (t < -SLACK || t > SLACK) {
            return;
        }
        float beside = t - held;
        float chiSquare = least(k) + beside * beside * samples[k * stride + stride - 2];
        if (chiSquare <= threshold) {
            result.add((float) table.thickness(k + held), chiSquare + samples[k * stride + stride - 1]);
        }
    }

    /** Looks at every sample of a run and places each minimum by the parabola through its neighbours. */
    private void folded(int first, int last) {
        int count = last - first + 1;
        if (scan.length < count) {
            scan = new float[Math.max(count, 2 * scan.length)];
        }
        for (int i = 0; i < count; i++) {
            float t = distance(first + i);
            scan[i] = least(first + i) + t * t * samples[(first + i) * stride + stride - 2];
        }
        for (int i = 0; i < count; i++) {
            int k = first + i;
            boolean atStart = k == 0;
            boolean atEnd = k == table.size() - 1;
            if ((i == 0 ? !atStart : scan[i] >= scan[i - 1]) || (i == count - 1 ? !atEnd : scan[i] > scan[i + 1])) {
                continue;
            }
            if (atStart || atEnd) {
                float t = distance(k);
                accept(k, atStart ? Math.min(t, SLACK) : Math.max(t, -SLACK));
            } else {
                acceptParabola(k, scan[i - 1], scan[i], scan[i + 1]);
            }
        }
    }

    private void acceptParabola(int k, float before, float here, float after) {
        float rise = after - before;
        float bend = after - 2 * here + before;
        float t = bend > 0 ? -rise / (2 * bend) : 0;
        float chiSquare = Math.max(0, here + rise * t / 4);
        if (chiSquare <= threshold) {
            result.add((float) table.thickness(k + t), chiSquare + samples[k * stride + stride - 1]);
        }
    }
}
