package iridepth.calibration;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Several fits of the same data under different suppositions, each weighted by its evidence (Bayesian model averaging: J. A.
 * Hoeting and others, Statistical Science 14, 382-401, 1999). What the suppositions disagree about is part of the covariance.
 *
 * @param fits        the fits
 * @param probability their probabilities, with sum 1
 */
record Mixture(List<Posterior> fits, double[] probability) {
    private static final double NEGLIGIBLE = 1e-2;
    private static final double SMALLEST_PART = 1e-12;

    /**
     * Weights fits by evidence times a prior.
     *
     * @param logPrior ln of each fit's prior probability, up to a constant
     */
    static Mixture of(List<Posterior> fits, double[] logPrior) {
        double[] probability = new double[fits.size()];
        double best = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < probability.length; i++) {
            probability[i] = fits.get(i).evidence() + logPrior[i];
            best = Math.max(best, probability[i]);
        }
        double sum = 0;
        for (int i = 0; i < probability.length; i++) {
            probability[i] = Math.exp(probability[i] - best);
            sum += probability[i];
        }
        for (int i = 0; i < probability.length; i++) {
            probability[i] /= sum;
        }
        return new Mixture(List.copyOf(fits), probability);
    }

    /** Place of the most probable fit. */
    int best() {
        int best = 0;
        for (int i = 1; i < probability.length; i++) {
            best = probability[i] > probability[best] ? i : best;
        }
        return best;
    }

    /** Mean of the parameters. */
    double[] mean() {
        double[] mean = new double[fits.get(0).parameters().length];
        for (int i = 0; i < probability.length; i++) {
            double[] p = fits.get(i).parameters();
            for (int k = 0; k < mean.length; k++) {
                mean[k] += probability[i] * p[k];
            }
        }
        return mean;
    }

    /**
     * Directions whose outer products sum to the covariance of the parameters, negligible ones left out.
     */
    double[][] factors() {
        double[] mean = mean();
        double[][] covariance = new double[mean.length][mean.length];
        for (int i = 0; i < probability.length; i++) {
            if (probability[i] < NEGLIGIBLE) {
                continue;
            }
            double[][] own = fits.get(i).covariance();
            double[] p = fits.get(i).parameters();
            for (int a = 0; a < mean.length; a++) {
                for (int b = 0; b <= a; b++) {
                    double both = own[a][b] + (p[a] - mean[a]) * (p[b] - mean[b]);
                    covariance[a][b] += probability[i] * both;
                    covariance[b][a] = covariance[a][b];
                }
            }
        }
        return pivoted(covariance);
    }

    /** Cholesky's factor with pivoting, column by column until what is left is negligible (N. J. Higham, Cambridge 1990). */
    private static double[][] pivoted(double[][] matrix) {
        int n = matrix.length;
        double[] diagonal = new double[n];
        for (int i = 0; i < n; i++) {
            diagonal[i] = matrix[i][i];
        }
        double largest = Arrays.stream(diagonal).max().orElseThrow();
        List<double[]> columns = new ArrayList<>();
        while (columns.size() < n) {
            int pivot = 0;
            for (int i = 1; i < n; i++) {
                pivot = diagonal[i] > diagonal[pivot] ? i : pivot;
            }
            if (!(diagonal[pivot] > SMALLEST_PART * largest)) {
                break;
            }
            double[] column = matrix[pivot].clone();
            for (double[] before : columns) {
                for (int i = 0; i < n; i++) {
                    column[i] -= before[pivot] * before[i];
                }
            }
            double root = Math.sqrt(diagonal[pivot]);
            for (int i = 0; i < n; i++) {
                column[i] /= root;
                diagonal[i] -= column[i] * column[i];
            }
            diagonal[pivot] = 0;
            columns.add(column);
        }
        return columns.toArray(double[][]::new);
    }
}
