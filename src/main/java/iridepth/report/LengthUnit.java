package iridepth.report;

/**
 * The unit in which lengths on a map are shown: mm for large fields, um, or pixels where the pixel size is unknown.
 *
 * @param name     for axis titles
 * @param perPixel edge of a pixel in it
 */
record LengthUnit(String name, double perPixel) {
    private static final double LARGE_UM = 5000;

    /**
     * The unit for a length.
     *
     * @param longestPixels the longest that is to be shown
     * @param pixelUm       edge of a pixel in um, NaN if unknown
     */
    static LengthUnit of(double longestPixels, double pixelUm) {
        if (Double.isNaN(pixelUm)) {
            return new LengthUnit("pixels", 1);
        }
        return longestPixels * pixelUm >= LARGE_UM ? new LengthUnit("mm", pixelUm / 1000) : new LengthUnit("\u00b5m", pixelUm);
    }
}
