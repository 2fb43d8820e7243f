package iridepth.reading;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.LinkedHashMap;
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

    /** Places where a pixel of the region would join another region by another of its candidates. */
    private final Map<Border, Integer> borders = new LinkedHashMap<>();

    /** A pixel of one bin that would join a region if it were of another. */
    private record Border(FilmRegion region, int chosen, int bin) {
    }

    OrderEvidence(CurveIndex index) {
        this.index = index;
        this.binNm = JumpPenalty.fringe(index) / BINS_PER_FRINGE;
    }

    private int bin(double thicknessNm) {
        return (int) (thicknessNm / binNm);
    }

    /** Hears a noted pixel that has several candidates. */
    void add(ReadRow row, int noted) {
        PixelRow pixels = row.pixels();
        int taken = row.taken(noted);
        int bin = bin(pixels.thickness()[taken]);
        witnesses.merge(bin, 1, Integer::sum);
        Map<Integer, double[]> others = sums.computeIfAbsent(bin, b -> new TreeMap<>());
        for (int k = pixels.start()[noted]; k < pixels.start()[noted + 1]; k++) {
            if (k != taken) {
                double[] sum = others.computeIfAbsent(bin(pixels.thickness()[k]), b -> new double[2]);
                sum[0]++;
                sum[1] += pixels.cost()[k] - pixels.cost()[taken];
            }
        }
    }

    /** Hears a pixel at the border that would join a region with another of its candidates. */
    void join(FilmRegion region, float chosenNm, float candidateNm) {
        borders.merge(new Border(region, bin(chosenNm), bin(candidateNm)), 1, Integer::sum);
    }

    /** How many pixels at the borders would join each other region if this one took an order. */
    Map<FilmRegion, Integer> joined(OrderChain chain) {
        Map<FilmRegion, Integer> joined = new LinkedHashMap<>();
        borders.forEach((border, count) -> {
            if (chain.leads(border.chosen(), border.bin())) {
                joined.merge(border.region().root(), count, Integer::sum);
            }
        });
        return joined;
    }

    /** Adds what the pixels of another region have said. */
    void add(OrderEvidence other) {
        other.borders.forEach((border, count) -> borders.merge(border, count, Integer::sum));
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

    /** A step of a chain: a bin in the place of a chosen one, and the chain before it. */
    private record Link(Link before, int chosen, int bin, double evidence, double thicknessSum, double weight) {
        Link after(Link chain) {
            return new Link(chain, chosen, bin, evidence + chain.evidence, thicknessSum + chain.thicknessSum,
                    weight + chain.weight);
        }

        OrderChain chain(double binNm) {
            TreeMap<Integer, Integer> bins = new TreeMap<>();
            for (Link link = this; link != null; link = link.before) {
                bins.put(link.chosen, link.bin);
            }
            return new OrderChain(evidence, thicknessSum / weight, binNm, bins);
        }
    }

    /**
     * Other orders for the whole region that are not refuted, the likeliest first.
     *
     * @param pixels number of pixels of the region
     */
    List<OrderChain> alternatives(long pixels) {
        List<Link> chains = new ArrayList<>(chains(pixels, 1));
        chains.addAll(chains(pixels, -1));
        return likeliest(chains);
    }

    /** The chains that rise, or fall, with the thickness chosen. */
    private List<Link> chains(long pixels, int direction) {
        int heard = witnesses.values().stream().mapToInt(Integer::intValue).sum();
        List<Link> chains = null;
        int before = 0;
        for (Map.Entry<Integer, Integer> entry : witnesses.entrySet()) {
            int bin = entry.getKey();
            int count = entry.getValue();
            if (count < MINOR * heard) {
                continue;
            }
            List<Link> links = links(bin, count, (double) pixels / heard);
            chains = chains == null ? links : extended(chains, links, direction, STEEPEST * (bin - before) + 1);
            before = bin;
        }
        return chains == null ? List.of() : chains;
    }

    /** The alternatives of one bin. */
    private List<Link> links(int bin, int count, double pixelsPerWitness) {
        Map<Integer, double[]> row = sums.get(bin);
        double share = 1.0 / neighboursInGroup(bin);
        double weight = count * pixelsPerWitness;
        List<Link> links = new ArrayList<>();
        for (int alternative : row.keySet()) {
            double n = 0;
            double sum = 0;
            for (int a = alternative - 1; a <= alternative + 1; a++) {
                double[] at = row.getOrDefault(a, new double[2]);
                n += at[0];
                sum += at[1];
            }
            if (n >= count / 2.0) {
                double gain = gain((bin + 0.5) * binNm, (alternative + 0.5) * binNm, weight);
                links.add(new Link(null, bin, alternative, share * gain * sum / n, weight * (alternative + 0.5) * binNm, weight));
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
    private static List<Link> extended(List<Link> chains, List<Link> links, int direction, int reach) {
        List<Link> result = new ArrayList<>();
        for (Link link : links) {
            chains.stream().filter(chain -> isWithin((link.bin() - chain.bin()) * direction, reach))
                    .min(Comparator.comparingDouble(Link::evidence)).ifPresent(chain -> result.add(link.after(chain)));
        }
        return result;
    }

    private static boolean isWithin(int step, int reach) {
        return step >= 0 && step <= reach;
    }

    private List<OrderChain> likeliest(List<Link> chains) {
        List<OrderChain> result = new ArrayList<>();
        chains.stream().filter(chain -> chain.evidence() < REFUTED).sorted(Comparator.comparingDouble(Link::evidence))
                .map(link -> link.chain(binNm))
                .forEach(chain -> {
                    if (result.stream().noneMatch(known -> Math.abs(known.meanNm() - chain.meanNm()) < 2 * binNm)) {
                        result.add(chain);
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
