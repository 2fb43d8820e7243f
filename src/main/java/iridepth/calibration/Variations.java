package iridepth.calibration;

import iridepth.optics.Stack;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.DoubleFunction;

/**
 * Refits a calibration with each input moved by its standard uncertainty: for index and lamp by what the observations leave of the
 * one that was stated. With the evidence ln p falling by c x^2 / 2 where the input is moved by x of the stated ones, its posterior is
 * 1 / sqrt(1 + c) of them (the second difference of ln p from -1 to +1 is c).
 *
 * @param input    the input, corrected as far as the steps corrected it
 * @param stated   the stack as stated
 * @param index    what was corrected of the film's index
 * @param prior    the most probable prior
 * @param level    the most probable noise level
 * @param mixture  the fits
 */
record Variations(FitInput input, Stack stated, IndexChange index, SensorPrior prior, NoiseLevel level,
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
            double left = left(x -> input.withStack(index.times(1 + x * relative).apply(stated)));
            result.add(refitIndex(index.times(1 + left * relative)));
        }
        double lampK = input.inputs().lampK();
        if (lampK > 0) {
            result.add(refit("lamp", hotter(left(x -> hotter(x * lampK)) * lampK), index));
        }
        return result;
    }

    private FitInput hotter(double kelvin) {
        return input.withLights(input.lights().stream().map(l -> l.hotter(kelvin)).toList());
    }

    /** Which share of an input's stated uncertainty the observations leave. */
    private double left(DoubleFunction<FitInput> moved) {
        double curvature = 2 * evidence(moved.apply(0)) - evidence(moved.apply(1)) - evidence(moved.apply(-1));
        return 1 / Math.sqrt(1 + Math.max(0, curvature));
    }

    private double evidence(FitInput moved) {
        return LaplaceFit.of(Observations.of(moved), prior, level).evidence();
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
