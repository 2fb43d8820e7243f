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
        for (int k = first; k <= last; k++) {
            double bent = table.curvature(k) * reach;
            if (bent * (1 + bent / 2) >= CONVEX || k < last && !table.isRegular(k)) {
                return false;
            }
        }
        return true;
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
}
