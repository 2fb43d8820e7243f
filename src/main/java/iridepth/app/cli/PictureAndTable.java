package iridepth.app.cli;

import iridepth.report.CsvTable;
import iridepth.report.OutputFile;
import java.nio.file.Path;
import java.util.function.Consumer;
import picocli.CommandLine.Option;

/** Where a picture goes, and the table beside it; they appear both or neither. */
final class PictureAndTable {
    @Option(names = "--out", required = true, paramLabel = "FILE.png", description = "The picture; its table goes beside it as FILE.csv.")
    private Path out;

    @Option(names = "--replace", description = "Replace files that exist.")
    private boolean replace;

    /**
     * Writes both.
     *
     * @param picture draws to a path
     * @return what was written, in words
     */
    String write(Consumer<Path> picture, CsvTable csv) {
        Path beside = OutputNames.table(out);
        try (OutputFile drawn = OutputFile.create(out, replace); OutputFile table = OutputFile.create(beside, replace)) {
            picture.accept(drawn.path());
            csv.write(table.path());
            drawn.commit();
            table.commit();
        }
        return "wrote " + out + " and " + beside;
    }
}
