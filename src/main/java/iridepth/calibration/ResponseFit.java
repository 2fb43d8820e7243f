package iridepth.calibration;

import java.util.List;
import java.util.Optional;

/**
 * Estimates the effective responses of a camera from films of known thickness.
 *
 * <p>A response is the light times a sum of smooth bumps with positive weights; see {@link SensorPrior} for what is believed of
 * them beforehand, {@link LaplaceFit} for the fit and {@link Suppositions} for what is tried and averaged.
 */
public final class ResponseFit {
    private ResponseFit() {
    }

    /**
     * Fits.
     *
     * @throws IllegalArgumentException if the steps cannot work; the message says what to add
     */
    public static Calibration fit(FitInput input) {
        StepCheck.require(input);
        Optional<IndexEstimate> index = input.indexPrior().map(spread -> IndexFit.of(input, spread));
        IndexChange change = index.map(e -> new IndexChange(1, e.a(), e.b())).orElse(IndexChange.NONE);
        FitInput film = input.withStack(change.apply(input.stack()));
        SensorPrior middle = Suppositions.middle(input, Observations.of(film));
        ApertureEstimate aperture = ApertureEstimate.of(film, middle, Suppositions.middleLevel(input));
        FitInput corrected = film.withView(aperture.view(input.view()));
        Observations data = Observations.of(corrected);
        Suppositions suppositions = Suppositions.of(input, middle, data);
        Mixture mixture = suppositions.fit(data);
        Judgement judgement = new Judgement(corrected, data, suppositions, mixture);
        Calibration found = calibration(corrected, input, change, suppositions, mixture, aperture, index, null);
        return found.with(judgement.figures(found, aperture, index));
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
        if (films.isEmpty()) {
            return first;
        }
        FitFigures figures = first.figures();
        NoiseLevel level = new NoiseLevel(figures.misfit(), figures.stepNm());
        Optional<IndexEstimate> index = Optional.ofNullable(figures.index());
        IndexChange change = index.map(e -> new IndexChange(1, e.a(), e.b())).orElse(IndexChange.NONE);
        ApertureEstimate aperture = ApertureEstimate.known(figures);
        FitInput corrected = input.withStack(change.apply(input.stack())).withView(aperture.view(input.view()));
        Observations steps = Observations.of(corrected);
        SensorPrior middle = Suppositions.middle(corrected, steps);
        Suppositions suppositions = Suppositions.few(corrected, middle, level, steps);
        FitInput more = corrected.withMore(films);
        Mixture mixture = suppositions.fit(Observations.of(more));
        return calibration(more, input, change, suppositions, mixture, aperture, index, figures);
    }

    private static Calibration calibration(FitInput corrected, FitInput stated, IndexChange change, Suppositions suppositions,
                                           Mixture mixture, ApertureEstimate aperture, Optional<IndexEstimate> index,
                                           FitFigures figures) {
        ResponseModel model = new ResponseModel(corrected.channels(), corrected.carriers(), mixture.mean(), stated.stack(), change,
                corrected.view());
        int best = mixture.best();
        Variations variations = new Variations(corrected, stated.stack(), change, suppositions.priors().get(best),
                suppositions.levels().get(best), mixture);
        return new Calibration(model, mixture.factors(), variations.all(aperture, index), figures);
    }
}
