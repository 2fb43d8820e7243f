package iridepth.app.cli;

import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.curve.ColourChart;
import iridepth.curve.ColourChart.White;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Fringes;
import iridepth.optics.Materials;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.recipe.LightSpec;
import iridepth.recipe.Recipe;
import iridepth.recipe.Recipe.ViewSpec;
import iridepth.report.ChartFigure;
import iridepth.report.ChartTable;
import iridepth.report.FringeTable;
import iridepth.report.OutputFile;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.Locale;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code chart}: the colours of a film against its thickness, as a picture and a table. */
@Command(name = "chart", mixinStandardHelpOptions = true,
        description = {"Draws the colour chart of a film and writes it as a table.", "",
            "The stack names ambient, layers and substrate with slashes between; the layer without a thickness is the film. "
                + "A constant index may stand behind any name.", "",
            "Examples:",
            "  chart --stack \"air / SiO2 / Si\" --range 0:500 --out oxide.png",
            "  chart --stack \"air / oil n=1.47 / water\" --range 0:1500 --out oil.png",
            "  chart --stack \"air / SiO2 / Si\" --range 0:1000 --wavelength 546", ""})
final class ChartCommand implements Callable<Integer> {
    private static final double ORDERS_AT_NM = 550;

    @Spec
    private CommandSpec spec;

    @Option(names = "--stack", paramLabel = "STACK", description = "The stack, as in \"air / SiO2 / Si\".")
    private String stack;

    @Option(names = "--recipe", paramLabel = "FILE", description = "Take stack, range, view and light from a recipe instead.")
    private Path recipe;

    @Option(names = "--range", paramLabel = "FROM:TO", description = "Thicknesses in nm, as in 0:500.")
    private String range;

    @Option(names = "--step", paramLabel = "NM", defaultValue = "1", description = "Spacing of the table's rows in nm (default: 1).")
    private double step;

    @Option(names = "--light", paramLabel = "LIGHT", description = "CIE illuminant, a black body as 3200K, a band as 546nm+-5nm, or "
            + "a CSV file (default: D65).")
    private String light;

    @Option(names = "--observer", paramLabel = "2|10", defaultValue = "2", description = "CIE observer: 2 degrees of 1931 or 10 "
            + "degrees of 1964 (default: 2).")
    private int observer;

    @Option(names = "--white", paramLabel = "perfect|bare", defaultValue = "perfect", description = "What the eye takes for white: a "
            + "perfect white, or the bare stack without its film, as at a microscope (default: perfect).")
    private String white;

    @Option(names = "--exposure", paramLabel = "FACTOR", description = "Brightness of the picture, 1 for true reflectance (default: "
            + "the brightest film nearly fills the scale; the picture says the factor).")
    private Double exposure;

    @Option(names = "--wavelength", paramLabel = "NM", description = "List the bright and dark thicknesses by order at this "
            + "wavelength.")
    private Double wavelength;

    @Option(names = "--out", paramLabel = "FILE.png", description = "The picture; its table goes beside it as FILE.csv.")
    private Path out;

    @Option(names = "--replace", description = "Replace files that exist.")
    private boolean replace;

    @Mixin
    private ViewOptions viewOptions;

    @Override
    public Integer call() {
        if (out == null && wavelength == null) {
            throw new IllegalArgumentException("nothing to do: give --out FILE.png for the chart, --wavelength NM for a table of "
                    + "orders, or both");
        }
        Recipe given = recipe == null ? null : Recipe.read(recipe);
        if (given == null && (stack == null || range == null)) {
            throw new IllegalArgumentException("give --stack and --range, or --recipe");
        }
        Stack film = stack == null ? given.stack() : Stack.parse(stack, Materials.bundled());
        film.filmIndex();
        ThicknessRange nm = range == null ? given.range() : ThicknessRange.parse(range);
        ViewSpec view = given == null ? viewOptions.spec() : given.view();
        double incidence = Double.isNaN(view.incidenceDeg()) ? 0 : view.incidenceDeg();
        Fringes fringes = Fringes.of(film, wavelength == null ? ORDERS_AT_NM : wavelength, incidence, nm.fromNm(), nm.toNm());
        PrintWriter terminal = spec.commandLine().getOut();
        if (wavelength != null) {
            terminal.print(new FringeTable(film, fringes).text());
        }
        if (out != null) {
            Light source = light != null ? LightSpec.parse(light) : given != null ? given.lights().get(0)
                    : Light.illuminant("D65");
            write(nm, film, view.view(film, nm.toNm()), source, fringes);
            terminal.println("wrote " + out + " and " + OutputNames.table(out));
        }
        terminal.flush();
        return Iridepth.DONE;
    }

    private void write(ThicknessRange nm, Stack film, View view, Light source, Fringes fringes) {
        try (OutputFile picture = OutputFile.create(out, replace); OutputFile table = OutputFile.create(OutputNames.table(out), replace)) {
            ColourChart chart = ColourChart.of(film, view, source, eye(), adopted(), nm, step,
                    exposure == null ? Double.NaN : exposure);
            new ChartFigure(chart, view.text(), fringes).write(picture.path());
            ChartTable.of(chart, view.text()).write(table.path());
            picture.commit();
            table.commit();
        }
    }

    private Observer eye() {
        return switch (observer) {
            case 2 -> Observer.CIE_1931;
            case 10 -> Observer.CIE_1964;
            default -> throw new IllegalArgumentException("--observer must be 2 or 10, not " + observer);
        };
    }

    private White adopted() {
        try {
            return White.valueOf(white.toUpperCase(Locale.ROOT));
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("--white must be perfect or bare, not '" + white + "'");
        }
    }
}
