package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.photo.Region;
import iridepth.photo.SignalSource;
import java.util.ArrayList;
import java.util.List;
import java.util.function.IntFunction;
import java.util.function.LongConsumer;

/**
 * Reads the film thickness of every pixel of a photograph by maximum likelihood on a colour curve, its order chosen from the
 * neighbourhood.
 *
 * <p>Two passes over the picture, down and up again, each in bands of rows; where regions of the picture turn out to be cut off
 * from what tells their order, another way up with other orders for them. The result depends neither on the height of the
 * bands nor on the number of threads, and memory does not grow with the picture but for a few bytes a region and row. Immutable but for what it keeps of the photo
 * read last; safe for several threads.
 */
public final class FilmReader {
    private static final int BAND_PIXELS = 1 << 19;
    private static final int LEAST_BAND = 16;
    private static final int MOST_BAND = 256;
    private static final long MOST_KEPT = 512L << 20;
    private static final int MOST_CORRECTIONS = 6;

    private final ColourCurve curve;
    private final List<Region> excluded;
    private final Pins pins;
    private final int bandHeight;
    private final long kept;
    private final boolean orderChoice;
    private Indexed indexed;

    private FilmReader(ColourCurve curve, List<Region> excluded, Pins pins, int bandHeight, long kept, boolean orderChoice) {
        this.curve = curve;
        this.excluded = List.copyOf(excluded);
        this.pins = pins;
        this.bandHeight = bandHeight;
        this.kept = kept;
        this.orderChoice = orderChoice;
    }

    /**
     * A reader for films on one curve.
     *
     * @param excluded regions to leave out
     */
    public static FilmReader of(ColourCurve curve, List<Region> excluded) {
        return new FilmReader(curve, excluded, Pins.none(), 0, Math.min(MOST_KEPT, Runtime.getRuntime().maxMemory() / 4),
                true);
    }

    /** This reader with knowledge of the thickness at places. */
    public FilmReader with(Pins itsPins) {
        return new FilmReader(curve, excluded, itsPins, bandHeight, kept, orderChoice);
    }

    /** This reader with each pixel on its own: it takes its likeliest thickness, whatever its neighbours say of the order. */
    public FilmReader withoutOrderChoice() {
        return new FilmReader(curve, excluded, pins, bandHeight, kept, false);
    }

    /**
     * This reader with bands of another size, which does not change its result.
     *
     * @param rows  rows of a band
     * @param bytes how much to keep of the candidates between the passes
     */
    FilmReader inBands(int rows, long bytes) {
        return new FilmReader(curve, excluded, pins, rows, bytes, orderChoice);
    }

    /**
     * Reads a frame of a photo.
     *
     * @param photo    the signals, with as many channels as the curve
     * @param frame    which frame, 0 for the first
     * @param sink     takes the readings
     * @param progress told the number of pixels done, twice that of the picture in the end
     * @return the regions whose order is in doubt, largest first
     * @throws IllegalArgumentException if the channels do not match
     */
    public List<DoubtfulRegion> read(SignalSource photo, int frame, ReadingSink sink, LongConsumer progress) {
        if (photo.info().channels() != curve.channels()) {
            throw new IllegalArgumentException("the photo has " + photo.info().channels() + " channels where the calibration has "
                    + curve.channels());
        }
        int width = photo.info().width();
        int height = photo.info().height();
        CurveIndex index = index(photo);
        JumpPenalty penalty = JumpPenalty.of(index);
        IntFunction<Sweep> newSweep = i -> index.turnsBack() ? new SlopeSweep(index, i % 2 == 0)
                : new PathSweep(penalty, i % 2 == 0);
        int rows = bandHeight > 0 ? bandHeight : Math.max(LEAST_BAND, Math.min(MOST_BAND, BAND_PIXELS / width));
        DownwardPass down = new DownwardPass(photo, frame, rows, () -> new RowReader(photo, excluded, pins, index, orderChoice), newSweep);
        List<Band> bands = down.run(kept, progress);
        long pixels = (long) width * height;
        List<OrderCorrection> corrections = new ArrayList<>();
        while (true) {
            UpwardPass up = new UpwardPass(index, penalty, width, height, orderChoice, corrections, sink);
            up.run(bands, down, done -> progress.accept(pixels + done));
            OrderCorrection correction = up.regions().correction();
            if (correction.chains().isEmpty() || corrections.size() == MOST_CORRECTIONS) {
                return up.judge();
            }
            corrections.add(correction);
            sink.restart();
        }
    }

    /**
     * What else the colours of a photo's pixels might mean.
     *
     * @param photo the signals, with as many channels as the curve
     * @param frame which frame, 0 for the first
     */
    public OtherCandidates others(SignalSource photo, int frame) {
        return new OtherCandidates(photo, frame, () -> new RowReader(photo, excluded, Pins.none(), index(photo), true));
    }

    /** The index of a photo; the one made last is kept. */
    private synchronized CurveIndex index(SignalSource photo) {
        if (indexed == null || indexed.photo != photo) {
            indexed = new Indexed(photo, CurveIndex.of(curve, photo));
        }
        return indexed.index;
    }

    private record Indexed(SignalSource photo, CurveIndex index) {
    }

    /**
     * Reads a frame of a photo into memory.
     *
     * @param photo    the signals, with as many channels as the curve
     * @param frame    which frame, 0 for the first
     * @param progress told the number of pixels done, twice that of the picture in the end
     * @return the readings
     * @throws IllegalArgumentException if the channels do not match
     */
    public ThicknessMap read(SignalSource photo, int frame, LongConsumer progress) {
        ThicknessMap map = ThicknessMap.blank(photo.info().width(), photo.info().height());
        read(photo, frame, map.sink(), progress);
        return map;
    }
}
