package iridepth.app.cli;

import iridepth.optics.Material;
import iridepth.optics.MaterialCheck;
import iridepth.optics.Materials;
import iridepth.photo.PhotoException;
import iridepth.report.MaterialSheet;
import iridepth.spectrum.SpectralTable;
import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code materials}: what stacks may name, and whether a table of one's own will do. */
@Command(name = "materials", mixinStandardHelpOptions = true,
        description = {"Lists the materials that a stack may name; shows one; checks a table of your own.", "",
            "A table is a CSV file: lines that open with # are remarks ('# source: ...' is kept), then the header "
                + "wavelength_nm,n,k, then rows with rising wavelength that cover 400-700 nm. k of 0 or more absorbs; without the "
                + "column k the material is transparent. A recipe takes it as table = \"FILE.csv\" in [film.material.NAME].", "",
            "Examples:", "  materials", "  materials SiO2 --out SiO2.png", "  materials --check resist.csv", ""})
final class MaterialsCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(arity = "0..1", paramLabel = "NAME", description = "The material to show (default: list all).")
    private String name;

    @Option(names = "--check", paramLabel = "FILE.csv", description = "Check and show a table of your own.")
    private Path check;

    @Mixin
    private OptionalPicture output;

    @Override
    public Integer call() {
        PrintWriter terminal = spec.commandLine().getOut();
        if (name != null && check != null) {
            throw new IllegalArgumentException("give a NAME or --check FILE.csv, not both");
        }
        if (name == null && check == null) {
            if (output.wanted()) {
                throw new IllegalArgumentException("--out goes with a NAME or with --check: which material shall be drawn?");
            }
            list(terminal);
            return Iridepth.DONE;
        }
        MaterialSheet sheet = new MaterialSheet(check == null ? Materials.bundled().get(name) : checked(terminal));
        terminal.print(sheet.text());
        output.write(sheet::write, sheet.csv()).ifPresent(terminal::println);
        terminal.flush();
        return Iridepth.DONE;
    }

    private static void list(PrintWriter terminal) {
        terminal.printf(Locale.ROOT, "%-14s %-10s %9s  %s%n", "name", "nm", "n at 550", "what and from where");
        for (String each : Materials.catalogue().names()) {
            Material m = Materials.bundled().get(each);
            terminal.printf(Locale.ROOT, "%-14s %-10s %9.4f  %s%n", m.name(),
                    String.format(Locale.ROOT, "%.0f-%.0f", m.firstNm(), m.lastNm()), m.nAt(550), m.description());
            terminal.printf(Locale.ROOT, "%36s %s%n", "", m.source());
        }
        terminal.flush();
    }

    private Material checked(PrintWriter terminal) {
        output.spare(check);
        SpectralTable table = read();
        MaterialCheck result = MaterialCheck.of(table);
        if (!result.faults().isEmpty()) {
            throw new PhotoException(check + ": " + String.join("; ", result.faults()));
        }
        result.remarks().forEach(remark -> terminal.println("note: " + remark));
        terminal.println(result.remarks().isEmpty() ? check + ": nothing amiss" : check + ": can be used");
        return Material.of(check.getFileName().toString(), table);
    }

    private SpectralTable read() {
        if (!Files.isRegularFile(check)) {
            throw new PhotoException(check + ": there is no such file");
        }
        try {
            return SpectralTable.read(check);
        } catch (IllegalArgumentException e) {
            throw new PhotoException(e.getMessage());
        } catch (IOException e) {
            throw new PhotoException(check + ": cannot be read (" + e.getMessage() + ")");
        }
    }
}
