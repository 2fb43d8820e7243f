package iridepth.app.cli;

import iridepth.report.CsvTable;
import iridepth.report.OutputFile;
import java.nio.file.Path;
import java.util.Optional;
import java.util.function.Consumer;
import picocli.CommandLine.Option;

/** A picture that is drawn where it is asked for, and the table beside it; they appear both or neither. */
final class OptionalPicture {
    @Option(names = "--out", paramLabel = "FILE.png", description = "A picture; its table goes beside it as FILE.csv.")
    private Path out;

    @Option(names = "--replace", description = "Replace files that exist.")
    private boolean replace;

    /** Whether a picture is asked for. */
    boolean wanted() {
        return out != null;
    }

    /** Whether files that exist may be replaced. */
    boolean replace() {
        return replace;
    }

    /** Refuses a name under which the table would take the place of an input. */
    void spare(Path input) {
        if (out != null && OutputNames.table(out).toAbsolutePath().normalize().equals(input.toAbsolutePath().normalize())) {
            throw new IllegalArgumentException("--out " + out + " would write its table over " + input + "; choose another name");
        }
    }

    /**
     * Writes both if they are asked for.
     *
     * @param picture draws to a path
     * @return what was written, in words
     */
    Optional<String> write(Consumer<Path> picture, CsvTable csv) {
        if (out == null) {
            return Optional.empty();
        }
        Path beside = OutputNames.table(out);
        try (OutputFile drawn = OutputFile.create(out, replace); OutputFile table = OutputFile.create(beside, replace)) {
            picture.accept(drawn.path());
            csv.write(table.path());
            drawn.commit();
            table.commit();
        }
        return Optional.of("wrote " + out + " and " + beside);
    }
}
