package iridepth.reading;

import java.util.Arrays;

/**
 * What it costs a film to go on to a thickness from what has been decided before, on each of a number of lines of pixels. A
 * pixel without reading leaves a gap, across which it costs less and less.
 */
abstract class Continuity {
    private final byte[] gap;

    Continuity(int lines) {
        this.gap = new byte[lines];
        forget();
    }

    /** The cost that suits a curve. */
    static Continuity of(CurveIndex index, JumpPenalty penalty, int lines) {
        return index.turnsBack() ? new OfSlope(index, lines) : new OfThickness(penalty, lines);
    }

    /** Forgets what has been decided. */
    final void forget() {
        Arrays.fill(gap, (byte) Sweep.WIDEST_GAP);
    }

    /** What it costs to go on to a thickness on a line. */
    final float cost(int line, float d) {
        int g = gap[line];
        return g >= Sweep.WIDEST_GAP ? 0 : jump(line, d, g + 1) * (1 - (float) g / Sweep.WIDEST_GAP);
    }

    /** Goes on to the next pixel of a line; NaN where it has no reading. */
    final void go(int line, float d) {
        if (d == d) {
            follow(line, d, gap[line] >= Sweep.WIDEST_GAP ? 0 : gap[line] + 1);
            gap[line] = 0;
        } else if (gap[line] < Sweep.WIDEST_GAP) {
            gap[line]++;
        }
    }

    abstract float jump(int line, float d, int steps);

    /** @param steps pixels since the last reading, 0 where there is none */
    abstract void follow(int line, float d, int steps);

    /** By the {@link JumpPenalty}. */
    private static final class OfThickness extends Continuity {
        private final JumpPenalty penalty;
        private final float[] last;

        OfThickness(JumpPenalty penalty, int lines) {
            super(lines);
            this.penalty = penalty;
            this.last = new float[lines];
        }

        @Override
        float jump(int line, float d, int steps) {
            float difference = d - last[line];
            return Math.min(JumpPenalty.TRUNCATION, difference * difference * penalty.stiffness(d) / steps);
        }

        @Override
        void follow(int line, float d, int steps) {
            last[line] = d;
        }
    }

    /** By a {@link SlopeFilter}, as in the {@link SlopeSweep}. */
    private static final class OfSlope extends Continuity {
        private final TangentTable table;
        private final SlopeFilter filter;
        private final float[] state;

        OfSlope(CurveIndex index, int lines) {
            super(lines);
            this.table = index.middle();
            this.filter = new SlopeFilter(index);
            this.state = new float[lines * SlopeFilter.SIZE];
        }

        @Override
        float jump(int line, float d, int steps) {
            float surprise = filter.surprise(state, line * SlopeFilter.SIZE, steps, d, table.spread(table.nearest(d)));
            return Math.min(SlopeSweep.TRUNCATION, surprise);
        }

        @Override
        void follow(int line, float d, int steps) {
            int at = line * SlopeFilter.SIZE;
            float variance = table.spread(table.nearest(d));
            if (steps == 0 || filter.surprise(state, at, steps, d, variance) > SlopeSweep.TRUNCATION) {
                filter.begin(state, at, d, variance);
            } else {
                filter.follow(state, at, steps, d, variance, state, at);
            }
        }
    }
}
