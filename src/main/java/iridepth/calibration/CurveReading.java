package iridepth.calibration;

import iridepth.curve.ColourCurve;

/**
 * The thickness near a known one at which a curve explains a signal best: least squares in the metric of the signal's and the
 * curve's covariance, by Gauss-Newton steps that do not leave the curve.
 *
 * @param thicknessNm   where chi-square is least, nm
 * @param uncertaintyNm its standard uncertainty, nm
 * @param chiSquare     the least chi-square
 */
record CurveReading(double thicknessNm, double uncertaintyNm, double chiSquare) {
    private static final int MOST_STEPS = 50;
    private static final double LARGEST_STEP_NM = 4;

    /**
     * Reads a signal.
     *
     * @param curve    the curve, with its covariance
     * @param signal   one value per channel
     * @param variance noise of the signal
     * @param startNm  thickness to start from
     */
    static CurveReading near(ColourCurve curve, double[] signal, double[] variance, double startNm) {
        int n = curve.channels();
        double[] value = new double[n];
        double[] first = new double[n];
        double[] second = new double[n];
        double[] flat = new double[n * n];
        double d = startNm;
        for (int step = 0; ; step++) {
            curve.at(d, value, first, second);
            curve.covarianceAt(d, flat);
            double[][] c = new double[n][n];
            for (int a = 0; a < n; a++) {
                for (int b = 0; b < n; b++) {
                    c[a][b] = flat[a * n + b] + (a == b ? variance[a] : 0);
                }
                value[a] = signal[a] - value[a];
            }
            Cholesky factor = Cholesky.of(c);
            double[] toward = factor.forward(first);
            double[] misfit = factor.forward(value);
            double gradient = 0;
            double information = 0;
            double chiSquare = 0;
            for (int a = 0; a < n; a++) {
                gradient += toward[a] * misfit[a];
                information += toward[a] * toward[a];
                chiSquare += misfit[a] * misfit[a];
            }
            double change = information > 0 ? gradient / information : 0;
            change = Math.max(-LARGEST_STEP_NM, Math.min(LARGEST_STEP_NM, change));
            double next = Math.max(curve.fromNm(), Math.min(curve.toNm(), d + change));
            if (Math.abs(next - d) < 1e-5 || step == MOST_STEPS) {
                // Where the curve turns, its bend limits the error: A x + B x^2 = 1 with x = u^2.
                double bend = factor.quadratic(second) / 4;
                double u = Math.sqrt(2 / (information + Math.sqrt(information * information + 4 * bend)));
                return new CurveReading(next, u, chiSquare);
            }
            d = next;
        }
    }
}
