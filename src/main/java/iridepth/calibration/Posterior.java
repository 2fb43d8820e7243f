package iridepth.calibration;

import java.util.Arrays;

/**
 * What a {@link LaplaceFit} found.
 *
 * @param weights    most probable weights, [channel][bump]
 * @param glare      most probable glare of each channel
 * @param residual   q minus fit, channel by channel
 * @param noise      covariance of the observations that the fit supposed
 * @param chiSquare  r^T N^-1 r
 * @param evidence   ln of the marginal likelihood, up to a constant
 * @param prior      covariance of the logarithms before the data
 * @param rows       derivatives of the fit by the logarithms, [channel][observation][parameter]
 * @param system     factor of J P J^T + N
 */
record Posterior(double[][] weights, double[] glare, double[] residual, double[][] noise, double chiSquare, double evidence,
                 PriorCovariance prior, double[][][] rows, Cholesky system) {
    /** Parameters: weights channel by channel, each channel's glare behind its weights. */
    double[] parameters() {
        double[] result = new double[weights.length * (Bumps.COUNT + 1)];
        for (int c = 0; c < weights.length; c++) {
            System.arraycopy(weights[c], 0, result, c * (Bumps.COUNT + 1), Bumps.COUNT);
            result[c * (Bumps.COUNT + 1) + Bumps.COUNT] = glare[c];
        }
        return result;
    }

    /** Covariance of the {@link #parameters}: W (P - P J^T (J P J^T + N)^-1 J P) W with W = diag(w). */
    double[][] covariance() {
        int channels = weights.length;
        int width = Bumps.COUNT + 1;
        int size = channels * width;
        double[] w = parameters();
        double[][] result = new double[size][];
        double[][] explained = new double[size][];
        for (int a = 0; a < size; a++) {
            double[][] unit = new double[channels][width];
            unit[a / width][a % width] = 1;
            double[][] column = prior.times(unit);
            result[a] = new double[size];
            for (int b = 0; b < size; b++) {
                result[a][b] = column[b / width][b % width];
            }
            explained[a] = system.forward(against(column));
        }
        for (int a = 0; a < size; a++) {
            for (int b = 0; b < size; b++) {
                double sum = 0;
                for (int j = 0; j < explained[a].length; j++) {
                    sum += explained[a][j] * explained[b][j];
                }
                result[a][b] = w[a] * w[b] * (result[a][b] - sum);
            }
        }
        return result;
    }

    /** J v. */
    private double[] against(double[][] v) {
        double[] result = new double[rows.length * rows[0].length];
        for (int at = 0; at < result.length; at++) {
            int c = at / rows[0].length;
            for (int k = 0; k <= Bumps.COUNT; k++) {
                result[at] += rows[c][at % rows[0].length][k] * v[c][k];
            }
        }
        return result;
    }

    /**
     * Effective number of parameters that the data determine: the trace of J P J^T (J P J^T + N)^-1 (D. J. C. MacKay, Neural
     * Computation 4, 415-447, 1992).
     */
    double determined() {
        double free = 0;
        double[] unit = new double[residual.length];
        for (int a = 0; a < residual.length; a++) {
            Arrays.fill(unit, 0);
            unit[a] = 1;
            double[] x = system.solve(unit);
            for (int b = 0; b < residual.length; b++) {
                free += noise[a][b] * x[b];
            }
        }
        return residual.length - free;
    }
}
