package iridepth.planning;

import iridepth.curve.ColourCurve;

/**
 * The standard uncertainty to expect of a thickness read from one pixel, by the Cramer-Rao bound of the colour curve with its
 * noise: u^2 = 1 / A with A = s'^T C^-1 s', C the noise plus the covariance of the systematic errors.
 *
 * <p>The estimate that reaches it is d = a^T v with a = C^-1 s' / A; its random part is a^T N a and its systematic part what is
 * left (JCGM 100, 5.1). Where the curve turns back on itself s' vanishes; there the half-width u at which chi-square rises by 1
 * to second order, A u^2 + B u^4 = 1 with B = s''^T C^-1 s'' / 4, takes the place of the bound. It is the uncertainty that
 * reading a photo states.
 *
 * @param randomNm     random part, nm
 * @param systematicNm systematic part, nm
 */
public record ExpectedUncertainty(double randomNm, double systematicNm) {

    /** At a thickness in nm. */
    static ExpectedUncertainty at(ColourCurve curve, CurveMetric metric, double thicknessNm) {
        int n = curve.channels();
        double[] value = new double[n];
        double[] first = new double[n];
        double[] second = new double[n];
        double[] white = new double[n];
        curve.at(thicknessNm, value, first, second);
        int sample = metric.nearest(thicknessNm);
        metric.whiten(sample, second, white);
        double bend = 0;
        for (double w : white) {
            bend += w * w / 4;
        }
        metric.whiten(sample, first, white);
        double information = 0;
        for (double w : white) {
            information += w * w;
        }
        double variance = 2 / (information + Math.sqrt(information * information + 4 * bend));
        double random = information > 0 ? Math.min(1, metric.noiseShare(sample, white) / information) : 1;
        return new ExpectedUncertainty(Math.sqrt(variance * random), Math.sqrt(variance * (1 - random)));
    }

    /** Both parts combined, nm. */
    public double combinedNm() {
        return Math.hypot(randomNm, systematicNm);
    }
}
