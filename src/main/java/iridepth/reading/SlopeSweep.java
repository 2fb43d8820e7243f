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

    SlopeSweep(CurveIndex index, boolean forward) {
        super(FIELDS, forward);
        this.table = index.middle();
        this.filter = new SlopeFilter(index);
    }

    @Override
    void weigh(PixelRow row, int noted, float[] message) {
        SweepRow here = here();
        int at = here.next();
        int from = row.start()[noted];
        int count = row.count(noted);
        float mean = mean();
        float authority = authority();
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[from + k];
            float variance = table.spread(table.nearest(d));
            float said = mean * (beside().weight() * hear(d, variance, beside(), ALONG, at + k)
                    + previous().weight() * hear(d, variance, previous(), DOWN, at + k));
            message[from + k] = said * authority;
            here.loss[at + k] = row.cost()[from + k] + said;
        }
        normalise(here.loss, at, count);
    }

    /**
     * Finds the entry of a neighbour that a film of this thickness most likely comes from, and carries its filter on, or begins
     * anew after a jump.
     *
     * @return what the neighbour says against this thickness
     */
    private float hear(float d, float variance, Neighbour neighbour, int which, int to) {
        float[] state = here().value;
        float least = TRUNCATION;
        int survivor = -1;
        if (neighbour.weight() > 0) {
            SweepRow row = neighbour.row();
            int end = neighbour.start() + neighbour.count();
            float steps = neighbour.steps();
            for (int j = neighbour.start(); j < end; j++) {
                int at = j * FIELDS + which;
                // most entries are far away: no need to divide to see that
                if (filter.isWithin(row.value, at, steps, d, variance, least - row.loss[j])) {
                    least = row.loss[j] + filter.surprise(row.value, at, steps, d, variance);
                    survivor = j;
                }
            }
            if (survivor >= 0) {
                filter.follow(row.value, survivor * FIELDS + which, neighbour.steps(), d, variance, state, to * FIELDS + which);
                return least;
            }
        }
        filter.begin(state, to * FIELDS + which, d, variance);
        return least;
    }
}
