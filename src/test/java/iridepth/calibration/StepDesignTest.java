package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.curve.ColourCurve;
import iridepth.photo.ChannelNoise;
import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;
import iridepth.simulation.Steps;
import iridepth.spectrum.Spectrum;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class StepDesignTest {
    private static final double[] NONE = new double[0];

    private static Spectrum lobe(double centre) {
        return Spectrum.sample(nm -> Math.exp(-Math.pow((nm - centre) / 34, 2) / 2) + 0.003);
    }

    /** A supposed sensor that is none of the simulated ones. */
    private static final List<Spectrum> SUPPOSED = List.of(lobe(600), lobe(535), lobe(455));

    /** Full well of 80000 electrons, the brightest signal at about half of the scale. */
    private static final ChannelNoise NOISE = (channel, signal) -> Math.max(signal, 0) / 80_000 / 1.4 + 1e-7;

    private static FitInput input() {
        FitInput with = new RigTrial(Rigs.oxideMixture()).input();
        return new FitInput(with.channels(), with.lights(), List.of(), with.stack(), with.flatStack(), with.view(), with.range(),
                List.of(), List.of(), with.inputs(), with.indexPrior());
    }

    private static StepDesign design(double[] films, int count) {
        return StepDesign.of(input(), SUPPOSED, NOISE, 0.3, films, count);
    }

    @Test
    void designedStepsBeatRandomOnes() {
        StepDesign best = design(NONE, 6);
        Random random = new Random(4);
        for (int trial = 0; trial < 5; trial++) {
            double[] any = random.doubles(6, 5, 445).toArray();
            assertTrue(design(any, 6).meanSystematicNm() > best.meanSystematicNm(), Arrays.toString(any));
        }
    }

    @Test
    void moreStepsLeaveLessUncertainty() {
        double[] means = design(NONE, 0).meanByCount();
        assertEquals(StepDesign.MOST, means.length);
        for (int n = 1; n < means.length; n++) {
            assertTrue(means[n] < means[n - 1]);
        }
    }

    @Test
    void filmsAtHandAreChosenFrom() {
        double[] films = {25, 60, 110, 180, 240, 320, 400};
        assertArrayEquals(films, design(films, 7).thicknesses());
        for (double chosen : design(films, 4).thicknesses()) {
            assertTrue(Arrays.stream(films).anyMatch(film -> film == chosen));
        }
    }

    @Test
    void requestsThatCannotBeMetAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> design(NONE, 13));
        assertThrows(IllegalArgumentException.class, () -> design(new double[] {10, 20}, 3));
        assertThrows(IllegalArgumentException.class, () -> design(new double[] {10, 2000}, 1));
        assertThrows(IllegalArgumentException.class, () -> StepDesign.of(input(), SUPPOSED, NOISE, 0, NONE, 4));
    }

    /** Calibrates a simulated rig with steps and tells the mean of the systematic uncertainty that the calibration states. */
    private static double stated(double[] thicknesses) {
        Scene scene = Rigs.oxideMixture();
        Scene other = new Scene(scene.name(), scene.rig(), scene.stack(), scene.flatStack(), scene.rangeNm(),
                new Steps(400, 120, thicknesses, 4), scene.field(), scene.believedLamp(), scene.believedView(), scene.seed());
        RigTrial trial = new RigTrial(other);
        ColourCurve curve = ResponseFit.fit(trial.input()).curve(trial.range(), trial.range().step(trial.stack()));
        return mean(curve, trial);
    }

    private static double mean(ColourCurve curve, RigTrial trial) {
        double sum = 0;
        int count = 0;
        double[] slope = new double[3];
        for (int k = 0; k < curve.size(); k += 4) {
            double[] signal = {curve.signal(k, 0), curve.signal(k, 1), curve.signal(k, 2)};
            double[] noise = trial.noise(signal);
            double[][] both = new double[3][3];
            for (int a = 0; a < 3; a++) {
                slope[a] = curve.slope(k, a);
                for (int b = 0; b < 3; b++) {
                    both[a][b] = curve.covariance(k, a, b) + (a == b ? noise[a] * noise[a] : 0);
                }
            }
            double[] w = Cholesky.of(both).solve(slope);
            double information = 0;
            double random = 0;
            for (int a = 0; a < 3; a++) {
                information += w[a] * slope[a];
                random += w[a] * w[a] * noise[a] * noise[a];
            }
            // Where the curve turns back on itself the linear figure means nothing.
            if (information > 1) {
                sum += Math.sqrt(Math.max(0, 1 - random / information) / information);
                count++;
            }
        }
        return sum / count;
    }

    @Test
    void calibrationOfASimulatedRigStatesAboutTheUncertaintyThatTheDesignExpects() {
        // The simulated steps are exact; the fit finds their uncertainty to be the least that it tries, 0.05 nm.
        StepDesign design = StepDesign.of(input(), SUPPOSED, NOISE, 0.05, NONE, 7);
        double expected = design.meanSystematicNm();
        double stated = stated(design.thicknesses());
        double usual = stated(new double[] {25, 60, 110, 180, 240, 320, 400});
        assertTrue(stated < 0.7 * usual, stated + " against " + usual + " with steps by rule of thumb");
        assertTrue(stated / expected > 0.5 && stated / expected < 1.5, stated + " against " + expected);
    }
}
