package iridepth.recipe;

import iridepth.calibration.InputUncertainty;

/** How well the inputs are known, {@code [uncertainty]}: standard uncertainties, GUM type B (JCGM 100, 4.3). */
final class InputSpec {
    private static final double PER_CENT = 0.01;

    private InputSpec() {
    }

    /** The uncertainties; those that are not given are the defaults. */
    static InputUncertainty read(Section section, InputUncertainty otherwise) {
        double aperture = section.number("numerical_aperture", otherwise.numericalAperture(), 0, 0.5);
        double lamp = section.number("lamp_K", otherwise.lampK(), 0, 5000);
        double index = section.number("film_index_percent", otherwise.relativeIndex() / PER_CENT, 0, 20);
        double flat = section.number("flat_percent", otherwise.flatResidual() / PER_CENT, 0.001, 20);
        section.finish();
        return new InputUncertainty(aperture, lamp, index * PER_CENT, flat * PER_CENT);
    }
}
