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
    static final int MOST = 120;

    private float[] thickness;
    private float[] cost;
    private int size;
    private int first;
    private boolean explained;

    CandidateRow(int width) {
        this.thickness = new float[2 * width + MOST];
        this.cost = new float[2 * width + MOST];
    }

    void clear() {
        size = 0;
        first = 0;
        explained = false;
    }

    /**
     * Adds a candidate to the pixel in work.
     *
     * @param explains whether it passes the off-curve test
     */
    void add(float thicknessNm, float itsCost, boolean explains) {
        explained |= explains;
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

    /**
     * Adds a candidate to the pixel in work unless it is the one added last, found from another sample.
     *
     * @param spacingNm spacing of the samples there
     */
    void addOnce(float thicknessNm, float spacingNm, float itsCost, boolean explains) {
        if (size == first || thicknessNm - thickness[size - 1] > spacingNm / 2) {
            add(thicknessNm, itsCost, explains);
        }
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
    void close() {
        first = size;
        explained = false;
    }

    /**
     * Of the candidates of the pixel in work keeps the one nearest to a thickness, if one is near enough.
     *
     * @return whether one is
     */
    boolean keepNearest(double thicknessNm, double tolerance) {
        int nearest = first;
        for (int k = first + 1; k < size; k++) {
            nearest = Math.abs(thickness[k] - thicknessNm) < Math.abs(thickness[nearest] - thicknessNm) ? k : nearest;
        }
        if (nearest == size || Math.abs(thickness[nearest] - thicknessNm) > tolerance) {
            return false;
        }
        thickness[first] = thickness[nearest];
        cost[first] = cost[nearest];
        size = first + 1;
        return true;
    }

    /** Of the candidates of the pixel in work keeps the one of least cost. */
    void keepLikeliest() {
        int best = first;
        for (int k = first + 1; k < size; k++) {
            best = cost[k] < cost[best] ? k : best;
        }
        thickness[first] = thickness[best];
        cost[first] = cost[best];
        size = first + 1;
    }

    /** Takes back the candidates of the pixel in work. */
    void withdraw() {
        size = first;
        explained = false;
    }

    /** Number of candidates so far. */
    int size() {
        return size;
    }

    /** Number of candidates of the pixel in work. */
    int pending() {
        return size - first;
    }

    /** Whether a candidate of the pixel in work passes the off-curve test. */
    boolean explained() {
        return explained;
    }

    /** Thickness of a candidate by its place in the row, nm. */
    float thickness(int place) {
        return thickness[place];
    }

    /** Cost of a candidate by its place in the row. */
    float cost(int place) {
        return cost[place];
    }

    /** A copy of all costs. */
    float[] costs() {
        return Arrays.copyOf(cost, size);
    }

    /** A copy of all thicknesses. */
    float[] thicknesses() {
        return Arrays.copyOf(thickness, size);
    }
}
