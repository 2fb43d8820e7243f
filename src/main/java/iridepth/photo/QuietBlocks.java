package iridepth.photo;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/** The blocks of a channel that show nothing but noise, grouped by level, and the covariance of that noise. */
final class QuietBlocks {

    private static final double QUIETEST = 0.2;
    private static final double REACH = 3;
    private static final int ROUNDS = 30;
    /** Rounding of a level that rests between two counts gives 1/4 count^2, three times the usual 1/12. */
    private static final double ROUNDING_SPREAD = 3;
    /** Variance above the photon-transfer curve from which a group is taken to hold texture. */
    private static final double TEXTURE = 1.3;
    private static final double LEAST_CORRECTION = 0.5;
    /** Neighbours on a grid can hardly be less correlated; a lower figure comes of pictures with next to no noise left. */
    private static final double LOWEST_CORRELATION = -0.5;

    private record Group(double level, double variance, double rounding, int[] blocks) {
    }

    /** Parts into which the blocks are dealt to see how far chance moves a correlation. */
    private static final int PARTS = 8;
    private static final double SIGNIFICANT = 3;

    private final BlockResidual residual;
    private final List<Group> groups;
    private final double[] covariance;
    private final double[][] covarianceOfParts;

    private QuietBlocks(NoiseBlocks blocks, List<Group> groups) {
        this.residual = blocks.residual();
        this.groups = groups;
        List<Group> plain = withoutTexture();
        this.covariance = residual.covariances(meanProducts(blocks, plain, 0, 1));
        this.covarianceOfParts = new double[PARTS][];
        Arrays.setAll(covarianceOfParts, part -> residual.covariances(meanProducts(blocks, plain, part, PARTS)));
    }

    /** The groups that lie no farther above the photon-transfer curve through all of them than noise may. */
    private List<Group> withoutTexture() {
        TransferFit fit = TransferFit.of(points(1));
        List<Group> plain = groups.stream()
                .filter(group -> group.variance <= TEXTURE * fit.variance(group.level, group.rounding)).toList();
        return plain.isEmpty() ? groups : plain;
    }

    static QuietBlocks of(NoiseBlocks blocks, int groupCount) {
        int[] byLevel = IntStream.range(0, blocks.count()).boxed()
                .sorted(Comparator.comparingDouble(blocks::level)).mapToInt(Integer::intValue).toArray();
        double chance = Math.sqrt(2.0 / blocks.residual().freedom());
        QuietBlocks quiet = null;
        double spread = 1;
        for (int round = 0; round < 3; round++) {
            List<Group> groups = new ArrayList<>();
            for (int g = 0; g < groupCount; g++) {
                int from = (int) ((long) byLevel.length * g / groupCount);
                int to = (int) ((long) byLevel.length * (g + 1) / groupCount);
                groups.add(group(blocks, Arrays.copyOfRange(byLevel, from, to), chance * spread));
            }
            quiet = new QuietBlocks(blocks, groups);
            double wider = quiet.spread();
            if (wider <= spread * 1.05) {
                break;
            }
            spread = wider;
        }
        return quiet;
    }

    /**
     * How much farther than that of white noise the variance of a block strays by chance: the root of the sum of squared
     * correlations over all distances.
     */
    private double spread() {
        if (neighbourCorrelation() == 0) {
            return 1;
        }
        int side = (int) Math.round(Math.sqrt(residual.distances()));
        double sum = 0;
        for (int k = 0; k < covariance.length; k++) {
            double places = (k % side == 0 ? 1 : 2) * (k / side == 0 ? 1 : 2);
            sum += places * Math.pow(correlation(covariance, k % side, k / side), 2);
        }
        return Math.sqrt(Math.min(residual.freedom() / 2.0, sum));
    }

    private static Group group(NoiseBlocks blocks, int[] members, double chance) {
        int[] byVariance = Arrays.stream(members).boxed().sorted(Comparator.comparingDouble(blocks::variance))
                .mapToInt(Integer::intValue).toArray();
        double rounding = Arrays.stream(members).mapToDouble(blocks::rounding).average().orElse(0);
        double variance = blocks.variance(byVariance[(int) (QUIETEST * byVariance.length)]);
        int kept = 0;
        for (int round = 0; round < ROUNDS; round++) {
            double limit = variance * (1 + REACH * chance) + ROUNDING_SPREAD * rounding;
            int n = 0;
            double sum = 0;
            while (n < byVariance.length && blocks.variance(byVariance[n]) <= limit) {
                sum += blocks.variance(byVariance[n++]);
            }
            if (n == kept) {
                break;
            }
            kept = n;
            variance = sum / n;
        }
        int[] quiet = Arrays.copyOf(byVariance, kept);
        return new Group(Arrays.stream(quiet).mapToDouble(blocks::level).average().orElse(Double.NaN), variance,
                Arrays.stream(quiet).mapToDouble(blocks::rounding).average().orElse(Double.NaN), quiet);
    }

    /** Mean products of residuals at each distance, in units of each group's variance, over one block in so many. */
    private static double[] meanProducts(NoiseBlocks blocks, List<Group> groups, int part, int parts) {
        double[] sums = new double[blocks.residual().distances()];
        int n = 0;
        for (Group group : groups) {
            if (group.variance > 0) {
                for (int i = part; i < group.blocks.length; i += parts) {
                    for (int k = 0; k < sums.length; k++) {
                        sums[k] += blocks.product(group.blocks[i], k) / group.variance;
                    }
                    n++;
                }
            }
        }
        for (int k = 0; k < sums.length; k++) {
            sums[k] /= Math.max(1, n);
        }
        return sums;
    }

    /** Number of quiet blocks. */
    int blocks() {
        return groups.stream().mapToInt(group -> group.blocks.length).sum();
    }

    private double correlation(double[] covariances, int dx, int dy) {
        int side = (int) Math.round(Math.sqrt(residual.distances()));
        return covariances[0] > 0 ? Math.max(-1, Math.min(1, covariances[dy * side + dx] / covariances[0])) : 0;
    }

    /** Mean correlation at a distance across and down, 0 where chance explains it or it cannot be. */
    private double correlation(int distance) {
        double value = mean(covariance, distance);
        double square = 0;
        for (double[] part : covarianceOfParts) {
            square += Math.pow(mean(part, distance) - value, 2);
        }
        double error = Math.sqrt(square / (PARTS * (PARTS - 1.0)));
        return Math.abs(value) > SIGNIFICANT * error && value > LOWEST_CORRELATION ? value : 0;
    }

    private double mean(double[] covariances, int distance) {
        return 0.5 * (correlation(covariances, distance, 0) + correlation(covariances, 0, distance));
    }

    /** Correlation of neighbours, mean of across and down, 0 where chance explains it. */
    double neighbourCorrelation() {
        return correlation(1);
    }

    /** The same at the end of the reach. */
    double farthestCorrelation() {
        return correlation((int) Math.round(Math.sqrt(residual.distances())) - 1);
    }

    /** Points of the photon-transfer curve, corrected for the correlated noise that the surfaces took away. */
    List<PhotonTransfer.Point> points() {
        return points(neighbourCorrelation() == 0 ? 1 : Math.max(LEAST_CORRECTION, covariance[0]));
    }

    private List<PhotonTransfer.Point> points(double correction) {
        return groups.stream().map(group -> new PhotonTransfer.Point(group.level, correction * group.variance,
                group.rounding, (double) group.blocks.length * residual.freedom())).toList();
    }
}
