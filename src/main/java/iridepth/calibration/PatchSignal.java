package iridepth.calibration;

import iridepth.spectrum.Spectrum;

/**
 * What the camera saw of a patch of known reflectance spectrum, such as one of a reference target.
 *
 * @param label       what to call the patch in messages
 * @param reflectance its reflectance, 0 to 1
 * @param uncertainty standard uncertainty of the patch's signal that comes from that of its reflectance, as a fraction of the
 *                    signal
 * @param signal      mean signal, one value per channel, on the scale of the steps
 * @param variance    variance of those means by noise, one value per channel
 */
public record PatchSignal(String label, Spectrum reflectance, double uncertainty, double[] signal, double[] variance) {
    /**
     * Keeps copies and checks them.
     *
     * @throws IllegalArgumentException if a value is impossible; the message names the patch
     */
    public PatchSignal {
        StepSignal checked = new StepSignal(label, 0, Double.NaN, signal, variance, false);
        signal = checked.signal();
        variance = checked.variance();
        if (!(uncertainty >= 0 && uncertainty <= 1)) {
            throw new IllegalArgumentException(label + ": the relative uncertainty must be 0 to 1, not " + uncertainty);
        }
    }

    @Override
    public double[] signal() {
        return signal.clone();
    }

    @Override
    public double[] variance() {
        return variance.clone();
    }
}
