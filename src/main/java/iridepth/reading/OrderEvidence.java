package iridepth.reading;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/**
 * What the pixels of a region say of other orders: for each bin of the chosen thickness and each bin of an alternative, in how
 * many pixels the alternative is a candidate and how much more it costs there.
 *
 * <p>An alternative order of the whole region is a chain of alternatives from bin to bin that is as continuous as the film.
 * What n pixels of a bin say adds up for noise, but not for systematic errors of the curve, which are the same for all of
 * them: the mean difference of a pixel, worked out with N + S, counts as often as D^T (N / n + S)^-1 D / D^T (N + S)^-1 D for
 * the difference D between the two signals. Nor do bins within a quarter of a fringe err independently: together they count
 * once.
 */
final class OrderEvidence {
    /** -2 ln likelihood by which an alternative must be behind to be refuted. */
    private static final double REFUTED = 10;
    /** No curve is trusted better than this share of its signal (common practice). */
    private static final double TRUST = 0.002;
    private static final int BINS_PER_FRINGE = 16;
    private static final int BINS_PER_WITNESS = 4;
    /** Bins with less than this share of the pixels do not decide. */
    private static final double MINOR = 0.01;
    /** Bins that an alternative may move on while the chosen thickness moves by one. */
    private static final int STEEPEST = 3;

    private final CurveIndex index;
    private final double binNm;
    /** [chosen bin]: number of witnesses. */
    private final TreeMap<Integer, Integer> witnesses = new TreeMap<>();
    /** [chosen bin][alternative bin]: number of witnesses and sum of the differences of cost. */
    private final Map<Integer, Map<Integer, double[]>> sums = new HashMap<>();

    OrderEvidence(CurveIndex index) {
        this.index = index;
        this.binNm = JumpPenalty.fringe(index) / BINS_PER_FRINGE;
    }

    private int bin(double thicknessNm) {
        return (int) (thicknessNm / binNm);
    }

    /** Hears a pixel that has several candidates. */
    void add(float chosenNm, PixelRow pixels, int candidate, int open, int count) {
        float cost = Float.NaN;
        for (int k = 0; k < count; k++) {
            if (pixels.thickness()[candidate + k] == chosenNm) {
                cost = pixels.cost()[open + k];
            }
        }
        int bin = bin(chosenNm);
        witnesses.merge(bin, 1, Integer::sum);
        Map<Integer, double[]> row = sums.computeIfAbsent(bin, b -> new TreeMap<>());
        for (int k = 0; k < count; k++) {
            float d = pixels.thickness()[candidate + k];
            if (d != chosenNm) {
                double[] sum = row.computeIfAbsent(bin(d), b -> new double[2]);
                sum[0]++;
                sum[1] += pixels.cost()[open + k] - cost;
            }
        }
    }

    /** Adds what the pixels of another region have said. */
    void add(OrderEvidence other) {
        other.witnesses.forEach((bin, n) -> witnesses.merge(bin, n, Integer::sum));
        other.sums.forEach((bin, row) -> {
            Map<Integer, double[]> own = sums.computeIfAbsent(bin, b -> new TreeMap<>());
            row.forEach((alternative, sum) -> {
                double[] total = own.computeIfAbsent(alternative, b -> new double[2]);
                total[0] += sum[0];
                total[1] += sum[1];
            });
        });
    }

    /** One way to go through the bins so far. */
    private record Chain(int bin, double evidence, double thicknessSum, double weight) {
    }

    /**
     * Other orders for the whole region that are not refuted, the likeliest first.
     *
     * @param pixels number of pixels of the region
     */
    List<DoubtfulRegion.Alternative> alternatives(long pixels) {
        int heard = witnesses.values().stream().mapToInt(Integer::intValue).sum();
        List<Chain> chains = null;
        int before = 0;
        for (Map.Entry<Integer, Integer> entry : witnesses.entrySet()) {
            int bin = entry.getKey();
            int count = entry.getValue();
            if (count < MINOR * heard) {
                continue;
            }
            List<Chain> links = links(bin, count, (double) pixels / heard);
            chains = chains == null ? links : extended(chains, links, STEEPEST * (bin - before) + 1);
            before = bin;
        }
        return chains == null ? List.of() : likeliest(chains);
    }

    /** The alternatives of one bin. */
    private List<Chain> links(int bin, int count, double pixelsPerWitness) {
        Map<Integer, double[]> row = sums.get(bin);
        double share = 1.0 / neighboursInGroup(bin);
        List<Chain> links = new ArrayList<>();
        for (int alternative : row.keySet()) {
            double n = 0;
            double sum = 0;
            for (int a = alternative - 1; a <= alternative + 1; a++) {
                double[] at = row.getOrDefault(a, new double[2]);
                n += at[0];
                sum += at[1];
            }
            if (n >= count / 2.0) {
                double gain = gain((bin + 0.5) * binNm, (alternative + 0.5) * binNm, count * pixelsPerWitness);
                double weight = count * pixelsPerWitness;
                links.add(new Chain(alternative, share * gain * sum / n, weight * (alternative + 0.5) * binNm, weight));
            }
        }
        return links;
    }

    /** Bins that count once together with a bin, itself among them. */
    private long neighboursInGroup(int bin) {
        int group = bin / BINS_PER_WITNESS;
        return sums.keySet().stream().filter(b -> b / BINS_PER_WITNESS == group).count();
    }

    /** Each link with the likeliest chain that leads to it. */
    private static List<Chain> extended(List<Chain> chains, List<Chain> links, int reach) {
        List<Chain> result = new ArrayList<>();
        for (Chain link : links) {
            chains.stream().filter(chain -> Math.abs(chain.bin() - link.bin()) <= reach)
                    .min(Comparator.comparingDouble(Chain::evidence))
                    .ifPresent(chain -> result.add(new Chain(link.bin(), chain.evidence() + link.evidence(),
                            chain.thicknessSum() + link.thicknessSum(), chain.weight() + link.weight())));
        }
        return result;
    }

    private List<DoubtfulRegion.Alternative> likeliest(List<Chain> chains) {
        List<DoubtfulRegion.Alternative> result = new ArrayList<>();
        chains.stream().filter(chain -> chain.evidence() < REFUTED).sorted(Comparator.comparingDouble(Chain::evidence))
                .forEach(chain -> {
                    double mean = chain.thicknessSum() / chain.weight();
                    if (result.stream().noneMatch(known -> Math.abs(known.meanNm() - mean) < 2 * binNm)) {
                        result.add(new DoubtfulRegion.Alternative(mean, chain.evidence()));
                    }
                });
        return result;
    }

    /** How often the difference of one pixel counts for so many of them. */
    private double gain(double chosenNm, double alternativeNm, double pixels) {
        CurvePoint point = new CurvePoint(index.curve(), index.noise(), index.levels().light(index.levels().count() / 2));
        point.moveTo(alternativeNm);
        double[] difference = point.signals();
        point.moveTo(chosenNm);
        double[] chosen = point.signals();
        for (int c = 0; c < difference.length; c++) {
            difference[c] -= chosen[c];
        }
        double one = point.distance(difference, 1, TRUST);
        return one > 0 ? point.distance(difference, pixels, TRUST) / one : 1;
    }
}
