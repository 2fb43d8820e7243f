package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * A grid over channel space that tells for every cell which runs of the curve can lie within the chi-square threshold of a
 * pixel in it.
 *
 * <p>chi^2 = r^T C^-1 r bounds a weighted sum of residuals, |w^T r| <= sqrt(chi^2 w^T C w) (Cauchy and Schwarz), so that the
 * curve between two samples can only explain pixels in the box around it whose half-widths are these bounds, widened by how far
 * the curve leaves its chord. Every cell that such a box touches lists the piece. A pixel outside the grid has no candidates.
 */
final class CurveCells {
    /** Edge of a cell in half-widths of the boxes. */
    private static final double EDGE = 0.5;
    private static final int[] MOST_CELLS = {8192, 512, 128};

    private final CellFrame frame;
    /** [cell]: where its runs begin, one more entry at the end. */
    private final int[] start;
    /** The runs; see {@link #runs()}. */
    private final int[] runs;

    private CurveCells(CellFrame frame, int[] start, int[] runs) {
        this.frame = frame;
        this.start = start;
        this.runs = runs;
    }

    /**
     * Builds the grid.
     *
     * @param light     the least light that a pixel has, where noise is greatest
     * @param table     the samples to which runs refer
     * @param threshold chi-square of the farthest candidates
     */
    static CurveCells of(ColourCurve curve, ExpectedNoise noise, double light, TangentTable table, double threshold) {
        CellAxes axes = CellAxes.of(curve, noise);
        CurveBoxes boxes = CurveBoxes.of(curve, noise, light, table, axes, threshold);
        double[] edge = new double[axes.count()];
        for (int i = 0; i < edge.length; i++) {
            double finest = (boxes.most(i) - boxes.least(i)) / MOST_CELLS[edge.length - 1];
            edge[i] = Math.max(EDGE * boxes.halfWidth(i), finest);
        }
        CellFrame frame = new CellFrame(axes, boxes.least(), boxes.most(), edge);
        CellRuns lists = new CellRuns(frame.size());
        NearestPiece nearest = axes.plain() ? new NearestPiece(table, frame, threshold) : null;
        for (int k = 0; k + 1 < table.size(); k++) {
            mark(frame, boxes, k, nearest, lists);
        }
        CellRuns.PackedRuns packed = new CellRuns.PackedRuns(frame.size());
        lists.pack(new CurveCourse(table, threshold), packed);
        return new CurveCells(frame, packed.start(), packed.runs());
    }

    private static void mark(CellFrame frame, CurveBoxes boxes, int k, NearestPiece nearest, CellRuns lists) {
        int[] first = new int[CellAxes.MOST];
        int[] last = new int[CellAxes.MOST];
        for (int i = 0; i < boxes.axes(); i++) {
            first[i] = frame.place(i, boxes.low(k, i));
            last[i] = frame.place(i, boxes.high(k, i));
        }
        int[] at = new int[CellAxes.MOST];
        for (at[0] = first[0]; at[0] <= last[0]; at[0]++) {
            for (at[1] = first[1]; at[1] <= last[1]; at[1]++) {
                for (at[2] = first[2]; at[2] <= last[2]; at[2]++) {
                    if (nearest == null || nearest.mayLieIn(k, at)) {
                        lists.add((at[0] * frame.size(1) + at[1]) * frame.size(2) + at[2], k);
                    }
                }
            }
        }
    }

    /** The cell of a pixel whose values begin at a place, or -1 outside the grid. */
    int cell(float[] values, int at) {
        return frame.cell(values, at);
    }

    /** Where the runs of a cell begin in {@link #runs}; those of cell + 1 begin where they end. */
    int start(int cell) {
        return start[cell];
    }

    /** {@link CellRuns#PACKED} values a run: first and last sample, the first as its complement where it is not straight. */
    int[] runs() {
        return runs;
    }
}
