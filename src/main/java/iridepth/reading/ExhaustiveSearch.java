package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * Looks at every sample of the curve: slow, simple and complete. The measure for faster searches, and their resort for pixels
 * with censored channels.
 */
final class ExhaustiveSearch implements CandidateSearch {
    private final ColourCurve curve;
    private final Misfit misfit;
    private final double threshold;
    private final double[] scan;

    /**
     * @param threshold chi-square above which a thickness does not explain a pixel
     */
    ExhaustiveSearch(ColourCurve curve, double threshold) {
        this.curve = curve;
        this.misfit = new Misfit(curve);
        this.threshold = threshold;
        this.scan = new double[curve.size()];
    }

    @Override
    public void find(float[] values, float[] variances, byte[] limits, int pixel, Candidates result) {
        misfit.load(values, variances, limits, pixel);
        result.clear();
        for (int k = 0; k < scan.length; k++) {
            scan[k] = misfit.atSample(k);
        }
        for (int k = 0; k < scan.length; k++) {
            boolean fallsFromLeft = k == 0 || scan[k] < scan[k - 1];
            boolean risesToRight = k == scan.length - 1 || scan[k] <= scan[k + 1];
            if (fallsFromLeft && risesToRight) {
                double low = curve.thickness(Math.max(k - 1, 0));
                double high = curve.thickness(Math.min(k + 1, scan.length - 1));
                double d = misfit.refine(curve.thickness(k), low, high);
                if (misfit.chiSquare(d) <= threshold) {
                    result.add(d, misfit.cost(d));
                }
            }
        }
    }
}
