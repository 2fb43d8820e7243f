package iridepth.reading;

/**
 * A row of pixels with their order chosen.
 *
 * @param thickness  nm, NaN where not read
 * @param random     random part of the standard uncertainty, nm, NaN where not read
 * @param systematic systematic part of the standard uncertainty, nm, NaN where not read
 * @param margin     by how much -2 ln likelihood of the next best order exceeds that of the chosen one; infinite where there is
 *                   none, NaN where not read
 * @param state      code of the {@link State}
 */
record ReadRow(float[] thickness, float[] random, float[] systematic, float[] margin, byte[] state) {
    static ReadRow of(int width) {
        return new ReadRow(new float[width], new float[width], new float[width], new float[width], new byte[width]);
    }

    /**
     * Takes a candidate of a pixel that has several, unless it does not explain the pixel.
     *
     * @param candidate its place among the row's candidates
     * @param open      its place among their costs
     */
    void take(int x, PixelRow row, int candidate, int open, float itsMargin, CurveIndex index) {
        float d = row.thickness()[candidate];
        if (index.explains(d, row.cost()[open], row.level(x))) {
            set(x, d, itsMargin, index.tables()[row.level(x)]);
        } else {
            leave(x, State.OFF_CURVE);
        }
    }

    ReadRow copy() {
        return new ReadRow(thickness.clone(), random.clone(), systematic.clone(), margin.clone(), state.clone());
    }

    /** Gives a pixel a reading. */
    void set(int x, float d, float itsMargin, TangentTable table) {
        int k = table.nearest(d);
        thickness[x] = d;
        random[x] = table.random(k);
        systematic[x] = table.systematic(k);
        margin[x] = itsMargin;
        state[x] = State.READ.code();
    }

    /** Leaves a pixel without reading. */
    void leave(int x, State why) {
        thickness[x] = Float.NaN;
        random[x] = Float.NaN;
        systematic[x] = Float.NaN;
        margin[x] = Float.NaN;
        state[x] = why.code();
    }

    /** Copies the row, less its states, to a place in a longer one. */
    void copyTo(ReadRow band, int at) {
        System.arraycopy(thickness, 0, band.thickness, at, thickness.length);
        System.arraycopy(random, 0, band.random, at, thickness.length);
        System.arraycopy(systematic, 0, band.systematic, at, thickness.length);
        System.arraycopy(margin, 0, band.margin, at, thickness.length);
    }
}
