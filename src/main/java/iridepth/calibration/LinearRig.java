package iridepth.calibration;

import iridepth.optics.Reflectance;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * A rig as a calibration sees it before any photo: signals at some thicknesses, and how they change with the logarithms
 * of the bumps' weights and of the glare around those of a supposed sensor.
 *
 * @param input      the rig
 * @param weights    weights of the bumps channel by channel, each channel's glare behind its weights
 * @param thickness  thicknesses, nm
 * @param stepNm     their spacing, NaN where they are not evenly spaced
 * @param signal     [thickness][channel], a perfect reflector's being 1
 * @param slope      its derivative by thickness, 1/nm
 * @param bend       its second derivative, 1/nm^2
 * @param rows       derivatives of the signals by the logarithms, [thickness][channel][parameter]
 */
record LinearRig(FitInput input, double[] weights, double[] thickness, double stepNm, double[][] signal, double[][] slope, double[][] bend,
                 double[][][] rows) {
    static final int WIDTH = Bumps.COUNT + 1;
    private static final double BEND_STEP_NM = 0.5;
    /** Signal of a film on which the usual glare is reckoned, a perfect reflector's being 1: that of an oxide on silicon. */
    private static final double TYPICAL_SIGNAL = 0.3;

    /** The rig with a supposed sensor, at {@code size} evenly spaced thicknesses. */
    static LinearRig evenly(FitInput input, List<Spectrum> supposed, double fromNm, double stepNm, int size) {
        double[] thickness = new double[size];
        Arrays.setAll(thickness, i -> fromNm + stepNm * i);
        return of(input, weights(input, supposed), thickness, stepNm);
    }

    /** The rig with a supposed sensor, at any thicknesses. */
    static LinearRig at(FitInput input, List<Spectrum> supposed, double[] thickness) {
        return of(input, weights(input, supposed), thickness, Double.NaN);
    }

    /** The same weights before other inputs. */
    LinearRig moved(FitInput other) {
        return of(other, weights, thickness, stepNm);
    }

    /** Weights that follow the sensitivities, with the generic floor, scaled for a perfect reflector; the usual glare. */
    private static double[] weights(FitInput input, List<Spectrum> supposed) {
        List<Spectrum> carriers = input.carriers();
        double[] weights = new double[carriers.size() * WIDTH];
        double[] design = new double[Bumps.COUNT];
        for (int c = 0; c < carriers.size(); c++) {
            double[] lobe = lobe(supposed.get(c));
            Bumps.project(carriers.get(c).toArray(), design);
            double white = 0;
            for (int k = 0; k < Bumps.COUNT; k++) {
                white += design[k] * (lobe[k] + SensorPrior.FLOOR);
            }
            for (int k = 0; k < Bumps.COUNT; k++) {
                weights[c * WIDTH + k] = (lobe[k] + SensorPrior.FLOOR) / white;
            }
            weights[c * WIDTH + Bumps.COUNT] = SensorPrior.GLARE * TYPICAL_SIGNAL;
        }
        return weights;
    }

    /** A sensitivity at the bumps, 1 at its highest. */
    static double[] lobe(Spectrum sensitivity) {
        double[] lobe = new double[Bumps.COUNT];
        double most = 0;
        for (int k = 0; k < lobe.length; k++) {
            int i = (int) Math.round(Bumps.centre(k)) - Grid.FIRST_NM;
            lobe[k] = Math.max(0, sensitivity.at(Math.max(0, Math.min(Grid.SIZE - 1, i))));
            most = Math.max(most, lobe[k]);
        }
        for (int k = 0; k < lobe.length; k++) {
            lobe[k] /= most;
        }
        return lobe;
    }

    private static LinearRig of(FitInput input, double[] weights, double[] thickness, double stepNm) {
        int channels = input.channels().size();
        int size = thickness.length;
        Reflectance film = Reflectance.of(input.stack(), input.view());
        double[][] r = new double[Grid.SIZE][size];
        double[][] dr = new double[Grid.SIZE][size];
        double[][] beyond = new double[Grid.SIZE][size];
        IntStream.range(0, Grid.SIZE).parallel().forEach(i -> {
            sweep(film, i, thickness, BEND_STEP_NM, stepNm, r[i], beyond[i]);
            sweep(film, i, thickness, 0, stepNm, r[i], dr[i]);
        });
        double[][] response = responses(input, weights, channels);
        double[][] signal = new double[size][channels];
        double[][] slope = new double[size][channels];
        double[][] bend = new double[size][channels];
        double[][][] rows = new double[size][channels][];
        for (int t = 0; t < size; t++) {
            double[] spectrum = new double[Grid.SIZE];
            for (int c = 0; c < channels; c++) {
                double next = 0;
                for (int i = 0; i < Grid.SIZE; i++) {
                    spectrum[i] = r[i][t];
                    slope[t][c] += response[c][i] * dr[i][t];
                    next += response[c][i] * beyond[i][t];
                }
                bend[t][c] = (next - slope[t][c]) / BEND_STEP_NM;
            }
            rows[t] = rows(input, weights, spectrum, signal[t]);
        }
        return new LinearRig(input, weights, thickness, stepNm, signal, slope, bend, rows);
    }

    /** Reflectance and its derivative at the thicknesses, each increased by an offset. */
    private static void sweep(Reflectance film, int gridIndex, double[] thickness, double offset, double stepNm, double[] value,
                              double[] derivative) {
        if (!Double.isNaN(stepNm)) {
            film.sweep(gridIndex, thickness[0] + offset, stepNm, value, derivative);
            return;
        }
        double[] one = new double[1];
        double[] change = new double[1];
        for (int t = 0; t < thickness.length; t++) {
            film.sweep(gridIndex, thickness[t] + offset, 1, one, change);
            value[t] = one[0];
            derivative[t] = change[0];
        }
    }

    private static double[][] responses(FitInput input, double[] weights, int channels) {
        List<Spectrum> carriers = input.carriers();
        double[][] response = new double[channels][];
        for (int c = 0; c < channels; c++) {
            double[] own = new double[Bumps.COUNT];
            System.arraycopy(weights, c * WIDTH, own, 0, Bumps.COUNT);
            response[c] = Bumps.sum(own);
            for (int i = 0; i < Grid.SIZE; i++) {
                response[c][i] *= carriers.get(c).at(i);
            }
        }
        return response;
    }

    /** Derivatives of the signals of a surface of given reflectance, [channel][parameter]; the signals go into the array. */
    static double[][] rows(FitInput input, double[] weights, double[] reflectance, double[] signal) {
        List<Spectrum> carriers = input.carriers();
        double[][] rows = new double[carriers.size()][carriers.size() * WIDTH];
        double[] product = new double[Grid.SIZE];
        double[] design = new double[Bumps.COUNT];
        for (int c = 0; c < rows.length; c++) {
            for (int i = 0; i < Grid.SIZE; i++) {
                product[i] = carriers.get(c).at(i) * reflectance[i];
            }
            Bumps.project(product, design);
            signal[c] = 0;
            for (int k = 0; k < Bumps.COUNT; k++) {
                rows[c][c * WIDTH + k] = design[k] * weights[c * WIDTH + k];
                signal[c] += rows[c][c * WIDTH + k];
            }
            rows[c][c * WIDTH + Bumps.COUNT] = weights[c * WIDTH + Bumps.COUNT];
            signal[c] += weights[c * WIDTH + Bumps.COUNT];
        }
        return rows;
    }
}
