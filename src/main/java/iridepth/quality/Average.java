package iridepth.quality;

/**
 * The mean thickness of n readings with its standard uncertainty in two parts (JCGM 100, sections 4.2 and 5.2).
 *
 * <p>Random part: sqrt(sum u_i^2) / n, times sqrt(min(n, c)) where c neighbouring readings share one random error. Systematic
 * part: the mean of the u_i, since a common error moves all readings together. Without readings all but the count is NaN.
 *
 * @param count number n of readings; NaN is not counted
 * @param thickness mean, nm
 * @param spread standard deviation of the readings about the mean, nm, with the divisor n - 1; NaN for one; it holds the
 *     film's own unevenness and is no uncertainty
 * @param random random part of the standard uncertainty of the mean, nm
 * @param systematic systematic part, nm
 */
public record Average(long count, double thickness, double spread, double random, double systematic) {

    /** Combined standard uncertainty of the mean, nm. */
    public double standardUncertainty() {
        return Math.hypot(random, systematic);
    }

    /** Readings that are being averaged. */
    static final class Sum {

        private final MeasuredField field;
        private long count;
        private double mean;
        private double squares;
        private double randomSquares;
        private double systematic;

        Sum(MeasuredField field) {
            this.field = field;
        }

        /** Adds a pixel. */
        void addPixel(int x, int y) {
            double thickness = field.thickness().at(x, y);
            if (!Double.isNaN(thickness)) {
                add(thickness, field.random().at(x, y), field.systematic().at(x, y));
            }
        }

        /** Adds a point between pixels; its random part is taken as that of a pixel, without credit for the interpolation. */
        void addPoint(double x, double y) {
            double thickness = field.thickness().interpolate(x, y);
            if (!Double.isNaN(thickness)) {
                add(thickness, field.random().interpolate(x, y), field.systematic().interpolate(x, y));
            }
        }

        /** The running mean and squares of Welford (Technometrics 4, 1962), which keep their digits under a large offset. */
        private void add(double thickness, double random, double systematicPart) {
            count++;
            double deviation = thickness - mean;
            mean += deviation / count;
            squares += deviation * (thickness - mean);
            randomSquares += random * random;
            systematic += systematicPart;
        }

        Average average() {
            if (count == 0) {
                return new Average(0, Double.NaN, Double.NaN, Double.NaN, Double.NaN);
            }
            double shared = Math.min(count, field.correlatedPixels());
            return new Average(count, mean, count == 1 ? Double.NaN : Math.sqrt(squares / (count - 1)),
                    Math.sqrt(randomSquares * shared) / count, systematic / count);
        }
    }
}
