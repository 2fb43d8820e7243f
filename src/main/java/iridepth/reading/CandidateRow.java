package iridepth.reading;

import java.util.Arrays;

/**
 * The candidates of a row of pixels: thicknesses at which the curve passes close to a pixel's signal, in order of rising
 * thickness, each with its cost (twice the negative log likelihood up to a constant). Those of a pixel stand together, pixel
 * after pixel.
 *
 * <p>A container to be filled anew: {@link #clear}, then for each pixel any number of {@link #add} and one {@link #close}.
 */
final class CandidateRow {
    /** Most that are kept for a pixel; the costliest are left out. */
    static final int MOST = 200;

    private final byte[] count;
    private float[] thickness;
    private float[] cost;
    private int size;
    private int first;

    CandidateRow(int width) {
        this.count = new byte[width];
        this.thickness = new float[2 * width + MOST];
        this.cost = new float[2 * width + MOST];
    }

    void clear() {
        size = 0;
        first = 0;
    }

    /** Adds a candidate to the pixel in work. */
    void add(float thicknessNm, float itsCost) {
        if (size == thickness.length) {
            thickness = Arrays.copyOf(thickness, 2 * size);
            cost = Arrays.copyOf(cost, 2 * size);
        }
        if (size - first == MOST) {
            dropCostliest();
        }
        thickness[size] = thicknessNm;
        cost[size++] = itsCost;
    }

    private void dropCostliest() {
        int worst = first;
        for (int k = first + 1; k < size; k++) {
            worst = cost[k] > cost[worst] ? k : worst;
        }
        System.arraycopy(thickness, worst + 1, thickness, worst, size - worst - 1);
        System.arraycopy(cost, worst + 1, cost, worst, size - worst - 1);
        size--;
    }

    /** Ends the pixel in work. */
    void close(int x) {
        count[x] = (byte) (size - first);
        first = size;
    }

    /** Number of candidates of a pixel. */
    int count(int x) {
        return count[x] & 0xff;
    }

    /** Number of candidates of all pixels. */
    int size() {
        return size;
    }

    /** Thickness of a candidate by its place in the row, nm. */
    float thickness(int place) {
        return thickness[place];
    }

    /** Cost of a candidate by its place in the row. */
    float cost(int place) {
        return cost[place];
    }
}
