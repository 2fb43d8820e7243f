package iridepth.reading;

/**
 * A sweep for a curve that turns back on itself, as that of one channel does at each extremum: there a film that goes on and
 * one that turns back look alike, and only its slope tells them apart.
 *
 * <p>Each entry follows its film by two Kalman filters of constant slope, one along the row and one down the rows (each path's
 * survivor keeps its own, as in per-survivor processing: R. Raheli, A. Polydoros and C.-K. Tzou, IEEE Trans. Commun. 43, 354,
 * 1995), and V = min(T, e^2 / P), with e the difference from what the filter expects and P its variance. The slope changes from
 * pixel to pixel by a hundred and fiftieth of the finest fringe (standard deviation), and starts as unknown.
 */
final class SlopeSweep extends Sweep {
    private static final float T = 12;
    private static final double FRINGE_PER_CHANGE = 150;
    /** Values of a filter: thickness, slope, their variances and covariance. */
    private static final int FILTER = 5;
    private static final int ALONG = 0;
    private static final int DOWN = FILTER;
    private static final int FIELDS = 2 * FILTER;

    private final TangentTable table;
    private final float change;
    private final float unknown;
    private float least;
    private int survivor;

    SlopeSweep(CurveIndex index, int width, boolean forward) {
        super(width, FIELDS, forward);
        this.table = index.tables()[index.tables().length / 2];
        this.change = (float) Math.pow(JumpPenalty.fringe(index) / FRINGE_PER_CHANGE, 2);
        this.unknown = (float) Math.pow(JumpPenalty.steepest(index), 2);
    }

    @Override
    void weigh(PixelRow row, int candidate, int count, int open, int i, float[] message) {
        SweepRow here = here();
        int at = at();
        float fromBeside = weightBeside(i);
        float fromBefore = weightBefore(i);
        float scale = scale(fromBeside, fromBefore);
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[candidate + k];
            float variance = table.spread(table.nearest(d));
            float said = 0;
            if (fromBeside > 0) {
                listen(d, variance, here, besideAt(), here.count(i - 1), here.gap(i - 1) + 1, ALONG);
                said += fromBeside * least;
                follow(d, variance, here, survivor, here.gap(i - 1) + 1, ALONG, at + k);
            } else {
                begin(d, variance, ALONG, at + k);
            }
            if (fromBefore > 0) {
                listen(d, variance, before(), beforeAt(), before().count(i), before().gap(i) + 1, DOWN);
                said += fromBefore * least;
                follow(d, variance, before(), survivor, before().gap(i) + 1, DOWN, at + k);
            } else {
                begin(d, variance, DOWN, at + k);
            }
            if (count > 1) {
                message[open + k] = said * scale;
            }
            here.loss[at + k] = (count > 1 ? row.cost()[open + k] : 0) + said * scale;
        }
        normalise(here.loss, at, count);
    }

    /** Finds the entry of a neighbour that a film of this thickness most likely comes from. */
    private void listen(float d, float variance, SweepRow row, int at, int count, float steps, int filter) {
        float[] f = row.value;
        least = T;
        survivor = -1;
        for (int j = at; j < at + count; j++) {
            int a = j * FIELDS + filter;
            float e = d - f[a] - steps * f[a + 1];
            float p = f[a + 2] + steps * (2 * f[a + 3] + steps * (f[a + 4] + change));
            float loss = row.loss[j] + e * e / (p + variance);
            if (loss < least) {
                least = loss;
                survivor = j;
            }
        }
    }

    /** Carries the survivor's filter on to a thickness, or begins anew after a jump. */
    private void follow(float d, float variance, SweepRow row, int from, float steps, int filter, int to) {
        if (from < 0) {
            begin(d, variance, filter, to);
            return;
        }
        float[] f = row.value;
        int a = from * FIELDS + filter;
        float slope = f[a + 1];
        float expected = f[a] + steps * slope;
        float p22 = f[a + 4] + change * steps;
        float p12 = f[a + 3] + steps * f[a + 4];
        float p11 = f[a + 2] + steps * (2 * f[a + 3] + steps * (f[a + 4] + change));
        float gain = p11 / (p11 + variance);
        float slopeGain = p12 / (p11 + variance);
        float[] g = here().value;
        int b = to * FIELDS + filter;
        g[b] = expected + gain * (d - expected);
        g[b + 1] = slope + slopeGain * (d - expected);
        g[b + 2] = p11 * (1 - gain);
        g[b + 3] = p12 * (1 - gain);
        g[b + 4] = p22 - slopeGain * p12;
    }

    private void begin(float d, float variance, int filter, int to) {
        float[] g = here().value;
        int b = to * FIELDS + filter;
        g[b] = d;
        g[b + 1] = 0;
        g[b + 2] = variance;
        g[b + 3] = 0;
        g[b + 4] = unknown;
    }
}
