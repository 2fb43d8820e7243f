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

    /** Chooses the candidate of least total in every pixel of a row. */
    static ReadRow choose(PixelRow row, CurveIndex index) {
        ReadRow read = of(row.width());
        int candidate = 0;
        int open = 0;
        for (int x = 0; x < row.width(); x++) {
            int kind = row.kind(x);
            if (kind < 0) {
                read.leave(x, row.state(x));
            } else if (kind == 1) {
                read.set(x, row.thickness()[candidate++], Float.POSITIVE_INFINITY, index.tables()[row.level(x)]);
            } else {
                read.choose(x, row, candidate, open, kind, index);
                candidate += kind;
                open += kind;
            }
        }
        return read;
    }

    private void choose(int x, PixelRow row, int candidate, int open, int kind, CurveIndex index) {
        int best = 0;
        float least = Float.POSITIVE_INFINITY;
        float second = Float.POSITIVE_INFINITY;
        for (int k = 0; k < kind; k++) {
            float total = row.total(open + k);
            if (total < least) {
                second = least;
                least = total;
                best = k;
            } else {
                second = Math.min(second, total);
            }
        }
        float d = row.thickness()[candidate + best];
        if (index.explains(d, row.cost()[open + best], row.level(x))) {
            set(x, d, second - least, index.tables()[row.level(x)]);
        } else {
            leave(x, State.OFF_CURVE);
        }
    }

    private void set(int x, float d, float itsMargin, TangentTable table) {
        int k = table.nearest(d);
        thickness[x] = d;
        random[x] = table.random(k);
        systematic[x] = table.systematic(k);
        margin[x] = itsMargin;
        state[x] = State.READ.code();
    }

    private void leave(int x, State why) {
        thickness[x] = Float.NaN;
        random[x] = Float.NaN;
        systematic[x] = Float.NaN;
        margin[x] = Float.NaN;
        state[x] = why.code();
    }

    /** Writes the row into a map. */
    void into(ThicknessMap map, int y) {
        int at = y * map.width();
        System.arraycopy(thickness, 0, map.thickness(), at, map.width());
        System.arraycopy(random, 0, map.random(), at, map.width());
        System.arraycopy(systematic, 0, map.systematic(), at, map.width());
        System.arraycopy(state, 0, map.state(), at, map.width());
    }
}
