package iridepth.reading;

/**
 * A band of rows between the two passes: its candidates, or, where memory is short, only what the downward sweeps carried into
 * it, from which they come again.
 */
final class Band {
    private final int top;
    private final SweepRow[] carried;
    private PixelRow[] rows;

    Band(int top, PixelRow[] rows, SweepRow[] carried) {
        this.top = top;
        this.rows = rows;
        this.carried = carried;
    }

    int top() {
        return top;
    }

    int height() {
        return rows.length;
    }

    PixelRow[] rows() {
        return rows;
    }

    /** What the downward sweeps carried from the row above. */
    SweepRow[] carried() {
        return carried;
    }

    /** Forgets the candidates, not how many rows there are. */
    void drop() {
        rows = new PixelRow[rows.length];
    }

    boolean isDropped() {
        return rows[0] == null;
    }

    long bytes() {
        long sum = 0;
        for (PixelRow row : rows) {
            sum += row.bytes();
        }
        return sum;
    }
}
