package iridepth.recipe;

import iridepth.calibration.InputUncertainty;
import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.Function;

/**
 * The colour curve of a recipe whose responses are known, and what its inputs' uncertainties move in it.
 *
 * @param recipe    the recipe
 * @param responses the responses under a light
 */
record KnownCurve(Recipe recipe, Function<Light, EffectiveResponses> responses) {
    View view() {
        return recipe.view().view(recipe.stack(), recipe.range().toNm());
    }

    /**
     * The curve with the covariance of its systematic errors: for each input that is uncertain, the difference that one standard
     * uncertainty of it makes, as an outer product over the channels; inputs are taken as independent (JCGM 100, 5.1.2).
     */
    ColourCurve curve(InputUncertainty inputs) {
        List<Light> light = recipe.lights();
        ColourCurve base = curve(recipe.stack(), view(), light);
        List<ColourCurve> moved = new ArrayList<>();
        if (inputs.relativeIndex() > 0) {
            Stack denser = recipe.stack().withFilm(recipe.stack().film().denser(1 + inputs.relativeIndex()));
            moved.add(curve(denser, view(), light));
        }
        if (inputs.lampK() > 0) {
            moved.add(curve(recipe.stack(), view(), light.stream().map(l -> l.hotter(inputs.lampK())).toList()));
        }
        if (inputs.numericalAperture() > 0 && Double.isNaN(recipe.view().incidenceDeg())) {
            double wider = recipe.view().numericalAperture() + inputs.numericalAperture();
            moved.add(curve(recipe.stack(), View.aperture(wider, recipe.stack(), recipe.range().toNm()), light));
        }
        return moved.isEmpty() ? base : base.withCovariance(covariance(base, moved));
    }

    private ColourCurve curve(Stack stack, View view, List<Light> lights) {
        EffectiveResponses scaled = lights.size() == 1 ? responses.apply(lights.get(0))
                : EffectiveResponses.jointly(lights.stream().map(responses).toList(), lights.stream().map(Light::name).toList());
        Stack flat = recipe.camera().flatStack();
        if (flat == null) {
            double[] factor = new double[scaled.count()];
            Arrays.fill(factor, 1 / recipe.camera().whiteReflectance());
            scaled = scaled.scaled(factor);
        } else {
            scaled = scaled.relativeTo(Reflectance.of(flat, view).spectrum(0));
        }
        return ColourCurve.of(scaled, Reflectance.of(stack, view), recipe.range(), recipe.range().step(recipe.stack()));
    }

    private static double[] covariance(ColourCurve base, List<ColourCurve> moved) {
        int n = base.channels();
        double[] covariance = new double[base.size() * n * n];
        for (ColourCurve other : moved) {
            for (int k = 0; k < base.size(); k++) {
                for (int a = 0; a < n; a++) {
                    double da = other.signal(k, a) - base.signal(k, a);
                    for (int b = 0; b < n; b++) {
                        covariance[(k * n + a) * n + b] += da * (other.signal(k, b) - base.signal(k, b));
                    }
                }
            }
        }
        return covariance;
    }
}
