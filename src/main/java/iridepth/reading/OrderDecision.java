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
 */
final class OrderDecision {
    private final CurveIndex index;
    private final Continuity below;
    private final Continuity beside;

    OrderDecision(CurveIndex index, JumpPenalty penalty, int width) {
        this.index = index;
        this.below = Continuity.of(index, penalty, width);
        this.beside = Continuity.of(index, penalty, 1);
    }

    /** Decides the next row upwards. */
    ReadRow decide(int y, PixelRow row) {
        ReadRow read = ReadRow.of(row.width());
        boolean forward = (y & 1) == 0;
        int candidate = forward ? 0 : row.thickness().length;
        int open = forward ? 0 : row.cost().length;
        beside.forget();
        for (int i = 0; i < row.width(); i++) {
            int x = forward ? i : row.width() - 1 - i;
            int kind = row.kind(x);
            int count = Math.max(kind, 0);
            int priced = kind > 1 ? kind : 0;
            candidate -= forward ? 0 : count;
            open -= forward ? 0 : priced;
            if (kind < 0) {
                read.leave(x, row.state(x));
            } else if (kind == 1) {
                read.set(x, row.thickness()[candidate], Float.POSITIVE_INFINITY, index.tables()[row.level(x)]);
            } else {
                choose(x, row, candidate, open, kind, read);
            }
            below.go(x, read.thickness()[x]);
            beside.go(0, read.thickness()[x]);
            candidate += forward ? count : 0;
            open += forward ? priced : 0;
        }
        return read;
    }

    private void choose(int x, PixelRow row, int candidate, int open, int count, ReadRow read) {
        int best = 0;
        float least = Float.POSITIVE_INFINITY;
        float second = Float.POSITIVE_INFINITY;
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[candidate + k];
            float energy = row.total(open + k) + below.cost(x, d) + beside.cost(0, d);
            if (energy < least) {
                second = least;
                least = energy;
                best = k;
            } else {
                second = Math.min(second, energy);
            }
        }
        read.take(x, row, candidate + best, open + best, second - least, index);
    }
}
