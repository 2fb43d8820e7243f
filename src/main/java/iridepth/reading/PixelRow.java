package iridepth.reading;

/**
 * What is kept of a row of pixels until the order is chosen. Candidates of a pixel stand together, pixel after pixel; those of
 * pixels with several, whose order is open, also have a cost. An order that is not open costs nothing.
 */
final class PixelRow {
    /** Number of candidates of each pixel, or the complement of its state's code where it has none. */
    private final byte[] kind;
    /** Level of light of each pixel; empty where there is only one. */
    private final byte[] level;
    private final float[] thickness;
    private final float[] cost;
    private final int[] pinned;
    private final float[][] messages = new float[2][];

    PixelRow(byte[] kind, byte[] level, float[] thickness, float[] cost, int[] pinned) {
        this.kind = kind;
        this.level = level;
        this.thickness = thickness;
        this.cost = cost;
        this.pinned = pinned;
    }

    int width() {
        return kind.length;
    }

    /** Number of candidates of a pixel, or less than 0 where it has none. */
    int kind(int x) {
        return kind[x];
    }

    /** State of a pixel without candidates. */
    State state(int x) {
        return State.of(~kind[x]);
    }

    /** Level of light of a pixel. */
    int level(int x) {
        return level.length == 0 ? 0 : level[x];
    }

    /** Thickness of all candidates, nm: not to be changed. */
    float[] thickness() {
        return thickness;
    }

    /** Cost of the candidates of pixels with several: not to be changed. */
    float[] cost() {
        return cost;
    }

    /** Columns of the pixels whose order is known beforehand, rising. */
    int[] pinned() {
        return pinned;
    }

    /** Receives what a sweep's neighbours say against each of the candidates that {@link #cost} lists. */
    float[] message(int sweep) {
        if (messages[sweep] == null) {
            messages[sweep] = new float[cost.length];
        }
        return messages[sweep];
    }

    /** Cost of an open candidate and what the sweeps say against it. */
    float total(int open) {
        return cost[open] + messages[0][open] + messages[1][open];
    }

    /** Bytes that it takes, about. */
    long bytes() {
        return kind.length + level.length + 4L * (thickness.length + 3L * cost.length);
    }
}
