package iridepth.recipe;

import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.OpenPhotos;
import iridepth.photo.PhotoInfo;
import iridepth.planning.Forecast;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * A rig of which flat, and steps where it needs them, have been photographed, but no part yet: what these tell of its photos.
 *
 * @param curve      expected signal against thickness, relative to the flat, with the covariance of its systematic errors
 * @param noise      noise to expect of a pixel in the middling light of the field
 * @param noiseModel the same as read noise and full well
 * @param encoding   how counts stand for light
 */
public record MeasuredRig(ColourCurve curve, ChannelNoise noise, NoiseModel noiseModel, Encoding encoding) {
    /**
     * Reads what a recipe names.
     *
     * @param known noise of the camera in fractions of full scale; empty to take it from the steps or the flat, which is right
     *              only as far as these are single exposures like the part's, not means of several
     * @param shown thicknesses that the part's photo will show, which then refines the calibration; empty if hardly more than one
     * @return empty where the recipe names no flat, or one of its photos has not been taken yet, or nothing fixes the responses
     * @throws iridepth.photo.PhotoException if a photo that is there cannot be used
     */
    public static Optional<MeasuredRig> of(Recipe recipe, Optional<NoiseModel> known, Optional<ThicknessRange> shown) {
        CameraSpec camera = recipe.camera();
        boolean open = !camera.isColourManaged() && camera.sensitivities() == null && !camera.isCalibrated();
        Stream<Path> photos = Stream.concat(Stream.concat(camera.flats().stream(), camera.darks().stream()),
                camera.steps().stream().flatMap(step -> step.images().stream()));
        if (open || camera.flats().isEmpty() || !photos.allMatch(Files::exists)) {
            return Optional.empty();
        }
        try (OpenPhotos like = OpenPhotos.of(camera.isCalibrated() ? camera.calibrationPhotos() : camera.flats())) {
            Rig rig = Rig.of(recipe);
            PhotoInfo info = like.files().get(0).info();
            Encoding encoding = rig.encoding(info);
            NoiseModel noise = known.orElseGet(() -> rig.signal(like.files()).noise());
            double[] level = new double[info.channels() * recipe.lights().size()];
            Arrays.setAll(level, c -> rig.flats().get(c / info.channels()).orElseThrow().mean(c % info.channels()));
            ChannelNoise pixel = ChannelNoise.of(noise, encoding, level);
            Setup setup = Setup.of(rig, info);
            ColourCurve curve = shown.map(range -> {
                Forecast first = Forecast.of(setup.curve(), pixel, Forecast.USUAL_LIMIT);
                return setup.foreseen(rig, info, PhotoFilms.foreseen(first, setup.curve(), pixel, range)).curve();
            }).orElse(setup.curve());
            return Optional.of(new MeasuredRig(curve, pixel, noise, encoding));
        }
    }
}
