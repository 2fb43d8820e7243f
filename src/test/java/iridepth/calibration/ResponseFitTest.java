package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Material;
import iridepth.optics.Materials;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.simulation.Rigs;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ForkJoinPool;
import org.junit.jupiter.api.Test;

class ResponseFitTest {
    private final RigTrial trial = new RigTrial(Rigs.oxideMixture());
    private final FitInput input = trial.input();

    private static ColourCurve curve(Calibration calibration, ThicknessRange range) {
        return calibration.curve(range, (range.toNm() - range.fromNm()) / 300);
    }

    private FitInput withSteps(List<StepSignal> steps) {
        return FitInput.of(input.channels(), input.lights().get(0), input.stack(), input.flatStack(), input.view(), input.range(), steps);
    }

    private static StepSignal scaled(StepSignal step, double[] factor) {
        double[] signal = step.signal();
        double[] variance = step.variance();
        for (int c = 0; c < signal.length; c++) {
            signal[c] *= factor[c];
            variance[c] *= factor[c] * factor[c];
        }
        return new StepSignal(step.label(), step.thicknessNm(), step.uncertaintyNm(), signal, variance, false);
    }

    @Test
    void numberOfThreadsDoesNotMatter() throws Exception {
        double[] common = ResponseFit.fit(input).data("").model().parameters();
        ForkJoinPool one = new ForkJoinPool(1);
        try {
            double[] alone = one.submit(() -> ResponseFit.fit(input).data("").model().parameters()).get();
            assertArrayEquals(common, alone);
        } finally {
            one.shutdown();
        }
    }

    @Test
    void responsesAndGlareGiveTheFlatTheSignalOne() {
        Calibration calibration = ResponseFit.fit(input);
        double[] flat = Reflectance.of(input.flatStack().orElseThrow(), calibration.view()).spectrum(0);
        double[] signal = calibration.responses().signal(flat);
        for (int c = 0; c < signal.length; c++) {
            assertEquals(1, signal[c] + calibration.glare()[c], 2e-3);
            assertTrue(calibration.glare()[c] > 0 && calibration.glare()[c] < 0.1);
        }
    }

    /** Signals on an arbitrary scale, as fractions of full scale are: the gain of each channel is found along with its response. */
    @Test
    void withoutAFlatTheGainsAreFound() {
        double[] gain = {0.31, 0.22, 0.12};
        List<StepSignal> steps = input.steps().stream().map(s -> scaled(s, gain)).toList();
        FitInput raw = FitInput.of(input.channels(), input.lights().get(0), input.stack(), Optional.empty(), input.view(),
                input.range(), steps);
        ColourCurve curve = curve(ResponseFit.fit(raw), input.range());
        double[] value = new double[3];
        double[] first = new double[3];
        double[] second = new double[3];
        double worst = 0;
        for (double d = 30; d <= 400; d += 5) {
            curve.at(d, value, first, second);
            double[] truth = trial.truth(d);
            for (int c = 0; c < 3; c++) {
                worst = Math.max(worst, Math.abs(value[c] / gain[c] - truth[c]));
            }
        }
        assertTrue(worst < 0.02, "worst " + worst);
    }

    /** The lamp is 300 K hotter than stated and the aperture 0.05 larger; two steps say so of a known sensor. */
    @Test
    void knownSensitivitiesNeedFewSteps() {
        List<Spectrum> sensor = Arrays.stream(trial.scene().rig().sensor().curves()).map(Spectrum::of).toList();
        FitInput two = withSteps(List.of(input.steps().get(2), input.steps().get(4)));
        assertThrows(IllegalArgumentException.class, () -> ResponseFit.fit(two));
        double calibrated = trial.curveError(curve(ResponseFit.fit(two.withSensitivities(sensor)), input.range()));
        EffectiveResponses asStated = EffectiveResponses.ofSensor(input.channels(), sensor, input.lights().get(0))
                .relativeTo(Reflectance.of(input.flatStack().orElseThrow(), input.view()).spectrum(0));
        double uncalibrated = trial.curveError(ColourCurve.of(asStated, Reflectance.of(input.stack(), input.view()), input.range(), 1));
        assertTrue(calibrated < uncalibrated / 4, uncalibrated + " to " + calibrated);
    }

    /** Smooth reflectances, invented, as of paints: two steps alone would be refused. */
    @Test
    void patchesOfKnownReflectanceTakeThePlaceOfSteps() {
        List<PatchSignal> patches = new ArrayList<>();
        for (int k = 0; k < 12; k++) {
            double centre = 400 + 27 * k;
            int rises = k % 2 == 0 ? 1 : -1;
            Spectrum paint = Spectrum.sample(nm -> 0.05 + 0.6 / (1 + Math.exp(-rises * (nm - centre) / 18)));
            double[] signal = trial.seen(paint.toArray());
            patches.add(new PatchSignal("paint " + k, paint, 0.003, signal, new double[] {1e-8, 1e-8, 1e-8}));
        }
        FitInput two = withSteps(List.of(input.steps().get(2), input.steps().get(5)));
        ColourCurve curve = curve(ResponseFit.fit(two.withPatches(patches)), input.range());
        double error = trial.curveError(curve);
        assertTrue(error < 0.4, "error " + error);
    }

    @Test
    void aWrongThicknessShows() {
        List<StepSignal> steps = new ArrayList<>(input.steps());
        StepSignal s = steps.get(3);
        steps.set(3, StepSignal.of(s.label(), s.thicknessNm() + 6, s.signal(), s.variance()));
        FitFigures figures = ResponseFit.fit(withSteps(steps)).figures();
        FitFigures right = ResponseFit.fit(input).figures();
        assertTrue(figures.leaveOneOut().get(3).errorNm() < -3, "" + figures.leaveOneOut().get(3));
        assertTrue(figures.pValue() < right.pValue());
        assertTrue(figures.stepNm() > 2 * right.stepNm() || figures.misfit() > 2 * right.misfit());
        assertTrue(figures.remarks().stream().anyMatch(r -> r.contains(s.label())), "" + figures.remarks());
        assertTrue(right.remarks().isEmpty(), "" + right.remarks());
    }

    @Test
    void uncertainThicknessesMakeUncertainCurves() {
        double[] noise = {0.005, 0.005, 0.005};
        double[] mean = new double[2];
        for (int k = 0; k < 2; k++) {
            double u = k == 0 ? 0.1 : 1.0;
            List<StepSignal> steps = input.steps().stream().map(s -> new StepSignal(s.label(), s.thicknessNm(), u, s.signal(),
                    s.variance(), false)).toList();
            Calibration calibration = ResponseFit.fit(withSteps(steps));
            ColourCurve curve = curve(calibration, new ThicknessRange(60, 350));
            mean[k] = Arrays.stream(calibration.budget(curve, noise).get(Calibration.RESPONSES)).sorted().skip(150).findFirst()
                    .orElseThrow();
        }
        assertTrue(mean[1] > 3 * mean[0], Arrays.toString(mean));
    }

    @Test
    void weakRangesLieBeyondTheSteps() {
        List<StepSignal> thin = input.steps().stream().filter(s -> s.thicknessNm() < 200).toList();
        Calibration calibration = ResponseFit.fit(withSteps(thin));
        ColourCurve curve = curve(calibration, input.range());
        List<ThicknessRange> weak = calibration.weakRanges(curve, new double[] {0.005, 0.005, 0.005});
        double beyond = weak.stream().mapToDouble(w -> Math.max(0, w.toNm() - Math.max(w.fromNm(), 250))).sum();
        double between = weak.stream().mapToDouble(w -> Math.max(0, Math.min(w.toNm(), 180) - Math.max(w.fromNm(), 30))).sum();
        assertTrue(beyond > 20 && between < 5, "" + weak);
    }

    @Test
    void filmsOfThePhotoImproveTheCurve() {
        FitInput few = withSteps(List.of(input.steps().get(1), input.steps().get(2), input.steps().get(4), input.steps().get(6)));
        Calibration first = ResponseFit.fit(few);
        ColourCurve curve = curve(first, input.range());
        List<StepSignal> films = new ArrayList<>();
        double[] variance = {1e-7, 1e-7, 1e-7};
        for (double d = 40; d <= 400; d += 20) {
            double[] signal = trial.truth(d);
            double read = CurveReading.near(curve, signal, variance, d).thicknessNm();
            films.add(new StepSignal("film", read, 3, signal, variance, false));
        }
        double before = trial.curveError(curve);
        double after = trial.curveError(curve(ResponseFit.refine(few, first, films), input.range()));
        assertTrue(after < 0.7 * before, before + " to " + after);
    }

    @Test
    void dataBringTheSameCurveBack() {
        Calibration calibration = ResponseFit.fit(input);
        Calibration back = Calibration.of(calibration.data("flat"), input.stack());
        ColourCurve a = curve(calibration, input.range());
        ColourCurve b = curve(back, input.range());
        for (int s = 0; s < a.size(); s += 7) {
            for (int c = 0; c < 3; c++) {
                assertEquals(a.signal(s, c), b.signal(s, c));
                assertEquals(a.covariance(s, c, 0), b.covariance(s, c, 0));
            }
        }
        Stack other = Stack.parse("air / PMMA / Si", Materials.bundled());
        assertThrows(IllegalArgumentException.class, () -> Calibration.of(calibration.data("flat"), other));
    }

    /** A resist of true index 1.60, stated as 1.57 and as 1.63. */
    @Test
    void theFilmsIndexIsFoundWithinItsUncertainty() {
        RigTrial resist = new RigTrial(Rigs.resistSkewed());
        FitInput right = resist.input();
        for (double off : new double[] {-0.03, 0.03}) {
            Material stated = Material.constant("resist", 1.60 + off, 0);
            FitInput wrong = right.withStack(right.stack().withFilm(stated));
            Calibration found = ResponseFit.fit(wrong.withIndexFitted(IndexPrior.DEFAULT));
            IndexEstimate index = found.figures().index();
            assertEquals(-off, index.at(550), 2 * index.sigmaAt(550), "" + index);
            assertTrue(index.sigmaAt(550) < 0.015, "" + index);
            assertEquals(1.60, found.stack().film().n().at(550 - Grid.FIRST_NM), 0.02);
            double without = resist.curveError(curve(ResponseFit.fit(wrong), right.range()));
            assertTrue(resist.curveError(curve(found, right.range())) < 0.7 * without);
            Calibration back = Calibration.of(found.data(""), wrong.stack());
            assertEquals(curve(found, right.range()).signal(100, 1), curve(back, right.range()).signal(100, 1));
        }
    }

    @Test
    void tooFewColoursAreRefusedWithAdvice() {
        String message = assertThrows(IllegalArgumentException.class, () -> ResponseFit.fit(withSteps(input.steps().subList(0, 2))))
                .getMessage();
        assertTrue(message.contains("3 different colours") && message.contains("add 1 step, best near"), message);
        StepSignal one = input.steps().get(2);
        List<StepSignal> same = List.of(one, StepSignal.of("copy", 210, one.signal(), one.variance()),
                StepSignal.of("copy again", 330, one.signal(), one.variance()));
        String repeated = assertThrows(IllegalArgumentException.class, () -> ResponseFit.fit(withSteps(same))).getMessage();
        assertTrue(repeated.contains("copy, copy again") && !repeated.contains("\n"), repeated);
        String none = assertThrows(IllegalArgumentException.class, () -> ResponseFit.fit(withSteps(List.of()))).getMessage();
        assertTrue(none.contains("1 different colour is too few") && none.contains("add 3 steps"), none);
    }

    @Test
    void clippedAndMismatchedStepsAreRefused() {
        StepSignal s = input.steps().get(0);
        StepSignal clipped = new StepSignal("patch 1", 25, 0.5, s.signal(), s.variance(), true);
        assertTrue(assertThrows(IllegalArgumentException.class, () -> withSteps(List.of(clipped))).getMessage()
                .contains("patch 1: the patch is clipped"));
        StepSignal grey = StepSignal.of("patch 2", 25, new double[] {0.5}, new double[] {1e-6});
        assertTrue(assertThrows(IllegalArgumentException.class, () -> withSteps(List.of(grey))).getMessage()
                .contains("1 channels where the calibration has 3"));
        assertThrows(IllegalArgumentException.class, () -> StepSignal.of("x", -1, s.signal(), s.variance()));
        assertThrows(IllegalArgumentException.class, () -> StepSignal.of("x", 1, new double[] {Double.NaN}, new double[] {1}));
        assertThrows(IllegalArgumentException.class, () -> new IndexPrior(0, 0.01));
    }
}
