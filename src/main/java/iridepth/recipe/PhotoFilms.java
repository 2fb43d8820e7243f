package iridepth.recipe;

import iridepth.calibration.StepSignal;
import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Region;
import iridepth.photo.Signal;
import iridepth.photo.StripSignal;
import iridepth.planning.Forecast;
import iridepth.reading.FilmReader;
import iridepth.reading.State;
import iridepth.reading.ThicknessMap;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Films of a photo for refining a calibration: the photo is read, and of the pixels read in a slice around each of a series of
 * thicknesses the mean signal is taken.
 *
 * <p>The slices lie apart so that they count as independent: errors of the flat, which differ from place to place, do not average
 * out over neighbouring thicknesses. Where the calibration is still uncertain, pixels may have been read in a wrong order; a slice
 * there waits until the calibration has been refined on the others.
 *
 * @param films   films in order of rising thickness
 * @param waiting how many more the photo shows that cannot be trusted yet
 */
record PhotoFilms(List<StepSignal> films, int waiting) {
    private static final double LEAST_SPACING_NM = 20;
    private static final int MOST = 24;
    private static final double HALF_SLICE_NM = 1;
    /** Of the pixels, this share at each end does not count for the range of thicknesses. */
    private static final double STRAY = 5e-4;
    /** Largest systematic uncertainty of a reading that can be trusted to be of the right order, nm. */
    private static final double TRUSTED_NM = 1.5;
    private static final int BAND = 64;
    /** Pixels of a slice in a photo still to be taken. */
    private static final int FORESEEN_PIXELS = 1000;

    /** Evenly spaced slices of thickness. */
    private record Slices(double first, double spacing, int count) {
        static Slices between(double least, double most) {
            int count = (int) Math.min(MOST, Math.floor((most - least) / LEAST_SPACING_NM));
            double spacing = count == 0 ? 0 : (most - least) / count;
            return new Slices(least + spacing / 2, spacing, count);
        }

        double thickness(int slice) {
            return first + slice * spacing;
        }

        /** The slice that a thickness lies in, or -1. */
        int at(double thickness) {
            int slice = (int) Math.round((thickness - first) / spacing);
            return slice >= 0 && slice < count && Math.abs(thickness - thickness(slice)) <= HALF_SLICE_NM ? slice : -1;
        }
    }

    /**
     * The films of a photo's first frame.
     *
     * @param curve    the curve to read it on
     * @param excluded regions of the whole photo to leave out
     * @param photo    strips of the photo
     * @return the films; none where the photo shows less than about 20 nm of variation
     */
    static PhotoFilms gather(ColourCurve curve, List<Region> excluded, StripSignal photo) {
        ThicknessMap map = FilmReader.of(curve, List.of()).read(photo, 0, done -> { });
        leaveOut(map, excluded, photo);
        double[] known = new double[map.state().length];
        int count = 0;
        for (int i = 0; i < known.length; i++) {
            if (map.state()[i] == State.READ.code()) {
                known[count++] = map.thickness()[i];
            }
        }
        if (count == 0) {
            return new PhotoFilms(List.of(), 0);
        }
        Arrays.sort(known, 0, count);
        int stray = (int) (STRAY * count);
        Slices slices = Slices.between(known[stray], known[count - 1 - stray]);
        FilmSlice[] filled = new FilmSlice[slices.count];
        Arrays.setAll(filled, k -> new FilmSlice(slices.thickness(k), curve.channels()));
        for (int y = 0; y < map.height() && filled.length > 0; y += BAND) {
            fill(filled, slices, map, y, photo.rows(0, y, Math.min(BAND, map.height() - y)));
        }
        List<FilmSlice> some = Arrays.stream(filled).filter(FilmSlice::counts).toList();
        List<StepSignal> films = some.stream().filter(slice -> slice.systematicNm() <= TRUSTED_NM).map(slice -> slice.film(photo)).toList();
        return new PhotoFilms(films, some.size() - films.size());
    }

    private static void leaveOut(ThicknessMap map, List<Region> excluded, StripSignal photo) {
        for (Region region : excluded) {
            for (int y = 0; y < map.height(); y++) {
                if (photo.row(y) >= region.y() && photo.row(y) < region.y() + region.height()) {
                    Arrays.fill(map.state(), y * map.width() + Math.min(map.width(), region.x()),
                            y * map.width() + Math.min(map.width(), region.x() + region.width()), State.EXCLUDED.code());
                }
            }
        }
    }

    private static void fill(FilmSlice[] filled, Slices slices, ThicknessMap map, int top, Signal signal) {
        for (int pixel = 0; pixel < signal.width() * signal.height(); pixel++) {
            int at = top * map.width() + pixel;
            int slice = map.state()[at] == State.READ.code() ? slices.at(map.thickness()[at]) : -1;
            if (slice >= 0) {
                filled[slice].add(signal.value(), pixel, map.random()[at], map.systematic()[at]);
            }
        }
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
        Slices slices = Slices.between(shown.fromNm(), shown.toNm());
        double step = forecast.thickness(1) - forecast.thickness(0);
        List<StepSignal> films = new ArrayList<>();
        for (int k = 0; k < slices.count; k++) {
            double[] mean = new double[curve.channels()];
            double[] variance = new double[mean.length];
            curve.at(slices.thickness(k), mean, new double[mean.length], new double[mean.length]);
            Arrays.setAll(variance, c -> noise.variance(c, mean[c]) / FORESEEN_PIXELS);
            int at = (int) Math.max(0, Math.min(forecast.size() - 1, Math.round((slices.thickness(k) - forecast.thickness(0)) / step)));
            films.add(FilmSlice.film(slices.thickness(k), forecast.uncertainty(at).combinedNm(), mean, variance));
        }
        return films;
    }
}
