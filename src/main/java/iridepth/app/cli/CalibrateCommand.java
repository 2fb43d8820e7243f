package iridepth.app.cli;

import iridepth.calibration.Calibration;
import iridepth.calibration.FitFigures;
import iridepth.calibration.LeaveOneOut;
import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Stack;
import iridepth.photo.OpenPhotos;
import iridepth.photo.SignalSource;
import iridepth.recipe.CalibrationFile;
import iridepth.recipe.Provenance;
import iridepth.recipe.Recipe;
import iridepth.recipe.RecipeException;
import iridepth.recipe.Rig;
import iridepth.recipe.Setup;
import iridepth.report.CalibrationFigures;
import iridepth.report.ResultFolder;
import iridepth.report.SummaryJson;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code calibrate}: fits and judges the responses from flat and steps. */
@Command(name = "calibrate", mixinStandardHelpOptions = true,
        description = {"Fits the camera's effective responses to the recipe's steps, and judges the fit.", "",
            "The result folder holds calibration.json, which map takes with --calibration; steps.csv (leave-one-out error of every "
                + "step, residual of every channel); responses.png and curve.png; summary.json.", "",
            "Example:", "  calibrate --recipe wafer.toml --out calibration", ""},
        footer = {"", Iridepth.CAUTION})
final class CalibrateCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Option(names = "--recipe", required = true, paramLabel = "FILE", description = "The recipe, with camera.steps or camera.target.")
    private Path recipeFile;

    @Option(names = "--out", required = true, paramLabel = "DIR", description = "The result folder.")
    private Path out;

    @Option(names = "--replace", description = "Replace a result folder that exists.")
    private boolean replace;

    @Override
    public Integer call() {
        Recipe recipe = Recipe.read(recipeFile);
        if (!recipe.camera().isCalibrated()) {
            throw new RecipeException(recipe.file() + ": camera.steps is missing; name photos and regions of films of known thickness, "
                    + "or a reference target in camera.target");
        }
        try (ResultFolder folder = ResultFolder.create(out, replace);
                OpenPhotos photos = OpenPhotos.of(recipe.camera().calibrationPhotos())) {
            Rig rig = Rig.of(recipe);
            Setup setup = Setup.of(rig, photos.files().get(0).info());
            Calibration calibration = setup.calibration().orElseThrow();
            double[] noise = noise(setup.curve(), rig.signal(photos.files()));
            List<ThicknessRange> weak = calibration.weakRanges(setup.curve(), noise);
            Stack flat = recipe.camera().flatStack();
            SummaryJson.write(calibration.data(flat == null ? "" : flat.toString()), folder.file(CalibrationFile.NAME));
            SummaryJson.write(summary(recipe, calibration, weak), folder.file(ResultFolder.SUMMARY));
            CalibrationFigures figures = new CalibrationFigures(recipe.title(), calibration, setup.curve());
            figures.stepTable().write(folder.file("steps.csv"));
            figures.responseFigure().write(folder.file("responses.png"));
            figures.curveFigure().write(folder.file("curve.png"));
            folder.commit();
            tell(calibration.figures(), weak);
            return Iridepth.DONE;
        }
    }

    /** Standard deviation of a pixel's signal in each channel, in the middle of the range. */
    private static double[] noise(ColourCurve curve, SignalSource signal) {
        double[] noise = new double[curve.channels()];
        for (int c = 0; c < noise.length; c++) {
            noise[c] = Math.sqrt(signal.variance(c, curve.signal(curve.size() / 2, c), 1));
        }
        return noise;
    }

    private static Map<String, Object> summary(Recipe recipe, Calibration calibration, List<ThicknessRange> weak) {
        Map<String, Object> summary = new LinkedHashMap<>();
        summary.put("program", "iridepth " + Iridepth.Version.number());
        summary.put("title", recipe.title());
        summary.put("stack", recipe.stack().toString());
        summary.put("figures", calibration.figures());
        summary.put("weak_ranges_nm", weak);
        summary.put("inputs_sha256", Provenance.of(recipe));
        summary.put("caution", Iridepth.CAUTION);
        return summary;
    }

    private void tell(FitFigures f, List<ThicknessRange> weak) {
        PrintWriter terminal = spec.commandLine().getOut();
        if (!f.leaveOneOut().isEmpty()) {
            terminal.println("step / nm   left out, read as / nm   error / nm   u / nm");
            for (LeaveOneOut l : f.leaveOneOut()) {
                terminal.printf(Locale.ROOT, "%9.1f   %22.2f   %10.2f   %6.2f%s%n", l.thicknessNm(), l.readNm(), l.errorNm(), l.uncertaintyNm(),
                        l.extrapolated() ? "   (extrapolated from the others)" : "");
            }
            terminal.printf(Locale.ROOT, "leave-one-out error %.2f nm rms between the outermost steps, %.2f nm over all, %.2f nm typically%n",
                    f.leaveOneOutRms(false), f.leaveOneOutRms(true), f.leaveOneOutTypical());
        }
        if (!Double.isNaN(f.expectedErrorNm())) {
            terminal.printf(Locale.ROOT, "expected     systematic error of %.2f nm rms between the outermost steps, noise apart, with all steps in "
                    + "use%n", f.expectedErrorNm());
        }
        if (f.index() != null) {
            terminal.printf(Locale.ROOT, "index        %+.4f +- %.4f from the stated one at 550 nm%n", f.index().at(550), f.index().sigmaAt(550));
        }
        terminal.printf(Locale.ROOT, "fit: chi-square %.1f with %.1f degrees of freedom (p = %.3f), condition %.0f, numerical aperture %.3f "
                + "(stated %.3f)%n", f.chiSquare(), f.degreesOfFreedom(), f.pValue(), f.condition(), f.aperture(), f.apertureStated());
        f.remarks().forEach(remark -> terminal.println("note         " + remark));
        for (ThicknessRange range : weak) {
            terminal.printf(Locale.ROOT, "weak from %.0f to %.0f nm: add a step there%n", range.fromNm(), range.toNm());
        }
        terminal.println("wrote " + out);
        terminal.println(Iridepth.CAUTION);
        terminal.flush();
    }
}
