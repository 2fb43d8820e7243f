package iridepth.simulation;

/**
 * What hides a film, or lies where there is none. Its reflectance is relative to that of the flat's surface, linear in
 * wavelength between its values at 400 and 700 nm and held outside.
 */
public enum Cover {
    /** A dark holder beside the sample. */
    HOLDER(0.07, 0.06),
    /** An opaque dark speck. */
    DUST(0.04, 0.06),
    /** A reddish fibre. */
    FIBRE(0.02, 0.80),
    /** A groove that throws light back. */
    SCRATCH(1.15, 1.05),
    /** A dried residue. */
    STAIN(0.10, 0.45);

    private final double blue;
    private final double red;

    Cover(double blue, double red) {
        this.blue = blue;
        this.red = red;
    }

    /** Reflectance relative to the flat's at a wavelength in nm. */
    public double at(double wavelength) {
        double part = Math.min(1, Math.max(0, (wavelength - 400) / 300));
        return blue + part * (red - blue);
    }
}
