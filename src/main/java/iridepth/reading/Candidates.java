package iridepth.reading;

import java.util.Arrays;

/**
 * The candidates of one pixel: thicknesses at which the curve passes close to its signal, in order of rising thickness, each
 * with its cost (twice the negative log likelihood up to a constant).
 *
 * <p>A container to be filled anew for each pixel.
 */
final class Candidates {
    /** Most that are kept for a pixel; the costliest go first. */
    static final int MOST = 8;

    private final double[] thickness = new double[MOST];
    private final double[] cost = new double[MOST];
    private int count;

    void clear() {
        count = 0;
    }

    int count() {
        return count;
    }

    double thickness(int k) {
        return thickness[k];
    }

    double cost(int k) {
        return cost[k];
    }

    /** The one with the least cost, or -1 if there is none. */
    int likeliest() {
        int best = -1;
        for (int k = 0; k < count; k++) {
            if (best < 0 || cost[k] < cost[best]) {
                best = k;
            }
        }
        return best;
    }

    /** Adds a candidate behind the others, or in place of the costliest when full. */
    void add(double thicknessNm, double itsCost) {
        if (count == MOST) {
            int worst = 0;
            for (int k = 1; k < MOST; k++) {
                worst = cost[k] > cost[worst] ? k : worst;
            }
            if (itsCost >= cost[worst]) {
                return;
            }
            System.arraycopy(thickness, worst + 1, thickness, worst, MOST - 1 - worst);
            System.arraycopy(cost, worst + 1, cost, worst, MOST - 1 - worst);
            count--;
        }
        thickness[count] = thicknessNm;
        cost[count++] = itsCost;
    }

    @Override
    public String toString() {
        return Arrays.toString(Arrays.copyOf(thickness, count));
    }
}
