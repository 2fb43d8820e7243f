package iridepth.recipe;

import iridepth.colour.Light;
import iridepth.colour.Xyz;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.photo.Encoding;
import iridepth.photo.IccProfile;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoInfo;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * What a recipe makes of a photo before any pixel is read: how counts become light, and the colour curve.
 *
 * @param encoding how counts stand for light
 * @param curve    expected signal against thickness, on the scale of the photo's signal
 * @param notes    what a user should know, a line each
 */
public record Setup(Encoding encoding, ColourCurve curve, List<String> notes) {
    private static final Xyz D50 = new Xyz(0.9642, 1, 0.8249);
    private static final double[][] LUMINANCE = {{0, 1, 0}};

    /**
     * Sets up the reading of a photo whose responses the recipe itself fixes: colour-managed, or linear with sensitivities.
     *
     * @throws RecipeException if the recipe does not fix them
     * @throws PhotoException  if the photo contradicts it
     */
    public static Setup of(Recipe recipe, PhotoInfo photo) {
        List<String> notes = new ArrayList<>();
        Light light = recipe.lights().get(0);
        noteHeldTables(recipe, light, notes);
        Encoding encoding = encoding(recipe.camera(), photo);
        EffectiveResponses responses = responses(recipe, photo, encoding, light);
        View view = recipe.view().view(recipe.stack(), recipe.range().toNm());
        Stack flat = recipe.camera().flatStack();
        if (flat == null) {
            double[] factor = new double[responses.count()];
            java.util.Arrays.fill(factor, 1 / recipe.camera().whiteReflectance());
            responses = responses.scaled(factor);
        } else {
            responses = responses.relativeTo(Reflectance.of(flat, view).spectrum(0));
        }
        ColourCurve curve = ColourCurve.of(responses, Reflectance.of(recipe.stack(), view), recipe.range(),
                recipe.range().step(recipe.stack()));
        return new Setup(encoding, curve, List.copyOf(notes));
    }

    private static void noteHeldTables(Recipe recipe, Light light, List<String> notes) {
        recipe.stack().media().stream().filter(m -> m.isHeld()).distinct().forEach(m -> notes.add(String.format(
                "the index of %s is tabulated for %.0f-%.0f nm; its end value is held beyond", m.name(), m.firstNm(), m.lastNm())));
        if (light.held()) {
            notes.add("the table of the light " + light.name() + " stops short of 380-780 nm; its end value is held beyond");
        }
    }

    private static Encoding encoding(CameraSpec camera, PhotoInfo photo) {
        Optional<IccProfile> profile = photo.profile();
        if (camera.isColourManaged()) {
            return profile.isPresent() ? Encoding.of(profile.get(), photo.bitDepth()) : Encoding.srgb(photo.bitDepth());
        }
        if (profile.isPresent()) {
            throw new PhotoException(photo.path() + ": it embeds a colour profile, but the recipe says camera.encoding = \"linear\"; "
                    + "set \"srgb\" to honour the profile, or save the sensor's linear values without one");
        }
        double fullScale = Double.isNaN(camera.fullScale()) ? photo.maxCount() : camera.fullScale();
        return Encoding.linear(fullScale);
    }

    private static EffectiveResponses responses(Recipe recipe, PhotoInfo photo, Encoding encoding, Light light) {
        if (recipe.camera().isColourManaged()) {
            double[][] toXyz = encoding.toXyz().orElseThrow();
            double[][] fromXyz = photo.channels() == 1 ? LUMINANCE : EffectiveResponses.fromXyz(toXyz);
            return EffectiveResponses.colourManaged(fromXyz, D50, light);
        }
        if (recipe.camera().sensitivities() == null) {
            throw new RecipeException(recipe.file() + ": a linear photo needs camera.sensitivities, or camera.steps to find them "
                    + "from; add either");
        }
        SpectralTable table = new Tables(recipe.file()).read(recipe.camera().sensitivities().toString());
        if (table.columns().size() != photo.channels()) {
            throw new PhotoException(table.name() + ": it has " + table.columns().size() + " columns of sensitivity where the photo "
                    + photo.path() + " has " + photo.channels() + " channels");
        }
        List<Spectrum> sensitivities = table.columns().stream().map(table::spectrum).toList();
        return EffectiveResponses.ofSensor(table.columns(), sensitivities, light);
    }
}
