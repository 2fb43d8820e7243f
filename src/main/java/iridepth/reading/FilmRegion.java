package iridepth.reading;

/** A region of continuous thickness while it is gathered; regions that turn out to be one are merged. */
final class FilmRegion {
    /** Pixels with one candidate only that settle a region's order, and their least share of its pixels. */
    private static final int SETTLING = 20;
    private static final double SETTLING_SHARE = 1e-3;

    private FilmRegion parent;
    private long pixels;
    private double sum;
    private int left = Integer.MAX_VALUE;
    private int top = Integer.MAX_VALUE;
    private int right = -1;
    private int bottom = -1;
    private long settled;
    private long contacts;
    private boolean pinned;
    private OrderEvidence evidence;
    private boolean doubtful;

    /**
     * The region that this one has become part of, or itself. Shortens the way there by halves, always to a region further on, so
     * that other threads may ask at the same time, also while regions join.
     */
    FilmRegion root() {
        FilmRegion region = this;
        while (true) {
            FilmRegion next = region.parent;
            if (next == null) {
                return region;
            }
            FilmRegion further = next.parent;
            if (further == null) {
                return next;
            }
            region.parent = further;
            region = further;
        }
    }

    /** Makes this and another region one, which is returned. */
    FilmRegion join(FilmRegion other) {
        FilmRegion a = root();
        FilmRegion b = other.root();
        if (a == b) {
            return a;
        }
        FilmRegion large = a.pixels >= b.pixels ? a : b;
        FilmRegion small = large == a ? b : a;
        small.parent = large;
        large.pixels += small.pixels;
        large.sum += small.sum;
        large.left = Math.min(large.left, small.left);
        large.top = Math.min(large.top, small.top);
        large.right = Math.max(large.right, small.right);
        large.bottom = Math.max(large.bottom, small.bottom);
        large.settled += small.settled;
        large.contacts += small.contacts;
        large.pinned |= small.pinned;
        if (large.evidence == null) {
            large.evidence = small.evidence;
        } else if (small.evidence != null) {
            large.evidence.add(small.evidence);
        }
        small.evidence = null;
        return large;
    }

    /** Adds pixels of a row, from one column up to before another, and the sum of their thicknesses. */
    void add(int y, int from, int to, double thicknessSum) {
        pixels += to - from;
        sum += thicknessSum;
        left = Math.min(left, from);
        right = Math.max(right, to);
        top = Math.min(top, y);
        bottom = Math.max(bottom, y + 1);
    }

    /** Adds pixels that have one candidate only. */
    void settle(int count) {
        settled += count;
    }

    /** Adds places where it meets a pixel that is not part of it. */
    void meet(int count) {
        contacts += count;
    }

    /** Whether its order is beyond doubt: it is known, or enough of its pixels leave no choice. */
    boolean isSettled() {
        return pinned || settled >= SETTLING && settled >= SETTLING_SHARE * pixels;
    }

    /** Its order is known. */
    void pin() {
        pinned = true;
    }

    void setDoubtful() {
        doubtful = true;
    }

    boolean doubtful() {
        return doubtful;
    }

    long pixels() {
        return pixels;
    }

    long contacts() {
        return contacts;
    }

    double mean() {
        return sum / pixels;
    }

    /** Left, top, width and height of the box around it. */
    int[] box() {
        return new int[] {left, top, right - left, bottom - top};
    }

    /** What its pixels say of other orders; made where there is none yet. */
    OrderEvidence evidence(CurveIndex index) {
        if (evidence == null) {
            evidence = new OrderEvidence(index);
        }
        return evidence;
    }

    /** Whether it has gathered evidence. */
    boolean hasEvidence() {
        return evidence != null;
    }
}
