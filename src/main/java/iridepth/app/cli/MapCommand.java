package iridepth.app.cli;

import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code map}: a photograph to a thickness map. */
@Command(name = "map", mixinStandardHelpOptions = true,
        description = {"Reads the film thickness of every pixel of a photograph.", "",
            "The result folder holds thickness.tif and uncertainty.tif (nm; NaN where not read), state.tif, thickness.png, "
                + "histogram.csv, histogram.png and summary.json. It appears whole or not at all.", "",
            "Examples:", "  map --recipe oxide.toml --out result photo.png",
            "  map --recipe two-lights.toml --out result blue.tif red.tif", ""},
        footer = {"", Iridepth.CAUTION})
final class MapCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Mixin
    private InstrumentOptions given;

    @Option(names = "--out", required = true, paramLabel = "DIR", description = "The result folder.")
    private Path out;

    @Option(names = "--replace", description = "Replace a result folder that exists.")
    private boolean replace;

    @Option(names = "--alone", description = "Read each pixel on its own, whatever its neighbours say of the order: what plan tells of "
            + "wrong orders is for this.")
    private boolean alone;

    @Parameters(arity = "1..*", paramLabel = "PHOTO", description = "TIFF, PNG or JPEG, 8 or 16 bit, grey or RGB; where the recipe "
            + "has several lights, one photo of the field under each, in their order, without moving camera or sample.")
    private List<Path> photos;

    @Override
    public Integer call() {
        return new MapRun(given.instrument(), photos, !alone, spec.commandLine().getOut()).write(out, replace);
    }
}
