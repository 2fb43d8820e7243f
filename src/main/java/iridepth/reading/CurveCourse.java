package iridepth.reading;

/**
 * Where runs of the curve are straight: a pixel within rho, the root of the threshold, of its nearest point sees one minimum of
 * chi-square along them.
 *
 * <p>In the metric of the noise and by arc length, half the second derivative of chi-square is 1 - k n . r, with k the
 * curvature, n the normal and r the residual. Two minima within the threshold would lie no more than 2 rho apart, and, where
 * the run turns by less than a radian in all, by little more along the curve; half way between them n . r < rho + k rho^2 / 2,
 * so that chi-square is convex there where k rho (1 + k rho / 2) < 1. And the curve must not come to a halt in between, as that
 * of one channel does at each extremum.
 */
final class CurveCourse implements CellRuns.Course {
    /** Share of the highest speed below which the curve comes to a halt. */
    private static final double SLOW = 0.3;
    private static final double TURNING = 1;
    /** Bound of the curvature condition, less than 1 since a run turns away from its chord. */
    private static final double CONVEX = 0.9;

    private final TangentTable table;
    private final double reach;

    CurveCourse(TangentTable table, double threshold) {
        this.table = table;
        this.reach = Math.sqrt(threshold);
    }

    @Override
    public boolean isSmooth(int first, int last) {
        double slowest = Double.POSITIVE_INFINITY;
        double fastest = 0;
        double bent = 0;
        for (int k = first; k <= last; k++) {
            double speed = Math.sqrt(table.information(k));
            slowest = Math.min(slowest, speed);
            fastest = Math.max(fastest, speed);
            bent = Math.max(bent, table.curvature(k) * reach);
        }
        return slowest > SLOW * fastest && bent * (1 + bent / 2) < CONVEX;
    }

    @Override
    public int straightUpTo(int first, int last) {
        double turning = 0;
        for (int k = first; k < last; k++) {
            turning += Math.sqrt(table.information(k)) * table.curvature(k);
            if (turning > TURNING) {
                return k;
            }
        }
        return last;
    }

    @Override
    public float slowness(int first, int last) {
        double fastest = 0;
        for (int k = first; k <= last; k++) {
            fastest = Math.max(fastest, Math.sqrt(table.information(k)));
        }
        return (float) (1 / fastest);
    }
}
