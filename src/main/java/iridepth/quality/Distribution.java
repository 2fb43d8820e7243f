package iridepth.quality;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;

/**
 * The distribution of thickness over a map, gathered value by value in memory that depends on the range alone.
 *
 * <p>Every value falls into a fine bin [i, i + 1) * 0.05 nm, and is also added, rounded to a quantum of at most
 * 2<sup>-29</sup> of the range (of 0.05 nm if the range is less), to integer sums of values and squares. Integer sums have no
 * order: any split of a map into bands, gathered by any number of threads and combined in any order, gives the same bits.
 * Count, mean and variance are exact for the rounded values; percentiles are off by at most one fine bin, 0.05 nm.
 *
 * <p>NaN, 'no value', is skipped. A value outside the range is an error. Not safe for concurrent writers: give each thread
 * its own and {@link #combine} them.
 */
public final class Distribution {

    /** Fine bins per nanometre: a bin is 0.05 nm wide. */
    static final int BINS_PER_NM = 20;

    /** Widest range that is accepted, in nm: it bounds the memory at 160 MB. */
    private static final double WIDEST = 1e6;

    private static final long LOW = 0xFFFFFFFFL;
    private static final MathContext PRECISION = MathContext.DECIMAL64;

    private final double lower;
    private final double upper;
    private final double quanta;
    private final long firstBin;
    private final long[] counts;

    private long count;
    private double min = Double.POSITIVE_INFINITY;
    private double max = Double.NEGATIVE_INFINITY;
    private long sum;
    /** Sums of the lower and the upper halves of the squares, which have room for 2^31 of them each. */
    private long squaresLow;
    private long squaresHigh;

    private Distribution(double lower, double upper) {
        this.lower = lower;
        this.upper = upper;
        this.quanta = Math.scalb(1.0, 29 - Math.getExponent(Math.max(upper - lower, 1.0 / BINS_PER_NM)));
        this.firstBin = bin(lower);
        this.counts = new long[(int) (bin(upper) - firstBin + 1)];
    }

    /**
     * An empty distribution over a range.
     *
     * @param lower lower end, nm, inclusive
     * @param upper upper end, nm, inclusive, not below {@code lower} and at most 1e6 nm above it
     * @throws IllegalArgumentException if the range is not finite, reversed or too wide
     */
    public static Distribution over(double lower, double upper) {
        if (!(lower <= upper) || !(upper - lower <= WIDEST) || Math.abs(lower) > 1e12) {
            throw new IllegalArgumentException("range of thickness " + lower + " to " + upper
                    + " nm: give finite ends, the lower first, at most " + (long) WIDEST + " nm apart");
        }
        return new Distribution(lower, upper);
    }

    /**
     * The distribution of given values, over their own range; empty if all are NaN.
     *
     * @param values thickness, nm; NaN is skipped
     * @throws IllegalArgumentException if a value is infinite or they spread over more than 1e6 nm
     */
    public static Distribution of(float... values) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (float value : values) {
            low = value < low ? value : low;
            high = value > high ? value : high;
        }
        Distribution distribution = low <= high ? over(low, high) : over(0, 0);
        distribution.addAll(values, 0, values.length);
        return distribution;
    }

    /**
     * Adds a value; NaN is skipped.
     *
     * @throws IllegalArgumentException if the value lies outside the range
     */
    public void add(double value) {
        if (Double.isNaN(value)) {
            return;
        }
        if (!(value >= lower && value <= upper)) {
            throw new IllegalArgumentException("thickness " + value + " nm lies outside the range " + lower + " to "
                    + upper + " nm over which the distribution is gathered: widen the range");
        }
        counts[(int) (bin(value) - firstBin)]++;
        count++;
        min = Math.min(min, value);
        max = Math.max(max, value);
        long rounded = (long) ((value - lower) * quanta + 0.5);
        sum += rounded;
        long square = rounded * rounded;
        squaresLow += square & LOW;
        squaresHigh += square >>> Integer.SIZE;
    }

    /**
     * Adds a run of values; NaN is skipped.
     *
     * @param values thickness, nm
     * @param from first index
     * @param to index after the last
     */
    public void addAll(float[] values, int from, int to) {
        for (int i = from; i < to; i++) {
            add(values[i]);
        }
    }

    /**
     * Adds all that another distribution over the same range has gathered; the order of combining does not matter.
     *
     * @return this
     * @throws IllegalArgumentException if the ranges differ
     */
    public Distribution combine(Distribution other) {
        if (other.lower != lower || other.upper != upper) {
            throw new IllegalArgumentException("distributions over " + lower + " to " + upper + " nm and over "
                    + other.lower + " to " + other.upper + " nm cannot be combined: gather them over one range");
        }
        for (int i = 0; i < counts.length; i++) {
            counts[i] += other.counts[i];
        }
        count += other.count;
        min = Math.min(min, other.min);
        max = Math.max(max, other.max);
        sum += other.sum;
        squaresLow += other.squaresLow;
        squaresHigh += other.squaresHigh;
        return this;
    }

    /** How many values there are, NaN not counted. */
    public long count() {
        return count;
    }

    /** Least value, nm; NaN if empty. */
    public double min() {
        return count == 0 ? Double.NaN : min;
    }

    /** Greatest value, nm; NaN if empty. */
    public double max() {
        return count == 0 ? Double.NaN : max;
    }

    /** Arithmetic mean, nm; NaN if empty. */
    public double mean() {
        return count == 0 ? Double.NaN
                : lower + new BigDecimal(sum).divide(new BigDecimal(count), PRECISION).doubleValue() / quanta;
    }

    /** Standard deviation with the divisor n - 1, nm; NaN for fewer than two values. */
    public double standardDeviation() {
        if (count < 2) {
            return Double.NaN;
        }
        BigInteger n = BigInteger.valueOf(count);
        BigInteger total = BigInteger.valueOf(sum);
        BigInteger deviations = n.multiply(squares()).subtract(total.multiply(total));
        BigInteger divisor = n.multiply(n.subtract(BigInteger.ONE));
        double variance = new BigDecimal(deviations).divide(new BigDecimal(divisor), PRECISION).doubleValue();
        return Math.sqrt(variance) / quanta;
    }

    /**
     * The value below which a given percentage of all values lies: linear interpolation between the order statistics at
     * position (n - 1) p / 100, counted from 0 (definition 7 of Hyndman and Fan, Sample quantiles in statistical packages,
     * The American Statistician 50, 1996). An order statistic is placed evenly within its fine bin.
     *
     * @param percent 0 to 100
     * @return nm, off by at most one fine bin (0.05 nm); NaN if empty
     */
    public double percentile(double percent) {
        if (!(percent >= 0 && percent <= 100)) {
            throw new IllegalArgumentException("percentile " + percent + ": give a percentage from 0 to 100");
        }
        if (count == 0) {
            return Double.NaN;
        }
        double position = (count - 1) * (percent / 100);
        long rank = (long) position;
        double below = ordered(rank);
        return rank + 1 < count ? below + (position - rank) * (ordered(rank + 1) - below) : below;
    }

    /**
     * Share of the values x with lower &lt;= x &lt;= upper; within a fine bin, values are taken as evenly spread.
     *
     * @param lower nm; may be infinite
     * @param upper nm; may be infinite
     * @return 0 to 1; 0 if the limits are reversed; NaN if empty
     */
    public double shareWithin(double lower, double upper) {
        double upToUpper = upper >= max ? count : countBelow(upper);
        return count == 0 ? Double.NaN : Math.max(0, upToUpper - countBelow(lower)) / count;
    }

    /** Index of the first fine bin: its lower edge is at index / BINS_PER_NM nm. */
    long firstBin() {
        return firstBin;
    }

    /** Number of fine bins. */
    int bins() {
        return counts.length;
    }

    /** Values in the fine bin {@code firstBin() + i}. */
    long countInBin(int i) {
        return counts[i];
    }

    /** Index of the fine bin of a value, counted from 0 nm. */
    static long bin(double value) {
        return (long) Math.floor(value * BINS_PER_NM);
    }

    private double countBelow(double thickness) {
        if (thickness <= min) {
            return 0;
        }
        if (thickness > max) {
            return count;
        }
        int last = (int) (bin(thickness) - firstBin);
        long below = 0;
        for (int i = 0; i < last; i++) {
            below += counts[i];
        }
        return below + (thickness * BINS_PER_NM - (firstBin + last)) * counts[last];
    }

    private double ordered(long rank) {
        if (rank == 0 || rank == count - 1) {
            return rank == 0 ? min : max;
        }
        long before = 0;
        int i = 0;
        while (before + counts[i] <= rank) {
            before += counts[i++];
        }
        double within = (rank - before + 0.5) / counts[i];
        return Math.min(max, Math.max(min, (firstBin + i + within) / BINS_PER_NM));
    }

    private BigInteger squares() {
        return BigInteger.valueOf(squaresHigh).shiftLeft(Integer.SIZE).add(BigInteger.valueOf(squaresLow));
    }
}
