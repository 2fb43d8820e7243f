package iridepth.planning;

import iridepth.curve.ColourCurve;
import iridepth.photo.ChannelNoise;

/**
 * Distances in channel space as a reader of photos weighs them: around each sample of a colour curve
 * chi^2 = (v - s)^T C^-1 (v - s) with C = N + S, the noise to expect there and the covariance of the systematic errors.
 * Immutable.
 */
final class CurveMetric {
    private final ColourCurve curve;
    private final int n;
    /** Rows of L^-1, the inverse of the Cholesky factor of C, by sample: [(sample * n + row) * n + column]. */
    private final double[] whitening;
    /** Noise variances, [sample * n + channel]. */
    private final double[] noise;

    private CurveMetric(ColourCurve curve, double[] whitening, double[] noise) {
        this.curve = curve;
        this.n = curve.channels();
        this.whitening = whitening;
        this.noise = noise;
    }

    static CurveMetric of(ColourCurve curve, ChannelNoise noise) {
        int n = curve.channels();
        double[] whitening = new double[curve.size() * n * n];
        double[] variance = new double[curve.size() * n];
        double[] factor = new double[n * n];
        for (int k = 0; k < curve.size(); k++) {
            for (int i = 0; i < n; i++) {
                variance[k * n + i] = noise.variance(i, curve.signal(k, i));
                for (int j = 0; j <= i; j++) {
                    factor[i * n + j] = curve.covariance(k, i, j) + (i == j ? variance[k * n + i] : 0);
                }
            }
            factor(factor, n);
            invert(factor, n, whitening, k * n * n);
        }
        return new CurveMetric(curve, whitening, variance);
    }

    /** Cholesky's factor in place of the lower triangle. */
    private static void factor(double[] a, int n) {
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double sum = a[i * n + j];
                for (int k = 0; k < j; k++) {
                    sum -= a[i * n + k] * a[j * n + k];
                }
                a[i * n + j] = i == j ? Math.sqrt(sum) : sum / a[j * n + j];
            }
        }
    }

    /** Inverse of a lower triangle, row by row. */
    private static void invert(double[] l, int n, double[] into, int at) {
        for (int c = 0; c < n; c++) {
            for (int r = c; r < n; r++) {
                double sum = r == c ? 1 : 0;
                for (int k = c; k < r; k++) {
                    sum -= l[r * n + k] * into[at + k * n + c];
                }
                into[at + r * n + c] = sum / l[r * n + r];
            }
        }
    }

    /** Whitens a vector of channel space around a sample: x = L^-1 v. */
    void whiten(int sample, double[] v, double[] x) {
        int at = sample * n * n;
        for (int r = 0; r < n; r++) {
            double sum = 0;
            for (int c = 0; c <= r; c++) {
                sum += whitening[at + r * n + c] * v[c];
            }
            x[r] = sum;
        }
    }

    /** Chi-square of a signal at a sample. */
    double chiSquare(double[] signal, int sample) {
        int at = sample * n * n;
        double total = 0;
        for (int r = 0; r < n; r++) {
            double sum = 0;
            for (int c = 0; c <= r; c++) {
                sum += whitening[at + r * n + c] * (signal[c] - curve.signal(sample, c));
            }
            total += sum * sum;
        }
        return total;
    }

    /** The sample nearest to a thickness. */
    int nearest(double thicknessNm) {
        long k = Math.round((thicknessNm - curve.fromNm()) / curve.stepNm());
        return (int) Math.max(0, Math.min(curve.size() - 1, k));
    }

    /** w^T N w for w = C^-1 s, with s given whitened: what noise alone does to an estimate along s. */
    double noiseShare(int sample, double[] whitened) {
        int at = sample * n * n;
        double total = 0;
        for (int c = 0; c < n; c++) {
            double w = 0;
            for (int r = c; r < n; r++) {
                w += whitening[at + r * n + c] * whitened[r];
            }
            total += w * w * noise[sample * n + c];
        }
        return total;
    }
}
