package iridepth.app.cli;

import iridepth.photo.PhotoList;
import iridepth.recipe.Instrument;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code lot}: many photos under one recipe. */
@Command(name = "lot", mixinStandardHelpOptions = true,
        description = {"Reads many photos under one recipe, one result folder each, and sums them up: lot.csv with a row per photo, a "
            + "run chart, and a page with small maps that leads to the reports.", "",
            "A folder stands for its TIFF, PNG and JPEG files by name, numbers by their value; the recipe's own flat, dark and steps "
                + "are left out. The recipe is calibrated once. A photo that cannot be used is listed with the reason, and the others "
                + "go on.", "",
            "Interrupt it as you like: called again, it keeps each result that is whole and was made by this version of the program "
                + "from the same photo and recipe, and makes the rest.", "",
            "Example:", "  lot --recipe oxide.toml --out lot photos/", ""},
        footer = {"", "Exit code 0 if every photo was read, 1 if besides one of them is out of tolerance, 3 if a photo could not be used "
            + "(whatever the verdict on the others).", "", Iridepth.CAUTION})
final class LotCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Mixin
    private InstrumentOptions given;

    @Option(names = "--out", required = true, paramLabel = "DIR", description = "The lot's folder: a new one, or one that this command "
            + "has begun.")
    private Path out;

    @Parameters(arity = "1..*", paramLabel = "PHOTO|FOLDER", description = "Photos, and folders of photos.")
    private List<Path> photos;

    @Override
    public Integer call() {
        Instrument instrument = given.ofOnePhoto();
        List<Path> files = PhotoList.of(photos, file -> !instrument.uses(file));
        return LotRun.of(instrument, files, out, spec.commandLine().getOut()).write();
    }
}
