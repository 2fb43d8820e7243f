package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.photo.Region;
import iridepth.photo.SignalSource;
import java.util.Arrays;
import java.util.List;

/** The candidates of a photo's pixels that were not chosen: what else a pixel's colour might mean. */
public final class OtherCandidates {
    /** A candidate that lies closer to the chosen thickness than this is the chosen one, nm. */
    private static final float SAME_NM = 2;

    private final SignalSource photo;
    private final int frame;
    private final RowReader reader;

    private OtherCandidates(SignalSource photo, int frame, RowReader reader) {
        this.photo = photo;
        this.frame = frame;
        this.reader = reader;
    }

    /**
     * Candidates on a curve. The object serves one thread.
     *
     * @param excluded regions that are left out
     * @param frame    frame of the photo
     */
    public static OtherCandidates of(ColourCurve curve, List<Region> excluded, SignalSource photo, int frame) {
        CurveIndex index = CurveIndex.of(curve, photo);
        return new OtherCandidates(photo, frame, new RowReader(photo, excluded, Pins.none(), index, true));
    }

    /**
     * The likeliest other candidates of a row.
     *
     * @param y      the row
     * @param chosen thicknesses chosen, nm, from {@code from} on, as many as the row has pixels; NaN where not read
     * @param from   where the row begins in {@code chosen} and the result
     * @param others receives the thicknesses, nm, the likeliest first, NaN where there is none
     */
    public void row(int y, float[] chosen, int from, float[][] others) {
        PixelRow row = reader.read(photo.counts(frame, y, 1), 0, y);
        for (int noted = 0; noted < row.noted(); noted++) {
            int x = row.column()[noted];
            if (row.count(noted) > 1) {
                rank(row, noted, chosen[from + x], from + x, others);
            }
        }
    }

    private static void rank(PixelRow row, int noted, float chosen, int at, float[][] others) {
        Integer[] order = new Integer[row.count(noted)];
        Arrays.setAll(order, k -> row.start()[noted] + k);
        Arrays.sort(order, (a, b) -> Float.compare(row.cost()[a], row.cost()[b]));
        int next = 0;
        for (int k : order) {
            float nm = row.thickness()[k];
            if (next < others.length && Math.abs(nm - chosen) > SAME_NM) {
                others[next++][at] = nm;
            }
        }
    }
}
