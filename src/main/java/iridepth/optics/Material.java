package iridepth.optics;

import iridepth.spectrum.Grid;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.util.function.DoubleUnaryOperator;
import org.apache.commons.math3.complex.Complex;

/**
 * An optically isotropic medium: its complex refractive index N = n + ik on the wavelength grid, time convention
 * exp(-i omega t), so that k of 0 or more absorbs.
 *
 * @param name        short name, as in a stack
 * @param description what it is
 * @param source      where the values come from
 * @param n           real refractive index, dimensionless
 * @param k           extinction coefficient, dimensionless
 * @param firstNm     shortest wavelength for which the source has a value
 * @param lastNm      longest wavelength for which the source has a value
 */
public record Material(String name, String description, String source, Spectrum n, Spectrum k, double firstNm,
                       double lastNm) {
    private static final double NM_PER_UM = 1000;

    /**
     * Checks the index.
     *
     * @throws IllegalArgumentException if n is not above 0 or k is negative somewhere on the grid
     */
    public Material {
        for (int i = 0; i < Grid.SIZE; i++) {
            if (n.at(i) <= 0 || k.at(i) < 0) {
                throw new IllegalArgumentException(String.format("material %s: n must be above 0 and k not negative, but at %d "
                        + "nm they are %.4g and %.4g", name, Grid.wavelength(i), n.at(i), k.at(i)));
            }
        }
    }

    /** A medium whose index is the same at every wavelength. */
    public static Material constant(String name, double n, double k) {
        return of(name, "constant index", nm -> n, k);
    }

    /**
     * Cauchy's formula n = A + B / lambda^2 + C / lambda^4 with lambda in micrometres.
     *
     * @param a dimensionless
     * @param b um^2
     * @param c um^4
     * @param k extinction coefficient, dimensionless
     */
    public static Material cauchy(String name, double a, double b, double c, double k) {
        return of(name, "Cauchy formula", nm -> {
            double squared = nm / NM_PER_UM * nm / NM_PER_UM;
            return a + b / squared + c / (squared * squared);
        }, k);
    }

    /**
     * Sellmeier's formula n^2 = 1 + sum of B_i lambda^2 / (lambda^2 - C_i) with lambda in micrometres.
     *
     * @param b strengths, dimensionless
     * @param c squares of the resonance wavelengths, um^2, as many as strengths
     * @param k extinction coefficient, dimensionless
     * @throws IllegalArgumentException if there are not as many strengths as resonances, or n^2 is not positive somewhere
     */
    public static Material sellmeier(String name, double[] b, double[] c, double k) {
        if (b.length == 0 || b.length != c.length) {
            throw new IllegalArgumentException("material " + name + ": sellmeier needs as many B as C values, at least one of "
                    + "each, not " + b.length + " and " + c.length);
        }
        return of(name, "Sellmeier formula", nm -> {
            double squared = nm / NM_PER_UM * nm / NM_PER_UM;
            double sum = 1;
            for (int i = 0; i < b.length; i++) {
                sum += b[i] * squared / (squared - c[i]);
            }
            if (!(sum > 0) || Double.isInfinite(sum)) {
                throw new IllegalArgumentException(String.format(
                        "material %s: the Sellmeier formula has no real index at %.0f nm", name, nm));
            }
            return Math.sqrt(sum);
        }, k);
    }

    /**
     * A medium from a table with a column {@code n} and, unless it is transparent, {@code k}.
     *
     * @throws IllegalArgumentException if the table lacks n
     */
    public static Material of(String name, SpectralTable table) {
        Spectrum k = table.has("k") ? table.spectrum("k") : Spectrum.sample(nm -> 0);
        return new Material(name, table.remark("material"), table.remark("source"), table.spectrum("n"), k, table.firstNm(),
                table.lastNm());
    }

    private static Material of(String name, String description, DoubleUnaryOperator n, double k) {
        return new Material(name, description, "given by the user", Spectrum.sample(n), Spectrum.sample(nm -> k),
                Grid.FIRST_NM, Grid.LAST_NM);
    }

    /** This medium with n multiplied by a factor. */
    public Material denser(double factor) {
        return new Material(name, description, source, n.times(factor), k, firstNm, lastNm);
    }

    /** Whether part of the grid lies outside the source's range, where the end value is held. */
    public boolean isHeld() {
        return firstNm > Grid.FIRST_NM || lastNm < Grid.LAST_NM;
    }

    /** The complex index at a grid index. */
    public Complex index(int i) {
        return new Complex(n.at(i), k.at(i));
    }

    /** Real index at any wavelength of the grid's range, linear between samples. */
    public double nAt(double wavelengthNm) {
        return interpolate(n, wavelengthNm);
    }

    /** The complex index at any wavelength of the grid's range, linear between samples. */
    public Complex indexAt(double wavelengthNm) {
        return new Complex(interpolate(n, wavelengthNm), interpolate(k, wavelengthNm));
    }

    private static double interpolate(Spectrum of, double nm) {
        double at = Math.min(Math.max(nm - Grid.FIRST_NM, 0), Grid.SIZE - 1.0);
        int below = Math.min((int) at, Grid.SIZE - 2);
        return of.at(below) + (at - below) * (of.at(below + 1) - of.at(below));
    }
}
