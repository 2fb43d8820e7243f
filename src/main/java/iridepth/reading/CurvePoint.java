package iridepth.reading;

import iridepth.curve.ColourCurve;

/** One point of the colour curve in the metric of its noise, W = (N + S)^-1, at a level of light; to be moved along. */
final class CurvePoint {
    /** Chi-square that noise passes with three standard deviations. */
    private static final double PASSABLE = 9;

    private final ColourCurve curve;
    private final ExpectedNoise noise;
    private final double light;
    private final int n;
    private final double[] signal;
    private final double[] first;
    private final double[] second;
    private final double[] covariance;
    private final double[] variance;
    private final double[] pull;
    private final double[] inverse;
    private final double[] unit;
    private final double[] scratch;
    private final Cholesky cholesky;

    CurvePoint(ColourCurve curve, ExpectedNoise noise, double light) {
        this.curve = curve;
        this.noise = noise;
        this.light = light;
        this.n = curve.channels();
        this.signal = new double[n];
        this.first = new double[n];
        this.second = new double[n];
        this.covariance = new double[n * n];
        this.variance = new double[n];
        this.pull = new double[n];
        this.inverse = new double[n * n];
        this.unit = new double[n];
        this.scratch = new double[n];
        this.cholesky = new Cholesky(n);
    }

    void moveTo(double thicknessNm) {
        curve.at(thicknessNm, signal, first, second);
        curve.covarianceAt(thicknessNm, covariance);
        for (int i = 0; i < n; i++) {
            variance[i] = noise.variance(i, signal[i], light);
            covariance[i * n + i] += variance[i];
        }
        cholesky.factor(covariance, n);
    }

    double signal(int channel) {
        return signal[channel];
    }

    /** First derivative of the signal, 1/nm. */
    double slope(int channel) {
        return first[channel];
    }

    /** s''^T W s'', 1/nm^4. */
    double bend() {
        return cholesky.quadratic(second, scratch);
    }

    /** Curvature in the metric W, |s'' less its part along s'| / |s'|^2; 0 with one channel, where there is but one way. */
    double curvature() {
        if (n == 1) {
            return 0;
        }
        double[] along = pull();
        double information = information();
        double product = 0;
        for (int i = 0; i < n; i++) {
            product += along[i] * second[i];
        }
        return Math.sqrt(Math.max(0, bend() - product * product / information)) / information;
    }

    /**
     * Squared uncertainty of a reading that may also be its own mirror image at a nearby extremum, nm^2: a^2 (1 - b / 9) for a
     * barrier b = A^2 / (4 s''^T W s'') of chi-square between the two that is below 9, a = sqrt(A / s''^T W s'') away.
     */
    double mirrored() {
        double information = information();
        double bend = bend();
        double barrier = information * information / (4 * bend);
        return bend > 0 && barrier < PASSABLE ? information / bend * (1 - barrier / PASSABLE) : 0;
    }

    /** W s', 1/nm: how residuals pull at the thickness. Overwritten by the next call. */
    double[] pull() {
        cholesky.solve(first, pull);
        return pull;
    }

    /** s'^T W s', 1/nm^2: the reciprocal of the variance of a thickness read here. */
    double information() {
        return cholesky.quadratic(first, scratch);
    }

    /** ln det (N + S). */
    double logDeterminant() {
        return cholesky.logDeterminant(n);
    }

    /** W by rows. Overwritten by the next call. */
    double[] inverse() {
        for (int i = 0; i < n; i++) {
            unit[i] = 1;
            cholesky.solve(unit, scratch);
            unit[i] = 0;
            System.arraycopy(scratch, 0, inverse, i * n, n);
        }
        return inverse;
    }

    /** A copy of the signals of all channels. */
    double[] signals() {
        return signal.clone();
    }

    /**
     * D^T (N / n + S + (t s)^2)^-1 D.
     *
     * @param difference D
     * @param pixels     n
     * @param trust      t, share of the signal to which the curve is trusted at best
     */
    double distance(double[] difference, double pixels, double trust) {
        double[] matrix = covariance.clone();
        for (int i = 0; i < n; i++) {
            matrix[i * n + i] += variance[i] * (1 / pixels - 1) + Math.pow(trust * signal[i], 2);
        }
        cholesky.factor(matrix, n);
        return cholesky.quadratic(difference, scratch);
    }

    /** w^T N w. */
    double noiseIn(double[] w) {
        double sum = 0;
        for (int i = 0; i < n; i++) {
            sum += w[i] * w[i] * variance[i];
        }
        return sum;
    }

    /** w^T (N + S) w. */
    double varianceIn(double[] w) {
        double sum = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                sum += w[i] * w[j] * covariance[i * n + j];
            }
        }
        return sum;
    }
}
