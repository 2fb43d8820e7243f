package iridepth.reading;

/**
 * A row of pixels with their order chosen.
 *
 * @param pixels    what it was chosen from
 * @param thickness nm, NaN where not read
 * @param margin    of each noted pixel: by how much -2 ln likelihood of the next best order exceeds that of the chosen one
 */
record ReadRow(PixelRow pixels, float[] thickness, float[] margin) {
    /** A row with the readings of its pixels with one candidate. */
    static ReadRow of(PixelRow pixels) {
        return new ReadRow(pixels, pixels.single().clone(), new float[pixels.noted()]);
    }

    ReadRow copy() {
        return new ReadRow(pixels, thickness.clone(), margin.clone());
    }

    /**
     * Takes a candidate of a noted pixel, unless it does not explain the pixel.
     *
     * @param candidate its place among the row's candidates
     */
    void take(int noted, int candidate, float itsMargin, CurveIndex index) {
        int x = pixels.column()[noted];
        float d = pixels.thickness()[candidate];
        boolean explains = index.explains(d, pixels.cost()[candidate], pixels.levelAt(x), pixels.censoredAt(x));
        thickness[x] = explains ? d : Float.NaN;
        margin[noted] = pixels.count(noted) == 1 ? Float.POSITIVE_INFINITY : itsMargin;
    }

    /** Which candidate of a noted pixel has been taken, by its place among the row's, or -1. */
    int taken(int noted) {
        float d = thickness[pixels.column()[noted]];
        for (int k = pixels.start()[noted]; k < pixels.start()[noted + 1]; k++) {
            if (pixels.thickness()[k] == d) {
                return k;
            }
        }
        return -1;
    }

    /** State of a pixel, as far as it can be told from the row. */
    State state(int x) {
        return Float.isNaN(thickness[x]) ? pixels.stateWithoutReading(x) : State.READ;
    }
}
