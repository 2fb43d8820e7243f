package iridepth.calibration;

import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.DecompositionSolver;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.RealMatrix;

/**
 * The smoothest reflectance of a given colour: of all spectra with these tristimulus values under CIE D50 for the CIE 1931 observer
 * the one whose neighbouring values differ least, sum of (rho_i+1 - rho_i)^2 least (S. A. Burns, Color Res. Appl. 45, 2020, 'least
 * slope squared'), held within 0 and 1.
 */
final class SmoothReflectance {
    /** Coefficients of the linear part, [grid index][X, Y, Z]. */
    private static final double[][] BY_XYZ = coefficients();

    private SmoothReflectance() {
    }

    /**
     * The spectrum of a colour.
     *
     * @param xyz relative to a perfect white of Y = 1, under D50
     */
    static Spectrum of(Xyz xyz) {
        double[] rho = new double[Grid.SIZE];
        for (int i = 0; i < rho.length; i++) {
            double v = BY_XYZ[i][0] * xyz.x() + BY_XYZ[i][1] * xyz.y() + BY_XYZ[i][2] * xyz.z();
            rho[i] = Math.max(0, Math.min(1, v));
        }
        return Spectrum.of(rho);
    }

    /** Solves the least-squares problem under its three equations by Lagrange's multipliers. */
    private static double[][] coefficients() {
        Light light = Light.illuminant("D50");
        Observer observer = Observer.CIE_1931;
        double scale = 1 / light.power().dot(observer.y());
        Spectrum[] weight = {observer.x(), observer.y(), observer.z()};
        int n = Grid.SIZE;
        RealMatrix system = new Array2DRowRealMatrix(n + 3, n + 3);
        RealMatrix right = new Array2DRowRealMatrix(n + 3, 3);
        for (int i = 0; i + 1 < n; i++) {
            system.addToEntry(i, i, 2);
            system.addToEntry(i + 1, i + 1, 2);
            system.addToEntry(i, i + 1, -2);
            system.addToEntry(i + 1, i, -2);
        }
        for (int c = 0; c < 3; c++) {
            for (int i = 0; i < n; i++) {
                double w = weight[c].at(i) * light.power().at(i) * scale;
                system.setEntry(i, n + c, w);
                system.setEntry(n + c, i, w);
            }
            right.setEntry(n + c, c, 1);
        }
        DecompositionSolver solver = new LUDecomposition(system, 1e-18).getSolver();
        return solver.solve(right).getSubMatrix(0, n - 1, 0, 2).getData();
    }
}
