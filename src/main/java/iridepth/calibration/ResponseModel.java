package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;

/**
 * Responses as sums of bumps before a film: what a colour curve is computed from.
 *
 * @param channels   names
 * @param carriers   what each channel's bumps multiply
 * @param parameters weights of the bumps channel by channel, each channel's glare behind its weights
 * @param stack      the stack as stated
 * @param index      how the film's index differs from the stated one
 * @param view       the directions
 */
record ResponseModel(List<String> channels, List<Spectrum> carriers, double[] parameters, Stack stack,
                     IndexChange index, View view) {
    private static final int WIDTH = Bumps.COUNT + 1;

    /** Responses of any parameters on these carriers: carrier times sum of weighted bumps. */
    List<double[]> responses(double[] p) {
        List<double[]> result = new ArrayList<>();
        for (int c = 0; c < channels.size(); c++) {
            double[] weights = new double[Bumps.COUNT];
            System.arraycopy(p, c * WIDTH, weights, 0, Bumps.COUNT);
            double[] response = Bumps.sum(weights);
            for (int i = 0; i < Grid.SIZE; i++) {
                response[i] *= carriers.get(c).at(i);
            }
            result.add(response);
        }
        return result;
    }

    EffectiveResponses responses() {
        return new EffectiveResponses(channels, responses(parameters).stream().map(Spectrum::of).toList());
    }

    /** The stack with the film's index as changed. */
    Stack film() {
        return index.apply(stack);
    }

    double[] glare() {
        double[] glare = new double[channels.size()];
        for (int c = 0; c < glare.length; c++) {
            glare[c] = parameters[c * WIDTH + Bumps.COUNT];
        }
        return glare;
    }

    ColourCurve curve(ThicknessRange range, double stepNm) {
        return ColourCurve.of(responses(), Reflectance.of(film(), view), range, stepNm).plus(glare());
    }

    /**
     * How the signals change along given directions of the parameters.
     *
     * @param factors directions, [direction][parameter]
     * @param curve   where: its samples
     * @return [sample][direction * channels + channel]
     */
    double[][] along(double[][] factors, ColourCurve curve) {
        double[][][] design = design(curve);
        int count = channels.size();
        double[][] result = new double[curve.size()][factors.length * count];
        for (int s = 0; s < result.length; s++) {
            for (int r = 0; r < factors.length; r++) {
                for (int c = 0; c < count; c++) {
                    double sum = factors[r][c * WIDTH + Bumps.COUNT];
                    for (int k = 0; k < Bumps.COUNT; k++) {
                        sum += design[s][c][k] * factors[r][c * WIDTH + k];
                    }
                    result[s][r * count + c] = sum;
                }
            }
        }
        return result;
    }

    /** Sum over wavelength of carrier x bump x reflectance, [sample][channel][bump]. */
    private double[][][] design(ColourCurve curve) {
        Reflectance reflectance = Reflectance.of(film(), view);
        double[][][] design = new double[curve.size()][channels.size()][Bumps.COUNT];
        double[] r = new double[curve.size()];
        for (int i = 0; i < Grid.SIZE; i++) {
            reflectance.sweep(i, curve.fromNm(), curve.stepNm(), r, null);
            int first = Bumps.first(i);
            double[] value = Bumps.values(i);
            for (int c = 0; c < channels.size(); c++) {
                double carrier = carriers.get(c).at(i);
                for (int s = 0; s < r.length; s++) {
                    for (int b = 0; b < Bumps.OVERLAP; b++) {
                        design[s][c][first + b] += carrier * value[b] * r[s];
                    }
                }
            }
        }
        return design;
    }
}
