package iridepth.report;

/**
 * The points of a photo that a page shows: every pixel of a small photo, else the middle one of each factor x factor block, so
 * that a point always is one pixel of the map with all that was read there, and no mixture.
 *
 * @param width  pixels per row of the photo
 * @param height rows of the photo
 * @param factor pixels from one point to the next, 1 and up
 */
record PageGrid(int width, int height, int factor) {
    /** Points along a row or column at most. */
    static final int LONGEST = 1200;
    /** Points in all at most; with this the page of a noisy film stays below 8 MB. */
    static final int MOST = 700_000;

    PageGrid {
        if (width < 1 || height < 1 || factor < 1) {
            throw new IllegalArgumentException("a page needs pixels to show, not " + width + " x " + height);
        }
    }

    /** The finest grid on a photo that keeps within {@link #LONGEST} and {@link #MOST}. */
    static PageGrid of(int width, int height) {
        int factor = 1;
        PageGrid grid = new PageGrid(width, height, factor);
        while (Math.max(grid.columns(), grid.rows()) > LONGEST || (long) grid.columns() * grid.rows() > MOST) {
            grid = new PageGrid(width, height, ++factor);
        }
        return grid;
    }

    /** Column of the photo in which the points of the first column lie. */
    int firstX() {
        return Math.min(factor, width) / 2;
    }

    /** Row of the photo in which the points of the first row lie. */
    int firstY() {
        return Math.min(factor, height) / 2;
    }

    /** Points per row. */
    int columns() {
        return (width - 1 - firstX()) / factor + 1;
    }

    /** Rows of points. */
    int rows() {
        return (height - 1 - firstY()) / factor + 1;
    }

    /** Number of points. */
    int points() {
        return columns() * rows();
    }

    /**
     * Told the place of a point and where its pixel lies in a block of rows.
     */
    interface Visitor {
        /**
         * Takes a point.
         *
         * @param point row of points x columns + column
         * @param pixel row within the block x width + column of the photo
         */
        void visit(int point, int pixel);
    }

    /** Whether points lie in a row of the photo. */
    boolean shows(int y) {
        return y >= firstY() && (y - firstY()) % factor == 0;
    }

    /**
     * Visits the points that lie in a block of whole rows.
     *
     * @param firstRow row of the photo with which the block begins
     * @param lines    its rows
     */
    void visit(int firstRow, int lines, Visitor visitor) {
        int columns = columns();
        for (int line = 0; line < lines; line++) {
            if (shows(firstRow + line)) {
                int row = (firstRow + line - firstY()) / factor;
                for (int i = 0; i < columns; i++) {
                    visitor.visit(row * columns + i, line * width + firstX() + i * factor);
                }
            }
        }
    }

    /** Number of rows in a block of values of whole rows; refuses what does not fit the photo. */
    int lines(int firstRow, int values, int perPixel) {
        int lines = values / width / perPixel;
        if (lines < 1 || lines * width * perPixel != values || firstRow < 0 || lines > height - firstRow) {
            throw new IllegalArgumentException(values + " values from row " + firstRow + " on are no whole rows of a photo of "
                    + width + " x " + height);
        }
        return lines;
    }
}
