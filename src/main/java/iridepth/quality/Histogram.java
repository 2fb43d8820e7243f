package iridepth.quality;

import java.util.Arrays;

/**
 * A histogram: how many values of thickness lie in each of a row of bins of equal width.
 *
 * <p>Bin i is [edge(i), edge(i + 1)). Edges are whole multiples of the width, so that histograms of equal width line up.
 * An empty distribution gives a histogram without bins.
 */
public final class Histogram {

    /** No more bins than this, however far the outliers lie. */
    static final int MOST_BINS = 500;

    private final long first;
    private final long step;
    private final long[] counts;

    /** Gathers the fine bins by {@code step}; the first bin is the one that holds the least value. */
    private Histogram(Distribution distribution, long step) {
        this.step = step;
        if (distribution.count() == 0) {
            first = 0;
            counts = new long[0];
            return;
        }
        long firstIndex = Math.floorDiv(Distribution.bin(distribution.min()), step);
        long lastIndex = Math.floorDiv(Distribution.bin(distribution.max()), step);
        first = firstIndex * step;
        counts = new long[(int) (lastIndex - firstIndex + 1)];
        for (int i = 0; i < distribution.bins(); i++) {
            long count = distribution.countInBin(i);
            if (count > 0) {
                counts[(int) (Math.floorDiv(distribution.firstBin() + i, step) - firstIndex)] += count;
            }
        }
    }

    /**
     * The histogram of a distribution with bins of a width fit for it: the width of Freedman and Diaconis,
     * 2 (P75 - P25) n<sup>-1/3</sup> (On the histogram as a density estimator, Z. Wahrscheinlichkeitstheorie verw. Gebiete
     * 57, 1981), rounded up to the next of 0.05, 0.1, 0.2, 0.5, 1, 2, 5, ... nm, and further where there would be more than
     * {@value #MOST_BINS} bins.
     */
    public static Histogram of(Distribution distribution) {
        if (distribution.count() == 0) {
            return new Histogram(distribution, Distribution.BINS_PER_NM);
        }
        double quartiles = distribution.percentile(75) - distribution.percentile(25);
        double fit = 2 * quartiles / Math.cbrt(distribution.count());
        double fewEnough = (distribution.max() - distribution.min()) / (MOST_BINS - 1);
        return new Histogram(distribution, roundStep(Math.max(fit, fewEnough) * Distribution.BINS_PER_NM));
    }

    /**
     * The histogram of a distribution with bins of a given width.
     *
     * @param width nm, a whole multiple of 0.05 nm
     * @throws IllegalArgumentException if the width is not such a multiple
     */
    public static Histogram of(Distribution distribution, double width) {
        double fineBins = width * Distribution.BINS_PER_NM;
        if (!(fineBins > 0.5 && Math.abs(fineBins - Math.rint(fineBins)) < 1e-6)) {
            throw new IllegalArgumentException("histogram bins of " + width + " nm: give a multiple of 0.05 nm");
        }
        return new Histogram(distribution, Math.round(fineBins));
    }

    /** Width of every bin, nm. */
    public double width() {
        return (double) step / Distribution.BINS_PER_NM;
    }

    /** Number of bins. */
    public int bins() {
        return counts.length;
    }

    /** Values in bin i. */
    public long count(int i) {
        return counts[i];
    }

    /** Values in each bin; a copy. */
    public long[] counts() {
        return counts.clone();
    }

    /** Lower edge of bin i, nm; for i equal to the number of bins, the upper end. */
    public double edge(int i) {
        return (double) (first + i * step) / Distribution.BINS_PER_NM;
    }

    /** Middle of bin i, nm. */
    public double centre(int i) {
        return (edge(i) + edge(i + 1)) / 2;
    }

    /** Values in all bins. */
    public long total() {
        return Arrays.stream(counts).sum();
    }

    /** The least of 1, 2, 4, 10, 20, 40, 100, ... that is not below x: in fine bins of 0.05 nm the series 0.05, 0.1, 0.2, 0.5. */
    private static long roundStep(double x) {
        long decade = 1;
        while (true) {
            for (long factor : new long[] {1, 2, 4}) {
                if (factor * decade >= x) {
                    return factor * decade;
                }
            }
            decade *= 10;
        }
    }
}
