package iridepth.calibration;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/**
 * What a fit supposes and cannot know: how smooth the sensitivities are, how far they stray from a generic lobe, how large the
 * misfit is that nobody measured. All combinations are fitted and weighted by their evidence.
 *
 * @param priors one per combination
 * @param levels one per combination
 */
record Suppositions(List<SensorPrior> priors, List<NoiseLevel> levels) {
    private static final double[] LENGTHS_NM = {15, 22, 32, 48};
    private static final double[][] UNKNOWN_SENSOR = {{0.2, 1}, {0.2, 2}, {0.6, 1}, {0.6, 2}};
    private static final double[][] KNOWN_SENSOR = {{0.02, 0}, {0.06, 0}, {0.2, 0}};
    /** In units of the flat's stated residual. */
    private static final double[] RESIDUALS = {0.3, 1, 3};
    private static final double[] STEP_NM = {0.04, 0.13, 0.4};
    private static final double MIDDLE_LENGTH_NM = 30;
    private static final double[] MIDDLE_UNKNOWN = {0.4, 1.5};
    private static final double COUPLING = 0.4;
    private static final double UNLIKELY = 0.05;
    private static final int FEW = 3;

    /**
     * A prior in the middle of what is supposed, around the generic lobe of each channel that has the largest evidence; a known
     * sensitivity is its own lobe.
     */
    static SensorPrior middle(FitInput input, Observations data) {
        boolean known = !input.sensitivities().isEmpty();
        double[] spread = known ? KNOWN_SENSOR[1] : MIDDLE_UNKNOWN;
        NoiseLevel level = middleLevel(input);
        List<double[]> lobes = known ? List.of(SensorPrior.level()) : SensorPrior.generic();
        double[][] best = new double[data.channels()][];
        for (int c = 0; c < best.length; c++) {
            Observations own = data.channel(c);
            double[] evidence = lobes.parallelStream().mapToDouble(lobe -> LaplaceFit.of(own, new SensorPrior(
                    new double[][] {lobe}, spread[0], spread[1], MIDDLE_LENGTH_NM, 0), level).evidence()).toArray();
            best[c] = lobes.get(IntStream.range(0, evidence.length).reduce(0, (a, b) -> evidence[b] > evidence[a] ? b : a));
        }
        return new SensorPrior(best, spread[0], spread[1], MIDDLE_LENGTH_NM, COUPLING);
    }

    /** The noise level in the middle of what is supposed. */
    static NoiseLevel middleLevel(FitInput input) {
        return new NoiseLevel(RESIDUALS[1] * input.inputs().flatResidual(), STEP_NM[1]);
    }

    /**
     * All combinations of the priors with those noise levels that the data do not rule out under the middle prior; the steps'
     * thicknesses are part of the noise only where their uncertainty was not stated.
     */
    static Suppositions of(FitInput input, SensorPrior middle, Observations data) {
        boolean unstated = input.steps().stream().anyMatch(s -> Double.isNaN(s.uncertaintyNm()));
        double[] stepNm = unstated ? STEP_NM : new double[] {0};
        List<NoiseLevel> levels = new ArrayList<>();
        for (double residual : RESIDUALS) {
            for (double step : stepNm) {
                levels.add(new NoiseLevel(residual * input.inputs().flatResidual(), step));
            }
        }
        double[] probability = new Suppositions(levels.stream().map(level -> middle).toList(), levels).fit(data).probability();
        List<NoiseLevel> likely = IntStream.range(0, levels.size()).filter(i -> probability[i] > UNLIKELY).mapToObj(levels::get).toList();
        return combined(input, middle, likely);
    }

    /** The likeliest few priors for the steps, with a noise level that is taken as known. */
    static Suppositions few(FitInput input, SensorPrior middle, NoiseLevel level, Observations steps) {
        Suppositions all = combined(input, middle, List.of(level));
        double[] probability = all.fit(steps).probability();
        int[] order = IntStream.range(0, probability.length).boxed().sorted(Comparator.comparingDouble(i -> -probability[i]))
                .mapToInt(i -> i).limit(FEW).toArray();
        return new Suppositions(Arrays.stream(order).mapToObj(all.priors::get).toList(),
                Arrays.stream(order).mapToObj(all.levels::get).toList());
    }

    /** A coarse selection for fits that must be made many times. */
    static Suppositions coarse(FitInput input, SensorPrior middle) {
        Suppositions all = combined(input, middle, Arrays.stream(RESIDUALS)
                .mapToObj(r -> new NoiseLevel(r * input.inputs().flatResidual(), STEP_NM[1])).toList());
        int[] those = IntStream.range(0, all.priors.size()).filter(i -> i / RESIDUALS.length % 2 == 0).toArray();
        return new Suppositions(Arrays.stream(those).mapToObj(all.priors::get).toList(),
                Arrays.stream(those).mapToObj(all.levels::get).toList());
    }

    /** The evidence of each. */
    double[] evidence(Observations data) {
        return IntStream.range(0, priors.size()).parallel()
                .mapToDouble(i -> LaplaceFit.of(data, priors.get(i), levels.get(i)).evidence()).toArray();
    }

    private static Suppositions combined(FitInput input, SensorPrior middle, List<NoiseLevel> levels) {
        List<SensorPrior> priors = new ArrayList<>();
        List<NoiseLevel> all = new ArrayList<>();
        for (double length : LENGTHS_NM) {
            for (double[] spread : input.sensitivities().isEmpty() ? UNKNOWN_SENSOR : KNOWN_SENSOR) {
                for (NoiseLevel level : levels) {
                    priors.add(middle.with(spread[0], spread[1], length));
                    all.add(level);
                }
            }
        }
        return new Suppositions(priors, all);
    }

    /** Fits them all; on any number of threads the same. */
    Mixture fit(Observations data) {
        List<Posterior> fits = IntStream.range(0, priors.size()).parallel()
                .mapToObj(i -> LaplaceFit.of(data, priors.get(i), levels.get(i))).toList();
        return Mixture.of(fits, new double[fits.size()]);
    }

    /** The combinations of one noise level. */
    Suppositions at(NoiseLevel level) {
        int[] those = IntStream.range(0, levels.size()).filter(i -> levels.get(i).equals(level)).toArray();
        return new Suppositions(Arrays.stream(those).mapToObj(priors::get).toList(), Arrays.stream(those).mapToObj(levels::get).toList());
    }

    /** Mean noise level, weighted by the fits' probabilities. */
    NoiseLevel mean(Mixture mixture) {
        double residual = 0;
        double step = 0;
        for (int i = 0; i < levels.size(); i++) {
            residual += mixture.probability()[i] * levels.get(i).residual();
            step += mixture.probability()[i] * levels.get(i).stepNm();
        }
        return new NoiseLevel(residual, step);
    }
}
