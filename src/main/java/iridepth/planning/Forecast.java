package iridepth.planning;

import iridepth.curve.ColourCurve;
import iridepth.photo.ChannelNoise;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.apache.commons.math3.special.Erf;

/**
 * What single pixels of a rig's photos will tell of a film: at evenly spaced thicknesses the uncertainty to expect and the
 * probability that the likeliest thickness is one of another order, and the thicknesses that the rig confuses.
 *
 * <p>Two thicknesses are confusable when chi-square between their signals is at most a limit. A pixel of the one is then taken
 * for the other with probability Phi(-sqrt(chi-square) / 2): 2.3 % at 16, 6.7 % at 9, one half at 0. With several rivals of odds
 * o the right one wins with probability 1 / (1 + sum of o). The order choice from the neighbourhood is left out.
 */
public final class Forecast {
    /** Chi-square up to which two thicknesses are confusable unless another limit is given. */
    public static final double USUAL_LIMIT = 16;
    /** Spacing of the thicknesses as a share of the curve's step. */
    private static final int PER_STEP = 8;
    /** From one thickness to the next a rival moves by less than so many steps of the curve. */
    private static final int REACH = 4;

    private final double[] thickness;
    private final ExpectedUncertainty[] uncertainty;
    private final double[] wrongOrder;
    private final int[] rivals;
    private final List<ConfusablePair> stretches;
    private final double freeToNm;

    private Forecast(double[] thickness, ExpectedUncertainty[] uncertainty, List<List<Rival>> rivals, double reachNm) {
        this.thickness = thickness;
        this.uncertainty = uncertainty;
        this.wrongOrder = rivals.stream().mapToDouble(Forecast::wrong).toArray();
        this.rivals = rivals.stream().mapToInt(List::size).toArray();
        this.freeToNm = rivals.stream().flatMap(List::stream).mapToDouble(r -> Math.max(r.filmNm(), r.rivalNm())).min()
                .orElse(thickness[thickness.length - 1]);
        this.stretches = stretches(rivals, reachNm);
    }

    /**
     * Forecasts for films on a curve.
     *
     * @param curve expected signals, with the covariance of their systematic errors where known
     * @param noise noise to expect of a pixel
     * @param limit chi-square up to which two thicknesses are confusable, above 0
     */
    public static Forecast of(ColourCurve curve, ChannelNoise noise, double limit) {
        if (!(limit > 0 && limit < 1e6)) {
            throw new IllegalArgumentException("the chi-square up to which thicknesses are confusable must be above 0, not " + limit);
        }
        CurveMetric metric = CurveMetric.of(curve, noise);
        int count = (curve.size() - 1) * PER_STEP + 1;
        double[] thickness = new double[count];
        Arrays.setAll(thickness, i -> curve.fromNm() + curve.stepNm() / PER_STEP * i);
        ExpectedUncertainty[] uncertainty = new ExpectedUncertainty[count];
        List<List<Rival>> rivals = new ArrayList<>(java.util.Collections.nCopies(count, List.of()));
        ThreadLocal<RivalSearch> searches = ThreadLocal.withInitial(() -> new RivalSearch(curve, metric, limit));
        IntStream.range(0, count).parallel().forEach(i -> {
            uncertainty[i] = ExpectedUncertainty.at(curve, metric, thickness[i]);
            rivals.set(i, searches.get().of(thickness[i]));
        });
        return new Forecast(thickness, uncertainty, rivals, REACH * curve.stepNm());
    }

    private static double wrong(List<Rival> rivals) {
        double odds = 0;
        for (Rival rival : rivals) {
            double taken = Erf.erfc(Math.sqrt(rival.chiSquare() / 8)) / 2;
            odds += taken / (1 - taken);
        }
        return odds / (1 + odds);
    }

    /** Joins rivals of neighbouring thicknesses to pairs; each pair is taken once, from its thinner side. */
    private static List<ConfusablePair> stretches(List<List<Rival>> rivals, double reachNm) {
        List<ConfusablePair> done = new ArrayList<>();
        List<ConfusablePair> open = new ArrayList<>();
        List<Rival> ends = new ArrayList<>();
        for (List<Rival> here : rivals) {
            List<ConfusablePair> nextOpen = new ArrayList<>();
            List<Rival> nextEnds = new ArrayList<>();
            for (Rival rival : here) {
                if (rival.rivalNm() < rival.filmNm()) {
                    continue;
                }
                int match = nearest(ends, rival, reachNm);
                nextOpen.add(match < 0 ? ConfusablePair.of(rival) : open.get(match).with(rival));
                nextEnds.add(rival);
                if (match >= 0) {
                    open.remove(match);
                    ends.remove(match);
                }
            }
            done.addAll(open);
            open = nextOpen;
            ends = nextEnds;
        }
        done.addAll(open);
        done.sort(java.util.Comparator.comparingDouble(ConfusablePair::thinNm).thenComparingDouble(ConfusablePair::thickNm));
        return List.copyOf(done);
    }

    private static int nearest(List<Rival> ends, Rival rival, double reachNm) {
        int best = -1;
        for (int k = 0; k < ends.size(); k++) {
            double gap = Math.abs(ends.get(k).rivalNm() - rival.rivalNm());
            if (gap <= reachNm && (best < 0 || gap < Math.abs(ends.get(best).rivalNm() - rival.rivalNm()))) {
                best = k;
            }
        }
        return best;
    }

    /** Number of thicknesses. */
    public int size() {
        return thickness.length;
    }

    /** A thickness, nm. */
    public double thickness(int i) {
        return thickness[i];
    }

    /** Uncertainty to expect at a thickness. */
    public ExpectedUncertainty uncertainty(int i) {
        return uncertainty[i];
    }

    /** Probability that a pixel there is taken for another order, 0 to 1. */
    public double wrongOrder(int i) {
        return wrongOrder[i];
    }

    /** With how many other thicknesses a thickness is confusable. */
    public int rivals(int i) {
        return rivals[i];
    }

    /** The stretches that are confusable with each other, the thinnest first. */
    public List<ConfusablePair> stretches() {
        return stretches;
    }

    /** Up to which thickness a range that begins with the first may reach before it holds a confusable pair, nm. */
    public double freeToNm() {
        return freeToNm;
    }

    /** Share of the thicknesses that are confusable with others, 0 to 1. */
    public double doubtfulShare() {
        return Arrays.stream(rivals).filter(r -> r > 0).count() / (double) size();
    }

    /** Number of confusable pairs among thicknesses one nanometre apart. */
    public long confusablePairs() {
        double length = thickness[thickness.length - 1] - thickness[0];
        return Math.round(Arrays.stream(rivals).average().orElseThrow() * length / 2);
    }

    /** Mean over the thicknesses of the probability that a pixel is taken for another order. */
    public double meanWrongOrder() {
        return Arrays.stream(wrongOrder).average().orElseThrow();
    }

    /** Median over the thicknesses of the combined standard uncertainty, nm. */
    public double medianUncertaintyNm() {
        double[] sorted = Arrays.stream(uncertainty).mapToDouble(ExpectedUncertainty::combinedNm).sorted().toArray();
        return sorted[sorted.length / 2];
    }
}
