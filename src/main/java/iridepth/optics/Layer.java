package iridepth.optics;

/**
 * An inner layer of a stack.
 *
 * @param material    what it is made of
 * @param thicknessNm its thickness in nm, or NaN for the film, whose thickness is to be read
 */
public record Layer(Material material, double thicknessNm) {
    /**
     * Checks the thickness.
     *
     * @throws IllegalArgumentException if the thickness is negative or infinite
     */
    public Layer {
        if (thicknessNm < 0 || Double.isInfinite(thicknessNm)) {
            throw new IllegalArgumentException("layer " + material.name() + ": the thickness must be 0 nm or more, not "
                    + thicknessNm);
        }
    }

    /** Whether this is the layer whose thickness is to be read. */
    public boolean isFilm() {
        return Double.isNaN(thicknessNm);
    }
}
