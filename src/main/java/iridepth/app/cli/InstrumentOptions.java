package iridepth.app.cli;

import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.recipe.RecipeException;
import java.nio.file.Path;
import picocli.CommandLine.Option;

/** The recipe, and a calibration made before, as options. */
final class InstrumentOptions {
    @Option(names = "--recipe", required = true, paramLabel = "FILE", description = "What is known of film, view, light and camera.")
    private Path recipe;

    @Option(names = "--calibration", paramLabel = "DIR", description = "What calibrate wrote, to be taken instead of fitting the "
            + "recipe's steps anew.")
    private Path calibration;

    /** What reads the photos. */
    Instrument instrument() {
        Recipe read = Recipe.read(recipe);
        return calibration == null ? Instrument.of(read) : Instrument.of(read, calibration);
    }

    /**
     * What reads photos one by one.
     *
     * @throws RecipeException if the recipe has several lights, each of which needs a photo of its own
     */
    Instrument ofOnePhoto() {
        Instrument instrument = instrument();
        int lights = instrument.recipe().lights().size();
        if (lights > 1) {
            throw new RecipeException(recipe + ": it has " + lights + " lights, so that each part needs as many photos; this command "
                    + "reads one photo per part, use map");
        }
        return instrument;
    }
}
