package iridepth.report;

import java.util.Arrays;
import java.util.BitSet;

/**
 * The readings that a page shows, gathered while a map is being read. Rows may come in any order and from several threads.
 * Of a map of more than 700 000 pixels, or more than 1200 in a row or column, one pixel of each block is kept, the middle one,
 * with exactly what was read there; memory is bounded accordingly. States are counted over all pixels.
 */
public final class PageMap {
    private static final int STATES = StateStyle.values().length;

    private final PageGrid grid;
    private final double pixelUm;
    private final float[] thickness;
    private final float[] uncertainty;
    private final float[][] alternatives;
    private final byte[] state;
    private final long[] total = new long[STATES];
    private final BitSet rows = new BitSet();

    private PageMap(PageGrid grid, double pixelUm, int alternatives) {
        this.grid = grid;
        this.pixelUm = pixelUm;
        this.thickness = empty();
        this.uncertainty = empty();
        this.alternatives = new float[alternatives][];
        Arrays.setAll(this.alternatives, k -> empty());
        this.state = new byte[grid.points()];
    }

    private float[] empty() {
        float[] values = new float[grid.points()];
        Arrays.fill(values, Float.NaN);
        return values;
    }

    /**
     * An empty map to be filled.
     *
     * @param width        pixels per row
     * @param height       rows
     * @param pixelUm      edge of a pixel in um, or NaN if unknown
     * @param alternatives how many other candidates a pixel may have, 0 to 3
     * @throws IllegalArgumentException if the map is empty, the pixel size not above 0, or the alternatives more than 3
     */
    public static PageMap of(int width, int height, double pixelUm, int alternatives) {
        if (pixelUm <= 0 || Double.isInfinite(pixelUm)) {
            throw new IllegalArgumentException("a pixel size of " + pixelUm + " um: give one above 0, or NaN if unknown");
        }
        if (alternatives < 0 || alternatives > 3) {
            throw new IllegalArgumentException(alternatives + " other candidates per pixel: a page shows 0 to 3");
        }
        return new PageMap(PageGrid.of(width, height), pixelUm, alternatives);
    }

    /**
     * Adds whole rows.
     *
     * @param firstRow row of the first value
     * @param nm       rows x width thicknesses, nm; looked at where the state has a thickness
     * @param sigma    as many standard uncertainties, nm; NaN where unknown
     * @param codes    as many codes of {@link StateStyle}
     * @param others   as many thicknesses of other candidates, nm, NaN where there is none; one array for each of them
     * @throws IllegalArgumentException if they are no whole rows, a code is unknown, or a pixel said to be read has no thickness
     */
    public synchronized void add(int firstRow, float[] nm, float[] sigma, byte[] codes, float[]... others) {
        int lines = grid.lines(firstRow, nm.length, 1);
        if (sigma.length != nm.length || codes.length != nm.length || others.length != alternatives.length
                || Arrays.stream(others).anyMatch(a -> a.length != nm.length)) {
            throw new IllegalArgumentException("thickness, uncertainty, state and " + alternatives.length
                    + " other candidates must come for the same pixels");
        }
        for (byte code : codes) {
            total[StateStyle.of(code).code()]++;
        }
        grid.visit(firstRow, lines, (point, pixel) -> {
            state[point] = codes[pixel];
            if (StateStyle.of(codes[pixel]).hasThickness()) {
                if (!Float.isFinite(nm[pixel])) {
                    throw new IllegalArgumentException("a pixel is said to be read but its thickness is " + nm[pixel]);
                }
                thickness[point] = nm[pixel];
                uncertainty[point] = sigma[pixel];
                for (int k = 0; k < others.length; k++) {
                    alternatives[k][point] = others[k][pixel];
                }
            }
        });
        rows.set(firstRow, firstRow + lines);
    }

    /** Refuses a map of which rows are missing, since they would look as if they had been read. */
    synchronized PageMap complete() {
        int missing = rows.nextClearBit(0);
        if (missing < grid.height()) {
            throw new IllegalStateException("row " + missing + " of the map has not been added");
        }
        return this;
    }

    PageGrid grid() {
        return grid;
    }

    /** Edge of a pixel, um; NaN if unknown. */
    double pixelUm() {
        return pixelUm;
    }

    /** Thickness of every point, nm; NaN where there is none. */
    float[] thickness() {
        return thickness;
    }

    /** Standard uncertainty of every point, nm. */
    float[] uncertainty() {
        return uncertainty;
    }

    /** Other candidates of every point, nm. */
    float[][] alternatives() {
        return alternatives;
    }

    /** State of every point. */
    byte[] state() {
        return state;
    }

    /** How many pixels of the whole map have each state, by code. */
    long[] total() {
        return total.clone();
    }
}
