package iridepth.quality;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.BitSet;
import java.util.List;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;

/**
 * How well maps of one part, taken one after another without change, repeat: gathered map by map, 14 bytes for a pixel.
 *
 * <p>Within-pixel variance: s_i^2 = sum (x_ij - mean_i)^2 / (n_i - 1) over the n_i maps j that read pixel i. Pooled over pixels:
 * s_r^2 = sum_i (n_i - 1) s_i^2 / sum_i (n_i - 1). Pixels read fewer than twice say nothing and are left out. The maps must
 * be registered: a shift of the part shows as poor repeatability wherever the thickness changes.
 *
 * <p>Sums are of differences from a pixel's first value. As that value is one of the sample, the subtraction in the variance
 * costs no more than a factor n_i in precision, so that single precision serves.
 */
public final class Repeatability {

    /** Repeatability limit over repeatability standard deviation, 1.96 sqrt(2) rounded as in ISO 5725-6. */
    private static final double LIMIT = 2.8;

    private final float[] first;
    private final float[] sum;
    private final float[] squares;
    private final short[] counts;
    private final BitSet inFirstMap = new BitSet();
    private final List<Run> runs = new ArrayList<>();

    /**
     * One map among the others.
     *
     * @param read pixels read in this map
     * @param mean mean thickness over these, nm; NaN if none
     * @param shared pixels read both in this map and in the first
     * @param shift mean difference from the first map over the shared pixels, nm; NaN if none; 0 for the first map
     */
    public record Run(long read, double mean, long shared, double shift) {
    }

    private Repeatability(int pixels) {
        first = new float[pixels];
        sum = new float[pixels];
        squares = new float[pixels];
        counts = new short[pixels];
        Arrays.fill(first, Float.NaN);
    }

    /**
     * Nothing gathered yet.
     *
     * @param pixels number of pixels of each map, one or more
     */
    public static Repeatability over(int pixels) {
        if (pixels < 1) {
            throw new IllegalArgumentException("repeatability of maps of " + pixels + " pixels: give one or more");
        }
        return new Repeatability(pixels);
    }

    /**
     * Adds the next map.
     *
     * @param map thickness, nm, in the same order of pixels each time; NaN where not read
     * @return this
     * @throws IllegalArgumentException if the map has another number of pixels
     */
    public Repeatability add(float[] map) {
        if (map.length != first.length) {
            throw new IllegalArgumentException("map " + (runs.size() + 1) + " has " + map.length + " pixels, the first has "
                    + first.length + ": repeated maps must be of one size");
        }
        if (runs.size() == Short.MAX_VALUE) {
            throw new IllegalArgumentException("more than " + Short.MAX_VALUE + " repeated maps: give fewer");
        }
        if (runs.isEmpty()) {
            IntStream.range(0, map.length).filter(i -> !Float.isNaN(map[i])).forEach(inFirstMap::set);
        }
        long read = 0;
        long shared = 0;
        double total = 0;
        double shift = 0;
        for (int i = 0; i < map.length; i++) {
            if (Float.isNaN(map[i])) {
                continue;
            }
            float difference = gather(i, map[i]);
            read++;
            total += map[i];
            if (inFirstMap.get(i)) {
                shared++;
                shift += difference;
            }
        }
        runs.add(new Run(read, total / read, shared, shift / shared));
        return this;
    }

    /** The maps in the order in which they were added. */
    public List<Run> runs() {
        return List.copyOf(runs);
    }

    /** Repeatability standard deviation s_r, pooled within pixels, nm; NaN if no pixel was read twice. */
    public double standardDeviation() {
        return standardDeviation(i -> true);
    }

    /**
     * Repeatability standard deviation pooled over some of the pixels, nm; NaN if none of them was read twice.
     *
     * @param pixels tells for an index whether the pixel belongs
     */
    public double standardDeviation(IntPredicate pixels) {
        double deviations = 0;
        long freedoms = 0;
        for (int i = 0; i < first.length; i++) {
            if (counts[i] > 1 && pixels.test(i)) {
                deviations += deviations(i);
                freedoms += counts[i] - 1;
            }
        }
        return Math.sqrt(deviations / freedoms);
    }

    /** Standard deviation within every pixel, nm; NaN where read fewer than twice. */
    public float[] standardDeviations() {
        float[] map = new float[first.length];
        for (int i = 0; i < map.length; i++) {
            map[i] = counts[i] < 2 ? Float.NaN : (float) Math.sqrt(deviations(i) / (counts[i] - 1));
        }
        return map;
    }

    /** Mean of every pixel over the maps, nm; NaN where never read. */
    public float[] means() {
        float[] map = new float[first.length];
        for (int i = 0; i < map.length; i++) {
            map[i] = counts[i] == 0 ? Float.NaN : first[i] + sum[i] / counts[i];
        }
        return map;
    }

    /**
     * Repeatability limit r = 2.8 s_r, nm: two readings of one pixel differ by less in 95 % of cases (ISO 5725-6, from memory;
     * 1.96 sqrt(2) = 2.77).
     */
    public double limit() {
        return LIMIT * standardDeviation();
    }

    /**
     * Standard deviation of the maps' shifts as wholes, nm: the part of s_r that averaging over pixels does not lessen.
     *
     * @return NaN for fewer than two maps that share pixels with the first
     */
    public double shiftStandardDeviation() {
        return shifts().standardDeviation();
    }

    /**
     * What is left of s_r without the shifts of whole maps: sqrt(s_r^2 - shift^2), nm, 0 if that is negative. Exact where all
     * maps read the same pixels.
     */
    public double noise() {
        double sr = standardDeviation();
        double shift = shiftStandardDeviation();
        return Math.sqrt(Math.max(0, sr * sr - shift * shift));
    }

    /**
     * Drift: slope of the shift over the number of the map by least squares, nm per map.
     *
     * @return with an interval from three maps on; a drift whose interval holds 0 is not shown
     * @throws IllegalArgumentException if fewer than two maps share pixels with the first
     */
    public Estimate drift() {
        double[] numbers = IntStream.range(0, runs.size()).asDoubleStream().toArray();
        double[] shifts = runs.stream().mapToDouble(Run::shift).toArray();
        return Pairs.of(numbers, shifts, 2).slope();
    }

    private Sample shifts() {
        return new Sample(runs.stream().mapToDouble(Run::shift).filter(shift -> !Double.isNaN(shift)).toArray());
    }

    private float gather(int i, float value) {
        if (counts[i]++ == 0) {
            first[i] = value;
            return 0;
        }
        float difference = value - first[i];
        sum[i] += difference;
        squares[i] += difference * difference;
        return difference;
    }

    private double deviations(int i) {
        double total = sum[i];
        return Math.max(0, squares[i] - total * total / counts[i]);
    }
}
