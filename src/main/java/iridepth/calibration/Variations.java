package iridepth.calibration;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Refits a calibration with each input moved by its standard uncertainty.
 *
 * @param input    the input, corrected as far as the steps corrected it
 * @param stated   the stack as stated
 * @param index    what was corrected of the film's index
 * @param prior    the most probable prior
 * @param level    the most probable noise level
 * @param mixture  the fits
 */
record Variations(FitInput input, iridepth.optics.Stack stated, IndexChange index, SensorPrior prior, NoiseLevel level,
                  Mixture mixture) {
    /** The refits; an input that is exact has none. */
    List<Variation> all(ApertureEstimate aperture, Optional<IndexEstimate> fitted) {
        List<Variation> result = new ArrayList<>();
        if (aperture.sigma() > 0) {
            FitInput wider = input.withView(Aperture.scaled(input.view(), 1 + aperture.sigma()));
            result.add(refit("numerical aperture", wider, index));
        }
        double relative = input.inputs().relativeIndex();
        if (fitted.isPresent()) {
            IndexEstimate e = fitted.get();
            // Two independent directions whose outer products sum to the covariance of (a, b): its Cholesky factor.
            result.add(refitIndex(index.plus(e.sigmaA(), e.correlation() * e.sigmaB())));
            result.add(refitIndex(index.plus(0, Math.sqrt(1 - e.correlation() * e.correlation()) * e.sigmaB())));
        } else if (relative > 0) {
            result.add(refitIndex(index.times(1 + relative)));
        }
        double lampK = input.inputs().lampK();
        if (lampK > 0) {
            result.add(refit("lamp", input.withLights(input.lights().stream().map(l -> l.hotter(lampK)).toList()), index));
        }
        return result;
    }

    private Variation refitIndex(IndexChange changed) {
        return refit("film index", input.withStack(changed.apply(stated)), changed);
    }

    private Variation refit(String name, FitInput moved, IndexChange changed) {
        double[] p = LaplaceFit.of(Observations.of(moved), prior, level).parameters();
        double[] base = mixture.fits().get(mixture.best()).parameters();
        double[] mean = mixture.mean();
        for (int k = 0; k < p.length; k++) {
            p[k] += mean[k] - base[k];
        }
        return new Variation(name, new ResponseModel(input.channels(), moved.carriers(), p, stated, changed, moved.view()));
    }
}
