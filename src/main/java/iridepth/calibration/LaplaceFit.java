package iridepth.calibration;

/**
 * The most probable weights of the bumps given observations, with Laplace's approximation to their covariance and to the
 * evidence (marginal likelihood) of the prior and the noise supposed.
 *
 * <p>With f = ln w the misfit is |q - X exp(f)|^2 in the metric of the noise N, plus the prior's (f - m)^T P^-1 (f - m). Gauss-Newton
 * in the space of observations, which are fewer than weights: f = m + P J^T (J P J^T + N)^-1 (q - X w + J (f - m)), J = X diag(w),
 * with step halving. The noise of a step's thickness enters N through the slope of the fitted curve, common to the channels of
 * the step. See C. E. Rasmussen and C. K. I. Williams, Gaussian Processes for Machine Learning (2006), chapters 3.4 and 5.
 */
final class LaplaceFit {
    private static final int MOST_STEPS = 60;
    /** First rounds in which the slopes of the curve, and with them the noise, still follow the fit. */
    private static final int NOISE_ROUNDS = 6;
    private static final double[] SOFTENED = {0.1, 0.01, 0.001};
    private static final double LARGEST_CHANGE = 3;
    /** A step that gains less than this in ln of the probability is the last. */
    private static final double CONVERGED = 1e-8;

    private final Observations data;
    private final PriorCovariance covariance;
    private final NoiseLevel level;
    private final double[][] mean;
    private double[][] f;
    /** P^-1 (f - m), kept up with f so that P is never inverted. */
    private double[][] dual;
    private Cholesky noise;
    private double[][] noiseMatrix;

    private LaplaceFit(Observations data, SensorPrior prior, NoiseLevel level) {
        this.data = data;
        this.covariance = PriorCovariance.of(prior);
        this.level = level;
        this.mean = new double[data.channels()][];
        for (int c = 0; c < mean.length; c++) {
            mean[c] = prior.mean(c, data.design()[c], data.signal()[c]);
        }
        this.f = new double[mean.length][];
        for (int c = 0; c < mean.length; c++) {
            f[c] = mean[c].clone();
        }
        this.dual = new double[mean.length][Bumps.COUNT + 1];
    }

    /** Fits the data. */
    static Posterior of(Observations data, SensorPrior prior, NoiseLevel level) {
        LaplaceFit fit = new LaplaceFit(data, prior, level);
        fit.iterate();
        return fit.posterior();
    }

    private void iterate() {
        double current = Double.NaN;
        for (int step = 0; step < MOST_STEPS; step++) {
            if (step < NOISE_ROUNDS) {
                setNoise(step < SOFTENED.length ? SOFTENED[step] : 0);
                current = objective(f, dual);
            }
            double[][][] rows = derivatives();
            double[] target = residual(f);
            for (int at = 0; at < target.length; at++) {
                double[] row = rows[at / data.count()][at % data.count()];
                for (int k = 0; k <= Bumps.COUNT; k++) {
                    target[at] += row[k] * (f[at / data.count()][k] - mean[at / data.count()][k]);
                }
            }
            double[] x = system(rows).solve(target);
            double[][] goalDual = combine(rows, x);
            double[][] toGoal = covariance.times(goalDual);
            double largest = 0;
            for (int c = 0; c < f.length; c++) {
                for (int k = 0; k <= Bumps.COUNT; k++) {
                    toGoal[c][k] += mean[c][k] - f[c][k];
                    largest = Math.max(largest, Math.abs(toGoal[c][k]));
                }
            }
            double share = Math.min(1, LARGEST_CHANGE / largest);
            double next = current;
            double[][] nextF = f;
            double[][] nextDual = dual;
            for (; share > 1e-3; share /= 2) {
                nextF = mixed(f, toGoal, share, 1);
                nextDual = mixed(dual, goalDual, share, 1 - share);
                next = objective(nextF, nextDual);
                if (next <= current + 1e-9) {
                    break;
                }
            }
            f = nextF;
            dual = nextDual;
            if (step >= NOISE_ROUNDS && current - next < CONVERGED) {
                return;
            }
            current = next;
        }
    }

    /** keep a + share b, element by element. */
    private static double[][] mixed(double[][] a, double[][] b, double share, double keep) {
        double[][] result = new double[a.length][a[0].length];
        for (int c = 0; c < a.length; c++) {
            for (int k = 0; k < a[c].length; k++) {
                result[c][k] = keep * a[c][k] + share * b[c][k];
            }
        }
        return result;
    }

    private double weight(int c, int k) {
        return Math.exp(f[c][k]);
    }

    private void setNoise(double softened) {
        int count = data.count();
        int size = count * data.channels();
        double[] pull = new double[size];
        noiseMatrix = new double[size][size];
        for (int at = 0; at < size; at++) {
            int c = at / count;
            int j = at % count;
            double u = Double.isNaN(data.thickness()[j]) ? level.stepNm() : data.thickness()[j];
            for (int k = 0; k < Bumps.COUNT; k++) {
                pull[at] += data.slope()[c][j][k] * weight(c, k) * u;
            }
            double relative = j < data.stepsFrom() ? 0 : level.residual() * data.signal()[c][j];
            noiseMatrix[at][at] = data.variance()[c][j] + relative * relative + softened * softened + 1e-14;
        }
        for (int a = 0; a < size; a++) {
            for (int b = a % count; b < size; b += count) {
                noiseMatrix[a][b] += pull[a] * pull[b];
            }
        }
        noise = Cholesky.of(noiseMatrix);
    }

    /** J = X diag(w), [channel][observation][parameter], the glare last. */
    private double[][][] derivatives() {
        double[][][] rows = new double[data.channels()][data.count()][Bumps.COUNT + 1];
        for (int c = 0; c < rows.length; c++) {
            double glare = weight(c, Bumps.COUNT);
            for (int k = 0; k < Bumps.COUNT; k++) {
                double w = weight(c, k);
                for (int j = 0; j < data.count(); j++) {
                    rows[c][j][k] = data.design()[c][j][k] * w;
                }
            }
            for (int j = 0; j < data.count(); j++) {
                rows[c][j][Bumps.COUNT] = glare;
            }
        }
        return rows;
    }

    private double[] residual(double[][] at) {
        double[] result = new double[data.channels() * data.count()];
        for (int c = 0; c < data.channels(); c++) {
            double[] w = new double[Bumps.COUNT + 1];
            for (int k = 0; k < w.length; k++) {
                w[k] = Math.exp(at[c][k]);
            }
            for (int j = 0; j < data.count(); j++) {
                double model = w[Bumps.COUNT];
                for (int k = 0; k < Bumps.COUNT; k++) {
                    model += data.design()[c][j][k] * w[k];
                }
                result[c * data.count() + j] = data.signal()[c][j] - model;
            }
        }
        return result;
    }

    private double priorMisfit(double[][] at, double[][] itsDual) {
        double sum = 0;
        for (int c = 0; c < at.length; c++) {
            for (int k = 0; k < at[c].length; k++) {
                sum += itsDual[c][k] * (at[c][k] - mean[c][k]);
            }
        }
        return sum;
    }

    private double objective(double[][] at, double[][] itsDual) {
        double misfit = noise.quadratic(residual(at)) + priorMisfit(at, itsDual);
        return Double.isNaN(misfit) ? Double.POSITIVE_INFINITY : misfit / 2;
    }

    private Cholesky system(double[][][] rows) {
        double[][] matrix = covariance.sandwich(rows);
        for (int a = 0; a < matrix.length; a++) {
            for (int b = 0; b < matrix.length; b++) {
                matrix[a][b] += noiseMatrix[a][b];
            }
        }
        return Cholesky.of(matrix);
    }

    /** J^T x. */
    private static double[][] combine(double[][][] rows, double[] x) {
        double[][] result = new double[rows.length][Bumps.COUNT + 1];
        for (int c = 0; c < rows.length; c++) {
            for (int j = 0; j < rows[c].length; j++) {
                for (int k = 0; k <= Bumps.COUNT; k++) {
                    result[c][k] += rows[c][j][k] * x[c * rows[c].length + j];
                }
            }
        }
        return result;
    }

    private Posterior posterior() {
        double[][][] rows = derivatives();
        Cholesky system = system(rows);
        double[] residual = residual(f);
        double[][] weights = new double[f.length][Bumps.COUNT];
        double[] glare = new double[f.length];
        for (int c = 0; c < f.length; c++) {
            for (int k = 0; k < Bumps.COUNT; k++) {
                weights[c][k] = weight(c, k);
            }
            glare[c] = weight(c, Bumps.COUNT);
        }
        double chiSquare = noise.quadratic(residual);
        double evidence = -0.5 * (chiSquare + priorMisfit(f, dual) + system.logDeterminant());
        return new Posterior(weights, glare, residual, noiseMatrix, chiSquare, evidence, covariance, rows, system);
    }
}
