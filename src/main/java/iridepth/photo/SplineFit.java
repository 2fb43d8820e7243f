package iridepth.photo;

import java.util.Arrays;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.RealMatrix;

/** A least-squares tensor-product spline through the block means of one channel, with its fineness chosen by Mallows' Cp. */
final class SplineFit {

    /** Numbers of spline intervals along the longer side, 0 for the constant. */
    private static final int[] INTERVALS = {0, 1, 2, 3, 4, 6, 8, 12, 16, 24, 32, 48, 64};
    private static final int ROUNDS = 4;
    private static final double OUTLIER = 6;
    private static final double MAD_TO_SIGMA = 1.4826;

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
     * @param residual what the fit leaves of the blocks beyond their noise, root mean square
     * @param outlierFraction fraction of the blocks left out
     */
    record Judged(SplineFit fit, double uncertainty, double residual, double outlierFraction) {
    }

    static Judged of(BlockMeans means, int channel) {
        RealMatrix data = MatrixUtils.createRealMatrix(means.mean(channel));
        double noise = blockNoise(means.mean(channel));
        RealMatrix cleaned = data;
        SplineFit best = best(means, data, noise);
        int outliers = 0;
        for (int round = 0; round < ROUNDS; round++) {
            cleaned = data.copy();
            int found = best.replaceOutliers(cleaned, noise);
            if (found == outliers) {
                break;
            }
            outliers = found;
            best = best(means, cleaned, noise);
        }
        double n = (double) data.getRowDimension() * data.getColumnDimension();
        double share = best.size() / n;
        double left = meanSquare(flat(cleaned.subtract(best.fitted)));
        return new Judged(best, noise * Math.sqrt(share), Math.sqrt(Math.max(0, left - noise * noise * (1 - share))),
                outliers / n);
    }

    /** Puts the fit in the place of blocks that stand out of it; returns how many. */
    private int replaceOutliers(RealMatrix data, double noise) {
        RealMatrix residuals = data.subtract(fitted);
        double reach = OUTLIER * Math.max(noise, MAD_TO_SIGMA * medianOfAbsolute(flat(residuals)));
        int found = 0;
        for (int row = 0; row < data.getRowDimension(); row++) {
            for (int column = 0; column < data.getColumnDimension(); column++) {
                if (Math.abs(residuals.getEntry(row, column)) > reach) {
                    data.setEntry(row, column, fitted.getEntry(row, column));
                    found++;
                }
            }
        }
        return found;
    }

    private double size() {
        return (double) across.size() * down.size();
    }

    private static SplineFit best(BlockMeans means, RealMatrix data, double noise) {
        int rows = data.getRowDimension();
        int columns = data.getColumnDimension();
        SplineFit best = null;
        double bestCp = Double.POSITIVE_INFINITY;
        for (int m : INTERVALS) {
            int longer = Math.max(rows, columns);
            int mx = m == 0 ? 0 : Math.max(1, Math.round((float) m * columns / longer));
            int my = m == 0 ? 0 : Math.max(1, Math.round((float) m * rows / longer));
            if (m > 0 && (mx + 3 > columns * 2 / 3 || my + 3 > rows * 2 / 3)) {
                break;
            }
            SplineFit fit = new SplineFit(new SplineBasis(means.width(), means.block(), mx),
                    new SplineBasis(means.height(), means.block(), my), data);
            double share = fit.size() / ((double) rows * columns);
            double cp = meanSquare(flat(data.subtract(fit.fitted))) + 2 * share * noise * noise;
            if (cp < bestCp) {
                bestCp = cp;
                best = fit;
            }
        }
        return best;
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

    private static double meanSquare(double[] values) {
        return Arrays.stream(values).map(v -> v * v).sum() / values.length;
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
