package iridepth.reading;

import java.util.ArrayList;
import java.util.List;

/** Gathers rows into bands for a sink. */
final class RowOutput {
    private static final int STATES_AT_ONCE = 1 << 20;

    private final ReadingSink sink;
    private final int width;
    private final List<ReadRow> rows = new ArrayList<>();
    private int top;
    private ReadRow band = ReadRow.of(0);

    RowOutput(ReadingSink sink, int width) {
        this.sink = sink;
        this.width = width;
    }

    /** Adds the row above those that have been added. */
    void add(int y, ReadRow row) {
        rows.add(row);
        top = y;
    }

    /** Hands the rows on. */
    void flush() {
        if (rows.isEmpty()) {
            return;
        }
        int count = rows.size();
        if (band.thickness().length != count * width) {
            band = ReadRow.of(count * width);
        }
        for (int i = 0; i < count; i++) {
            rows.get(count - 1 - i).copyTo(band, i * width);
        }
        rows.clear();
        sink.readings(top, band.thickness(), band.random(), band.systematic(), band.margin());
    }

    /** Hands on the states of all rows. */
    void states(Regions regions, int height) {
        int step = Math.max(1, Math.min(height, STATES_AT_ONCE / width));
        for (int y = 0; y < height; y += step) {
            byte[] state = new byte[Math.min(step, height - y) * width];
            for (int row = 0; row * width < state.length; row++) {
                regions.states(y + row, state, row * width);
            }
            sink.states(y, state);
        }
    }
}
