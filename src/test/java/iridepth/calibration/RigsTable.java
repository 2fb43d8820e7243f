package iridepth.calibration;

import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;

/** Prints, for every simulated rig, the thickness error of a calibrated colour curve beside those of what a user would do otherwise. */
final class RigsTable {
    private RigsTable() {
    }

    /** Prints the table as Markdown: root mean square error over the rig's steps' range, without noise, in nm. */
    public static void main(String[] args) {
        System.out.println("| rig | steps | calibrated | 3x3 matrix | uncalibrated |\n| --- | --- | --- | --- | --- |");
        for (Scene scene : Rigs.all()) {
            RigTrial trial = new RigTrial(scene);
            FitInput input = trial.input();
            GenericSensor generic = new GenericSensor(input);
            Calibration fit = ResponseFit.fit(input);
            System.out.printf("| %s | %d | %.2f | %.2f | %.2f |%n", scene.name(), input.steps().size(),
                    trial.curveError(fit.curve(input.range(), input.range().step(input.stack()))), trial.curveError(generic.matrix()),
                    trial.curveError(generic.uncalibrated()));
        }
    }
}
