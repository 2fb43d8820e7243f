package iridepth.photo;

import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.QRDecomposition;

/**
 * What is left of a square block of pixels when the best cubic surface is taken away, and how the covariance of the
 * noise shows in it. With Q an orthonormal basis of the surfaces and C the covariance matrix of the noise, the residual
 * has the covariance (I - QQ') C (I - QQ'). If C depends only on the distance (|dx|, |dy|) of two pixels and ends at a
 * given reach, its values follow from the mean products of residuals at those distances by a linear system.
 */
final class BlockResidual {

    private static final int TERMS = 10;

    private final int size;
    private final int reach;
    private final double[][] basis;
    private final QRDecomposition system;

    /**
     * @param size pixels along a side
     * @param reach farthest distance along x or y at which noise is taken as correlated
     */
    BlockResidual(int size, int reach) {
        this.size = size;
        this.reach = reach;
        this.basis = orthonormal(size);
        this.system = new QRDecomposition(new Array2DRowRealMatrix(response(), false));
    }

    /** The terms of a cubic in x and y made orthonormal by Gram-Schmidt. */
    private static double[][] orthonormal(int size) {
        double[][] rows = new double[TERMS][size * size];
        for (int i = 0; i < size * size; i++) {
            double x = (i % size - 0.5 * (size - 1)) / size;
            double y = (i / size - 0.5 * (size - 1)) / size;
            double[] terms = {1, x, y, x * x, x * y, y * y, x * x * x, x * x * y, x * y * y, y * y * y};
            for (int k = 0; k < TERMS; k++) {
                rows[k][i] = terms[k];
            }
        }
        for (int k = 0; k < TERMS; k++) {
            for (int j = 0; j < k; j++) {
                addTo(rows[k], -dot(rows[k], rows[j]), rows[j]);
            }
            double norm = Math.sqrt(dot(rows[k], rows[k]));
            for (int i = 0; i < rows[k].length; i++) {
                rows[k][i] /= norm;
            }
        }
        return rows;
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }

    private static void addTo(double[] a, double factor, double[] b) {
        for (int i = 0; i < a.length; i++) {
            a[i] += factor * b[i];
        }
    }

    int size() {
        return size;
    }

    /** Number of distances (|dx|, |dy|); distance k is (k % (reach + 1), k / (reach + 1)). */
    int distances() {
        return (reach + 1) * (reach + 1);
    }

    /** Degrees of freedom of the residual. */
    int freedom() {
        return size * size - TERMS;
    }

    /** Takes the best cubic surface away, in place. */
    void apply(double[] block) {
        for (double[] surface : basis) {
            addTo(block, -dot(block, surface), surface);
        }
    }

    /** Sums of products of a block's values at each distance. */
    void addProducts(double[] block, float[] sums, int at) {
        for (int dy = 0; dy <= reach; dy++) {
            for (int dx = 0; dx <= reach; dx++) {
                double sum = products(block, dx, dy);
                if (dx > 0 && dy > 0) {
                    sum += products(block, -dx, dy);
                }
                sums[at + dy * (reach + 1) + dx] += (float) sum;
            }
        }
    }

    private double products(double[] block, int dx, int dy) {
        double sum = 0;
        int from = Math.max(0, -dx);
        int to = Math.min(size, size - dx);
        for (int y = 0; y < size - dy; y++) {
            int a = y * size;
            int b = (y + dy) * size + dx;
            for (int x = from; x < to; x++) {
                sum += block[a + x] * block[b + x];
            }
        }
        return sum;
    }

    /** Covariances of the noise at each distance from the mean sums of products of residuals. */
    double[] covariances(double[] meanSums) {
        return system.getSolver().solve(new Array2DRowRealMatrix(meanSums)).getColumn(0);
    }

    /** Expected sum of products at distance l for a unit covariance at distance k: [l][k]. */
    private double[][] response() {
        int n = size * size;
        int count = distances();
        double[][] response = new double[count][count];
        for (int k = 0; k < count; k++) {
            double[][] covariance = new double[n][];
            for (int i = 0; i < n; i++) {
                double[] row = new double[n];
                for (int j = 0; j < n; j++) {
                    row[j] = distance(i, j) == k ? 1 : 0;
                }
                apply(row);
                covariance[i] = row;
            }
            projectColumns(covariance);
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    int l = distance(i, j);
                    if (l >= 0 && (j > i || i == j)) {
                        response[l][k] += covariance[i][j];
                    }
                }
            }
        }
        return response;
    }

    private void projectColumns(double[][] matrix) {
        int n = matrix.length;
        for (double[] surface : basis) {
            double[] sums = new double[n];
            for (int i = 0; i < n; i++) {
                addTo(sums, surface[i], matrix[i]);
            }
            for (int i = 0; i < n; i++) {
                addTo(matrix[i], -surface[i], sums);
            }
        }
    }

    private int distance(int i, int j) {
        int dx = Math.abs(i % size - j % size);
        int dy = Math.abs(i / size - j / size);
        return dx > reach || dy > reach ? -1 : dy * (reach + 1) + dx;
    }
}
