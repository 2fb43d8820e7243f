package iridepth.reading;

/** Where the cells of a grid over channel space lie. */
final class CellFrame {
    private final CellAxes axes;
    private final boolean plain;
    private final float[] from;
    private final float[] perUnit;
    private final int[] cells;

    /**
     * @param axes the axes of the grid
     * @param from least value on each axis
     * @param to   largest value on each axis
     * @param edge edge of a cell on each axis
     */
    CellFrame(CellAxes axes, double[] from, double[] to, double[] edge) {
        this.axes = axes;
        this.plain = axes.plain();
        this.from = new float[axes.count()];
        this.perUnit = new float[axes.count()];
        this.cells = new int[axes.count()];
        for (int i = 0; i < cells.length; i++) {
            this.from[i] = (float) (from[i] - edge[i]);
            this.perUnit[i] = (float) (1 / edge[i]);
            this.cells[i] = (int) ((to[i] - from[i]) / edge[i]) + 3;
        }
    }

    /** Number of cells. */
    int size() {
        int size = 1;
        for (int count : cells) {
            size *= count;
        }
        return size;
    }

    /** Number of cells along an axis; 1 along one that the grid does not have. */
    int size(int axis) {
        return axis < cells.length ? cells[axis] : 1;
    }

    /** Edge of a cell along an axis. */
    double edge(int axis) {
        return 1 / perUnit[axis];
    }

    /** Middle of the cells at a place along an axis. */
    double middle(int axis, int place) {
        return from[axis] + (place + 0.5) / perUnit[axis];
    }

    /** Place of a value along an axis, held inside the grid. */
    int place(int axis, double value) {
        return Math.max(0, Math.min(cells[axis] - 1, (int) ((value - from[axis]) * perUnit[axis])));
    }

    /** The cell of a pixel whose values begin at a place, or -1 outside the grid. */
    int cell(float[] values, int at) {
        int cell = 0;
        for (int i = 0; i < cells.length; i++) {
            float value = plain ? values[at + i] : weighted(axes.weight()[i], values, at);
            float place = (value - from[i]) * perUnit[i];
            if (!(place >= 0 && place < cells[i])) {
                return -1;
            }
            cell = cell * cells[i] + (int) place;
        }
        return cell;
    }

    private static float weighted(double[] weight, float[] values, int at) {
        double sum = 0;
        for (int c = 0; c < weight.length; c++) {
            sum += weight[c] * values[at + c];
        }
        return (float) sum;
    }
}
