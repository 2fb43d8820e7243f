package iridepth.photo;

import java.util.ArrayList;
import java.util.List;

/** A few bands of rows spread evenly over a photo: a sample for statistics that need not see all of it. */
final class Bands {

    /**
     * @param y first row
     * @param frame its rows
     */
    record Band(int y, Frame frame) {
    }

    /** Samples (pixels x channels) read at most, about. */
    private static final int MOST_SAMPLES = 3_000_000;
    private static final int ROWS = 32;
    /** Bands begin where blocks of JPEG files begin. */
    private static final int ALIGNMENT = 16;

    private Bands() {
    }

    /** The whole photo where it is small, else bands of 32 rows. */
    static List<Band> sample(PhotoFile photo) {
        PhotoInfo info = photo.info();
        long rowSamples = (long) info.width() * info.channels();
        int all = (info.height() + ROWS - 1) / ROWS;
        int wanted = (int) Math.max(4, MOST_SAMPLES / (rowSamples * ROWS));
        if (wanted >= all) {
            return List.of(new Band(0, photo.all()));
        }
        List<Band> bands = new ArrayList<>();
        for (int i = 0; i < wanted; i++) {
            int y = (int) ((long) (info.height() - ROWS) * i / (wanted - 1)) / ALIGNMENT * ALIGNMENT;
            bands.add(new Band(y, photo.rows(y, ROWS)));
        }
        return bands;
    }
}
