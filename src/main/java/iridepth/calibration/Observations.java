package iridepth.calibration;

import iridepth.optics.Reflectance;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.List;

/**
 * The linear model of what was observed: signal q[c][j] = sum over k of design[c][j][k] w[c][k] + glare[c], with w the weights of
 * the bumps. Observation 0 is the flat, where there is one: q = 1 by definition. Then follow the steps, then the patches.
 *
 * @param design       sum over wavelength of carrier x bump x reflectance, [channel][observation][bump]
 * @param slope        its derivative by the observation's thickness, 1/nm; zeros for flat and patches
 * @param signal       q, [channel][observation]
 * @param variance     variance of q by noise and by the patches' reflectance, [channel][observation]
 * @param thickness    standard uncertainty of the thickness, nm; NaN where nobody stated it, 0 for flat and patches
 * @param stepsFrom    index of the first step
 * @param steps        number of steps
 */
record Observations(double[][][] design, double[][][] slope, double[][] signal, double[][] variance, double[] thickness,
                    int stepsFrom, int steps) {
    /** The flat's own signal is 1 but for the noise of its smoothed field. */
    private static final double FLAT_NOISE = 2e-4;

    /** The observations of an input. */
    static Observations of(FitInput input) {
        Reflectance film = Reflectance.of(input.stack(), input.view());
        int from = input.flatStack().isPresent() ? 1 : 0;
        int count = from + input.steps().size() + input.patches().size();
        double[][] reflectance = new double[count][];
        double[][] derivative = new double[count][Grid.SIZE];
        double[] thickness = new double[count];
        int channels = input.channels().size();
        double[][] signal = new double[channels][count];
        double[][] variance = new double[channels][count];
        input.flatStack().ifPresent(stack -> reflectance[0] = Reflectance.of(stack, input.view()).spectrum(0));
        for (int c = 0; c < channels && from == 1; c++) {
            signal[c][0] = 1;
            variance[c][0] = FLAT_NOISE * FLAT_NOISE;
        }
        for (int j = 0; j < input.steps().size(); j++) {
            StepSignal step = input.steps().get(j);
            reflectance[from + j] = spectrum(film, step.thicknessNm(), derivative[from + j]);
            thickness[from + j] = step.uncertaintyNm();
            for (int c = 0; c < channels; c++) {
                signal[c][from + j] = step.signal()[c];
                variance[c][from + j] = step.variance()[c];
            }
        }
        for (int j = 0; j < input.patches().size(); j++) {
            PatchSignal patch = input.patches().get(j);
            int at = from + input.steps().size() + j;
            reflectance[at] = patch.reflectance().toArray();
            for (int c = 0; c < channels; c++) {
                signal[c][at] = patch.signal()[c];
                variance[c][at] = patch.variance()[c] + Math.pow(patch.uncertainty() * patch.signal()[c], 2);
            }
        }
        List<Spectrum> carriers = input.carriers();
        return new Observations(project(carriers, reflectance), project(carriers, derivative), signal, variance, thickness, from,
                input.steps().size());
    }

    /** Reflectance at a thickness, and its derivative. */
    private static double[] spectrum(Reflectance film, double thicknessNm, double[] derivative) {
        double[] result = new double[Grid.SIZE];
        double[] one = new double[1];
        double[] change = new double[1];
        for (int i = 0; i < Grid.SIZE; i++) {
            film.sweep(i, thicknessNm, 1, one, change);
            result[i] = one[0];
            derivative[i] = change[0];
        }
        return result;
    }

    private static double[][][] project(List<Spectrum> carriers, double[][] spectra) {
        double[][][] result = new double[carriers.size()][spectra.length][Bumps.COUNT];
        double[] product = new double[Grid.SIZE];
        for (int c = 0; c < carriers.size(); c++) {
            for (int j = 0; j < spectra.length; j++) {
                for (int i = 0; i < Grid.SIZE; i++) {
                    product[i] = carriers.get(c).at(i) * spectra[j][i];
                }
                Bumps.project(product, result[c][j]);
            }
        }
        return result;
    }

    int channels() {
        return signal.length;
    }

    /** Number of observations of each channel. */
    int count() {
        return thickness.length;
    }

    /** One channel alone. */
    Observations channel(int c) {
        return new Observations(new double[][][] {design[c]}, new double[][][] {slope[c]}, new double[][] {signal[c]},
                new double[][] {variance[c]}, thickness, stepsFrom, steps);
    }

    /** The same without one of the steps. */
    Observations withoutStep(int step) {
        int out = stepsFrom + step;
        return new Observations(drop(design, out), drop(slope, out), drop(signal, out), drop(variance, out),
                drop(new double[][] {thickness}, out)[0], stepsFrom, steps - 1);
    }

    private static double[][][] drop(double[][][] from, int out) {
        double[][][] result = new double[from.length][from[0].length - 1][];
        for (int c = 0; c < from.length; c++) {
            for (int j = 0; j < result[c].length; j++) {
                result[c][j] = from[c][j < out ? j : j + 1];
            }
        }
        return result;
    }

    private static double[][] drop(double[][] from, int out) {
        double[][] result = new double[from.length][from[0].length - 1];
        for (int c = 0; c < from.length; c++) {
            for (int j = 0; j < result[c].length; j++) {
                result[c][j] = from[c][j < out ? j : j + 1];
            }
        }
        return result;
    }
}
