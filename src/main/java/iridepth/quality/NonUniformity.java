package iridepth.quality;

/**
 * The usual definitions of non-uniformity, in per cent. They are common practice in film deposition, and figures by different
 * definitions cannot be compared: always name the one that was used.
 *
 * <p>The first needs no extremes; the next two rest on the two most extreme pixels and so grow with the number of pixels and
 * with noise: they suit a few averaged sites rather than a whole map; the last is the range without its outer 1 % on
 * either side, and suits a map.
 */
public enum NonUniformity {

    /** Relative standard deviation, '1 sigma'. */
    SIGMA("1 sigma / mean") {
        @Override
        public double percent(Uniformity u) {
            return ratio(u.standardDeviation(), u.mean());
        }
    },

    /** Half range over the mean, often written +- per cent. */
    HALF_RANGE("(max - min) / (2 mean)") {
        @Override
        public double percent(Uniformity u) {
            return ratio(u.max() - u.min(), 2 * u.mean());
        }
    },

    /** Half range over the middle of the range. */
    MID_RANGE("(max - min) / (max + min)") {
        @Override
        public double percent(Uniformity u) {
            return ratio(u.max() - u.min(), u.max() + u.min());
        }
    },

    /** Half the range of the inner 98 % over the median: robust against dust and single wrong pixels. */
    ROBUST("(P99 - P1) / (2 median)") {
        @Override
        public double percent(Uniformity u) {
            return ratio(u.percentile(99) - u.percentile(1), 2 * u.median());
        }
    };

    private final String formula;

    NonUniformity(String formula) {
        this.formula = formula;
    }

    /** The formula in words, for tables. */
    public String formula() {
        return formula;
    }

    /**
     * Non-uniformity by this definition.
     *
     * @return per cent; NaN if it rests on no value, or if the divisor is not positive
     */
    public abstract double percent(Uniformity uniformity);

    private static double ratio(double spread, double location) {
        return location > 0 ? 100 * spread / location : Double.NaN;
    }
}
