package iridepth.reading;

import java.util.Arrays;

/**
 * Finds the candidates of pixels with censored channels. The chi-square of the other channels is a lower bound of that of all, as a
 * censored channel only adds to it, and quickly had from tangents: what is censored is weighed only where that leaves a candidate
 * possible.
 */
final class CensoredSearch implements CandidateSearch {
    /** Standard deviations by which a film between two samples may be nearer than the samples. */
    private static final double BETWEEN = 1;

    private final CurveIndex index;
    private final Misfit misfit;
    private final double[] scan;
    private final double bound;

    CensoredSearch(CurveIndex index) {
        this.index = index;
        this.misfit = new Misfit(index.curve(), index.noise());
        this.scan = new double[index.tables()[0].size()];
        this.bound = Math.pow(Math.sqrt(index.threshold()) + BETWEEN, 2);
    }

    @Override
    public void find(float[] values, byte[] limits, int pixel, int level, CandidateRow result) {
        TangentTable table = index.table(level, mask(limits, pixel, index.curve().channels()));
        lookAlong(table, values, limits, pixel);
        misfit.load(values, limits, pixel, index.levels().light(level));
        for (int k = 0; k < scan.length; k++) {
            scan[k] = scan[k] <= bound ? misfit.chiSquare(table.thickness(k)) : Double.POSITIVE_INFINITY;
        }
        for (int k = 0; k < scan.length; k++) {
            boolean fallsFromLeft = k == 0 || scan[k] < scan[k - 1];
            boolean risesToRight = k == scan.length - 1 || scan[k] <= scan[k + 1];
            if (fallsFromLeft && risesToRight && scan[k] < Double.POSITIVE_INFINITY) {
                double d = misfit.minimum(table.thickness(Math.max(k - 1, 0)), table.thickness(Math.min(k + 1, scan.length - 1)));
                double chiSquare = misfit.chiSquare(d);
                if (chiSquare <= index.threshold()) {
                    result.add((float) d, (float) misfit.cost(d), chiSquare <= index.acceptance());
                }
            }
        }
    }

    /** Leaves the chi-square of the channels that are not censored at every sample. */
    private void lookAlong(TangentTable table, float[] values, byte[] limits, int pixel) {
        int all = index.curve().channels();
        float[] measured = new float[all];
        int count = 0;
        for (int c = 0; c < all; c++) {
            if (limits[pixel * all + c] == 0) {
                measured[count++] = values[pixel * all + c];
            }
        }
        if (count == 0) {
            Arrays.fill(scan, 0);
            return;
        }
        AnyChannelProbe probe = new AnyChannelProbe(count);
        probe.load(table, measured, 0);
        for (int k = 0; k < scan.length; k++) {
            scan[k] = probe.chiSquare(k);
        }
    }

    /** Bit c is set where channel c is censored. */
    static int mask(byte[] limits, int pixel, int channels) {
        int mask = 0;
        for (int c = 0; c < channels; c++) {
            mask |= limits[pixel * channels + c] != 0 ? 1 << c : 0;
        }
        return mask;
    }
}
