package iridepth.report;

/**
 * A thickness map reduced to a picture's size while it is being read: cells of factor x factor pixels with the mean of the
 * thicknesses in them and the count of every state. Rows may come in any order and from several threads; the sums are whole
 * numbers, so that the order leaves no trace. Memory depends on the number of cells alone.
 */
public final class MapCells {
    /** Thickness is summed in units of 1/1024 nm. */
    private static final double UNITS_PER_NM = 1024;
    private static final int STATES = StateStyle.values().length;

    private final int width;
    private final int height;
    private final int factor;
    private final int columns;
    private final int rows;
    private final long[] sum;
    /** [cell * STATES + code]. */
    private final short[] count;

    private MapCells(int width, int height, int factor) {
        this.width = width;
        this.height = height;
        this.factor = factor;
        this.columns = (width + factor - 1) / factor;
        this.rows = (height + factor - 1) / factor;
        this.sum = new long[columns * rows];
        this.count = new short[columns * rows * STATES];
    }

    /**
     * Cells for a map.
     *
     * @param width  pixels per row
     * @param height rows
     * @param most   how many cells a row or column may have at most
     * @throws IllegalArgumentException if the map is empty, or a cell would hold more than 32767 pixels
     */
    public static MapCells of(int width, int height, int most) {
        if (width < 1 || height < 1 || most < 1) {
            throw new IllegalArgumentException("a map needs pixels, not " + width + " x " + height + " shown by " + most);
        }
        int factor = (Math.max(width, height) - 1) / most + 1;
        if (factor * (long) factor > Short.MAX_VALUE) {
            throw new IllegalArgumentException("a map of " + width + " x " + height + " pixels is too large for a picture of "
                    + most);
        }
        return new MapCells(width, height, factor);
    }

    /**
     * Adds whole rows.
     *
     * @param firstRow row of the first value
     * @param nm       rows x width thicknesses; looked at where the state has a thickness
     * @param state    as many codes of {@link StateStyle}
     * @throws IllegalArgumentException if they are no whole rows of the map, or a pixel that should have a thickness has none
     */
    public synchronized void add(int firstRow, float[] nm, byte[] state) {
        int lines = nm.length / width;
        if (nm.length != state.length || lines * width != nm.length || firstRow < 0 || lines > height - firstRow) {
            throw new IllegalArgumentException(nm.length + " thicknesses and " + state.length + " states from row " + firstRow
                    + " on are no whole rows of a map of " + width + " x " + height);
        }
        for (int i = 0; i < lines; i++) {
            int base = (firstRow + i) / factor * columns;
            for (int x = 0; x < width; x++) {
                int cell = base + x / factor;
                int code = StateStyle.of(state[i * width + x]).code();
                count[cell * STATES + code]++;
                if (code <= StateStyle.ORDER_DOUBTFUL.code()) {
                    sum[cell] += units(nm[i * width + x]);
                }
            }
        }
    }

    private static long units(float nm) {
        if (!Float.isFinite(nm)) {
            throw new IllegalArgumentException("a pixel is said to be read but its thickness is " + nm);
        }
        return Math.round(nm * UNITS_PER_NM);
    }

    int width() {
        return width;
    }

    int height() {
        return height;
    }

    /** Pixels along the edge of a cell. */
    int factor() {
        return factor;
    }

    int columns() {
        return columns;
    }

    int rows() {
        return rows;
    }

    /** State of most pixels of a cell: first whether they have a thickness, then which of these or the other states. */
    StateStyle state(int cell) {
        int base = cell * STATES;
        int others = 0;
        int common = STATES - 1;
        for (int code = STATES - 1; code > StateStyle.ORDER_DOUBTFUL.code(); code--) {
            others += count[base + code];
            common = count[base + code] > count[base + common] ? code : common;
        }
        int having = having(cell);
        if (having == 0 || having < others) {
            return StateStyle.of(common);
        }
        return 2 * count[base + StateStyle.ORDER_DOUBTFUL.code()] > having ? StateStyle.ORDER_DOUBTFUL : StateStyle.READ;
    }

    private int having(int cell) {
        return count[cell * STATES + StateStyle.READ.code()] + count[cell * STATES + StateStyle.ORDER_DOUBTFUL.code()];
    }

    /** Mean thickness of a cell's pixels that have one, nm; NaN if none has. */
    double mean(int cell) {
        int having = having(cell);
        return having == 0 ? Double.NaN : sum[cell] / UNITS_PER_NM / having;
    }

    /** How many pixels of the whole map have each state, by code. */
    long[] total() {
        long[] total = new long[STATES];
        for (int i = 0; i < count.length; i++) {
            total[i % STATES] += count[i];
        }
        return total;
    }
}
