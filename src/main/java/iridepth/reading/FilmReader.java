package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.photo.Region;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import java.util.Arrays;
import java.util.List;
import java.util.function.LongConsumer;
import java.util.stream.IntStream;
import org.apache.commons.math3.distribution.ChiSquaredDistribution;

/**
 * Reads the film thickness of every pixel of a photograph by maximum likelihood on a colour curve.
 *
 * <p>Rows are read in bands and a band's rows in parallel; a row's result depends on nothing but its signal, so that the number
 * of threads does not matter.
 */
public final class FilmReader {
    private static final int BAND = 64;
    /** Share of good pixels that the off-curve test gives up. */
    private static final double OFF_CURVE_PROBABILITY = 1e-4;
    /** A channel is dark when its signal is within so many standard deviations of none. */
    private static final double DARK_SIGMAS = 3;

    private final ColourCurve curve;
    private final List<Region> excluded;
    private final double threshold;

    private FilmReader(ColourCurve curve, List<Region> excluded) {
        this.curve = curve;
        this.excluded = List.copyOf(excluded);
        int freedom = Math.max(1, curve.channels() - 1);
        this.threshold = new ChiSquaredDistribution(freedom).inverseCumulativeProbability(1 - OFF_CURVE_PROBABILITY);
    }

    /**
     * A reader for films on one curve.
     *
     * @param excluded regions to leave out
     */
    public static FilmReader of(ColourCurve curve, List<Region> excluded) {
        return new FilmReader(curve, excluded);
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
        double[] range = photo.lightRange();
        CurveIndex index = CurveIndex.of(curve, photo::variance, LightLevels.of(range[0], range[1]), threshold);
        ThicknessMap map = ThicknessMap.blank(photo.info().width(), photo.info().height());
        for (int y = 0; y < photo.info().height(); y += BAND) {
            int rows = Math.min(BAND, photo.info().height() - y);
            Signal signal = photo.rows(frame, y, rows);
            int top = y;
            IntStream.range(0, rows).parallel().forEach(row -> readRow(index, signal, row, top + row, map));
            progress.accept((long) (y + rows) * photo.info().width());
        }
        return map;
    }

    private void readRow(CurveIndex index, Signal signal, int row, int y, ThicknessMap map) {
        CandidateSearch search = new GridSearch(index);
        CandidateRow candidates = new CandidateRow(map.width());
        boolean[] out = excludedColumns(y, map.width());
        for (int x = 0; x < map.width(); x++) {
            int target = y * map.width() + x;
            int pixel = row * map.width() + x;
            if (out[x]) {
                continue;
            }
            if (clipped(signal, pixel)) {
                map.state()[target] = State.CLIPPED.code();
                continue;
            }
            int level = index.levels().level(signal.light()[pixel]);
            candidates.clear();
            search.find(signal.value(), signal.limit(), pixel, level, candidates);
            if (candidates.size() == 0) {
                map.state()[target] = (dark(index, signal, pixel) ? State.DARK : State.OFF_CURVE).code();
                continue;
            }
            int best = 0;
            for (int k = 1; k < candidates.size(); k++) {
                best = candidates.cost(k) < candidates.cost(best) ? k : best;
            }
            float d = candidates.thickness(best);
            TangentTable table = index.tables()[level];
            map.thickness()[target] = d;
            map.random()[target] = table.random(table.nearest(d));
            map.systematic()[target] = table.systematic(table.nearest(d));
            map.state()[target] = State.READ.code();
        }
    }

    private boolean[] excludedColumns(int y, int width) {
        boolean[] out = new boolean[width];
        for (Region region : excluded) {
            if (y >= region.y() && y < region.y() + region.height()) {
                Arrays.fill(out, Math.min(width, Math.max(0, region.x())),
                        Math.min(width, Math.max(0, region.x() + region.width())), true);
            }
        }
        return out;
    }

    private boolean clipped(Signal signal, int pixel) {
        for (int c = 0; c < curve.channels(); c++) {
            if (signal.limit()[pixel * curve.channels() + c] <= 0) {
                return false;
            }
        }
        return true;
    }

    private boolean dark(CurveIndex index, Signal signal, int pixel) {
        for (int c = 0; c < curve.channels(); c++) {
            int at = pixel * curve.channels() + c;
            if (signal.value()[at] > DARK_SIGMAS * Math.sqrt(index.noise().variance(c, 0, signal.light()[pixel]))) {
                return false;
            }
        }
        return true;
    }
}
