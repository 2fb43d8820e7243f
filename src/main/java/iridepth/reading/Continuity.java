package iridepth.reading;

import java.util.Arrays;

/**
 * What it costs a film to go on to a thickness from what has been decided in the row below and beside. Pixels without reading
 * leave a gap, across which it costs less and less.
 */
abstract class Continuity {
    /** The cost that suits a curve. */
    static Continuity of(CurveIndex index, JumpPenalty penalty, int width) {
        return index.turnsBack() ? new OfSlope(index, width) : new OfThickness(penalty);
    }

    /** Begins the next row upwards, from one side or the other. */
    abstract void begin(ReadRow row, boolean forward);

    /** Comes to a noted pixel. */
    abstract void at(int x);

    /** What it costs to go on to a thickness there. */
    abstract float cost(float d);

    /** What has been decided there; NaN where there is no reading. */
    abstract void decided(float d);

    /** What a jump counts for across so many pixels without reading. */
    private static float weight(int gap) {
        return 1 - (float) gap / Sweep.WIDEST_GAP;
    }

    /** By the {@link JumpPenalty}. */
    private static final class OfThickness extends Continuity {
        private final JumpPenalty penalty;
        /** Readings of the row in work and of those below it. */
        private final float[][] rows = new float[Sweep.WIDEST_GAP + 1][];
        private int step;
        private float below;
        private int gapBelow;
        private float beside;
        private int gapBeside;

        OfThickness(JumpPenalty penalty) {
            this.penalty = penalty;
        }

        @Override
        void begin(ReadRow row, boolean forward) {
            System.arraycopy(rows, 0, rows, 1, rows.length - 1);
            rows[0] = row.thickness();
            step = forward ? 1 : -1;
        }

        @Override
        void at(int x) {
            gapBelow = 0;
            while (gapBelow < Sweep.WIDEST_GAP && (rows[gapBelow + 1] == null || Float.isNaN(rows[gapBelow + 1][x]))) {
                gapBelow++;
            }
            below = gapBelow < Sweep.WIDEST_GAP ? rows[gapBelow + 1][x] : 0;
            gapBeside = 0;
            int from = x - step;
            while (gapBeside < Sweep.WIDEST_GAP && (from < 0 || from >= rows[0].length || Float.isNaN(rows[0][from]))) {
                gapBeside++;
                from -= step;
            }
            beside = gapBeside < Sweep.WIDEST_GAP ? rows[0][from] : 0;
        }

        @Override
        float cost(float d) {
            float stiffness = penalty.stiffness(d);
            return jump(d - below, stiffness, gapBelow) + jump(d - beside, stiffness, gapBeside);
        }

        private static float jump(float difference, float stiffness, int gap) {
            return Math.min(JumpPenalty.TRUNCATION, difference * difference * stiffness / (1 + gap)) * weight(gap);
        }

        @Override
        void decided(float d) {
            // the row itself remembers
        }
    }

    /** By {@link SlopeFilter}s up the columns and along the row, as in the {@link SlopeSweep}. */
    private static final class OfSlope extends Continuity {
        /** Less than the sweeps' say, so that what was decided wrongly is not carried on against them. */
        private static final float WEIGHT = 0.5f;

        private final TangentTable table;
        private final SlopeFilter filter;
        /** States of the filters, those of the columns and at the end that of the row; and the pixels since a reading. */
        private final float[] state;
        private final byte[] gap;
        private int column;

        OfSlope(CurveIndex index, int width) {
            this.table = index.middle();
            this.filter = new SlopeFilter(index);
            this.state = new float[(width + 1) * SlopeFilter.SIZE];
            this.gap = new byte[width + 1];
            Arrays.fill(gap, (byte) Sweep.WIDEST_GAP);
        }

        private int along() {
            return gap.length - 1;
        }

        @Override
        void begin(ReadRow row, boolean forward) {
            gap[along()] = Sweep.WIDEST_GAP;
        }

        @Override
        void at(int x) {
            column = x;
        }

        @Override
        float cost(float d) {
            float variance = table.spread(table.nearest(d));
            return WEIGHT * (jump(column, d, variance) + jump(along(), d, variance));
        }

        private float jump(int line, float d, float variance) {
            if (gap[line] >= Sweep.WIDEST_GAP) {
                return 0;
            }
            float surprise = filter.surprise(state, line * SlopeFilter.SIZE, gap[line] + 1, d, variance);
            return Math.min(SlopeSweep.TRUNCATION, surprise) * weight(gap[line]);
        }

        @Override
        void decided(float d) {
            go(column, d);
            go(along(), d);
        }

        private void go(int line, float d) {
            if (Float.isNaN(d)) {
                gap[line] = (byte) Math.min(Sweep.WIDEST_GAP, gap[line] + 1);
                return;
            }
            int at = line * SlopeFilter.SIZE;
            int steps = gap[line] + 1;
            float variance = table.spread(table.nearest(d));
            if (steps > Sweep.WIDEST_GAP || filter.surprise(state, at, steps, d, variance) > SlopeSweep.TRUNCATION) {
                filter.begin(state, at, d, variance);
            } else {
                filter.follow(state, at, steps, d, variance, state, at);
            }
            gap[line] = 0;
        }
    }
}
