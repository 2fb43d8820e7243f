package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.photo.Region;
import iridepth.quality.Field;
import iridepth.quality.Repeatability;
import iridepth.quality.Tolerance;
import iridepth.report.GaugeSheet;
import iridepth.report.MapTiff;
import iridepth.report.OutputFile;
import iridepth.report.RepeatSheet;
import iridepth.report.SavedResult;
import iridepth.report.TiffWriter;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code repeat}: how well readings repeat. */
@Command(name = "repeat", mixinStandardHelpOptions = true,
        description = {"Tells how well readings repeat: from repeated maps of one part, or from a list of parts by operators by "
            + "repeats.", "",
            "Repeated maps: photograph a part again and again without moving it, map each photo, and give the result folders. The "
                + "scatter within each pixel is parted into what whole maps shift by and the rest.", "",
            "A list is a CSV table with a line for each measurement and the columns part, operator (where there are several), and "
                + "thickness_nm or result (a result folder, by its path from the table; the mean of the map is taken, or of "
                + "--region). It is analysed as the usual gauge study: repeatability and reproducibility by analysis of variance.", "",
            "Examples:",
            "  repeat run1 run2 run3 run4 --out repeat.png",
            "  repeat run1 run2 run3 --region 100,80,64,64 --tolerance 275:295",
            "  repeat --list study.csv --tolerance 275:295 --out gauge.png", ""})
final class RepeatCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(arity = "0..*", paramLabel = "RESULT", description = "Result folders of repeated maps, in the order of time.")
    private List<Path> results = List.of();

    @Option(names = "--list", paramLabel = "FILE.csv", description = "The list of a gauge study, instead of result folders.")
    private Path list;

    @Option(names = "--region", paramLabel = "X,Y,W,H", description = "A rectangle of the map to look at; may be repeated for "
            + "repeated maps.")
    private List<String> regions = List.of();

    @Option(names = "--tolerance", paramLabel = "FROM:TO", description = "Limits that parts are held to, nm, for the "
            + "precision-to-tolerance ratio (default: those of the maps' recipe, if it has any).")
    private String limits;

    @Option(names = "--map", paramLabel = "FILE.tif", description = "Writes the standard deviation within each pixel as a map in nm.")
    private Path map;

    @Mixin
    private OptionalPicture output;

    @Override
    public Integer call() {
        if ((list == null) == results.isEmpty()) {
            throw new IllegalArgumentException("give the result folders of two or more maps, or --list FILE.csv");
        }
        PrintWriter terminal = spec.commandLine().getOut();
        if (list == null) {
            maps(terminal);
        } else {
            if (map != null || regions.size() > 1) {
                throw new IllegalArgumentException("with --list there is no --map and at most one --region");
            }
            output.spare(list);
            Optional<Region> region = regions.stream().findFirst().map(text -> Coordinates.region("--region", text));
            GaugeSheet sheet = new GaugeTable(list, region).sheet(tolerance());
            Optional<String> written = output.write(sheet::write, sheet.csv());
            terminal.print(sheet.text());
            written.ifPresent(terminal::println);
        }
        terminal.flush();
        return Iridepth.DONE;
    }

    private Optional<Tolerance> tolerance() {
        if (limits == null) {
            return Optional.empty();
        }
        String[] ends = limits.split(":", -1);
        try {
            if (ends.length == 2) {
                return Optional.of(Tolerance.between(Double.parseDouble(ends[0].strip()), Double.parseDouble(ends[1].strip())));
            }
        } catch (NumberFormatException e) {
            // told below, with the texts of another form
        }
        throw new IllegalArgumentException("--tolerance " + limits + ": write it in nm as FROM:TO, such as 275:295");
    }

    private void maps(PrintWriter terminal) {
        if (results.size() < 2) {
            throw new IllegalArgumentException("one map says nothing of how readings repeat: give two or more");
        }
        SavedResult first = SavedResult.open(results.get(0));
        Field one = first.thickness();
        Repeatability repeatability = Repeatability.over(Math.multiplyExact(one.width(), one.height()));
        List<String> names = new ArrayList<>();
        for (Path result : results) {
            Field field = SavedResult.open(result).thickness();
            if (field.width() != one.width() || field.height() != one.height()) {
                throw new PhotoException(result, "has " + field.width() + " x " + field.height() + " pixels where " + results.get(0)
                        + " has " + one.width() + " x " + one.height() + "; repeated maps must be of one field");
            }
            repeatability.add(values(field));
            names.add(result.getFileName().toString());
        }
        if (Double.isNaN(repeatability.standardDeviation())) {
            throw new PhotoException(results.get(0), "shares no pixel that is read with the other maps");
        }
        List<Region> chosen = regions.stream().map(text -> Coordinates.region("--region", text)).toList();
        Optional<Tolerance> held = limits == null ? first.tolerance() : tolerance();
        RepeatSheet sheet = new RepeatSheet(first.title() + ": " + results.size() + " maps of one part", names, one.width(),
                repeatability, chosen, held);
        Optional<String> written = output.write(sheet::write, sheet.csv());
        terminal.print(sheet.text());
        written.ifPresent(terminal::println);
        if (map != null) {
            writeMap(repeatability.standardDeviations(), one, first.pixelUm());
            terminal.println("wrote " + map);
        }
    }

    private static float[] values(Field field) {
        float[] values = new float[field.width() * field.height()];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) field.at(i % field.width(), i / field.width());
        }
        return values;
    }

    private void writeMap(float[] values, Field size, double pixelUm) {
        try (OutputFile file = OutputFile.create(map, output.replace())) {
            try (TiffWriter tiff = MapTiff.nanometres(file.path(), size.width(), size.height(), pixelUm)) {
                tiff.writeRows(0, values);
            }
            file.commit();
        }
    }
}
