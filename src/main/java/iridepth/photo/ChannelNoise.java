package iridepth.photo;


/** The noise to expect of linear signals on a scale of their own, such as one on which a perfect reflector gives 1. */
@FunctionalInterface
public interface ChannelNoise {
    /** Variance that stands for 'tells nothing': that of a channel at the end of its scale. */
    double NOTHING = 1e12;

    /**
     * Variance of one pixel's signal.
     *
     * @param channel 0 and up
     * @param signal  expected signal
     * @return variance, above 0; {@link #NOTHING} where the channel is clipped
     */
    double variance(int channel, double signal);

    /**
     * The noise of a camera.
     *
     * @param noise    photon and read noise, in fractions of full scale
     * @param encoding what is rounded to counts
     * @param level    per channel the fraction of full scale that a signal of 1 fills
     */
    static ChannelNoise of(NoiseModel noise, Encoding encoding, double[] level) {
        double[] fill = level.clone();
        return (channel, signal) -> {
            double light = signal * fill[channel];
            double rounding = encoding.slope(channel, light);
            return light >= 1 ? NOTHING : noise.variance(channel, light, rounding) / (fill[channel] * fill[channel]);
        };
    }

    /** This noise for the first channels and another's for those that follow. */
    default ChannelNoise and(int channels, ChannelNoise other) {
        return (channel, signal) -> channel < channels ? variance(channel, signal) : other.variance(channel - channels, signal);
    }
}
