package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.simulation.Rigs;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.RealMatrix;
import org.junit.jupiter.api.Test;

/** The fit in the space of observations against the same in the space of weights, by a general-purpose matrix library. */
class LaplaceFitTest {
    private static final NoiseLevel LEVEL = new NoiseLevel(1e-3, 0.1);
    private final FitInput input = new RigTrial(Rigs.oxideMixture()).input();
    private final Observations data = Observations.of(input);
    private final SensorPrior prior = Suppositions.middle(input, data);
    private final Posterior fit = LaplaceFit.of(data, prior, LEVEL);
    private final int width = Bumps.COUNT + 1;
    private final int size = 3 * width;

    private RealMatrix priorCovariance() {
        RealMatrix p = new Array2DRowRealMatrix(size, size);
        for (int a = 0; a < size; a++) {
            double[][] unit = new double[3][width];
            unit[a / width][a % width] = 1;
            double[][] column = fit.prior().times(unit);
            for (int b = 0; b < size; b++) {
                p.setEntry(b, a, column[b / width][b % width]);
            }
        }
        return p;
    }

    private RealMatrix derivatives() {
        RealMatrix j = new Array2DRowRealMatrix(3 * data.count(), size);
        for (int at = 0; at < 3 * data.count(); at++) {
            int c = at / data.count();
            for (int k = 0; k < width; k++) {
                j.setEntry(at, c * width + k, fit.rows()[c][at % data.count()][k]);
            }
        }
        return j;
    }

    private static RealMatrix inverse(RealMatrix m) {
        return new LUDecomposition(m, 1e-300).getSolver().getInverse();
    }

    /** (P^-1 + J^T N^-1 J)^-1 of the logarithms, which the fit gets by the matrix inversion lemma. */
    @Test
    void covarianceIsThatOfTheLinearProblem() {
        RealMatrix j = derivatives();
        RealMatrix n = new Array2DRowRealMatrix(fit.noise());
        RealMatrix covariance = inverse(inverse(priorCovariance()).add(j.transpose().multiply(inverse(n)).multiply(j)));
        double[] w = fit.parameters();
        double[][] own = fit.covariance();
        for (int a = 0; a < size; a++) {
            for (int b = 0; b < size; b++) {
                double scale = w[a] * w[b];
                assertEquals(covariance.getEntry(a, b), own[a][b] / scale, 1e-5, a + ", " + b);
            }
        }
    }

    /** At the most probable weights the gradient vanishes: f - m = P J^T N^-1 r. */
    @Test
    void gradientVanishesAtTheFit() {
        RealMatrix step = priorCovariance().multiply(derivatives().transpose())
                .multiply(inverse(new Array2DRowRealMatrix(fit.noise()))).multiply(MatrixUtils.createColumnRealMatrix(fit.residual()));
        double[] w = fit.parameters();
        for (int c = 0; c < 3; c++) {
            double[] mean = prior.mean(c, data.design()[c], data.signal()[c]);
            for (int k = 0; k < width; k++) {
                assertEquals(step.getEntry(c * width + k, 0), Math.log(w[c * width + k]) - mean[k], 0.02);
            }
        }
    }

    @Test
    void weightsArePositiveAndFewerAreDeterminedThanObserved() {
        for (double w : fit.parameters()) {
            assertTrue(w > 0);
        }
        assertTrue(fit.determined() > 3 && fit.determined() < 3 * data.count(), "" + fit.determined());
    }

    /** The slopes of the design by thickness against differences of the design. */
    @Test
    void slopesOfTheDesignAreItsDerivatives() {
        int step = 3;
        double h = 0.01;
        double[][] design = new double[2][];
        for (int side = 0; side < 2; side++) {
            java.util.List<StepSignal> steps = new java.util.ArrayList<>(input.steps());
            StepSignal s = steps.get(step);
            steps.set(step, StepSignal.of(s.label(), s.thicknessNm() + (side == 0 ? -h : h), s.signal(), s.variance()));
            FitInput moved = FitInput.of(input.channels(), input.lights().get(0), input.stack(), input.flatStack(), input.view(),
                    input.range(), steps);
            design[side] = Observations.of(moved).design()[1][step + 1];
        }
        double largest = 0;
        for (int k = 0; k < Bumps.COUNT; k++) {
            largest = Math.max(largest, Math.abs(data.slope()[1][step + 1][k]));
        }
        for (int k = 0; k < Bumps.COUNT; k++) {
            assertEquals(data.slope()[1][step + 1][k], (design[1][k] - design[0][k]) / (2 * h), 1e-5 * largest);
        }
    }
}
