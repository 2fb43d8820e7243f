package iridepth.calibration;

import iridepth.curve.ColourCurve;

/**
 * The plainest maximum-likelihood reading of a signal: chi-square + ln det C at every sample of the curve, the least of them
 * refined by a parabola. Serves as a measure that shares nothing with the program's own readings.
 */
final class ScanReader {
    private final ColourCurve curve;

    ScanReader(ColourCurve curve) {
        this.curve = curve;
    }

    /**
     * Thickness and standard uncertainty, nm, and chi-square.
     *
     * @param signal one value per channel
     * @param sigma  noise of each
     */
    double[] read(double[] signal, double[] sigma) {
        int best = 0;
        double[] cost = new double[curve.size()];
        for (int s = 0; s < cost.length; s++) {
            cost[s] = cost(s, signal, sigma)[0];
            best = cost[s] < cost[best] ? s : best;
        }
        double shift = 0;
        if (best > 0 && best < cost.length - 1) {
            double bend = cost[best - 1] - 2 * cost[best] + cost[best + 1];
            shift = bend > 0 ? 0.5 * (cost[best - 1] - cost[best + 1]) / bend : 0;
        }
        double[] at = cost(best, signal, sigma);
        return new double[] {curve.thickness(best) + shift * curve.stepNm(), 1 / Math.sqrt(at[2]), at[1]};
    }

    /** Cost, chi-square and information at a sample. */
    private double[] cost(int s, double[] signal, double[] sigma) {
        int n = curve.channels();
        double[][] l = new double[n][n];
        double[] r = new double[n];
        double[] t = new double[n];
        double chiSquare = 0;
        double information = 0;
        double logDeterminant = 0;
        for (int i = 0; i < n; i++) {
            r[i] = signal[i] - curve.signal(s, i);
            t[i] = curve.slope(s, i);
            for (int j = 0; j <= i; j++) {
                double sum = curve.covariance(s, i, j) + (i == j ? sigma[i] * sigma[i] : 0);
                for (int k = 0; k < j; k++) {
                    sum -= l[i][k] * l[j][k];
                }
                l[i][j] = i == j ? Math.sqrt(sum) : sum / l[j][j];
                if (j < i) {
                    r[i] -= l[i][j] * r[j];
                    t[i] -= l[i][j] * t[j];
                }
            }
            r[i] /= l[i][i];
            t[i] /= l[i][i];
            chiSquare += r[i] * r[i];
            information += t[i] * t[i];
            logDeterminant += 2 * Math.log(l[i][i]);
        }
        return new double[] {chiSquare + logDeterminant, chiSquare, information};
    }
}
