package iridepth.recipe;

import iridepth.calibration.Calibration;
import iridepth.calibration.FitInput;
import iridepth.calibration.IndexPrior;
import iridepth.calibration.InputUncertainty;
import iridepth.calibration.ResponseFit;
import iridepth.calibration.StepSignal;
import iridepth.colour.Light;
import iridepth.colour.Xyz;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.optics.View;
import iridepth.photo.Encoding;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoInfo;
import iridepth.photo.SignalSource;
import iridepth.photo.StripSignal;
import iridepth.reading.FilmReader;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;

/**
 * What a recipe makes of the photos of a rig: the channels' responses and the colour curve.
 *
 * @param view        the quadrature over directions
 * @param curve       expected signal against thickness, on the scale of the photo's signal
 * @param calibration what the steps say of the responses, empty where the recipe itself fixes them
 */
public record Setup(View view, ColourCurve curve, Optional<Calibration> calibration) {
    /** White of the ICC profile connection space (ISO 15076-1). */
    private static final Xyz D50 = new Xyz(0.9642, 1, 0.8249);
    /** Pixels that are enough to refine a calibration on. */
    private static final int REFINING_PIXELS = 1 << 19;
    private static final int MOST_ROUNDS = 6;
    private static final double[][] LUMINANCE = {{0, 1, 0}};

    /**
     * The set-up for a photo of a rig: from its steps or target where the recipe has any, else from what it states.
     *
     * @param photo one of the photos, where several are read jointly
     * @throws RecipeException if the recipe does not fix the responses, or its steps cannot
     * @throws PhotoException  if a photo or a table contradicts it
     */
    public static Setup of(Rig rig, PhotoInfo photo) {
        return rig.recipe().camera().isCalibrated() ? calibrated(rig, photo)
                : known(rig.recipe(), photo, rig.encoding(photo));
    }

    /** The set-up with a calibration that has been made before. */
    public static Setup of(Recipe recipe, Calibration calibration) {
        ColourCurve curve = calibration.curve(recipe.range(), recipe.range().step(recipe.stack()));
        return new Setup(calibration.view(), curve, Optional.of(calibration));
    }

    /** A reader of films on this curve, for a photo of a recipe. */
    public FilmReader reader(Recipe recipe, PhotoInfo photo) {
        return FilmReader.of(curve, recipe.excluded()).with(recipe.pins().pins(photo));
    }

    private static Setup calibrated(Rig rig, PhotoInfo photo) {
        Recipe recipe = rig.recipe();
        FitInput input = input(rig, photo);
        try {
            return of(recipe, ResponseFit.fit(input));
        } catch (IllegalArgumentException e) {
            throw new RecipeException(recipe.file() + ": camera.steps: " + e.getMessage());
        }
    }

    /**
     * This set-up with its calibration refined on the films that a photo shows, or itself where there is no calibration or nothing
     * to refine it on. Refined again until all films can be trusted, a few times at most: even where no more of them can, the
     * readings on which they rest become better.
     */
    public Setup refined(Rig rig, SignalSource photo) {
        if (calibration.isEmpty()) {
            return this;
        }
        FitInput input = input(rig, photo.parts().get(0).info());
        StripSignal strips = StripSignal.of(photo, REFINING_PIXELS);
        Setup refined = this;
        for (int round = 0; round < MOST_ROUNDS; round++) {
            PhotoFilms shown = PhotoFilms.gather(refined.curve, rig.recipe().excluded(), strips);
            if (shown.films().isEmpty()) {
                break;
            }
            refined = of(rig.recipe(), ResponseFit.refine(input, calibration.get(), shown.films()));
            if (shown.waiting() == 0) {
                break;
            }
        }
        return refined;
    }

    /** This set-up as films of a photo still to be taken will refine it. */
    Setup foreseen(Rig rig, PhotoInfo photo, List<StepSignal> films) {
        return calibration.map(first -> of(rig.recipe(), ResponseFit.refine(input(rig, photo), first, films))).orElse(this);
    }

    private static FitInput input(Rig rig, PhotoInfo photo) {
        Recipe recipe = rig.recipe();
        CameraSpec camera = recipe.camera();
        View view = recipe.view().view(recipe.stack(), recipe.range().toNm());
        List<String> channels = photo.channels() == 1 ? List.of("grey") : List.of("red", "green", "blue");
        List<StepSignal> steps = Steps.measure(rig, channels.size());
        List<String> names = new ArrayList<>();
        List<Light> lights = new ArrayList<>();
        for (Light light : recipe.lights()) {
            for (String channel : channels) {
                names.add(recipe.lights().size() == 1 ? channel : channel + ", " + light.name());
                lights.add(light);
            }
        }
        try {
            FitInput input = FitInput.of(names, lights.get(0), recipe.stack(), Optional.ofNullable(camera.flatStack()), view,
                    recipe.range(), steps).withLights(lights);
            if (camera.target() != null) {
                input = input.withPatches(camera.target().measure(rig, channels.size()));
            }
            if (recipe.inputs().isPresent()) {
                input = input.withInputs(recipe.inputs().get());
            }
            if (recipe.fitIndex()) {
                input = input.withIndexFitted(IndexPrior.DEFAULT);
            }
            return camera.sensitivities() == null ? input : input.withSensitivities(sensitivities(recipe, photo));
        } catch (IllegalArgumentException e) {
            throw new RecipeException(recipe.file() + ": camera.steps: " + e.getMessage());
        }
    }

    /**
     * The set-up where the recipe itself fixes the responses: a colour-managed file, or a sensor of known sensitivities. Systematic
     * errors enter only as far as the recipe states how well its inputs are known.
     *
     * @throws RecipeException if the recipe does not fix them
     * @throws PhotoException  if the photo or a table contradicts it
     */
    public static Setup known(Recipe recipe, PhotoInfo photo, Encoding encoding) {
        Function<Light, EffectiveResponses> responses = light -> responses(recipe, photo, encoding, light);
        KnownCurve known = new KnownCurve(recipe, responses);
        return new Setup(known.view(), known.curve(recipe.inputs().orElse(InputUncertainty.NONE)), Optional.empty());
    }

    private static EffectiveResponses responses(Recipe recipe, PhotoInfo photo, Encoding encoding, Light light) {
        CameraSpec camera = recipe.camera();
        if (camera.isColourManaged()) {
            double[][] toXyz = encoding.toXyz().orElseThrow();
            double[][] fromXyz = photo.channels() == 1 ? LUMINANCE : EffectiveResponses.fromXyz(toXyz);
            return EffectiveResponses.colourManaged(fromXyz, D50, light);
        }
        if (camera.sensitivities() == null) {
            throw new RecipeException(recipe.file() + ": a linear photo needs camera.sensitivities, or camera.steps to find them "
                    + "from; add either");
        }
        SpectralTable table = table(recipe, photo);
        return EffectiveResponses.ofSensor(table.columns(), table.columns().stream().map(table::spectrum).toList(), light);
    }

    /** Sensitivity of each channel under each light. */
    private static List<Spectrum> sensitivities(Recipe recipe, PhotoInfo photo) {
        SpectralTable table = table(recipe, photo);
        return recipe.lights().stream().flatMap(light -> table.columns().stream()).map(table::spectrum).toList();
    }

    private static SpectralTable table(Recipe recipe, PhotoInfo photo) {
        CameraSpec camera = recipe.camera();
        SpectralTable table = new Tables(recipe.file()).read(camera.sensitivities().toString());
        if (table.columns().size() != photo.channels()) {
            throw new PhotoException(table.name() + ": it has " + table.columns().size() + " columns of sensitivity where the photo "
                    + photo.path() + " has " + photo.channels() + " channels");
        }
        return table;
    }
}
