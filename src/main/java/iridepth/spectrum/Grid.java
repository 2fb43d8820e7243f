package iridepth.spectrum;

/**
 * The wavelength grid on which every spectrum is sampled: 380 nm to 780 nm in steps of 1 nm, both ends included.
 *
 * <p>The range is that of the visible spectrum in CIE 015:2018; sums over the grid stand for integrals over wavelength.
 */
public final class Grid {
    /** First wavelength, nm. */
    public static final int FIRST_NM = 380;
    /** Last wavelength, nm. */
    public static final int LAST_NM = 780;
    /** Number of samples. */
    public static final int SIZE = LAST_NM - FIRST_NM + 1;

    private Grid() {
    }

    /**
     * Wavelength of a sample.
     *
     * @param index sample, 0 to {@link #SIZE} - 1
     * @return wavelength in nm
     */
    public static int wavelength(int index) {
        return FIRST_NM + index;
    }
}
