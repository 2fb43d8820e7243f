package iridepth.reading;

/** Gathers rows into bands for a sink. */
final class RowOutput {
    private static final int STATES_AT_ONCE = 1 << 20;

    private final ReadingSink sink;
    private final CurveIndex index;
    private final int width;
    private float[][] planes = new float[4][0];
    private int top;
    private int count;

    RowOutput(ReadingSink sink, CurveIndex index, int width) {
        this.sink = sink;
        this.index = index;
        this.width = width;
    }

    /** Begins a band of rows. */
    void begin(int itsTop, int rows) {
        top = itsTop;
        count = rows;
        if (planes[0].length != rows * width) {
            planes = new float[4][rows * width];
        }
    }

    /** Puts a row of the band in its place; rows may come from several threads. */
    void put(int y, ReadRow row) {
        int at = (y - top) * width;
        float[] thickness = row.thickness();
        System.arraycopy(thickness, 0, planes[0], at, width);
        for (int x = 0; x < width; x++) {
            float d = thickness[x];
            if (Float.isNaN(d)) {
                planes[1][at + x] = Float.NaN;
                planes[2][at + x] = Float.NaN;
                planes[3][at + x] = Float.NaN;
            } else {
                TangentTable table = row.pixels().table(index, x);
                int k = table.nearest(d);
                planes[1][at + x] = table.random(k);
                planes[2][at + x] = table.systematic(k);
                planes[3][at + x] = Float.POSITIVE_INFINITY;
            }
        }
        for (int noted = 0; noted < row.pixels().noted(); noted++) {
            int x = row.pixels().column()[noted];
            if (!Float.isNaN(thickness[x])) {
                planes[3][at + x] = row.margin()[noted];
            }
        }
    }

    /** Hands the band on. */
    void flush() {
        if (count > 0) {
            sink.readings(top, planes[0], planes[1], planes[2], planes[3]);
        }
        count = 0;
    }

    /** Hands on the states of all rows. */
    void states(Regions regions, int height) {
        int step = Math.max(1, Math.min(height, STATES_AT_ONCE / width));
        for (int y = 0; y < height; y += step) {
            byte[] state = new byte[Math.min(step, height - y) * width];
            for (int row = 0; row * width < state.length; row++) {
                regions.states(y + row, state, row * width);
            }
            sink.states(y, state);
        }
    }
}
