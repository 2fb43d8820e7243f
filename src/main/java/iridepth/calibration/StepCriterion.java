package iridepth.calibration;

import java.util.Arrays;
import java.util.stream.IntStream;

/**
 * By what steps are judged: the mean over a rig's thicknesses of the systematic standard uncertainty u of thickness,
 * u^2 = share x 2 / (A + sqrt(A^2 + 4 B)) with A = s'^T C^-1 s', B = s''^T C^-1 s'' / 4, C = N + S the noise of a pixel and what
 * the posterior leaves of the signals' uncertainty, and share the part of S in the variance of the estimate.
 */
final class StepCriterion {
    private final StepModel model;
    private final LinearRig rig;
    private final double[][] pixel;

    StepCriterion(StepModel model, LinearRig rig) {
        this.model = model;
        this.rig = rig;
        this.pixel = Arrays.stream(rig.signal()).map(s -> IntStream.range(0, s.length)
                .mapToDouble(c -> model.noise().variance(c, s[c])).toArray()).toArray(double[][]::new);
    }

    /** The mean for a posterior, nm. */
    double mean(LinearPosterior posterior) {
        return IntStream.range(0, pixel.length).mapToDouble(t -> systematic(t, posterior.covariance(rig.rows()[t]))).average()
                .orElseThrow();
    }

    /**
     * The candidate that lowers the mean most when it is added to a posterior; the first of equals.
     *
     * @param films      the rig at the thicknesses of the films that may be steps
     * @param candidates which of these
     */
    int best(LinearPosterior posterior, LinearRig films, int[] candidates) {
        double[][][] covariance = Arrays.stream(rig.rows()).parallel().map(posterior::covariance).toArray(double[][][]::new);
        double[] means = Arrays.stream(candidates).parallel().mapToDouble(at -> meanWith(posterior, covariance, films, at)).toArray();
        int best = 0;
        for (int k = 1; k < means.length; k++) {
            best = means[k] < means[best] ? k : best;
        }
        return candidates[best];
    }

    private double meanWith(LinearPosterior posterior, double[][][] covariance, LinearRig films, int at) {
        double[][] spread = posterior.spread(films.rows()[at]);
        double[][] system = model.stepNoise(films, at);
        double[][] own = LinearPosterior.times(films.rows()[at], spread);
        int n = own.length;
        for (int a = 0; a < n; a++) {
            for (int b = 0; b < n; b++) {
                system[a][b] += own[a][b];
            }
        }
        Cholesky factor = Cholesky.of(system);
        double sum = 0;
        double[][] left = new double[n][n];
        for (int t = 0; t < pixel.length; t++) {
            double[][] across = LinearPosterior.times(rig.rows()[t], spread);
            for (int a = 0; a < n; a++) {
                across[a] = factor.forward(across[a]);
            }
            for (int a = 0; a < n; a++) {
                for (int b = 0; b < n; b++) {
                    left[a][b] = covariance[t][a][b];
                    for (int c = 0; c < n; c++) {
                        left[a][b] -= across[a][c] * across[b][c];
                    }
                }
            }
            sum += systematic(t, left);
        }
        return sum / pixel.length;
    }

    private double systematic(int t, double[][] covariance) {
        int n = covariance.length;
        double[][] both = new double[n][];
        for (int a = 0; a < n; a++) {
            both[a] = covariance[a].clone();
            both[a][a] += pixel[t][a];
        }
        Cholesky factor = Cholesky.of(both);
        double[] weights = factor.solve(rig.slope()[t]);
        double information = factor.quadratic(rig.slope()[t]);
        double bend = factor.quadratic(rig.bend()[t]) / 4;
        double random = 0;
        for (int a = 0; a < n; a++) {
            random += weights[a] * weights[a] * pixel[t][a];
        }
        double share = information > 0 ? Math.max(0, 1 - random / information) : 0;
        return Math.sqrt(share * 2 / (information + Math.sqrt(information * information + 4 * bend)));
    }
}
