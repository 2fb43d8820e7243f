package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * The colour curve as short tangents in the metric of its noise, at one level of light.
 *
 * <p>At sample k, with r = v - s_k, W = C^-1, g = W s', A = s'^T W s' and h the spacing of the samples, the nearest thickness
 * lies t = q . r samples on, q = g / (A h), and chi-square there is r^T M r with M = W - g g^T / A; t samples beside it
 * chi-square is larger by a t^2 with a = A h^2.
 *
 * <p>Standard uncertainty: the reading is the generalised least-squares estimate q . r, so its random part has the variance
 * g^T N g / A^2 and its systematic part g^T S g / A^2 (JCGM 100, 5.1). Where the curve turns back on itself A vanishes; there
 * the half-width u at which chi-square rises by 1 to second order, A u^2 + B u^4 = 1 with B = s''^T W s'' / 4, takes the place
 * of 1 / sqrt(A).
 */
final class TangentTable {
    /** Below this a the tangent does not tell where the minimum lies. */
    private static final double FLAT = 1e-9;
    private static final double UNEVEN = 0.3;

    private final int channels;
    private final int stride;
    private final CurveSampling sampling;
    /**
     * [sample * stride]: signal, q, M by its upper triangle with the other elements doubled, curvature, ln det C, thickness,
     * spacing. All that a reading usually needs stands together, with three channels in the 64 bytes of a line of cache.
     */
    private final float[] samples;
    private final float[] information;
    private final float[] random;
    private final float[] systematic;
    private final float[] spread;

    private TangentTable(int channels, CurveSampling sampling) {
        this.channels = channels;
        this.stride = stride(channels);
        this.sampling = sampling;
        this.samples = new float[sampling.size() * stride];
        this.random = new float[sampling.size()];
        this.systematic = new float[sampling.size()];
        this.information = new float[sampling.size()];
        this.spread = new float[sampling.size()];
    }

    /** The table of a curve at a light. */
    static TangentTable of(ColourCurve curve, ExpectedNoise noise, double light, CurveSampling sampling) {
        TangentTable table = new TangentTable(curve.channels(), sampling);
        CurvePoint point = new CurvePoint(curve, noise, light);
        for (int k = 0; k < sampling.size(); k++) {
            point.moveTo(sampling.thickness(k));
            table.store(k, point);
        }
        return table;
    }

    int channels() {
        return channels;
    }

    /** Number of samples. */
    int size() {
        return sampling.size();
    }

    /** Values that a sample takes in {@link #samples}. */
    static int stride(int channels) {
        return 2 * channels + channels * (channels + 1) / 2 + 4;
    }

    /** The samples themselves: not to be changed. */
    float[] samples() {
        return samples;
    }

    /** Thickness at a sample, nm. */
    double thickness(int k) {
        return sampling.thickness(k);
    }

    /** Thickness at less than a sample's spacing beyond a sample, nm. */
    float thickness(int k, float t) {
        return samples[k * stride + stride - 2] + t * samples[k * stride + stride - 1];
    }

    /** Spacing of the samples around one, nm. */
    float spacing(int k) {
        return samples[k * stride + stride - 1];
    }

    /** The sample nearest to a thickness. */
    int nearest(float thicknessNm) {
        return sampling.nearest(thicknessNm);
    }

    /** Signal of a channel at a sample. */
    double signal(int sample, int channel) {
        return samples[sample * stride + channel];
    }

    /** q of a channel at a sample. */
    double towards(int sample, int channel) {
        return samples[sample * stride + channels + channel];
    }

    /** M of two channels at a sample, the second no less than the first; doubled where they differ. */
    double across(int sample, int i, int j) {
        return samples[sample * stride + 2 * channels + i * channels - i * (i - 1) / 2 + j - i];
    }

    /**
     * Whether by the tangent at each of its samples the other end of the piece from sample k to k + 1 lies about one sample away,
     * as it does unless the curve comes to a halt.
     */
    boolean isRegular(int k) {
        double ahead = 0;
        double back = 0;
        for (int c = 0; c < channels; c++) {
            double step = signal(k + 1, c) - signal(k, c);
            ahead += towards(k, c) * step;
            back += towards(k + 1, c) * step;
        }
        return Math.abs(ahead - 1) < UNEVEN && Math.abs(back - 1) < UNEVEN;
    }

    /** ln det C at a sample. */
    float logDeterminant(int sample) {
        return samples[sample * stride + stride - 3];
    }

    /** A at a sample, per squared sample. */
    float information(int sample) {
        return information[sample];
    }

    /** Curvature of the curve at a sample: the reciprocal of its radius in standard deviations of the noise. */
    float curvature(int sample) {
        return samples[sample * stride + stride - 4];
    }

    /** Random part of the standard uncertainty at a sample, nm. */
    float random(int sample) {
        return random[sample];
    }

    /** Squared distance from the truth that noise may bring about at a sample, also across an extremum nearby, nm^2. */
    float spread(int sample) {
        return spread[sample];
    }

    /** Systematic part of the standard uncertainty at a sample, nm. */
    float systematic(int sample) {
        return systematic[sample];
    }

    private void store(int k, CurvePoint point) {
        int n = channels;
        double h = sampling.spacing(k);
        double[] inverse = point.inverse();
        double[] pull = point.pull();
        double information = point.information();
        double a = information * h * h;
        boolean flat = a < FLAT;
        int at = k * stride;
        for (int i = 0; i < n; i++) {
            samples[at + i] = (float) point.signal(i);
            samples[at + n + i] = (float) (flat ? 0 : pull[i] / (information * h));
        }
        at += 2 * n;
        for (int i = 0; i < n; i++) {
            for (int j = i; j < n; j++) {
                double m = inverse[i * n + j] - (flat ? 0 : pull[i] * pull[j] / information);
                samples[at++] = (float) (i == j ? m : 2 * m);
            }
        }
        samples[at] = (float) point.curvature();
        samples[at + 1] = (float) point.logDeterminant();
        samples[at + 2] = (float) sampling.thickness(k);
        samples[at + 3] = (float) h;
        this.information[k] = (float) (flat ? 0 : a);
        double total = 2 / (information + Math.sqrt(information * information + point.bend()));
        double share = information > 0 ? Math.min(1, point.noiseIn(pull) / information) : 1;
        random[k] = (float) Math.sqrt(total * share);
        systematic[k] = (float) Math.sqrt(total * (1 - share));
        spread[k] = (float) (total * share + point.mirrored());
    }
}
