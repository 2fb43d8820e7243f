package iridepth.reading;

/**
 * Decides the order of every pixel, row after row from the bottom up, by what the two sweeps downwards say from above and from
 * the sides, and by what has been decided below and beside: the candidate of least
 *
 * <p>E(d) = D(d) + m0(d) + m1(d) + V(d, below) + V(d, beside),
 *
 * <p>as one goes back along the survivors in the Viterbi algorithm, or decides in sequential tree-reweighted message passing
 * (V. Kolmogorov, IEEE Trans. Pattern Anal. Mach. Intell. 28, 1568, 2006), so that a region in which several orders are equally
 * likely comes out as one of them throughout. Rows are gone through by turns from the left and from the right.
 *
 * <p>A curve that turns back on itself leaves a wake of doubt behind every obstacle, where the sweeps downwards have to begin
 * anew. There two sweeps upwards, from the other side of the wake, have their say as well.
 */
final class OrderDecision {
    private final CurveIndex index;
    private final Continuity continuity;
    private final Sweep[] upwards;

    OrderDecision(CurveIndex index, JumpPenalty penalty, int width) {
        this.index = index;
        this.continuity = Continuity.of(index, penalty, width);
        this.upwards = index.turnsBack() ? new Sweep[] {new SlopeSweep(index, true), new SlopeSweep(index, false)} : new Sweep[0];
    }

    /** Decides the next row upwards. */
    ReadRow decide(int y, PixelRow row) {
        ReadRow read = ReadRow.of(row);
        boolean forward = (y & 1) == 0;
        float[][] said = new float[upwards.length][row.cost().length];
        for (int i = 0; i < upwards.length; i++) {
            upwards[i].advance(row, said[i]);
        }
        continuity.begin(read, forward);
        for (int i = 0; i < row.noted(); i++) {
            int noted = forward ? i : row.noted() - 1 - i;
            int x = row.column()[noted];
            continuity.at(x);
            if (row.count(noted) > 0) {
                choose(noted, row, said, read);
            }
            continuity.decided(read.thickness()[x]);
        }
        return read;
    }

    private void choose(int noted, PixelRow row, float[][] said, ReadRow read) {
        int best = -1;
        float least = Float.POSITIVE_INFINITY;
        float second = Float.POSITIVE_INFINITY;
        for (int k = row.start()[noted]; k < row.start()[noted + 1]; k++) {
            float energy = row.total(k) + continuity.cost(row.thickness()[k]);
            for (float[] message : said) {
                energy += message[k];
            }
            if (energy < least) {
                second = least;
                least = energy;
                best = k;
            } else {
                second = Math.min(second, energy);
            }
        }
        read.take(noted, best, second - least, index);
    }
}
