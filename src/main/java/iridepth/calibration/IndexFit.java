package iridepth.calibration;

import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.LUDecomposition;

/**
 * Fits the film's index along with the responses: the shift of Cauchy's A and B that maximises the evidence of the steps times the
 * prior, by Newton steps on a quadratic through neighbouring values; its curvature gives the uncertainty (Laplace).
 *
 * <p>Thickness and index are seen as their product almost alone; what tells them apart is the depth of the fringes, which is why the
 * steps' thicknesses must be known by an instrument that does not share the wrong index.
 */
final class IndexFit {
    private static final int MOST_STEPS = 12;
    private static final double SPACING = 0.25;
    private static final double LARGEST_STEP = 1.5;
    private static final double CONVERGED = 0.01;

    private final FitInput input;
    private final SensorPrior prior;
    private final NoiseLevel level;
    private final IndexPrior spread;

    private IndexFit(FitInput input, SensorPrior prior, NoiseLevel level, IndexPrior spread) {
        this.input = input;
        this.prior = prior;
        this.level = level;
        this.spread = spread;
    }

    static IndexEstimate of(FitInput input, SensorPrior prior, NoiseLevel level, IndexPrior spread) {
        return new IndexFit(input, prior, level, spread).estimate();
    }

    /** ln of evidence times prior; x and y in standard deviations of the prior. */
    private double log(double x, double y) {
        IndexChange change = new IndexChange(1, x * spread.sigmaA(), y * spread.sigmaB());
        Observations data = Observations.of(input.withStack(change.apply(input.stack())));
        return LaplaceFit.of(data, prior, level).evidence() - (x * x + y * y) / 2;
    }

    private IndexEstimate estimate() {
        double x = 0;
        double y = 0;
        double h = SPACING;
        for (int step = 0; ; step++) {
            double centre = log(x, y);
            double right = log(x + h, y);
            double left = log(x - h, y);
            double up = log(x, y + h);
            double down = log(x, y - h);
            double gx = (right - left) / (2 * h);
            double gy = (up - down) / (2 * h);
            double hxx = Math.max((2 * centre - right - left) / (h * h), 1);
            double hyy = Math.max((2 * centre - up - down) / (h * h), 1);
            double hxy = -(log(x + h, y + h) - right - up + centre) / (h * h);
            // The prior alone gives a curvature of 1; keep the matrix positive definite.
            double bound = 0.999 * Math.sqrt(hxx * hyy);
            hxy = Math.max(-bound, Math.min(bound, hxy));
            LUDecomposition curvature = new LUDecomposition(new Array2DRowRealMatrix(new double[][] {{hxx, hxy}, {hxy, hyy}}));
            double[][] covariance = curvature.getSolver().getInverse().getData();
            double dx = covariance[0][0] * gx + covariance[0][1] * gy;
            double dy = covariance[1][0] * gx + covariance[1][1] * gy;
            double size = Math.max(Math.abs(dx), Math.abs(dy));
            double share = Math.min(1, LARGEST_STEP / size);
            if (step == MOST_STEPS || size < CONVERGED) {
                double sx = Math.sqrt(covariance[0][0]);
                double sy = Math.sqrt(covariance[1][1]);
                return new IndexEstimate(x * spread.sigmaA(), y * spread.sigmaB(), sx * spread.sigmaA(), sy * spread.sigmaB(),
                        covariance[0][1] / (sx * sy));
            }
            x += share * dx;
            y += share * dy;
            h = Math.max(0.02, Math.min(SPACING, Math.sqrt(Math.min(covariance[0][0], covariance[1][1]))));
        }
    }
}
