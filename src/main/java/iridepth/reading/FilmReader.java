package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.photo.Frame;
import iridepth.photo.Region;
import iridepth.photo.SignalSource;
import java.util.List;
import java.util.function.LongConsumer;
import java.util.stream.IntStream;

/**
 * Reads the film thickness of every pixel of a photograph by maximum likelihood on a colour curve.
 *
 * <p>Rows are read in bands and a band's rows in parallel; a row's result depends on nothing but its signal, so that the number
 * of threads does not matter.
 */
public final class FilmReader {
    private static final int BAND = 64;
    private final ColourCurve curve;
    private final List<Region> excluded;
    private final boolean orderChoice;

    private FilmReader(ColourCurve curve, List<Region> excluded, boolean orderChoice) {
        this.curve = curve;
        this.excluded = List.copyOf(excluded);
        this.orderChoice = orderChoice;
    }

    /**
     * A reader for films on one curve.
     *
     * @param excluded regions to leave out
     */
    public static FilmReader of(ColourCurve curve, List<Region> excluded) {
        return new FilmReader(curve, excluded, true);
    }

    /** This reader with each pixel on its own: it takes its likeliest thickness, whatever its neighbours say of the order. */
    public FilmReader withoutOrderChoice() {
        return new FilmReader(curve, excluded, false);
    }

    /**
     * Reads a frame of a photo.
     *
     * @param photo    the signals, with as many channels as the curve
     * @param frame    which frame, 0 for the first
     * @param progress told the number of pixels done, now and then
     * @throws IllegalArgumentException if the channels do not match
     */
    public ThicknessMap read(SignalSource photo, int frame, LongConsumer progress) {
        if (photo.info().channels() != curve.channels()) {
            throw new IllegalArgumentException("the photo has " + photo.info().channels() + " channels where the calibration has "
                    + curve.channels());
        }
        CurveIndex index = CurveIndex.of(curve, photo);
        int width = photo.info().width();
        int height = photo.info().height();
        ThicknessMap map = ThicknessMap.blank(width, height);
        PixelRow[] rows = new PixelRow[height];
        JumpPenalty penalty = JumpPenalty.of(index);
        PathSweep[] sweeps = new PathSweep[4];
        for (int i = 0; i < 4; i++) {
            sweeps[i] = new PathSweep(penalty, width, i % 2 == 0);
        }
        for (int y = 0; y < height; y += BAND) {
            int count = Math.min(BAND, height - y);
            Frame counts = photo.counts(frame, y, count);
            int top = y;
            ThreadLocal<RowReader> readers = ThreadLocal.withInitial(() -> new RowReader(photo, excluded, index));
            IntStream.range(0, count).parallel().forEach(row -> rows[top + row] = readers.get().read(counts, row, top + row));
            IntStream.range(0, orderChoice ? 2 : 0).parallel().forEach(i -> {
                for (int row = 0; row < count; row++) {
                    sweeps[i].advance(rows[top + row], rows[top + row].message(i));
                }
            });
            progress.accept((long) (y + count) * width);
        }
        IntStream.range(2, orderChoice ? 4 : 2).parallel().forEach(i -> {
            for (int row = height - 1; row >= 0; row--) {
                sweeps[i].advance(rows[row], rows[row].message(i));
            }
        });
        IntStream.range(0, height).parallel().forEach(row -> ReadRow.choose(rows[row], index).into(map, row));
        return map;
    }
}
