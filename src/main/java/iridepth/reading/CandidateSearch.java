package iridepth.reading;

/** Finds the candidates of a pixel on a colour curve. Implementations serve one thread. */
interface CandidateSearch {
    /**
     * All local minima of chi-square along the curve that pass the off-curve test.
     *
     * @param values    signals, interleaved by channel
     * @param variances their noise variances
     * @param limits    0 for a plain value, +1 for 'at least', -1 for 'at most'
     * @param pixel     which pixel of the arrays
     * @param result    receives the candidates; empty when the pixel is off the curve
     */
    void find(float[] values, float[] variances, byte[] limits, int pixel, Candidates result);
}
