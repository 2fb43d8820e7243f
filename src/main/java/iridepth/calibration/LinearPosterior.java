package iridepth.calibration;

/**
 * Mean and covariance of the logarithms of a {@link LinearRig}'s weights, as observations come in one after the other (the
 * update of a Kalman filter).
 */
final class LinearPosterior {
    private final double[] mean;
    private final double[][] sigma;

    private LinearPosterior(double[] mean, double[][] sigma) {
        this.mean = mean;
        this.sigma = sigma;
    }

    /** What is believed before anything is observed. */
    static LinearPosterior of(PriorCovariance prior, int channels) {
        int size = channels * LinearRig.WIDTH;
        double[][] sigma = new double[size][size];
        for (int a = 0; a < size; a++) {
            double[][] unit = new double[channels][LinearRig.WIDTH];
            unit[a / LinearRig.WIDTH][a % LinearRig.WIDTH] = 1;
            double[][] column = prior.times(unit);
            for (int b = 0; b < size; b++) {
                sigma[a][b] = column[b / LinearRig.WIDTH][b % LinearRig.WIDTH];
            }
        }
        return new LinearPosterior(new double[size], sigma);
    }

    /** Sigma H^T, by parameter, for rows of derivatives H. */
    double[][] spread(double[][] rows) {
        double[][] result = new double[sigma.length][rows.length];
        for (int a = 0; a < sigma.length; a++) {
            for (int c = 0; c < rows.length; c++) {
                double sum = 0;
                for (int b = 0; b < sigma.length; b++) {
                    sum += sigma[a][b] * rows[c][b];
                }
                result[a][c] = sum;
            }
        }
        return result;
    }

    /** H M for rows H and a matrix M by parameter. */
    static double[][] times(double[][] rows, double[][] matrix) {
        double[][] result = new double[rows.length][matrix[0].length];
        for (int r = 0; r < rows.length; r++) {
            for (int k = 0; k < matrix.length; k++) {
                double h = rows[r][k];
                for (int c = 0; h != 0 && c < result[r].length; c++) {
                    result[r][c] += h * matrix[k][c];
                }
            }
        }
        return result;
    }

    /** Covariance of the signals whose derivatives are the rows. */
    double[][] covariance(double[][] rows) {
        return times(rows, spread(rows));
    }

    /** Expected change of the signals whose derivatives are the rows. */
    double[] change(double[][] rows) {
        double[] change = new double[rows.length];
        for (int r = 0; r < rows.length; r++) {
            for (int k = 0; k < mean.length; k++) {
                change[r] += rows[r][k] * mean[k];
            }
        }
        return change;
    }

    /**
     * The posterior once signals have been observed.
     *
     * @param rows   their derivatives
     * @param noise  covariance of their noise
     * @param change by how much they differ from those of the supposed sensor
     */
    LinearPosterior observed(double[][] rows, double[][] noise, double[] change) {
        double[][] spread = spread(rows);
        double[][] system = times(rows, spread);
        double[] left = change(rows);
        for (int a = 0; a < system.length; a++) {
            left[a] = change[a] - left[a];
            for (int b = 0; b < system.length; b++) {
                system[a][b] += noise[a][b];
            }
        }
        Cholesky factor = Cholesky.of(system);
        double[] surprise = factor.forward(left);
        double[][] white = new double[sigma.length][];
        for (int a = 0; a < white.length; a++) {
            white[a] = factor.forward(spread[a]);
        }
        double[] nextMean = new double[mean.length];
        double[][] next = new double[sigma.length][sigma.length];
        for (int a = 0; a < next.length; a++) {
            nextMean[a] = mean[a] + dot(white[a], surprise);
            for (int b = 0; b < next.length; b++) {
                next[a][b] = sigma[a][b] - dot(white[a], white[b]);
            }
        }
        return new LinearPosterior(nextMean, next);
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int c = 0; c < a.length; c++) {
            sum += a[c] * b[c];
        }
        return sum;
    }
}
