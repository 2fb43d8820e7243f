package iridepth.reading;

/**
 * A sweep for a curve that turns back on itself, as that of one channel does at each extremum: there a film that goes on and
 * one that turns back look alike, and only its slope tells them apart.
 *
 * <p>Each entry follows its film by two {@link SlopeFilter}s, one along the row and one down the rows (each path's survivor
 * keeps its own, as in per-survivor processing: R. Raheli, A. Polydoros and C.-K. Tzou, IEEE Trans. Commun. 43, 354, 1995), and
 * V = min(T, e^2 / P), with e the difference from what the filter expects and P its variance.
 */
final class SlopeSweep extends Sweep {
    /** T. */
    static final float TRUNCATION = 12;
    private static final int ALONG = 0;
    private static final int DOWN = SlopeFilter.SIZE;
    private static final int FIELDS = 2 * SlopeFilter.SIZE;

    private final TangentTable table;
    private final SlopeFilter filter;

    SlopeSweep(CurveIndex index, int width, boolean forward) {
        super(width, FIELDS, forward);
        this.table = index.middle();
        this.filter = new SlopeFilter(index);
    }

    @Override
    void weigh(PixelRow row, int candidate, int count, int open, int i, float[] message) {
        SweepRow here = here();
        int at = at();
        float fromBeside = weightBeside();
        float fromBefore = weightBefore();
        float mean = mean();
        float authority = authority();
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[candidate + k];
            float variance = table.spread(table.nearest(d));
            float said = 0;
            if (fromBeside > 0) {
                said += fromBeside * hear(d, variance, here, besideAt(), here.count(i - 1), here.gap(i - 1) + 1, ALONG, at + k);
            } else {
                filter.begin(here.value, (at + k) * FIELDS + ALONG, d, variance);
            }
            if (fromBefore > 0) {
                said += fromBefore * hear(d, variance, before(), beforeAt(), before().count(i), before().gap(i) + 1, DOWN, at + k);
            } else {
                filter.begin(here.value, (at + k) * FIELDS + DOWN, d, variance);
            }
            said *= mean;
            if (count > 1) {
                message[open + k] = said * authority;
            }
            here.loss[at + k] = (count > 1 ? row.cost()[open + k] : 0) + said;
        }
        normalise(here.loss, at, count);
    }

    /**
     * Finds the entry of a neighbour that a film of this thickness most likely comes from, and carries its filter on, or begins
     * anew after a jump.
     *
     * @return what the neighbour says against this thickness
     */
    private float hear(float d, float variance, SweepRow row, int at, int count, float steps, int which, int to) {
        float least = TRUNCATION;
        int survivor = -1;
        for (int j = at; j < at + count; j++) {
            float loss = row.loss[j] + filter.surprise(row.value, j * FIELDS + which, steps, d, variance);
            if (loss < least) {
                least = loss;
                survivor = j;
            }
        }
        float[] state = here().value;
        if (survivor < 0) {
            filter.begin(state, to * FIELDS + which, d, variance);
        } else {
            filter.follow(row.value, survivor * FIELDS + which, steps, d, variance, state, to * FIELDS + which);
        }
        return least;
    }
}
