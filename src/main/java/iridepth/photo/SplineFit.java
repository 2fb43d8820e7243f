package iridepth.photo;

import java.util.Arrays;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.RealMatrix;

/**
 * A tensor-product spline through the block means of one channel: Huber's M-estimate (P. J. Huber, Robust Statistics,
 * 1981), in which a block that stands out pulls no more than one that is {@value #PULL} standard deviations off, with the
 * number of intervals chosen by Mallows' Cp on the bounded residuals.
 */
final class SplineFit {

    private static final double PULL = 3;
    /** Numbers of spline intervals along the longer side, 0 for the constant. */
    private static final int[] INTERVALS = {0, 1, 2, 3, 4, 6, 8, 12, 16, 24, 32, 48, 64};
    /** Choices in a row that may be worse than the best before the search ends. */
    private static final int PATIENCE = 3;
    private static final int ROUNDS = 30;
    private static final double CONVERGED = 0.05;
    private static final double OUTLIER = 6;
    private static final double MAD_TO_SIGMA = 1.4826;
    /** Least noise of a block, as a fraction of the mean: rounding hides less. */
    private static final double LEAST_NOISE = 1e-6;

    private final SplineBasis across;
    private final SplineBasis down;
    private final double[][] coefficients;
    private final RealMatrix fitted;

    private SplineFit(SplineBasis across, SplineBasis down, RealMatrix means) {
        this.across = across;
        this.down = down;
        RealMatrix c = down.projection().multiply(means).multiply(across.projection().transpose());
        coefficients = c.getData();
        fitted = down.blockMeans().multiply(c).multiply(across.blockMeans().transpose());
    }

    /**
     * A fit and how well it describes the blocks.
     *
     * @param uncertainty standard uncertainty of the fit from the noise of the blocks
     * @param residual what the fit leaves of the blocks beyond their noise, root mean square, without outliers
     * @param outlierFraction fraction of the blocks that stand out
     */
    record Judged(SplineFit fit, double uncertainty, double residual, double outlierFraction) {
    }

    static Judged of(BlockMeans means, int channel) {
        RealMatrix data = MatrixUtils.createRealMatrix(means.mean(channel));
        double noise = Math.max(blockNoise(means.mean(channel)), LEAST_NOISE * meanOfAbsolute(flat(data)));
        SplineFit fit = best(means, data, noise);
        double[] residuals = flat(data.subtract(fit.fitted));
        double reach = OUTLIER * Math.max(noise, MAD_TO_SIGMA * medianOfAbsolute(residuals));
        double[] inliers = Arrays.stream(residuals).filter(r -> Math.abs(r) <= reach).toArray();
        double share = fit.size() / residuals.length;
        double excess = meanSquare(inliers) - noise * noise * (1 - share);
        return new Judged(fit, noise * Math.sqrt(share), Math.sqrt(Math.max(0, excess)),
                1 - (double) inliers.length / residuals.length);
    }

    private static SplineFit best(BlockMeans means, RealMatrix data, double noise) {
        int rows = data.getRowDimension();
        int columns = data.getColumnDimension();
        int longer = Math.max(rows, columns);
        SplineFit best = null;
        double bestCp = Double.POSITIVE_INFINITY;
        int worse = 0;
        for (int m : INTERVALS) {
            int mx = m == 0 ? 0 : Math.max(1, Math.round((float) m * columns / longer));
            int my = m == 0 ? 0 : Math.max(1, Math.round((float) m * rows / longer));
            if (worse == PATIENCE || m > 0 && (mx + 3 > columns * 2 / 3 || my + 3 > rows * 2 / 3)) {
                break;
            }
            SplineFit fit = robust(new SplineBasis(means.width(), means.block(), mx),
                    new SplineBasis(means.height(), means.block(), my), data, noise);
            double cp = fit.boundedSquares(data, noise) + 2 * fit.size() * noise * noise;
            worse++;
            if (best == null || cp < bestCp) {
                bestCp = cp;
                best = fit;
                worse = 0;
            }
        }
        return best;
    }

    /** Huber's estimate by pseudo-observations: least squares to the data with residuals cut to the bound, repeated. */
    private static SplineFit robust(SplineBasis across, SplineBasis down, RealMatrix data, double noise) {
        SplineFit fit = new SplineFit(across, down, data);
        for (int round = 0; round < ROUNDS; round++) {
            RealMatrix bounded = data.copy();
            double[][] last = fit.fitted.getData();
            boolean cut = false;
            for (int y = 0; y < last.length; y++) {
                for (int x = 0; x < last[y].length; x++) {
                    double residual = data.getEntry(y, x) - last[y][x];
                    if (Math.abs(residual) > PULL * noise) {
                        bounded.setEntry(y, x, last[y][x] + Math.copySign(PULL * noise, residual));
                        cut = true;
                    }
                }
            }
            if (!cut) {
                break;
            }
            SplineFit next = new SplineFit(across, down, bounded);
            double moved = Arrays.stream(flat(next.fitted.subtract(fit.fitted))).map(Math::abs).max().orElse(0);
            fit = next;
            if (moved < CONVERGED * noise) {
                break;
            }
        }
        return fit;
    }

    /** Sum of Huber's loss: the square up to the bound, beyond it the tangent. */
    private double boundedSquares(RealMatrix data, double noise) {
        double bound = PULL * noise;
        return Arrays.stream(flat(data.subtract(fitted))).map(Math::abs)
                .map(r -> r <= bound ? r * r : bound * (2 * r - bound)).sum();
    }

    private double size() {
        return (double) across.size() * down.size();
    }

    /** Noise of a block mean from second differences along rows and columns, which a smooth field hardly changes. */
    private static double blockNoise(double[][] mean) {
        int rows = mean.length;
        int columns = mean[0].length;
        double[] seconds = new double[2 * rows * columns];
        int n = 0;
        for (int y = 0; y < rows; y++) {
            for (int x = 0; x < columns; x++) {
                if (x > 0 && x < columns - 1) {
                    seconds[n++] = mean[y][x - 1] - 2 * mean[y][x] + mean[y][x + 1];
                }
                if (y > 0 && y < rows - 1) {
                    seconds[n++] = mean[y - 1][x] - 2 * mean[y][x] + mean[y + 1][x];
                }
            }
        }
        return n == 0 ? 0 : MAD_TO_SIGMA * medianOfAbsolute(Arrays.copyOf(seconds, n)) / Math.sqrt(6);
    }

    private static double medianOfAbsolute(double[] values) {
        double[] sorted = Arrays.stream(values).map(Math::abs).sorted().toArray();
        return 0.5 * (sorted[(sorted.length - 1) / 2] + sorted[sorted.length / 2]);
    }

    private static double meanOfAbsolute(double[] values) {
        return Arrays.stream(values).map(Math::abs).average().orElse(0);
    }

    private static double meanSquare(double[] values) {
        return Arrays.stream(values).map(v -> v * v).average().orElse(0);
    }

    private static double[] flat(RealMatrix matrix) {
        return Arrays.stream(matrix.getData()).flatMapToDouble(Arrays::stream).toArray();
    }

    /** Evaluates along a row of pixels. */
    void row(int y, float[] into) {
        across.evaluate(down.at(y, coefficients), into);
    }

    double mean() {
        return Arrays.stream(flat(fitted)).average().orElse(Double.NaN);
    }

    double lowest() {
        return Arrays.stream(flat(fitted)).min().orElse(Double.NaN);
    }
}
