package iridepth.reading;

/**
 * What is kept of a row of pixels until the order is chosen.
 *
 * <p>Most pixels have one candidate: for these its thickness is all. The others are noted, from left to right: pixels with
 * several candidates, whose order is open, and those with none. Where the curve turns back on itself all pixels are noted.
 *
 * @param kind      number of candidates of each pixel, or the complement of its state's code where it has none
 * @param level     level of light of each pixel; empty where there is only one
 * @param censored  channels of each pixel that are at an end of their scale, bit c for channel c; empty where there are none
 * @param single    thickness of each pixel with one candidate, nm, NaN for others
 * @param column    column of each noted pixel
 * @param start     where the candidates of each noted pixel begin, one more entry at the end
 * @param thickness thickness of the candidates of noted pixels, nm, rising for each pixel
 * @param cost      their costs
 * @param pinned    columns of the pixels whose order is known beforehand
 * @param message   what the two downward sweeps say against the candidates of noted pixels
 */
record PixelRow(byte[] kind, byte[] level, int[] censored, float[] single, int[] column, int[] start, float[] thickness, float[] cost,
                int[] pinned, float[][] message) {
    PixelRow(byte[] kind, byte[] level, int[] censored, float[] single, int[] column, int[] start, float[] thickness, float[] cost, int[] pinned) {
        this(kind, level, censored, single, column, start, thickness, cost, pinned,
                new float[][] {new float[cost.length], new float[cost.length]});
    }

    int width() {
        return kind.length;
    }

    /** Number of noted pixels. */
    int noted() {
        return column.length;
    }

    /** Number of candidates of a noted pixel. */
    int count(int noted) {
        return start[noted + 1] - start[noted];
    }

    /** State of a pixel that has no reading. */
    State stateWithoutReading(int x) {
        return kind[x] < 0 ? State.of(~kind[x]) : State.OFF_CURVE;
    }

    /** Level of light of a pixel. */
    int levelAt(int x) {
        return level.length == 0 ? 0 : level[x];
    }

    /** Table of a pixel. */
    TangentTable table(CurveIndex index, int x) {
        return index.table(levelAt(x), censoredAt(x));
    }

    /** Channels of a pixel that are at an end of their scale. */
    int censoredAt(int x) {
        return censored.length == 0 ? 0 : censored[x];
    }

    /** Cost of a candidate and what the sweeps say against it. */
    float total(int candidate) {
        return cost[candidate] + message[0][candidate] + message[1][candidate];
    }

    /** Bytes that it takes, about. */
    long bytes() {
        return kind.length + level.length + 4L * (censored.length + single.length + 2L * column.length + 4L * cost.length);
    }
}
