package iridepth.recipe;

import iridepth.curve.ColourCurve;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.photo.ShadingField;
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
     * @return empty where the recipe names no flat, or one of its photos has not been taken yet, or nothing fixes the responses
     * @throws iridepth.photo.PhotoException if a photo that is there cannot be used
     */
    public static Optional<MeasuredRig> of(Recipe recipe, Optional<NoiseModel> known) {
        CameraSpec camera = recipe.camera();
        boolean open = !camera.isColourManaged() && camera.sensitivities() == null && camera.steps().isEmpty();
        if (open || camera.flat() == null || !Stream.concat(Stream.of(camera.flat(), camera.dark()), camera.steps().stream()
                .map(CameraSpec.Step::image)).allMatch(file -> file == null || Files.exists(file))) {
            return Optional.empty();
        }
        Path like = camera.steps().isEmpty() ? camera.flat() : camera.steps().get(0).image();
        try (PhotoFile photo = PhotoFile.open(like)) {
            Rig rig = Rig.of(recipe);
            Encoding encoding = rig.encoding(photo.info());
            NoiseModel noise = known.orElseGet(() -> rig.signal(photo).noise());
            ShadingField flat = rig.flat().orElseThrow();
            double[] level = new double[photo.info().channels()];
            Arrays.setAll(level, flat::mean);
            ColourCurve curve = Setup.of(rig, photo.info()).curve();
            return Optional.of(new MeasuredRig(curve, ChannelNoise.of(noise, encoding, level), noise, encoding));
        }
    }
}
