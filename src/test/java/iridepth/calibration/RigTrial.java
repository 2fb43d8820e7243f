package iridepth.calibration;

import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Material;
import iridepth.optics.Materials;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.simulation.Detector;
import iridepth.simulation.Medium;
import iridepth.simulation.Photograph;
import iridepth.simulation.Scene;
import iridepth.simulation.Shot;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A simulated scene as a calibration sees it: patch means relative to the flat, and pixels to read with the result.
 */
final class RigTrial {
    private static final int STRIDE = 7;
    private static final double NEAR_NM = 5;
    private static final double SPACING_NM = 3;
    private final Scene scene;
    private final Shot shot;
    /** Signal of the flat per channel, glare included, on the scale of the simulation. */
    private final double[] flat;
    private final double[] glare;

    /**
     * What came of reading every few pixels of the scene.
     *
     * @param readings of how many pixels
     * @param near     share of them within 5 nm of the truth: the rest are of another order
     * @param rms      root mean square error, nm, of those within 5 nm
     * @param bias     their mean error, nm
     * @param coverage share of errors within twice the stated uncertainty
     * @param stated   root mean square of their stated uncertainty, nm
     * @param limit    root mean square of the Cramer-Rao bound, nm: what noise alone leaves
     */
    record Outcome(int readings, double near, double rms, double bias, double coverage, double stated, double limit) {
    }

    RigTrial(Scene scene) {
        this.scene = scene;
        this.shot = scene.shot();
        double[][] e = scene.rig().responses();
        this.glare = new double[e.length];
        this.flat = shot.flatSignal();
        for (int c = 0; c < e.length; c++) {
            glare[c] = scene.rig().glare() * Arrays.stream(e[c]).sum();
            flat[c] += glare[c];
        }
    }

    /** The stated stack, view, lamp and steps. */
    FitInput input() {
        Stack stack = stack();
        double thickest = scene.rangeNm()[1];
        String statement = scene.believedView().statement();
        View view = View.aperture(Double.parseDouble(statement.substring(statement.indexOf('=') + 1)), stack, thickest);
        Light light = new Light("stated lamp", Spectrum.of(scene.believedLamp().power()), false);
        List<String> names = new ArrayList<>();
        for (int c = 0; c < flat.length; c++) {
            names.add("channel " + (c + 1));
        }
        return FitInput.of(names, light, stack, Optional.of(Stack.parse(scene.flatStack().text(), materials())), view,
                range(), steps());
    }

    ThicknessRange range() {
        return new ThicknessRange(scene.rangeNm()[0], scene.rangeNm()[1]);
    }

    Stack stack() {
        return Stack.parse(scene.stack().text(), materials());
    }

    private Materials materials() {
        Map<String, Material> own = new LinkedHashMap<>();
        for (Medium medium : scene.stack().media()) {
            if (!medium.statement().isEmpty()) {
                own.put(medium.name(), Material.constant(medium.name(), medium.n().at(550), 0));
            }
        }
        return new Materials(own);
    }

    /** Means of the step patches relative to a flat taken at the same size. */
    private List<StepSignal> steps() {
        Photograph steps = shot.steps(scene.steps(), scene.seed() + 3);
        Photograph flats = shot.flat(steps.width(), steps.height(), scene.seed() + 1);
        Photograph dark = shot.dark(steps.width(), steps.height(), scene.seed() + 2);
        Detector detector = scene.rig().detector();
        List<StepSignal> result = new ArrayList<>();
        for (int j = 0; j < scene.steps().thickness().length; j++) {
            int[] r = scene.steps().region(j);
            double[] signal = new double[flat.length];
            double[] variance = new double[flat.length];
            for (int c = 0; c < flat.length; c++) {
                double black = dark.mean(c, r[0], r[1], r[2], r[3]);
                double above = flats.mean(c, r[0], r[1], r[2], r[3]) - black;
                signal[c] = (steps.mean(c, r[0], r[1], r[2], r[3]) - black) / above;
                double sigma = detector.noiseRounded(signal[c] * above / flats.fullScale()) * flats.fullScale() / above;
                variance[c] = sigma * sigma / (r[2] * r[3]);
            }
            result.add(StepSignal.of("step " + (j + 1), scene.steps().thickness()[j], signal, variance));
        }
        return result;
    }

    /** Signal of the true rig at a thickness, relative to the flat. */
    double[] truth(double thicknessNm) {
        double[] signal = new double[flat.length];
        for (int c = 0; c < flat.length; c++) {
            signal[c] = (shot.curve().signal(c, thicknessNm) + glare[c]) / flat[c];
        }
        return signal;
    }

    /** Signal of the true rig for a surface of any reflectance, relative to the flat. */
    double[] seen(double[] reflectance) {
        double[][] e = scene.rig().responses();
        double[] signal = new double[flat.length];
        for (int c = 0; c < flat.length; c++) {
            double sum = glare[c];
            for (int i = 0; i < reflectance.length; i++) {
                sum += e[c][i] * reflectance[i];
            }
            signal[c] = sum / flat[c];
        }
        return signal;
    }

    /** Noise of a pixel's signal relative to the flat. */
    double[] noise(double[] signal) {
        double[] sigma = new double[flat.length];
        for (int c = 0; c < flat.length; c++) {
            sigma[c] = shot.signalNoise(c, signal[c] * flat[c] - glare[c]) / flat[c];
        }
        return sigma;
    }

    /** Reads every few pixels of the photograph on a curve, each by itself. */
    Outcome read(ColourCurve curve) {
        return read(new ScanReader(curve));
    }

    private Outcome read(ScanReader reader) {
        Photograph photo = shot.photo(scene.field(), scene.seed());
        double[] signals = shot.signals(photo);
        double[] truth = scene.field().truth();
        double[] limit = iridepth.simulation.CramerRao.bounds(shot, scene.field());
        int all = 0;
        int n = 0;
        int covered = 0;
        double square = 0;
        double sum = 0;
        double stated = 0;
        double bound = 0;
        for (int i = 0; i < truth.length; i += STRIDE) {
            if (Double.isNaN(truth[i])) {
                continue;
            }
            double[] signal = new double[flat.length];
            for (int c = 0; c < flat.length; c++) {
                signal[c] = (signals[i * flat.length + c] + glare[c]) / flat[c];
            }
            double[] reading = reader.read(signal, noise(signal));
            double error = reading[0] - truth[i];
            all++;
            if (Math.abs(error) > NEAR_NM) {
                continue;
            }
            n++;
            square += error * error;
            sum += error;
            stated += reading[1] * reading[1];
            bound += limit[i] * limit[i];
            covered += Math.abs(error) <= 2 * reading[1] ? 1 : 0;
        }
        return new Outcome(all, n / (double) all, Math.sqrt(square / n), sum / n, covered / (double) n, Math.sqrt(stated / n),
                Math.sqrt(bound / n));
    }

    /**
     * Error of the curve itself: the root mean square over thicknesses between the outermost steps, the worst tenth left out, of what
     * the noiseless true signal reads on it.
     */
    double curveError(ColourCurve curve) {
        double[] known = scene.steps().thickness();
        double from = Arrays.stream(known).min().orElseThrow();
        double to = Arrays.stream(known).max().orElseThrow();
        List<Double> squares = new ArrayList<>();
        for (double d = from; d <= to; d += SPACING_NM) {
            double[] signal = truth(d);
            double[] variance = Arrays.stream(noise(signal)).map(v -> v * v).toArray();
            double error = CurveReading.near(curve, signal, variance, d).thicknessNm() - d;
            squares.add(error * error);
        }
        return Math.sqrt(squares.stream().sorted().limit((long) (0.9 * squares.size())).mapToDouble(v -> v).average().orElseThrow());
    }

    Scene scene() {
        return scene;
    }
}
