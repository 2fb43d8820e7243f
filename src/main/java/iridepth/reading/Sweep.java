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
    private static final float LEAST_AUTHORITY = 0.1f;

    private final boolean forward;
    private SweepRow before;
    private SweepRow here;
    private final Neighbour beside = new Neighbour();
    private final Neighbour previous = new Neighbour();

    /** A pixel behind the one in work: its entries, or its one thickness where it is not noted. */
    static final class Neighbour {
        private SweepRow row;
        private int noted;
        private int count;
        private int gap;
        private float single;
        private float weight;

        /** There is none. */
        private void none() {
            count = 0;
            weight = 0;
        }

        /** One that is not noted. */
        private void single(float thickness) {
            row = null;
            count = 1;
            gap = 0;
            single = thickness;
            weight = 1;
        }

        private void noted(SweepRow itsRow, int itsIndex) {
            row = itsRow;
            noted = itsIndex;
            count = itsRow.count(itsIndex);
            gap = itsRow.gap(itsIndex);
            weight = count == 0 ? 0 : nearness() * Math.max(LEAST_AUTHORITY, itsRow.authority(itsIndex));
        }

        private float nearness() {
            return count == 0 ? 0 : 1 - (float) gap / (WIDEST_GAP + 1);
        }

        /** What it weighs, 0 where there is none. */
        float weight() {
            return weight;
        }

        /** Whether it is a pixel with one thickness only. */
        boolean isSingle() {
            return row == null;
        }

        float thickness() {
            return single;
        }

        /** The row of its entries. */
        SweepRow row() {
            return row;
        }

        /** Where its entries begin. */
        int start() {
            return row.start(noted);
        }

        /** How many they are. */
        int count() {
            return count;
        }

        /** Pixels from where its entries come to the one in work. */
        int steps() {
            return gap + 1;
        }
    }

    /**
     * @param fields  values that an entry carries
     * @param forward whether it goes from left to right in each row
     */
    Sweep(int fields, boolean forward) {
        this.forward = forward;
        this.before = new SweepRow(fields);
        this.here = new SweepRow(fields);
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
     * @param message receives, in the places of its candidates, what the neighbours behind say against each
     */
    final void advance(PixelRow row, float[] message) {
        here.begin(row);
        int noted = row.noted();
        int[] columns = row.column();
        int[] above = before.pixels() == null ? new int[0] : before.pixels().column();
        int step = forward ? 1 : -1;
        int a = forward ? 0 : above.length - 1;
        int past = -1;
        for (int e = forward ? 0 : noted - 1; e >= 0 && e < noted; e += step) {
            int x = columns[e];
            while (a >= 0 && a < above.length && (forward ? above[a] < x : above[a] > x)) {
                a += step;
            }
            if (past >= 0 && columns[past] == x - step) {
                beside.noted(here, past);
            } else if (x - step >= 0 && x - step < row.width()) {
                beside.single(row.single()[x - step]);
            } else {
                beside.none();
            }
            if (a >= 0 && a < above.length && above[a] == x) {
                previous.noted(before, a);
            } else if (before.pixels() != null) {
                previous.single(before.pixels().single()[x]);
            } else {
                previous.none();
            }
            if (row.count(e) > 0) {
                here.reserve(row.count(e));
                weigh(row, e, message);
                here.close(e, row.count(e), row.count(e) == 1 ? 1 : FADING * Math.max(beside.weight, previous.weight));
            } else {
                pass(e);
            }
            past = e;
        }
        SweepRow spare = before;
        before = here;
        here = spare;
    }

    /**
     * A noted pixel with candidates: hears its neighbours, tells {@code message}, and puts its entries in place.
     *
     * @param noted   which of the row's noted pixels
     * @param message receives what the neighbours say
     */
    abstract void weigh(PixelRow row, int noted, float[] message);

    /** A pixel that says nothing carries on what reaches it over the smaller gap. */
    private void pass(int noted) {
        boolean takeBeside = beside.count > 0 && (previous.count == 0 || beside.gap <= previous.gap);
        Neighbour from = takeBeside ? beside : previous;
        if (from.count == 0 || from.gap >= WIDEST_GAP) {
            here.leave(noted);
        } else if (from.isSingle()) {
            here.carry(from.single, noted);
        } else {
            here.carry(from.row, from.noted, noted, from.gap + 1);
        }
    }

    /** The row in work. */
    final SweepRow here() {
        return here;
    }

    /** The pixel beside. */
    final Neighbour beside() {
        return beside;
    }

    /** The pixel in the row before. */
    final Neighbour previous() {
        return previous;
    }

    /** What makes the weighted sum of two messages their mean, less where both came over a gap. */
    final float mean() {
        float sum = beside.weight + previous.weight;
        return sum > 0 ? Math.max(beside.nearness(), previous.nearness()) / sum : 0;
    }

    /** What makes that mean what is to be said to the pixel itself: less where it rests on little. */
    final float authority() {
        float nearness = Math.max(beside.nearness(), previous.nearness());
        return nearness > 0 ? Math.max(beside.weight, previous.weight) / nearness : 0;
    }

    /** Takes the least of the losses of a pixel from all of them. */
    static void normalise(float[] loss, int at, int count) {
        float least = loss[at];
        for (int k = at + 1; k < at + count; k++) {
            // no Math.min: its care for NaN takes longer than all the rest
            least = loss[k] < least ? loss[k] : least;
        }
        for (int k = at; k < at + count; k++) {
            loss[k] -= least;
        }
    }
}
