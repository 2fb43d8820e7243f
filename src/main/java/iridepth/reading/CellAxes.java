package iridepth.reading;

import iridepth.curve.ColourCurve;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;

/**
 * The axes of a grid over channel space, each a weighted sum of the channels: the channels themselves where there are three or
 * fewer, else the three principal axes along which the curve spreads most, measured in its noise.
 *
 * @param weight [axis][channel]
 */
record CellAxes(double[][] weight) {
    /** Most axes of a grid. */
    static final int MOST = 3;

    static CellAxes of(ColourCurve curve, ExpectedNoise noise) {
        int n = curve.channels();
        if (n <= MOST) {
            double[][] identity = new double[n][n];
            for (int c = 0; c < n; c++) {
                identity[c][c] = 1;
            }
            return new CellAxes(identity);
        }
        return principal(curve, noise);
    }

    private static CellAxes principal(ColourCurve curve, ExpectedNoise noise) {
        int n = curve.channels();
        double[] mean = new double[n];
        double[] scale = new double[n];
        for (int k = 0; k < curve.size(); k++) {
            for (int c = 0; c < n; c++) {
                mean[c] += curve.signal(k, c) / curve.size();
                scale[c] += (noise.variance(c, curve.signal(k, c), 1) + curve.covariance(k, c, c)) / curve.size();
            }
        }
        double[][] scatter = new double[n][n];
        for (int k = 0; k < curve.size(); k++) {
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    scatter[i][j] += (curve.signal(k, i) - mean[i]) * (curve.signal(k, j) - mean[j]) / Math.sqrt(scale[i] * scale[j]);
                }
            }
        }
        EigenDecomposition axes = new EigenDecomposition(new Array2DRowRealMatrix(scatter));
        double[][] weight = new double[MOST][n];
        for (int i = 0; i < MOST; i++) {
            for (int c = 0; c < n; c++) {
                weight[i][c] = axes.getEigenvector(i).getEntry(c) / Math.sqrt(scale[c]);
            }
        }
        return new CellAxes(weight);
    }

    int count() {
        return weight.length;
    }

    /** Whether the axes are the channels themselves. */
    boolean plain() {
        return weight.length == weight[0].length;
    }
}
