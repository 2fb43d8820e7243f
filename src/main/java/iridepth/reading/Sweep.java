package iridepth.reading;

/**
 * One sweep of the order choice over a picture: row after row, in each from one side to the other. What a pixel tells its
 * neighbours ahead is the loss of each of its candidates,
 *
 * <p>L(p, d) = D(p, d) + mean over q of m(q, d) - min, m(q, d) = min(T, min over e of (L(q, e) + V(d, e))),
 *
 * <p>with D the data cost, V the cost of the jump from e to d, T its most, and q the two neighbours behind: the one beside and
 * the one in the row before. Semi-global matching (H. Hirschmueller, IEEE Trans. Pattern Anal. Mach. Intell. 30, 328, 2008) over
 * short candidate lists, with two predecessors so that each path fans out over a quarter of the picture (G. Facciolo, C. de
 * Franchis and E. Meinhardt, MGM: a significantly more global matching for stereovision, BMVC 2015).
 *
 * <p>The mean is weighted by authority, so that what follows from pixels that leave no choice is not diluted by what follows
 * from nothing, such as behind an obstacle.
 *
 * <p>A pixel without candidates lets what reaches it pass. What it passes weighs less with each pixel of the gap, and nothing
 * beyond {@link #WIDEST_GAP}.
 */
abstract class Sweep {
    /** Across more pixels without a word a film says nothing of its order. */
    static final int WIDEST_GAP = 8;
    /** Share of its authority that a pixel takes over from its neighbours. */
    private static final float FADING = 0.999f;
    private static final float LEAST_AUTHORITY = 0.25f;

    private final boolean forward;
    private SweepRow before;
    private SweepRow here;
    /** Where the entries of the neighbours begin that the pixel in work hears. */
    private int besideAt;
    private int beforeAt;
    /** Where those of the pixel in work begin. */
    private int at;
    private float beside;
    private float previous;
    private float nearness;

    /**
     * @param width   pixels a row
     * @param fields  values that an entry carries
     * @param forward whether it goes from left to right in each row
     */
    Sweep(int width, int fields, boolean forward) {
        this.forward = forward;
        this.before = new SweepRow(width, fields);
        this.here = new SweepRow(width, fields);
    }

    /** What it carries from the last row. */
    final SweepRow state() {
        return before.copy();
    }

    /** Goes on from what was carried from a row. */
    final void resume(SweepRow state) {
        before = state.copy();
    }

    /**
     * Takes the next row.
     *
     * @param row     its pixels
     * @param message receives, in the places of {@link PixelRow#cost}, what the neighbours behind say against each candidate
     */
    final void advance(PixelRow row, float[] message) {
        here.clear();
        int width = row.width();
        int candidate = forward ? 0 : row.thickness().length;
        int open = forward ? 0 : row.cost().length;
        at = 0;
        besideAt = 0;
        beforeAt = 0;
        for (int i = 0; i < width; i++) {
            int kind = row.kind(forward ? i : width - 1 - i);
            int entries = Math.max(kind, 0);
            int priced = kind > 1 ? kind : 0;
            candidate -= forward ? 0 : entries;
            open -= forward ? 0 : priced;
            if (kind > 0) {
                here.reserve(kind);
                hear(i);
                weigh(row, candidate, kind, open, i, message);
                here.close(i, kind, 0, kind == 1 ? 1 : FADING * Math.max(beside, previous));
            } else {
                pass(i);
            }
            candidate += forward ? entries : 0;
            open += forward ? priced : 0;
            besideAt = at;
            at += here.count(i);
            beforeAt += before.count(i);
        }
        SweepRow spare = before;
        before = here;
        here = spare;
    }

    /**
     * A pixel with candidates: hears its neighbours, tells {@code message} if its order is open, and puts its entries in place.
     *
     * @param candidate where its candidates begin among the row's
     * @param count     how many it has
     * @param open      where their costs begin, if there are several
     */
    abstract void weigh(PixelRow row, int candidate, int count, int open, int i, float[] message);

    /** A pixel that says nothing carries on what reaches it over the smaller gap. */
    private void pass(int i) {
        boolean hasBeside = i > 0 && here.count(i - 1) > 0;
        boolean hasBefore = before.count(i) > 0;
        if (!hasBeside && !hasBefore) {
            here.close(i, 0, 0, 0);
            return;
        }
        boolean takeBeside = hasBeside && (!hasBefore || here.gap(i - 1) <= before.gap(i));
        SweepRow from = takeBeside ? here : before;
        int index = takeBeside ? i - 1 : i;
        int gap = from.gap(index) + 1;
        int entries = gap > WIDEST_GAP ? 0 : from.count(index);
        here.reserve(entries);
        here.carry(from, takeBeside ? besideAt : beforeAt, i, entries, gap, from.authority(index));
    }

    /** The row in work. */
    final SweepRow here() {
        return here;
    }

    /** The row before. */
    final SweepRow before() {
        return before;
    }

    /** Where the entries of the pixel in work begin. */
    final int at() {
        return at;
    }

    /** Where the entries of the pixel beside begin. */
    final int besideAt() {
        return besideAt;
    }

    /** Where the entries of the pixel in the row before begin. */
    final int beforeAt() {
        return beforeAt;
    }

    /** Works out what the two neighbours behind weigh. */
    private void hear(int i) {
        float besideGap = i > 0 && here.count(i - 1) > 0 ? weight(here.gap(i - 1)) : 0;
        float beforeGap = before.count(i) > 0 ? weight(before.gap(i)) : 0;
        beside = besideGap == 0 ? 0 : besideGap * Math.max(LEAST_AUTHORITY, here.authority(i - 1));
        previous = beforeGap == 0 ? 0 : beforeGap * Math.max(LEAST_AUTHORITY, before.authority(i));
        nearness = Math.max(besideGap, beforeGap);
    }

    private static float weight(int gap) {
        return 1 - (float) gap / (WIDEST_GAP + 1);
    }

    /** What the pixel beside weighs, 0 where there is none. */
    final float weightBeside() {
        return beside;
    }

    /** What the pixel in the row before weighs, 0 where there is none. */
    final float weightBefore() {
        return previous;
    }

    /** What makes the weighted sum of two messages their mean, less where both came over a gap. */
    final float mean() {
        return beside + previous > 0 ? nearness / (beside + previous) : 0;
    }

    /** What makes that mean what is to be said to the pixel itself: less where it rests on little. */
    final float authority() {
        return nearness > 0 ? Math.max(beside, previous) / nearness : 0;
    }

    /** Takes the least of the losses of a pixel from all of them. */
    static void normalise(float[] loss, int at, int count) {
        float least = loss[at];
        for (int k = at + 1; k < at + count; k++) {
            least = Math.min(least, loss[k]);
        }
        for (int k = at; k < at + count; k++) {
            loss[k] -= least;
        }
    }
}
