package iridepth.recipe;

import iridepth.calibration.StepSignal;
import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import iridepth.planning.Forecast;
import iridepth.reading.FilmReader;
import iridepth.reading.State;
import iridepth.reading.ThicknessMap;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * Films of a photo for refining a calibration: the photo is read once, and of the pixels read in a slice around each of a series
 * of thicknesses the mean signal is taken.
 *
 * <p>The slices lie apart so that they count as independent: errors of the flat, which differ from place to place, do not average
 * out over neighbouring thicknesses.
 */
final class PhotoFilms {
    private static final double LEAST_SPACING_NM = 20;
    private static final int MOST = 24;
    private static final double HALF_SLICE_NM = 1;
    private static final int FEWEST_PIXELS = 20;
    /** The thickness of a film counts as known to no better than this, so that a first calibration's error cannot set. */
    private static final double LEAST_UNCERTAINTY_NM = 3;
    private static final double SIGMAS = 3;
    private static final int BAND = 64;
    /** Pixels of a slice in a photo still to be taken. */
    private static final int FORESEEN_PIXELS = 1000;

    private final double first;
    private final double spacing;
    private final double[][] sum;
    private final double[][] squares;
    private final double[] uncertainty;
    private final long[] count;

    private PhotoFilms(double least, double most, int channels) {
        int slices = (int) Math.min(MOST, Math.floor((most - least) / LEAST_SPACING_NM));
        this.spacing = slices == 0 ? 0 : (most - least) / slices;
        this.first = least + spacing / 2;
        this.sum = new double[slices][channels];
        this.squares = new double[slices][channels];
        this.uncertainty = new double[slices];
        this.count = new long[slices];
    }

    /**
     * The films of a photo's first frame.
     *
     * @param reader   reads it with the first calibration
     * @param channels its channels
     * @param photo    the photo
     * @return films in order of rising thickness; none where the photo shows less than about 20 nm of variation
     */
    static List<StepSignal> gather(FilmReader reader, int channels, SignalSource photo) {
        ThicknessMap map = reader.read(photo, 0, done -> { });
        float least = Float.POSITIVE_INFINITY;
        float most = Float.NEGATIVE_INFINITY;
        for (int i = 0; i < map.state().length; i++) {
            if (map.state()[i] == State.READ.code()) {
                least = Math.min(least, map.thickness()[i]);
                most = Math.max(most, map.thickness()[i]);
            }
        }
        if (!(most > least)) {
            return List.of();
        }
        PhotoFilms films = new PhotoFilms(least, most, channels);
        for (int y = 0; y < map.height(); y += BAND) {
            films.add(map, y, photo.rows(0, y, Math.min(BAND, map.height() - y)));
        }
        return films.signals();
    }

    /**
     * The films that a photo still to be taken will show.
     *
     * @param forecast what its pixels will tell
     * @param curve    the curve
     * @param noise    noise of a pixel
     * @param shown    thicknesses that it will show
     */
    static List<StepSignal> foreseen(Forecast forecast, ColourCurve curve, ChannelNoise noise, ThicknessRange shown) {
        PhotoFilms films = new PhotoFilms(shown.fromNm(), shown.toNm(), curve.channels());
        double step = forecast.thickness(1) - forecast.thickness(0);
        double[] value = new double[curve.channels()];
        double[] unused = new double[value.length];
        for (int k = 0; k < films.count.length; k++) {
            double thickness = films.first + k * films.spacing;
            curve.at(thickness, value, unused, unused);
            int at = (int) Math.max(0, Math.min(forecast.size() - 1, Math.round((thickness - forecast.thickness(0)) / step)));
            films.count[k] = FORESEEN_PIXELS;
            films.uncertainty[k] = FORESEEN_PIXELS * forecast.uncertainty(at).combinedNm();
            for (int c = 0; c < value.length; c++) {
                films.sum[k][c] = FORESEEN_PIXELS * value[c];
                films.squares[k][c] = FORESEEN_PIXELS * (value[c] * value[c] + noise.variance(c, value[c]));
            }
        }
        return films.signals();
    }

    private void add(ThicknessMap map, int top, Signal signal) {
        for (int pixel = 0; pixel < signal.width() * signal.height(); pixel++) {
            int at = top * map.width() + pixel;
            int slice = map.state()[at] == State.READ.code() ? (int) Math.round((map.thickness()[at] - first) / spacing) : -1;
            if (slice >= 0 && slice < count.length && Math.abs(map.thickness()[at] - first - slice * spacing) <= HALF_SLICE_NM) {
                count[slice]++;
                uncertainty[slice] += map.uncertainty(at);
                for (int c = 0; c < signal.channels(); c++) {
                    double v = signal.value()[pixel * signal.channels() + c];
                    sum[slice][c] += v;
                    squares[slice][c] += v * v;
                }
            }
        }
    }

    private List<StepSignal> signals() {
        List<StepSignal> films = new ArrayList<>();
        for (int k = 0; k < count.length; k++) {
            if (count[k] >= FEWEST_PIXELS) {
                double[] mean = new double[sum[k].length];
                double[] variance = new double[mean.length];
                for (int c = 0; c < mean.length; c++) {
                    mean[c] = sum[k][c] / count[k];
                    variance[c] = Math.max(0, squares[k][c] / count[k] - mean[c] * mean[c]) / count[k];
                }
                double thickness = first + k * spacing;
                double u = Math.max(LEAST_UNCERTAINTY_NM, SIGMAS * uncertainty[k] / count[k]);
                films.add(new StepSignal(String.format(Locale.ROOT, "film of the photo of about %.0f nm", thickness), thickness, u, mean,
                        variance, false));
            }
        }
        return films;
    }
}
