package iridepth.reading;

/** The variance of a signal value that is expected at a place of given light. */
@FunctionalInterface
interface ExpectedNoise {
    /**
     * @param channel 0 and up
     * @param value   expected signal
     * @param light   light at the place over its mean in the picture
     * @return variance, above 0
     */
    double variance(int channel, double value, double light);
}
