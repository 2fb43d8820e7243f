package iridepth.reading;

/** Finds the candidates of a pixel on a colour curve. Implementations serve one thread. */
interface CandidateSearch {
    /**
     * Finds all local minima of chi-square along the curve that are no larger than the threshold of the search.
     *
     * @param values signals, interleaved by channel
     * @param limits 0 for a plain value, +1 for 'at least', -1 for 'at most'
     * @param pixel  which pixel of the arrays
     * @param level  level of the light at the pixel
     * @param result receives the candidates; none when the pixel is off the curve
     */
    void find(float[] values, byte[] limits, int pixel, int level, CandidateRow result);
}
