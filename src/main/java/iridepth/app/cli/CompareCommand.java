package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.quality.Comparison;
import iridepth.quality.Comparison.Reference;
import iridepth.quality.Position;
import iridepth.report.ComparisonSheet;
import iridepth.report.CsvFile;
import iridepth.report.SavedResult;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code compare}: a map against points of a reference instrument. */
@Command(name = "compare", mixinStandardHelpOptions = true,
        description = {"Compares a map with points that a reference instrument has measured: bias, limits of agreement (Bland and "
            + "Altman) with their confidence intervals, normalised errors E_n (ISO 13528), Deming regression.", "",
            "The points are a CSV table with the columns x and y in pixels of the map, their centres at whole numbers (or x_um and "
                + "y_um from the centre of the upper left pixel), thickness_nm, and uncertainty_nm (standard) or "
                + "expanded_uncertainty_nm (coverage factor 2); without these there is no E_n. |E_n| up to 1 means that map and "
                + "reference agree within what both state.", "",
            "Example:", "  compare result ellipsometer.csv --radius 20 --out agreement.png", ""},
        footer = {"", Iridepth.CAUTION})
final class CompareCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(index = "0", paramLabel = "RESULT", description = "A result folder that map has written.")
    private Path result;

    @Parameters(index = "1", paramLabel = "POINTS.csv", description = "The points of the reference instrument.")
    private Path points;

    @Option(names = "--radius", paramLabel = "PX", description = "Radius of the spot that the reference instrument averages over, in "
            + "pixels (default: the nearest pixel alone).")
    private double radius;

    @Mixin
    private OptionalPicture output;

    @Override
    public Integer call() {
        if (!(radius >= 0 && radius < 1e6)) {
            throw new IllegalArgumentException("--radius must be 0 pixels or more, not " + radius);
        }
        output.spare(points);
        SavedResult saved = SavedResult.open(result);
        List<Reference> references = references(CsvFile.read(points), saved.pixelUm());
        Comparison comparison;
        try {
            comparison = Comparison.of(saved.measured(), references, radius);
        } catch (IllegalArgumentException e) {
            throw new PhotoException(points, e.getMessage());
        }
        ComparisonSheet sheet = new ComparisonSheet(saved.title() + " against " + points.getFileName(), comparison);
        Optional<String> written = output.write(sheet::write, sheet.csv());
        PrintWriter terminal = spec.commandLine().getOut();
        terminal.print(sheet.text());
        written.ifPresent(terminal::println);
        terminal.flush();
        return Iridepth.DONE;
    }

    private List<Reference> references(CsvFile table, double pixelUm) {
        boolean um = !table.has("x") && table.has("x_um");
        if (um && Double.isNaN(pixelUm)) {
            throw new PhotoException(points, "gives places in um, but the map has no pixel size; give x and y in pixels, or map again "
                    + "with scale.pixel_um in the recipe");
        }
        double[] x = table.numbers(um ? "x_um" : "x");
        double[] y = table.numbers(um ? "y_um" : "y");
        double[] thickness = table.numbers("thickness_nm");
        double[] uncertainty = new double[x.length];
        Arrays.fill(uncertainty, Double.NaN);
        if (table.has("uncertainty_nm")) {
            uncertainty = table.numbers("uncertainty_nm");
        } else if (table.has("expanded_uncertainty_nm")) {
            uncertainty = Arrays.stream(table.numbers("expanded_uncertainty_nm")).map(u -> u / 2).toArray();
        }
        List<Reference> references = new ArrayList<>();
        for (int i = 0; i < x.length; i++) {
            if (Double.isNaN(x[i]) || Double.isNaN(y[i]) || Double.isNaN(thickness[i])) {
                throw new PhotoException(points + ", line " + table.lines().get(i) + ": a point needs its place and its thickness");
            }
            if (uncertainty[i] < 0) {
                throw new PhotoException(points + ", line " + table.lines().get(i) + ": the uncertainty is negative");
            }
            double scale = um ? 1 / pixelUm : 1;
            references.add(new Reference(new Position(x[i] * scale, y[i] * scale), thickness[i], uncertainty[i]));
        }
        if (references.isEmpty()) {
            throw new PhotoException(points, "holds no point; give a line with place and thickness for each");
        }
        return references;
    }
}
