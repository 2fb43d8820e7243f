package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.optics.Reflectance;
import iridepth.photo.ChannelNoise;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;

/**
 * What films of known thickness would tell of a supposed sensor: the calibration's model made linear around it, with smoothness
 * and spread of the sensitivities in the middle of what the calibration tries.
 *
 * @param input         the rig, without steps
 * @param supposed      sensitivities supposed, one per channel
 * @param noise         noise of a pixel
 * @param uncertaintyNm standard uncertainty of a step's thickness, nm
 */
record StepModel(FitInput input, List<Spectrum> supposed, ChannelNoise noise, double uncertaintyNm) {
    /** Pixels of a step's patch over which noise averages, common practice. */
    private static final double PATCH_PIXELS = 1000;
    private static final double FLAT_NOISE = 2e-4;
    private static final double LEVEL = 0.4;
    private static final double SKIRT = 1.5;
    private static final double LENGTH_NM = 30;
    private static final double COUPLING = 0.4;

    /** Signals of one photo: their derivatives, the covariance of their noise, and their values. */
    private record Patch(double[][] rows, double[][] noise, double[] signal) {
    }

    LinearRig rig(double fromNm, double stepNm, int size) {
        return LinearRig.evenly(input, supposed, fromNm, stepNm, size);
    }

    LinearRig rig(double[] thickness) {
        return LinearRig.at(input, supposed, thickness);
    }

    /** What is known before the first step: the prior, and the flat where there is one. */
    LinearPosterior start(LinearRig rig) {
        double[][] lobes = supposed.stream().map(LinearRig::lobe).toArray(double[][]::new);
        LinearPosterior prior = prior();
        return flat(input, rig.weights()).stream().reduce(prior,
                (p, flat) -> p.observed(flat.rows, flat.noise, new double[lobes.length]), (a, b) -> b);
    }

    private LinearPosterior prior() {
        double[][] lobes = supposed.stream().map(LinearRig::lobe).toArray(double[][]::new);
        return LinearPosterior.of(PriorCovariance.of(new SensorPrior(lobes, LEVEL, SKIRT, LENGTH_NM, COUPLING)), lobes.length);
    }

    /** The posterior once the step at one of the rig's thicknesses has been seen. */
    LinearPosterior with(LinearPosterior before, LinearRig rig, int at) {
        Patch step = step(rig, at);
        return before.observed(step.rows, step.noise, new double[step.signal.length]);
    }

    /** Covariance of the noise of a step's signals: pixels averaged, what the flat leaves, and the thickness, common to all. */
    double[][] stepNoise(LinearRig rig, int at) {
        return step(rig, at).noise;
    }

    private Patch step(LinearRig rig, int at) {
        double[] signal = rig.signal()[at];
        double[][] covariance = new double[signal.length][signal.length];
        for (int a = 0; a < signal.length; a++) {
            double residual = input.inputs().flatResidual() * signal[a];
            covariance[a][a] = noise.variance(a, signal[a]) / PATCH_PIXELS + residual * residual;
            for (int b = 0; b < signal.length; b++) {
                covariance[a][b] += rig.slope()[at][a] * rig.slope()[at][b] * uncertaintyNm * uncertaintyNm;
            }
        }
        return new Patch(rig.rows()[at], covariance, signal);
    }

    private static List<Patch> flat(FitInput input, double[] weights) {
        return input.flatStack().stream().map(stack -> {
            int n = input.channels().size();
            double[] signal = new double[n];
            double[][] rows = LinearRig.rows(input, weights, Reflectance.of(stack, input.view()).spectrum(0), signal);
            double[][] covariance = new double[n][n];
            for (int c = 0; c < n; c++) {
                covariance[c][c] = FLAT_NOISE * FLAT_NOISE * signal[c] * signal[c];
            }
            return new Patch(rows, covariance, signal);
        }).toList();
    }

    /**
     * A curve of the supposed sensor with the covariance that a calibration is expected to leave: of responses and glare, and of
     * index, lamp and aperture as far as they are uncertain and the fit to the steps, which see them too, does not absorb them.
     *
     * @param steps which of the rig's thicknesses are steps
     */
    ColourCurve expected(ColourCurve curve, LinearRig rig, List<Integer> steps) {
        LinearRig fine = rig(curve.fromNm(), curve.stepNm(), curve.size());
        LinearPosterior posterior = start(rig);
        for (int at : steps) {
            posterior = with(posterior, rig, at);
        }
        int n = curve.channels();
        double[] covariance = new double[curve.size() * n * n];
        LinearPosterior known = posterior;
        IntStream.range(0, curve.size()).parallel().forEach(s -> {
            double[][] own = known.covariance(fine.rows()[s]);
            for (int a = 0; a < n * n; a++) {
                covariance[s * n * n + a] = own[a / n][a % n];
            }
        });
        for (FitInput moved : moved()) {
            LinearRig there = fine.moved(moved);
            LinearPosterior absorbed = absorbed(rig, rig.moved(moved), steps);
            for (int s = 0; s < curve.size(); s++) {
                double[] left = minus(minus(there.signal()[s], fine.signal()[s]), absorbed.change(fine.rows()[s]));
                for (int a = 0; a < n * n; a++) {
                    covariance[s * n * n + a] += left[a / n] * left[a % n];
                }
            }
        }
        return curve.withCovariance(covariance);
    }

    /** What the fit takes for a property of the sensor when an input has moved. */
    private LinearPosterior absorbed(LinearRig rig, LinearRig moved, List<Integer> steps) {
        LinearPosterior posterior = prior();
        List<Patch> before = new ArrayList<>(flat(input, rig.weights()));
        List<Patch> after = new ArrayList<>(flat(moved.input(), rig.weights()));
        for (int at : steps) {
            before.add(step(rig, at));
            after.add(step(moved, at));
        }
        for (int k = 0; k < before.size(); k++) {
            Patch patch = before.get(k);
            posterior = posterior.observed(patch.rows, patch.noise, minus(after.get(k).signal, patch.signal));
        }
        return posterior;
    }

    private List<FitInput> moved() {
        List<FitInput> moved = new ArrayList<>();
        InputUncertainty inputs = input.inputs();
        double aperture = Aperture.of(input.view());
        if (aperture > 0 && inputs.numericalAperture() > 0) {
            moved.add(input.withView(Aperture.scaled(input.view(), 1 + inputs.numericalAperture() / aperture)));
        }
        if (inputs.relativeIndex() > 0) {
            moved.add(input.withStack(input.stack().withFilm(input.stack().film().denser(1 + inputs.relativeIndex()))));
        }
        if (inputs.lampK() > 0) {
            moved.add(input.withLights(input.lights().stream().map(l -> l.hotter(inputs.lampK())).toList()));
        }
        return moved;
    }

    private static double[] minus(double[] a, double[] b) {
        double[] result = a.clone();
        for (int c = 0; c < result.length; c++) {
            result[c] -= b[c];
        }
        return result;
    }
}
