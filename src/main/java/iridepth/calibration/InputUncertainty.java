package iridepth.calibration;

/**
 * How well the inputs of a calibration that are not measured from photos are known, as standard uncertainties.
 *
 * @param numericalAperture of the numerical aperture; where it is not 0 the steps help to estimate the aperture
 * @param lampK             of the lamp's colour temperature, kelvin
 * @param relativeIndex     of the film's refractive index, as a fraction of it
 * @param flatResidual      what the flat leaves of the shading between flat and step, as a fraction of the signal: the least
 *                          misfit that the fit supposes
 */
public record InputUncertainty(double numericalAperture, double lampK, double relativeIndex, double flatResidual) {
    /**
     * Defaults, common practice: an objective's engraved aperture is rarely filled evenly to its rim (0.03); a lamp's colour
     * temperature is read off its label (200 K); published film indices agree to about 0.2 %; flats repeat to about 0.1 %.
     */
    public static final InputUncertainty DEFAULT = new InputUncertainty(0.03, 200, 0.002, 0.001);

    /** Inputs taken as exact, but for the smallest flat residual. */
    public static final InputUncertainty NONE = new InputUncertainty(0, 0, 0, 1e-5);

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if one is negative or not finite, or the flat is said to leave nothing
     */
    public InputUncertainty {
        if (!(numericalAperture >= 0 && numericalAperture < 1 && lampK >= 0 && lampK < 1e4 && relativeIndex >= 0
                && relativeIndex < 0.5)) {
            throw new IllegalArgumentException("input uncertainties must be 0 or more and small: aperture " + numericalAperture
                    + ", lamp " + lampK + " K, relative index " + relativeIndex);
        }
        if (!(flatResidual > 0 && flatResidual < 0.5)) {
            throw new IllegalArgumentException("the flat's residual must be above 0 and below 0.5 of the signal, not "
                    + flatResidual);
        }
    }
}
