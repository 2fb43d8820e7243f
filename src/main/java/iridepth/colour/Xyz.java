package iridepth.colour;

/**
 * Tristimulus values of the CIE system, relative to a white of Y = 1 unless said otherwise.
 *
 * @param x X
 * @param y Y, the luminance factor
 * @param z Z
 */
public record Xyz(double x, double y, double z) {
    /** Chromaticity coordinate x = X / (X + Y + Z); NaN for black. */
    public double chromaticityX() {
        return x / (x + y + z);
    }

    /** Chromaticity coordinate y = Y / (X + Y + Z); NaN for black. */
    public double chromaticityY() {
        return y / (x + y + z);
    }

    /** These values times a number. */
    public Xyz times(double factor) {
        return new Xyz(x * factor, y * factor, z * factor);
    }

    /** The values as X, Y, Z. */
    public double[] toArray() {
        return new double[] {x, y, z};
    }

    /** Values from an array of X, Y, Z. */
    public static Xyz of(double[] xyz) {
        return new Xyz(xyz[0], xyz[1], xyz[2]);
    }
}
