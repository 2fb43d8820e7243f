package iridepth.trial;

import iridepth.photo.PhotoFile;
import iridepth.photo.SignalSource;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.recipe.Setup;
import iridepth.simulation.SceneFolder;
import java.nio.file.Path;

/**
 * A simulated photo with its truth, read by the whole program from files: recipe, dark, flat, steps and photo.
 *
 * @param recipe the recipe's file
 * @param photo  the photo's file
 * @param truth  nm, NaN where a pixel has none
 * @param bound  Cramer-Rao bound, nm
 */
record Trial(Path recipe, Path photo, double[] truth, double[] bound) {
    static Trial of(SceneFolder folder) {
        return new Trial(folder.recipe(), folder.photo(), folder.truth(), folder.limit());
    }

    /**
     * Reads as {@code map} does.
     *
     * @param least pixels of a smaller truth do not count, nm
     */
    Outcome map(double least) {
        return read(least, true);
    }

    /** Reads with the calibration that the steps alone give. */
    Outcome stepsOnly(double least) {
        return read(least, false);
    }

    private Outcome read(double least, boolean refined) {
        Recipe read = Recipe.read(recipe);
        Instrument instrument = Instrument.of(read);
        try (PhotoFile file = PhotoFile.open(photo)) {
            SignalSource signal = instrument.signal(file);
            Setup setup = refined ? instrument.setup(signal) : instrument.setup(file.info());
            return Outcome.of(setup.reader(read, file.info()).read(signal, 0, done -> { }), truth, bound, least);
        }
    }
}
