package iridepth.report;

/**
 * The range of some values.
 *
 * @param from least
 * @param to   greatest; below the least if there are no values
 */
record Span(double from, double to) {
    /** The range of no values. */
    static final Span NONE = new Span(Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY);

    /** This range stretched to hold more values; NaN and infinite ones are left out. */
    Span with(double... values) {
        double low = from;
        double high = to;
        for (double v : values) {
            if (Double.isFinite(v)) {
                low = Math.min(low, v);
                high = Math.max(high, v);
            }
        }
        return new Span(low, high);
    }

    /** A range with a length, for an axis: widened at both ends by a share of itself, or made of nothing. */
    Span widened(double share) {
        if (from > to) {
            return new Span(0, 1);
        }
        double margin = to > from ? share * (to - from) : Math.max(1e-3 * Math.abs(from), 0.5);
        return new Span(from - margin, to + margin);
    }
}
