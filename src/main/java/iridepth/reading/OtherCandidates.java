package iridepth.reading;

import iridepth.photo.SignalSource;
import java.util.function.Supplier;

/** The candidates of a photo's pixels that were not chosen: what else a pixel's colour might mean. */
public final class OtherCandidates {
    /** A candidate that lies closer to the chosen thickness than this is the chosen one, nm. */
    private static final float SAME_NM = 2;

    private final SignalSource photo;
    private final int frame;
    private final ThreadLocal<RowReader> readers;

    OtherCandidates(SignalSource photo, int frame, Supplier<RowReader> newReader) {
        this.photo = photo;
        this.frame = frame;
        this.readers = ThreadLocal.withInitial(newReader);
    }

    /**
     * The likeliest other candidates of some pixels of a row. Several threads may ask at the same time.
     *
     * @param y      the row
     * @param firstX column of the first of the pixels
     * @param step   columns from one to the next
     * @param chosen thicknesses chosen, nm, from {@code from} on, as many as the row has pixels; NaN where not read
     * @param from   where the row begins in {@code chosen} and the result
     * @param others receives the thicknesses, nm, the likeliest first; where there is none it is left as it is
     */
    public void row(int y, int firstX, int step, float[] chosen, int from, float[][] others) {
        PixelRow row = readers.get().read(photo.counts(frame, y, 1), 0, y, firstX, step);
        for (int noted = 0; noted < row.noted(); noted++) {
            int x = row.column()[noted];
            if (row.count(noted) > 1) {
                rank(row, noted, chosen[from + x], from + x, others);
            }
        }
    }

    private static void rank(PixelRow row, int noted, float chosen, int at, float[][] others) {
        float[] cost = new float[others.length];
        int found = 0;
        for (int k = row.start()[noted]; k < row.start()[noted + 1]; k++) {
            if (Math.abs(row.thickness()[k] - chosen) > SAME_NM) {
                int place = found;
                while (place > 0 && cost[place - 1] > row.cost()[k]) {
                    place--;
                }
                if (place < others.length) {
                    found = Math.min(others.length, found + 1);
                    for (int n = found - 1; n > place; n--) {
                        cost[n] = cost[n - 1];
                        others[n][at] = others[n - 1][at];
                    }
                    cost[place] = row.cost()[k];
                    others[place][at] = row.thickness()[k];
                }
            }
        }
    }
}
