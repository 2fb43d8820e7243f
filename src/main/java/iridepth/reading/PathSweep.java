package iridepth.reading;

/**
 * One sweep of the order choice over a picture: row after row, in each from one side to the other. What a pixel tells its
 * neighbours ahead is the loss of each of its candidates,
 *
 * <p>L(p, d) = D(p, d) + mean over q of m(q, d) - min, m(q, d) = min over e of (L(q, e) + V(d, e)),
 *
 * <p>with D the data cost, V the {@link JumpPenalty} and q the two neighbours behind: the one beside and the one in the row
 * before. Semi-global matching (H. Hirschmueller, IEEE Trans. Pattern Anal. Mach. Intell. 30, 328, 2008) over short candidate
 * lists, with two predecessors so that each path fans out over a quarter of the picture (G. Facciolo, C. de Franchis and
 * E. Meinhardt, MGM: a significantly more global matching for stereovision, BMVC 2015).
 *
 * <p>A pixel without candidates lets what reaches it pass. What it passes weighs less with each pixel of the gap, and nothing
 * beyond {@link #WIDEST_GAP}.
 */
final class PathSweep {
    /** Across more pixels without a word a film says nothing of its order. */
    static final int WIDEST_GAP = 8;
    private static final float T = JumpPenalty.TRUNCATION;

    private final JumpPenalty penalty;
    private final boolean forward;
    private SweepRow before;
    private SweepRow here;

    /**
     * @param forward whether it goes from left to right in each row
     */
    PathSweep(JumpPenalty penalty, int width, boolean forward) {
        this.penalty = penalty;
        this.forward = forward;
        this.before = new SweepRow(width);
        this.here = new SweepRow(width);
    }

    /** What it carries from the last row. */
    SweepRow state() {
        return before.copy();
    }

    /** Goes on from what was carried from a row. */
    void resume(SweepRow state) {
        before = state.copy();
    }

    /**
     * Takes the next row.
     *
     * @param row     its pixels
     * @param message receives, in the places of {@link PixelRow#cost}, what the neighbours behind say against each candidate
     */
    void advance(PixelRow row, float[] message) {
        here.clear();
        int width = row.width();
        int candidate = forward ? 0 : row.thickness().length;
        int open = forward ? 0 : row.cost().length;
        int above = 0;
        int beside = 0;
        for (int i = 0; i < width; i++) {
            int x = forward ? i : width - 1 - i;
            int kind = row.kind(x);
            int entries = Math.max(kind, 0);
            int priced = kind > 1 ? kind : 0;
            if (!forward) {
                candidate -= entries;
                open -= priced;
            }
            int next = here.reserve(Math.max(entries, Math.max(before.count(i), i > 0 ? here.count(i - 1) : 0)));
            if (kind == 1) {
                here.thickness()[next] = row.thickness()[candidate];
                here.loss()[next] = 0;
                here.close(i, 1, 0);
            } else if (kind > 1) {
                weigh(row, candidate, open, kind, i, beside, above, next, message);
            } else {
                pass(i, beside, above, next);
            }
            if (forward) {
                candidate += entries;
                open += priced;
            }
            above += before.count(i);
            beside = next;
        }
        SweepRow spare = before;
        before = here;
        here = spare;
    }

    /** A pixel whose order is open: hears its neighbours and works out the losses of its candidates. */
    private void weigh(PixelRow row, int candidate, int open, int kind, int i, int beside, int above, int next, float[] message) {
        float fromBeside = i > 0 && here.count(i - 1) > 0 ? weight(here.gap(i - 1)) : 0;
        float fromAbove = before.count(i) > 0 ? weight(before.gap(i)) : 0;
        float sum = fromBeside + fromAbove;
        float scale = sum > 0 ? Math.max(fromBeside, fromAbove) / sum : 0;
        float least = Float.POSITIVE_INFINITY;
        for (int k = 0; k < kind; k++) {
            float d = row.thickness()[candidate + k];
            float stiffness = penalty.stiffness(d);
            float said = 0;
            if (fromBeside > 0) {
                said += fromBeside * message(d, stiffness, here, beside, here.count(i - 1), here.gap(i - 1));
            }
            if (fromAbove > 0) {
                said += fromAbove * message(d, stiffness, before, above, before.count(i), before.gap(i));
            }
            said *= scale;
            message[open + k] = said;
            float loss = row.cost()[open + k] + said;
            here.thickness()[next + k] = d;
            here.loss()[next + k] = loss;
            least = Math.min(least, loss);
        }
        for (int k = 0; k < kind; k++) {
            here.loss()[next + k] -= least;
        }
        here.close(i, kind, 0);
    }

    private static float weight(int gap) {
        return 1 - (float) gap / (WIDEST_GAP + 1);
    }

    private static float message(float d, float stiffness, SweepRow row, int at, int count, int gap) {
        float[] thickness = row.thickness();
        float[] loss = row.loss();
        float best = T;
        for (int j = at; j < at + count; j++) {
            float jump = d - thickness[j];
            best = Math.min(best, loss[j] + jump * jump * stiffness / (1 + gap));
        }
        return best;
    }

    /** A pixel that says nothing carries on what reaches it over the smaller gap. */
    private void pass(int i, int beside, int above, int next) {
        boolean hasBeside = i > 0 && here.count(i - 1) > 0;
        boolean hasAbove = before.count(i) > 0;
        boolean takeBeside = hasBeside && (!hasAbove || here.gap(i - 1) <= before.gap(i));
        if (!takeBeside && !hasAbove) {
            here.close(i, 0, 0);
            return;
        }
        SweepRow from = takeBeside ? here : before;
        int index = takeBeside ? i - 1 : i;
        int gap = from.gap(index) + 1;
        int count = gap > WIDEST_GAP ? 0 : from.count(index);
        int at = takeBeside ? beside : above;
        System.arraycopy(from.thickness(), at, here.thickness(), next, count);
        System.arraycopy(from.loss(), at, here.loss(), next, count);
        here.close(i, count, gap);
    }
}
