package iridepth.trial;

import ij.ImagePlus;
import ij.io.Opener;
import iridepth.calibration.Calibration;
import iridepth.photo.PhotoFile;
import iridepth.photo.SignalSource;
import iridepth.reading.ThicknessMap;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.recipe.Setup;
import iridepth.simulation.SceneFolder;
import java.nio.file.Path;
import java.util.function.Function;

/**
 * A photo with its truth, read by the whole program from files: recipe, dark, flat, steps and photo.
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

    /** A folder of test images. */
    static Trial of(Path folder, String photo) {
        return new Trial(folder.resolve("recipe.toml"), folder.resolve(photo), values(folder.resolve("truth.tif")),
                values(folder.resolve("limit.tif")));
    }

    private static double[] values(Path tiff) {
        ImagePlus image = new Opener().openImage(tiff.toString());
        float[] pixels = (float[]) image.getProcessor().getPixels();
        double[] values = new double[pixels.length];
        for (int i = 0; i < values.length; i++) {
            values[i] = pixels[i];
        }
        return values;
    }

    /** What the steps alone make of the rig. */
    Calibration calibration() {
        try (PhotoFile file = PhotoFile.open(photo)) {
            return Instrument.of(Recipe.read(recipe)).setup(file.info()).calibration().orElseThrow();
        }
    }

    /** Reads as {@code map} does. */
    Outcome map(double least) {
        return read(least, null);
    }

    /** Reads with the calibration that the steps alone give. */
    Outcome stepsOnly(double least) {
        return read(least, setup -> setup);
    }

    private Outcome read(double least, Function<Setup, Setup> choice) {
        Recipe read = Recipe.read(recipe);
        Instrument instrument = Instrument.of(read);
        try (PhotoFile file = PhotoFile.open(photo)) {
            SignalSource signal = instrument.signal(file);
            Setup setup = choice == null ? instrument.setup(signal) : choice.apply(instrument.setup(file.info()));
            ThicknessMap map = setup.reader(read, file.info()).read(signal, 0, done -> { });
            return Outcome.of(map, truth, bound, least);
        }
    }
}
