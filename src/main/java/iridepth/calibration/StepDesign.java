package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.photo.ChannelNoise;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Films to calibrate with: the thicknesses that leave the least systematic uncertainty over a range, before any is photographed.
 *
 * <p>The calibration's own model, smooth bumps times the lamp with what is believed of a sensor beforehand, is made linear around
 * a supposed sensor. Steps are added one by one, each where it most lowers the mean over the range of the systematic standard
 * uncertainty of thickness (a greedy design for the variance of prediction), then each is exchanged for a better one where there
 * is one (V. V. Fedorov, Theory of Optimal Experiments, 1972). Which sensor is supposed matters little to where the steps should
 * lie, more to the uncertainty that is expected.
 */
public final class StepDesign {
    /** Most steps that are proposed. */
    public static final int MOST = 12;
    private static final int FEWEST = 4;
    /** Another step pays when it lowers the mean uncertainty by this share. */
    private static final double WORTHWHILE = 0.1;
    private static final int MOST_THICKNESSES = 121;
    private static final int FEWEST_THICKNESSES = 61;
    private static final double SPACING_NM = 5;
    private static final int EXCHANGES = 2;

    private final StepModel model;
    private final StepCriterion criterion;
    /** The rig at the thicknesses that may be steps. */
    private final LinearRig films;
    private final List<Double> meanByCount = new ArrayList<>();
    private List<Integer> chosen = new ArrayList<>();

    private StepDesign(StepModel model, double[] atHand) {
        this.model = model;
        double from = model.input().range().fromNm();
        double length = model.input().range().toNm() - from;
        int size = (int) Math.max(FEWEST_THICKNESSES, Math.min(MOST_THICKNESSES, length / SPACING_NM + 1));
        double step = length / (size - 1);
        LinearRig rig = model.rig(from, step, size);
        this.criterion = new StepCriterion(model, rig);
        this.films = atHand.length == 0 ? rig : model.rig(atHand);
    }

    /**
     * Designs steps.
     *
     * @param input         the rig, without steps
     * @param supposed      sensitivities supposed, one per channel, any unit
     * @param noise         noise of a pixel, on a scale on which a perfect reflector gives 1
     * @param uncertaintyNm standard uncertainty of a step's thickness, nm, above 0
     * @param films         thicknesses at hand, nm, to choose from; empty for any in the range
     * @param count         how many steps; 0 for as many as pay
     * @throws IllegalArgumentException if there are fewer films than steps, or one lies outside the range
     */
    public static StepDesign of(FitInput input, List<Spectrum> supposed, ChannelNoise noise, double uncertaintyNm, double[] films,
                                int count) {
        if (!(uncertaintyNm > 0 && uncertaintyNm < 1e3)) {
            throw new IllegalArgumentException("the uncertainty of the steps must be above 0 nm, not " + uncertaintyNm);
        }
        double[] distinct = Arrays.stream(films).distinct().sorted().toArray();
        int most = films.length > 0 ? Math.min(MOST, distinct.length) : MOST;
        if (count < 0 || count > most) {
            throw new IllegalArgumentException("give 1 to " + most + " steps, not " + count);
        }
        for (double film : distinct) {
            if (!(film >= input.range().fromNm() && film <= input.range().toNm())) {
                throw new IllegalArgumentException("the film of " + film + " nm lies outside the range of " + input.range().fromNm()
                        + " to " + input.range().toNm() + " nm");
            }
        }
        StepDesign design = new StepDesign(new StepModel(input, supposed, noise, uncertaintyNm), distinct);
        design.choose(count, most);
        return design;
    }

    private void choose(int count, int most) {
        LinearPosterior posterior = model.start(films);
        while (chosen.size() < most) {
            int best = criterion.best(posterior, films, free(-1));
            chosen.add(best);
            posterior = model.with(posterior, films, best);
            meanByCount.add(criterion.mean(posterior));
        }
        int wanted = count > 0 ? count : worthwhile();
        chosen = new ArrayList<>(chosen.subList(0, wanted));
        for (int round = 0; round < EXCHANGES; round++) {
            for (int k = 0; k < wanted; k++) {
                chosen.set(k, criterion.best(posterior(k), films, free(k)));
            }
        }
    }

    /** Candidates that are not chosen yet, the one chosen at a place apart: a film measured twice errs twice alike. */
    private int[] free(int without) {
        return IntStream.range(0, films.thickness().length).filter(c -> {
            int at = chosen.indexOf(c);
            return at < 0 || at == without;
        }).toArray();
    }

    /** The first count from which the next step gains less than it is worth. */
    private int worthwhile() {
        int n = Math.min(FEWEST, meanByCount.size());
        while (n < meanByCount.size() && meanByCount.get(n) < (1 - WORTHWHILE) * meanByCount.get(n - 1)) {
            n++;
        }
        return n;
    }

    /** The posterior of the steps chosen, but for one of them; -1 for all. */
    private LinearPosterior posterior(int without) {
        LinearPosterior posterior = model.start(films);
        for (int k = 0; k < chosen.size(); k++) {
            posterior = k == without ? posterior : model.with(posterior, films, chosen.get(k));
        }
        return posterior;
    }

    /** The steps' thicknesses, rising, nm. */
    public double[] thicknesses() {
        return chosen.stream().mapToDouble(i -> films.thickness()[i]).sorted().toArray();
    }

    /** Mean over the range of the systematic standard uncertainty after 1, 2, ... steps, chosen greedily, nm. */
    public double[] meanByCount() {
        return meanByCount.stream().mapToDouble(m -> m).toArray();
    }

    /** Mean over the range of the systematic standard uncertainty that responses and glare have with the steps chosen, nm. */
    public double meanSystematicNm() {
        return criterion.mean(posterior(-1));
    }

    /**
     * A curve of the supposed sensor with the covariance that a calibration with these steps is expected to leave: of the
     * responses and the glare, and of index, lamp and aperture as far as they are uncertain and the fit does not absorb them.
     *
     * @param curve signals on a scale on which a perfect reflector gives 1
     */
    public ColourCurve expected(ColourCurve curve) {
        return model.expected(curve, films, chosen);
    }
}
