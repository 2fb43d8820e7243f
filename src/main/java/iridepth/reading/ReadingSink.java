package iridepth.reading;

/**
 * Takes the readings of a photo as they come. Calls come one after another, from any thread.
 *
 * <p>First {@link #readings} for bands of whole rows, each row once, from the bottom of the picture up; then, since only the
 * whole picture tells which orders are in doubt, {@link #states} for bands from the top down.
 */
public interface ReadingSink {
    /**
     * Takes a band of readings. The arrays hold rows x width values, row after row, and are used again after the call.
     *
     * @param firstRow   top row of the band
     * @param thickness  nm, NaN where not read
     * @param random     random part of the standard uncertainty, nm, NaN where not read
     * @param systematic systematic part of the standard uncertainty, nm, NaN where not read
     * @param margin     by how much -2 ln likelihood of the next best order of the pixel exceeds that of the chosen one, by what
     *                   the pixel and those around it say; infinite where there is no other, NaN where not read
     */
    void readings(int firstRow, float[] thickness, float[] random, float[] systematic, float[] margin);

    /**
     * All readings so far are void and come again: seen as a whole, the picture asks for other orders. Happens seldom, where
     * regions are cut off from all that tells their order.
     */
    void restart();

    /**
     * Takes a band of states.
     *
     * @param firstRow top row of the band
     * @param state    codes of {@link State}, rows x width values
     */
    void states(int firstRow, byte[] state);
}
