package iridepth.calibration;

import iridepth.colour.Light;
import iridepth.optics.Material;
import iridepth.optics.View;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Estimates the effective responses of a camera from films of known thickness.
 */
public final class ResponseFit {
    /** Suppositions tried: smoothness of the sensitivities, and how far they stray from a generic lobe. */
    private static final double[] LENGTHS_NM = {15, 22, 32, 48};
    private static final double[][] UNKNOWN_SENSOR = {{0.2, 1}, {0.2, 2}, {0.6, 1}, {0.6, 2}};
    private static final double[][] KNOWN_SENSOR = {{0.02, 0}, {0.06, 0}, {0.2, 0}};
    private static final double[] RESIDUALS = {0.4, 1, 2.5};
    private static final double[] STEP_NM = {0.05, 0.15, 0.45};
    private static final double COUPLING = 0.4;
    private static final double[] APERTURE_SIGMAS = {-2, -1, 0, 1, 2};

    private final FitInput input;
    private SensorPrior prior;

    private ResponseFit(FitInput input) {
        this.input = input;
    }

    /**
     * Fits.
     *
     * @throws IllegalArgumentException if the steps cannot work; the message says what to add
     */
    public static Calibration fit(FitInput input) {
        return new ResponseFit(input).calibrate();
    }

    /**
     * Fits anew with films of the photo itself beside the steps: patches whose thickness was read with the first calibration and
     * is only roughly known, so that they say how the channels go together, while the steps say how thick. The curve must pass
     * through every colour that the film shows, and a photo shows many more than the steps.
     *
     * @param input the input of the first calibration
     * @param first that calibration; it keeps its figures, which judge it by the steps alone
     * @param films films of the photo, each with the uncertainty of its reading
     * @return a calibration that serves this photo better, or the first where there are no films
     * @throws IllegalArgumentException if the films do not fit the input
     */
    public static Calibration refine(FitInput input, Calibration first, List<StepSignal> films) {
        return films.isEmpty() ? first : new ResponseFit(input.withMore(films)).calibrate(first.figures());
    }

    private Calibration calibrate() {
        return calibrate(null);
    }

    private Calibration calibrate(FitFigures known) {
        Observations stated = Observations.of(input);
        prior = new SensorPrior(lobes(stated), midPrior()[0], midPrior()[1], 30, COUPLING);
        double[] aperture = aperture();
        FitInput corrected = input.withView(Aperture.scaled(input.view(), aperture[0]));
        Observations data = Observations.of(corrected);
        List<SensorPrior> priors = new ArrayList<>();
        List<NoiseLevel> levels = new ArrayList<>();
        Mixture mixture = mixture(data, priors, levels);
        SensorPrior bestPrior = priors.get(mixture.best());
        NoiseLevel bestLevel = levels.get(mixture.best());
        ResponseModel model = new ResponseModel(input.channels(), corrected.carriers(), mixture.mean(), input.stack(),
                corrected.view());
        double[][] factors = mixture.factors();
        List<Variation> variations = variations(corrected, aperture[1], bestPrior, bestLevel, mixture);
        FitFigures figures = known != null ? known : new Judgement(corrected, data, mixture, bestPrior, bestLevel, priors.stream().distinct().toList()).figures(aperture,
                Aperture.of(input.view()), levels);
        return new Calibration(model, factors, variations, figures);
    }

    private double[] midPrior() {
        return input.sensitivities().isEmpty() ? new double[] {0.4, 1.5} : KNOWN_SENSOR[1];
    }

    /** The generic lobe of each channel with the largest evidence; a known sensitivity needs none. */
    private double[][] lobes(Observations data) {
        double[][] best = new double[data.channels()][];
        List<double[]> lobes = SensorPrior.generic();
        for (int c = 0; c < best.length; c++) {
            best[c] = SensorPrior.level();
            if (input.sensitivities().isEmpty()) {
                Observations own = data.channel(c);
                double[] evidence = lobes.parallelStream().mapToDouble(lobe -> LaplaceFit.of(own, new SensorPrior(
                        new double[][] {lobe}, midPrior()[0], midPrior()[1], 30, 0), nominal()).evidence()).toArray();
                int most = 0;
                for (int i = 1; i < evidence.length; i++) {
                    most = evidence[i] > evidence[most] ? i : most;
                }
                best[c] = lobes.get(most);
            }
        }
        return best;
    }

    private NoiseLevel nominal() {
        return new NoiseLevel(input.inputs().flatResidual(), STEP_NM[1]);
    }

    /** Factor on the aperture that the steps call for, and its standard uncertainty. */
    private double[] aperture() {
        double stated = Aperture.of(input.view());
        double sigma = input.inputs().numericalAperture();
        if (stated == 0 || sigma == 0) {
            return new double[] {1, 0};
        }
        double[] factor = Arrays.stream(APERTURE_SIGMAS).map(k -> Math.max(0.05, (stated + k * sigma) / stated)).toArray();
        List<Posterior> fits = IntStream.range(0, factor.length).parallel().mapToObj(k -> LaplaceFit.of(Observations.of(
                input.withView(Aperture.scaled(input.view(), factor[k]))), prior, nominal())).toList();
        Mixture mixture = Mixture.of(fits, Arrays.stream(APERTURE_SIGMAS).map(k -> -k * k / 2).toArray());
        double mean = 0;
        double square = 0;
        for (int k = 0; k < factor.length; k++) {
            mean += mixture.probability()[k] * factor[k];
            square += mixture.probability()[k] * factor[k] * factor[k];
        }
        double spacing = sigma / stated / Math.sqrt(12);
        return new double[] {mean, Math.sqrt(Math.max(0, square - mean * mean) + spacing * spacing)};
    }

    private Mixture mixture(Observations data, List<SensorPrior> priors, List<NoiseLevel> levels) {
        double[][] spreads = input.sensitivities().isEmpty() ? UNKNOWN_SENSOR : KNOWN_SENSOR;
        boolean unstated = Arrays.stream(data.thickness()).anyMatch(Double::isNaN);
        double[] stepNm = unstated ? STEP_NM : new double[] {0};
        for (double length : LENGTHS_NM) {
            for (double[] spread : spreads) {
                for (double residual : RESIDUALS) {
                    for (double step : stepNm) {
                        priors.add(prior.with(spread[0], spread[1], length));
                        levels.add(new NoiseLevel(residual * input.inputs().flatResidual(), step));
                    }
                }
            }
        }
        List<Posterior> fits = IntStream.range(0, priors.size()).parallel()
                .mapToObj(i -> LaplaceFit.of(data, priors.get(i), levels.get(i))).toList();
        return Mixture.of(fits, new double[fits.size()]);
    }

    private List<Variation> variations(FitInput corrected, double apertureSigma, SensorPrior bestPrior, NoiseLevel level,
                                       Mixture mixture) {
        List<Variation> result = new ArrayList<>();
        double[] base = mixture.fits().get(mixture.best()).parameters();
        double[] mean = mixture.mean();
        if (apertureSigma > 0) {
            View wider = Aperture.scaled(corrected.view(), 1 + apertureSigma);
            result.add(variation("numerical aperture", corrected.withView(wider), bestPrior, level, base, mean));
        }
        double index = input.inputs().relativeIndex();
        if (index > 0) {
            Material denser = input.stack().film().denser(1 + index);
            result.add(variation("film index", corrected.withStack(input.stack().withFilm(denser)), bestPrior, level, base, mean));
        }
        if (input.inputs().lampK() > 0) {
            List<Light> hotter = input.lights().stream().map(l -> l.hotter(input.inputs().lampK())).toList();
            result.add(variation("lamp", corrected.withLights(hotter), bestPrior, level, base, mean));
        }
        return result;
    }

    private Variation variation(String name, FitInput moved, SensorPrior bestPrior, NoiseLevel level, double[] base,
                                double[] mean) {
        double[] p = LaplaceFit.of(Observations.of(moved), bestPrior, level).parameters();
        for (int k = 0; k < p.length; k++) {
            p[k] += mean[k] - base[k];
        }
        return new Variation(name, new ResponseModel(input.channels(), moved.carriers(), p, moved.stack(), moved.view()));
    }
}
