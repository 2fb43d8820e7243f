package iridepth.reading;

/**
 * Whether a pixel in a cell may have its nearest point of the curve on a piece between two samples: its foot on the tangent at the
 * one must lie beyond that, on the tangent at the other before that, and neither tangent may be out of reach. All bounds hold for
 * the whole cell: over a cell with half-edges e the foot q . r moves by the sum of |q_i| e_i, and the distance to the tangent,
 * the root of r^T M r, by that of sqrt(M_ii) e_i at most (triangle inequality). Where the curve comes to a halt feet tell nothing.
 * Serves one thread.
 */
final class NearestPiece {
    /** Samples by which a foot may be off: the metric of the noise changes a little with the light. */
    private static final double FOOT_SLACK = 0.3;
    /** By how many standard deviations the curve may leave the tangents of a piece's samples. */
    private static final double TANGENT_SLACK = 0.4;

    private final TangentTable table;
    private final CellFrame frame;
    private final double reach;
    private final double[] residual;

    /**
     * @param frame     a frame whose axes are the channels
     * @param threshold chi-square of the farthest pixels
     */
    NearestPiece(TangentTable table, CellFrame frame, double threshold) {
        this.table = table;
        this.frame = frame;
        this.reach = Math.sqrt(threshold) + TANGENT_SLACK;
        this.residual = new double[table.channels()];
    }

    /** Whether the piece from sample k to k + 1 may hold the nearest point for a pixel in the cell at these places on the axes. */
    boolean mayLieIn(int k, int[] places) {
        for (int c = 0; c < residual.length; c++) {
            residual[c] = frame.middle(c, places[c]);
        }
        boolean isBetween = !table.isRegular(k) || (k == 0 || foot(k, 1) >= -FOOT_SLACK)
                && (k + 2 == table.size() || foot(k + 1, -1) <= FOOT_SLACK);
        return isBetween && (isInReach(k) || isInReach(k + 1));
    }

    /** The farthest foot, in samples beyond sample k, of a pixel in the cell, or with direction -1 the least far. */
    private double foot(int k, int direction) {
        double foot = 0;
        for (int c = 0; c < residual.length; c++) {
            double q = table.towards(k, c);
            foot += q * (residual[c] - table.signal(k, c)) + direction * Math.abs(q) * frame.edge(c) / 2;
        }
        return foot;
    }

    private boolean isInReach(int k) {
        double chiSquare = 0;
        double radius = 0;
        for (int i = 0; i < residual.length; i++) {
            double r = residual[i] - table.signal(k, i);
            for (int j = i; j < residual.length; j++) {
                chiSquare += table.across(k, i, j) * r * (residual[j] - table.signal(k, j));
            }
            radius += Math.sqrt(Math.max(0, table.across(k, i, i))) * frame.edge(i) / 2;
        }
        return chiSquare <= (reach + radius) * (reach + radius);
    }
}
