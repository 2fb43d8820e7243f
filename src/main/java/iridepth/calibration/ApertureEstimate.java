package iridepth.calibration;

import iridepth.optics.View;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * The numerical aperture that the steps call for, given the stated one and how well it is known.
 *
 * @param stated the stated aperture; 0 for a single direction, which is left alone
 * @param factor estimate over stated
 * @param sigma  standard uncertainty of the factor
 */
record ApertureEstimate(double stated, double factor, double sigma) {
    private static final double[] SIGMAS = {-2, -1, 0, 1, 2};
    private static final double LEAST_FACTOR = 0.05;

    /** The mean and spread over apertures within two standard deviations, weighted by prior and evidence. */
    static ApertureEstimate of(FitInput input, SensorPrior prior, NoiseLevel level) {
        double stated = Aperture.of(input.view());
        double sigma = input.inputs().numericalAperture();
        if (stated == 0 || sigma == 0) {
            return new ApertureEstimate(stated, 1, 0);
        }
        double[] factor = Arrays.stream(SIGMAS).map(k -> Math.max(LEAST_FACTOR, (stated + k * sigma) / stated)).toArray();
        List<Posterior> fits = IntStream.range(0, factor.length).parallel().mapToObj(k -> LaplaceFit.of(Observations.of(
                input.withView(Aperture.scaled(input.view(), factor[k]))), prior, level)).toList();
        Mixture mixture = Mixture.of(fits, Arrays.stream(SIGMAS).map(k -> -k * k / 2).toArray());
        double mean = 0;
        double square = 0;
        for (int k = 0; k < factor.length; k++) {
            mean += mixture.probability()[k] * factor[k];
            square += mixture.probability()[k] * factor[k] * factor[k];
        }
        double spacing = sigma / stated / Math.sqrt(12);
        return new ApertureEstimate(stated, mean, Math.sqrt(Math.max(0, square - mean * mean) + spacing * spacing));
    }

    /** The estimate of an earlier fit. */
    static ApertureEstimate known(FitFigures figures) {
        double stated = figures.apertureStated();
        return stated == 0 ? new ApertureEstimate(0, 1, 0)
                : new ApertureEstimate(stated, figures.aperture() / stated, figures.apertureSigma() / stated);
    }

    /** The view through the estimated aperture. */
    View view(View statedView) {
        return Aperture.scaled(statedView, factor);
    }
}
