package iridepth.reading;

/**
 * Kalman filters that follow a film of nearly constant slope from pixel to pixel. The state of each takes {@link #SIZE} values
 * in an array: thickness in nm, slope in nm a pixel, and the variance of the one, their covariance, the variance of the other.
 * The slope changes from pixel to pixel by a hundred and fiftieth of the finest fringe (standard deviation), and starts as
 * unknown, no more than the {@link JumpPenalty}'s q.
 */
final class SlopeFilter {
    static final int SIZE = 5;
    private static final double FRINGE_PER_CHANGE = 150;

    private final float change;
    private final float unknown;

    SlopeFilter(CurveIndex index) {
        this.change = (float) Math.pow(JumpPenalty.fringe(index) / FRINGE_PER_CHANGE, 2);
        this.unknown = (float) Math.pow(JumpPenalty.steepest(index), 2);
    }

    /** Starts a filter at a thickness. */
    void begin(float[] state, int at, float d, float variance) {
        state[at] = d;
        state[at + 1] = 0;
        state[at + 2] = variance;
        state[at + 3] = 0;
        state[at + 4] = unknown;
    }

    /** Squared difference of a thickness from what a filter expects so many pixels on, over its variance. */
    float surprise(float[] state, int at, float steps, float d, float variance) {
        float e = d - state[at] - steps * state[at + 1];
        float p = state[at + 2] + steps * (2 * state[at + 3] + steps * (state[at + 4] + change));
        return e * e / (p + variance);
    }

    /** Whether the surprise is less than a bound. */
    boolean isWithin(float[] state, int at, float steps, float d, float variance, float bound) {
        float e = d - state[at] - steps * state[at + 1];
        float p = state[at + 2] + steps * (2 * state[at + 3] + steps * (state[at + 4] + change));
        return e * e < bound * (p + variance);
    }

    /** Carries a filter on to a thickness so many pixels on, in the same array or another. */
    void follow(float[] from, int at, float steps, float d, float variance, float[] to, int toAt) {
        float slope = from[at + 1];
        float expected = from[at] + steps * slope;
        float p22 = from[at + 4] + change * steps;
        float p12 = from[at + 3] + steps * from[at + 4];
        float p11 = from[at + 2] + steps * (2 * from[at + 3] + steps * (from[at + 4] + change));
        float gain = p11 / (p11 + variance);
        float slopeGain = p12 / (p11 + variance);
        to[toAt] = expected + gain * (d - expected);
        to[toAt + 1] = slope + slopeGain * (d - expected);
        to[toAt + 2] = p11 * (1 - gain);
        to[toAt + 3] = p12 * (1 - gain);
        to[toAt + 4] = p22 - slopeGain * p12;
    }
}
