package iridepth.reading;

/**
 * Looks at the curve at every sample of the table: slow, simple and complete. The measure for faster searches.
 */
final class ExhaustiveSearch implements CandidateSearch {
    private final TangentTable table;
    private final CurveIndex index;
    private final Misfit misfit;
    private final double[] scan;

    ExhaustiveSearch(CurveIndex index) {
        this.table = index.tables()[0];
        this.index = index;
        this.misfit = new Misfit(index.curve(), index.noise());
        this.scan = new double[table.size()];
    }

    @Override
    public void find(float[] values, byte[] limits, int pixel, int level, CandidateRow result) {
        misfit.load(values, limits, pixel, index.levels().light(level));
        for (int k = 0; k < scan.length; k++) {
            scan[k] = misfit.chiSquare(table.thickness(k));
        }
        for (int k = 0; k < scan.length; k++) {
            boolean fallsFromLeft = k == 0 || scan[k] < scan[k - 1];
            boolean risesToRight = k == scan.length - 1 || scan[k] <= scan[k + 1];
            if (fallsFromLeft && risesToRight) {
                double d = misfit.minimum(table.thickness(Math.max(k - 1, 0)), table.thickness(Math.min(k + 1, scan.length - 1)));
                double chiSquare = misfit.chiSquare(d);
                if (chiSquare <= index.threshold()) {
                    result.add((float) d, (float) misfit.cost(d), chiSquare <= index.acceptance());
                }
            }
        }
    }
}
