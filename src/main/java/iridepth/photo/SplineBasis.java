package iridepth.photo;

import java.util.Arrays;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.RealMatrix;

/**
 * Uniform cubic B-splines along one side of a picture (C. de Boor, A Practical Guide to Splines, 1978): a smooth function
 * of the pixel position with intervals + 3 coefficients. With 0 intervals it is the constant.
 */
final class SplineBasis {

    /** Positions within a block at which the basis is averaged: a block's mean is not the value at its centre. */
    private static final int POINTS = 4;

    private final int length;
    private final int intervals;
    /** First pixel of each interval, and the end. */
    private final int[] starts;
    /** Where in its interval each pixel's centre lies, 0 to 1. */
    private final float[] fraction;
    private final RealMatrix blockMeans;
    private final RealMatrix projection;

    /**
     * @param length pixels along the side
     * @param block pixels a block, the last block may be shorter
     * @param intervals 0 for a constant, else 1 or more, with no more coefficients than blocks
     */
    SplineBasis(int length, int block, int intervals) {
        this.length = length;
        this.intervals = intervals;
        starts = new int[intervals + 1];
        fraction = new float[intervals == 0 ? 0 : length];
        for (int x = 0; x < fraction.length; x++) {
            double u = (x + 0.5) / length * intervals;
            int k = Math.min(intervals - 1, (int) u);
            fraction[x] = (float) (u - k);
            starts[k + 1] = x + 1;
        }
        int blocks = (length + block - 1) / block;
        double[][] rows = new double[blocks][size()];
        for (int b = 0; b < blocks; b++) {
            double from = b * block;
            double to = Math.min(length, from + block);
            for (int p = 0; p < POINTS; p++) {
                add(from + (p + 0.5) / POINTS * (to - from), rows[b]);
            }
        }
        blockMeans = MatrixUtils.createRealMatrix(rows);
        RealMatrix transposed = blockMeans.transpose();
        projection = new CholeskyDecomposition(transposed.multiply(blockMeans)).getSolver().solve(transposed);
    }

    private void add(double position, double[] row) {
        if (intervals == 0) {
            row[0] += 1.0 / POINTS;
            return;
        }
        double u = position / length * intervals;
        int k = Math.min(intervals - 1, (int) u);
        double[] weights = weights(u - k);
        for (int i = 0; i < 4; i++) {
            row[k + i] += weights[i] / POINTS;
        }
    }

    private static double[] weights(double t) {
        double s = 1 - t;
        return new double[] {s * s * s / 6, (3 * t * t * t - 6 * t * t + 4) / 6,
            (-3 * t * t * t + 3 * t * t + 3 * t + 1) / 6, t * t * t / 6};
    }

    /** Number of coefficients. */
    int size() {
        return intervals == 0 ? 1 : intervals + 3;
    }

    /** The blocks x coefficients matrix that gives the mean of each block. */
    RealMatrix blockMeans() {
        return blockMeans;
    }

    /** The coefficients x blocks matrix of the least-squares fit to block means. */
    RealMatrix projection() {
        return projection;
    }

    /** Combines rows of coefficients into the ones that hold at the centre of a pixel. */
    double[] at(int pixel, double[][] coefficients) {
        if (intervals == 0) {
            return coefficients[0];
        }
        double u = (pixel + 0.5) / length * intervals;
        int k = Math.min(intervals - 1, (int) u);
        double[] w = weights(u - k);
        double[] combined = new double[coefficients[0].length];
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < combined.length; j++) {
                combined[j] += w[i] * coefficients[k + i][j];
            }
        }
        return combined;
    }

    /** Evaluates at every pixel along the side. */
    void evaluate(double[] c, float[] into) {
        if (intervals == 0) {
            Arrays.fill(into, 0, length, (float) c[0]);
            return;
        }
        for (int k = 0; k < intervals; k++) {
            float a0 = (float) ((c[k] + 4 * c[k + 1] + c[k + 2]) / 6);
            float a1 = (float) ((c[k + 2] - c[k]) / 2);
            float a2 = (float) ((c[k] - 2 * c[k + 1] + c[k + 2]) / 2);
            float a3 = (float) ((-c[k] + 3 * c[k + 1] - 3 * c[k + 2] + c[k + 3]) / 6);
            for (int x = starts[k]; x < starts[k + 1]; x++) {
                float t = fraction[x];
                into[x] = a0 + t * (a1 + t * (a2 + t * a3));
            }
        }
    }
}
