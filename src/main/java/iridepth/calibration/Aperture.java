package iridepth.calibration;

import iridepth.optics.View;

/** The aperture of a {@link View} as a number, and views of a slightly other aperture. */
final class Aperture {
    private Aperture() {
    }

    /**
     * Sine of the marginal angle of a filled aperture: in the square of the sine its weight is even, so the mean of sin^2 is half
     * that of the edge. 0 for a single direction.
     */
    static double of(View view) {
        if (view.sine().length == 1) {
            return 0;
        }
        double mean = 0;
        for (int i = 0; i < view.sine().length; i++) {
            mean += view.weight()[i] * view.sine()[i] * view.sine()[i];
        }
        return Math.sqrt(2 * mean);
    }

    /** The view with all sines multiplied by a factor. */
    static View scaled(View view, double factor) {
        double[] sine = view.sine().clone();
        for (int i = 0; i < sine.length; i++) {
            sine[i] = Math.min(sine[i] * factor, 0.999);
        }
        return new View(view.text(), sine, view.weight(), view.polarisation());
    }
}
