package iridepth.trial;

import iridepth.calibration.Calibration;
import iridepth.calibration.FitInput;
import iridepth.calibration.GenericSensor;
import iridepth.calibration.ResponseFit;
import iridepth.calibration.RigTrial;
import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;

/**
 * Prints, for every simulated rig, how the whole program reads its photo from files, and what the calibration is worth beside what
 * a user would do otherwise.
 */
final class RigsTable {
    private RigsTable() {
    }

    /** Prints two tables as Markdown. */
    public static void main(String[] args) throws IOException {
        System.out.println("""
                | rig | lamp, stated | aperture, stated | steps | bound | rms, steps alone | rms | bias | worst | within 2u | read |
                | --- | --- | --- | --- | --- | --- | --- | --- | --- | --- | --- |""");
        for (Scene scene : Rigs.all()) {
            System.out.println(readings(scene));
        }
        System.out.println("""

                | rig | sensor | true curve error | expected | typical leave-one-out | 3x3 matrix | uncalibrated |
                | --- | --- | --- | --- | --- | --- | --- |""");
        for (Scene scene : Rigs.all()) {
            System.out.println(curves(scene));
        }
    }

    private static String readings(Scene scene) throws IOException {
        String rig = String.format(Locale.ROOT, "| %s | %s | %s | %d ", scene.name(),
                pair(scene.rig().lamp().statement(), scene.believedLamp().statement()),
                pair(scene.rig().view().statement(), scene.believedView().statement()), scene.steps().thickness().length);
        if (scene.rig().channels() > 3) {
            RigTrial trial = new RigTrial(scene);
            FitInput input = trial.input();
            RigTrial.Outcome o = trial.read(ResponseFit.fit(input).curve(input.range(), input.range().step(input.stack())));
            return rig + String.format(Locale.ROOT, "| %.3f | %.3f | no such files | %+.3f | | %.1f %% | |", o.limit(), o.rms(), o.bias(),
                    100 * o.coverage());
        }
        Path folder = Files.createTempDirectory("rig");
        Trial trial = Trial.of(SceneFolder.write(folder, scene));
        Outcome steps = trial.stepsOnly(0);
        Outcome o = trial.map(0);
        return rig + String.format(Locale.ROOT, "| %.3f | %.3f | %.3f | %+.3f | %.2f | %.1f %% | %.2f %% |", o.bound(), steps.rms(), o.rms(),
                o.bias(), o.worst(), 100 * o.within2u(), 100 * o.read());
    }

    /** True and stated, in the words of a recipe without its keys. */
    private static String pair(String truth, String stated) {
        String short1 = value(truth);
        String short2 = value(stated);
        return truth.startsWith("table") && stated.startsWith("illuminant") ? "LED, " + short2 : short1 + ", " + short2;
    }

    private static String value(String statement) {
        return statement.lines().map(line -> line.substring(line.indexOf('=') + 2).replace("\"", "")).reduce((a, b) -> a + " / " + b)
                .orElse("");
    }

    private static String curves(Scene scene) {
        RigTrial trial = new RigTrial(scene);
        FitInput input = trial.input();
        GenericSensor generic = new GenericSensor(input);
        Calibration fit = ResponseFit.fit(input);
        double error = trial.curveError(fit.curve(input.range(), input.range().step(input.stack())));
        return String.format(Locale.ROOT, "| %s | %s | %.3f | %.3f | %.3f | %.2f | %.2f |", scene.name(), scene.rig().sensor().name(), error,
                fit.figures().expectedErrorNm(), fit.figures().leaveOneOutTypical(), trial.curveError(generic.matrix()),
                trial.curveError(generic.uncalibrated()));
    }
}
