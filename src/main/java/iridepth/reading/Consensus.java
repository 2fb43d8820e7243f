package iridepth.reading;

/**
 * A second look at pixels whose thickness jumps beside a neighbour's: each takes the candidate of least
 *
 * <p>E(d) = D(d) + sum over n of w(n) min(T, (d - d(n))^2 / (q^2 + 2 u^2) / r(n)^2),
 *
 * <p>over the readings d(n) in a window, at distances r(n), w falling with 1 / r^2 to a sum of 4: iterated conditional modes
 * (J. Besag, J. Roy. Statist. Soc. B 48, 259, 1986), all pixels at once so that the result does not depend on their order.
 */
final class Consensus {
    /** Rows and columns to each side of a pixel. */
    static final int RADIUS = 3;
    private static final double WEIGHT = 4;
    private static final int SIDE = 2 * RADIUS + 1;

    private final CurveIndex index;
    private final JumpPenalty penalty;
    private final float jump;
    private final float[] weight = new float[SIDE * SIDE];
    private final float[] perSquare = new float[SIDE * SIDE];

    Consensus(CurveIndex index, JumpPenalty penalty) {
        this.index = index;
        this.penalty = penalty;
        this.jump = penalty.jump();
        double sum = 0;
        for (int j = 0; j < weight.length; j++) {
            double squared = Math.pow(j % SIDE - RADIUS, 2) + Math.pow(j / SIDE - RADIUS, 2);
            perSquare[j] = squared > 0 ? (float) (1 / squared) : 0;
            sum += perSquare[j];
        }
        for (int j = 0; j < weight.length; j++) {
            weight[j] = (float) (WEIGHT * perSquare[j] / sum);
        }
    }

    /**
     * Looks at a row again.
     *
     * @param window the readings of the rows from RADIUS above to RADIUS below, null outside the picture
     * @return the readings of the row in the middle, the same object where nothing changes
     */
    ReadRow look(ReadRow[] window) {
        ReadRow here = window[RADIUS];
        PixelRow pixels = here.pixels();
        ReadRow result = here;
        float[] d = here.thickness();
        float[] above = window[RADIUS - 1] == null ? d : window[RADIUS - 1].thickness();
        float[] below = window[RADIUS + 1] == null ? d : window[RADIUS + 1].thickness();
        int last = d.length - 1;
        for (int noted = 0; noted < pixels.noted(); noted++) {
            int x = pixels.column()[noted];
            if (pixels.count(noted) > 1 && (jumps(d[x], d[Math.max(0, x - 1)]) || jumps(d[x], d[Math.min(last, x + 1)])
                    || jumps(d[x], above[x]) || jumps(d[x], below[x]))) {
                if (result == here) {
                    result = here.copy();
                }
                choose(noted, pixels, window, result);
            }
        }
        return result;
    }

    private boolean jumps(float d, float other) {
        return Math.abs(d - other) > jump;
    }

    private void choose(int noted, PixelRow pixels, ReadRow[] window, ReadRow result) {
        int best = -1;
        float least = Float.POSITIVE_INFINITY;
        float second = Float.POSITIVE_INFINITY;
        for (int k = pixels.start()[noted]; k < pixels.start()[noted + 1]; k++) {
            float energy = pixels.cost()[k] + around(pixels.column()[noted], pixels.thickness()[k], window);
            if (energy < least) {
                second = least;
                least = energy;
                best = k;
            } else {
                second = Math.min(second, energy);
            }
        }
        result.take(noted, best, second - least, index);
    }

    private float around(int x, float d, ReadRow[] window) {
        float stiffness = penalty.stiffness(d);
        float sum = 0;
        for (int row = 0; row < SIDE; row++) {
            if (window[row] == null) {
                continue;
            }
            float[] thickness = window[row].thickness();
            int to = Math.min(thickness.length - 1, x + RADIUS);
            for (int column = Math.max(0, x - RADIUS); column <= to; column++) {
                int j = row * SIDE + column - x + RADIUS;
                float difference = thickness[column] - d;
                float cost = difference * difference * stiffness * perSquare[j];
                if (cost < JumpPenalty.TRUNCATION) {
                    sum += weight[j] * cost;
                } else if (cost >= JumpPenalty.TRUNCATION) {
                    sum += weight[j] * JumpPenalty.TRUNCATION;
                }
            }
        }
        return sum;
    }
}
