package iridepth.calibration;

/**
 * What the camera saw of a film of known thickness.
 *
 * @param label         what to call the step in messages
 * @param thicknessNm   its thickness by another instrument, nm
 * @param uncertaintyNm standard uncertainty of that, nm, or NaN where nobody stated it: then the fit estimates one for all such
 *                      steps
 * @param signal        mean signal of the patch, one value per channel: relative to the flat where there is one, else a
 *                      fraction of full scale, dark taken off
 * @param variance      variance of those means by noise, one value per channel
 * @param clipped       whether part of the patch lies at an end of the camera's scale
 */
public record StepSignal(String label, double thicknessNm, double uncertaintyNm, double[] signal, double[] variance,
                         boolean clipped) {
    /**
     * Keeps copies and checks them.
     *
     * @throws IllegalArgumentException if a value is impossible; the message names the step
     */
    public StepSignal {
        signal = signal.clone();
        variance = variance.clone();
        if (!(thicknessNm >= 0 && thicknessNm < 1e6)) {
            throw new IllegalArgumentException(label + ": the thickness must be 0 nm or more, not " + thicknessNm);
        }
        if (uncertaintyNm < 0 || Double.isInfinite(uncertaintyNm)) {
            throw new IllegalArgumentException(label + ": the uncertainty of the thickness must be 0 nm or more, not "
                    + uncertaintyNm);
        }
        if (signal.length == 0 || signal.length != variance.length) {
            throw new IllegalArgumentException(label + ": as many variances as signals are needed, at least one, not "
                    + variance.length + " and " + signal.length);
        }
        for (int c = 0; c < signal.length; c++) {
            if (!Double.isFinite(signal[c]) || !(variance[c] >= 0) || Double.isInfinite(variance[c])) {
                throw new IllegalArgumentException(label + ": channel " + (c + 1) + " has no usable signal (" + signal[c]
                        + ", variance " + variance[c] + ")");
            }
        }
    }

    /** A step that is not clipped and whose thickness has no stated uncertainty. */
    public static StepSignal of(String label, double thicknessNm, double[] signal, double[] variance) {
        return new StepSignal(label, thicknessNm, Double.NaN, signal, variance, false);
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
