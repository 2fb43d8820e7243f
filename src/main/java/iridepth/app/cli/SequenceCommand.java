package iridepth.app.cli;

import iridepth.photo.PhotoList;
import iridepth.quality.Position;
import iridepth.recipe.Instrument;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code sequence}: thickness against time. */
@Command(name = "sequence", mixinStandardHelpOptions = true,
        description = {"Follows a film that drains, dries or grows through a sequence of photos at even intervals: thickness against "
            + "time at places, and along a line as a kymograph.", "",
            "Photos are the pages of a TIFF file, files in the order given, or those of a folder by name, numbers by their value. The "
                + "recipe is calibrated once. A photo that cannot be used leaves a gap and is listed with the reason.", "",
            "The result folder holds time.csv and time.png for places (mean over a disk or region, with its uncertainty), "
                + "kymograph.png and kymograph.tif (nm, one column per photo) for a line, and summary.json.", "",
            "Example:",
            "  sequence --recipe soap.toml --interval 0.5 --point 40,60 --line 40,0,40,119 --out drained frames/", ""},
        footer = {"", "Exit code 3 if a photo could not be used.", "", Iridepth.CAUTION})
final class SequenceCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Mixin
    private InstrumentOptions given;

    @Option(names = "--interval", required = true, paramLabel = "S", description = "Seconds from one photo to the next.")
    private double interval;

    @Option(names = "--line", paramLabel = "X0,Y0,X1,Y1", description = "The line of the kymograph, in pixels.")
    private String line;

    @Option(names = "--width", paramLabel = "N", defaultValue = "1", description = "Samples across the line of which the mean is "
            + "taken, one pixel apart (default: 1).")
    private int width;

    @Mixin
    private PlaceOptions where;

    @Option(names = "--out", required = true, paramLabel = "DIR", description = "The result folder.")
    private Path out;

    @Option(names = "--replace", description = "Replace a result folder that exists.")
    private boolean replace;

    @Parameters(arity = "1..*", paramLabel = "PHOTO|FOLDER", description = "The photos.")
    private List<Path> photos;

    @Override
    public Integer call() {
        if (!(interval > 0 && interval < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("--interval " + interval + ": give a time above 0 s");
        }
        if (line == null && where.any(1 << 20, 1 << 20).isEmpty()) {
            throw new IllegalArgumentException("say what to follow: --point X,Y or other places, --line X0,Y0,X1,Y1, or both");
        }
        Optional<Position[]> ends = Optional.ofNullable(line).map(text -> Coordinates.line("--line", text));
        Instrument instrument = given.ofOnePhoto();
        List<Path> files = PhotoList.of(photos, file -> !instrument.uses(file));
        return new SequenceRun(instrument, files, interval, where, ends, width, spec.commandLine().getOut()).write(out, replace);
    }
}
