package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.curve.ColourCurve;
import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Rigs of an independent simulation, by Rouard's recursion, with sensors beyond the fit's basis, lamps stated up to 300 K wrong and
 * apertures stated up to 0.05 wrong: what a calibration with five to seven steps makes of them, pixel by pixel.
 */
class RigsCalibrationTest {
    static List<Scene> rigs() {
        return Rigs.all();
    }

    @ParameterizedTest
    @MethodSource("rigs")
    void aFewStepsCalibrateAnUnknownCamera(Scene scene) {
        RigTrial trial = new RigTrial(scene);
        FitInput input = trial.input();
        Calibration calibration = ResponseFit.fit(input);
        ColourCurve curve = calibration.curve(input.range(), input.range().step(input.stack()));
        RigTrial.Outcome outcome = trial.read(curve);
        GenericSensor generic = new GenericSensor(input);
        double matrixError = trial.curveError(generic.matrix());
        double expected = Math.hypot(calibration.figures().expectedErrorNm(), outcome.limit());
        double leftOut = Math.hypot(calibration.figures().leaveOneOutTypical(), outcome.limit());
        double curveError = trial.curveError(curve);
        double stated = calibration.figures().expectedErrorNm();
        String what = scene.name() + " " + outcome + " expected " + expected + " left out " + leftOut + " matrix " + matrixError + " curve " + curveError + " stated "
                + stated;
        assertAll(
                () -> assertTrue(outcome.near() > 0.999, what),
                () -> assertTrue(outcome.rms() <= 0.6, what),
                () -> assertTrue(Math.abs(outcome.bias()) <= 0.3, what),
                () -> assertTrue(outcome.coverage() >= 0.9 && outcome.coverage() <= 0.99, what),
                () -> assertTrue(expected < 2 * outcome.rms() && expected > outcome.rms() / 2, what),
                () -> assertTrue(leftOut < 2 * outcome.rms() && leftOut > outcome.rms() / 2, what),
                // what calibrate states, noise apart
                () -> assertTrue(stated > curveError / 2 && stated < 2 * curveError, what),
                () -> assertTrue(curveError < matrixError / 3, what));
    }
}
