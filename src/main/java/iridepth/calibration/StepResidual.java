package iridepth.calibration;

/**
 * How far a channel of an observation lies from the fit.
 *
 * @param label    the step or patch, or 'flat'
 * @param channel  name of the channel
 * @param measured the signal
 * @param fitted   the fit's signal
 * @param sigma    standard deviation of the measured signal that the fit supposes, its thickness included
 */
public record StepResidual(String label, String channel, double measured, double fitted, double sigma) {
    /** Measured minus fitted. */
    public double difference() {
        return measured - fitted;
    }

    /** The difference in standard deviations. */
    public double inSigmas() {
        return difference() / sigma;
    }
}
