package iridepth.trial;

import iridepth.reading.State;
import iridepth.reading.ThicknessMap;
import java.util.Arrays;
import java.util.Locale;
import java.util.stream.IntStream;

/**
 * How a map compares with the truth, over the pixels that have one.
 *
 * @param pixels     with truth
 * @param read       share of them that were read
 * @param doubtful   share of them that have a thickness whose order is in doubt
 * @param within5    share of the read within 5 nm of the truth
 * @param within40   share of the read within 40 nm of the truth
 * @param worst      largest error of a read pixel, nm
 * @param rms        root mean square error, nm
 * @param bias       mean error, nm
 * @param normalized median of |error| / Cramer-Rao bound, over 0.6745: 1 where a Gaussian error reaches the bound
 * @param within1u   share of errors within the stated standard uncertainty
 * @param within2u   share of errors within twice the stated standard uncertainty
 * @param stated     root mean square of the stated standard uncertainty, nm
 * @param bound      root mean square of the Cramer-Rao bound, nm
 */
record Outcome(int pixels, double read, double doubtful, double within5, double within40, double worst, double rms, double bias, double normalized,
               double within1u, double within2u, double stated, double bound) {
    /** Median of |x| of a standard normal variable. */
    private static final double MEDIAN_OF_NORMAL = 0.6745;

    /**
     * Compares.
     *
     * @param truth nm, NaN where a pixel has none
     * @param bound Cramer-Rao bound, nm
     * @param least pixels of a smaller truth do not count, nm
     */
    static Outcome of(ThicknessMap map, double[] truth, double[] bound, double least) {
        int[] known = IntStream.range(0, truth.length).filter(i -> truth[i] >= least).toArray();
        int[] read = Arrays.stream(known).filter(i -> map.state()[i] == State.READ.code()).toArray();
        long doubtful = Arrays.stream(known).filter(i -> map.state()[i] == State.ORDER_DOUBTFUL.code()).count();
        double[] error = Arrays.stream(read).mapToDouble(i -> map.thickness()[i] - truth[i]).toArray();
        double[] size = Arrays.stream(error).map(Math::abs).toArray();
        double[] ratio = IntStream.range(0, read.length).mapToDouble(k -> size[k] / bound[read[k]]).sorted().toArray();
        return new Outcome(known.length, read.length / (double) known.length, doubtful / (double) known.length, share(read, k -> size[k] <= 5),
                share(read, k -> size[k] <= 40), Arrays.stream(size).max().orElse(Double.NaN), rms(error),
                Arrays.stream(error).average().orElse(Double.NaN), ratio.length == 0 ? Double.NaN : ratio[ratio.length / 2] / MEDIAN_OF_NORMAL,
                share(read, k -> size[k] <= map.uncertainty(read[k])), share(read, k -> size[k] <= 2 * map.uncertainty(read[k])),
                rms(Arrays.stream(read).mapToDouble(map::uncertainty).toArray()),
                rms(Arrays.stream(read).mapToDouble(i -> bound[i]).toArray()));
    }

    private static double share(int[] read, java.util.function.IntPredicate holds) {
        return IntStream.range(0, read.length).filter(holds).count() / (double) read.length;
    }

    private static double rms(double[] values) {
        return Math.sqrt(Arrays.stream(values).map(v -> v * v).average().orElse(Double.NaN));
    }

    @Override
    public String toString() {
        return String.format(Locale.ROOT, "read %.4f, doubtful %.4f, within 5 nm %.5f, 40 nm %.5f, worst %.2f, rms %.3f, bias %+.3f, normalized %.3f, "
                        + "within u %.3f, 2u %.3f, stated %.3f, bound %.3f", read, doubtful, within5, within40, worst, rms, bias, normalized,
                within1u, within2u, stated, bound);
    }
}
