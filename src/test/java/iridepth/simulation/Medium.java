package iridepth.simulation;

import org.apache.commons.math3.complex.Complex;

/**
 * A homogeneous medium of complex refractive index N = n + ik, time convention exp(-i w t).
 *
 * @param name what the medium is called in a stack
 * @param n real index
 * @param k extinction coefficient
 * @param statement the lines that declare the medium in a recipe; empty for tabulated materials
 */
public record Medium(String name, Spectrum n, Spectrum k, String statement) {

    /** A material of the published tables, interpolated linearly. */
    public static Medium table(String name) {
        Table table = Table.resource("/iridepth/materials/" + name + ".csv");
        return new Medium(name, table.spectrum("n"), table.spectrum("k"), "");
    }

    /** A medium without dispersion or absorption. */
    public static Medium constant(String name, double n) {
        return new Medium(name, w -> n, w -> 0, "n = " + n);
    }

    /** Cauchy's dispersion n = a + b / L^2 + c / L^4, with L the wavelength in um; no absorption. */
    public static Medium cauchy(String name, double a, double b, double c) {
        Spectrum n = w -> a + b / (w * w * 1e-6) + c / (w * w * w * w * 1e-12);
        return new Medium(name, n, w -> 0, "cauchy = [" + a + ", " + b + ", " + c + "]");
    }

    /** The complex index at a wavelength in nm. */
    public Complex index(double wavelength) {
        return new Complex(n.at(wavelength), k.at(wavelength));
    }
}
