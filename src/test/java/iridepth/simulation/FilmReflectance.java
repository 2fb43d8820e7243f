package iridepth.simulation;

import java.util.stream.IntStream;
import org.apache.commons.math3.complex.Complex;

/**
 * Reflectance R(wavelength; thickness) of a film over a view, on the simulation's wavelengths and evenly spaced
 * thicknesses.
 *
 * @param from first thickness, nm
 * @param step distance of thicknesses, nm
 * @param values one row per wavelength 380, 381 .. 780 nm, one cell per thickness
 */
public record FilmReflectance(double from, double step, double[][] values) {

    /** Computes the reflectance at {@code count} thicknesses. */
    public static FilmReflectance of(FilmStack stack, View view, double from, double step, int count) {
        double[][] values = IntStream.range(0, Spectrum.COUNT).parallel().mapToObj(i -> {
            double[] row = new double[count];
            double wavelength = Spectrum.FIRST + i;
            Complex[] index = stack.indices(wavelength);
            for (int a = 0; a < view.sine().length; a++) {
                double s = view.s() * view.weight()[a];
                double p = view.weight()[a] - s;
                if (s > 0) {
                    Rouard.sweep(stack, index, from, step, wavelength, view.sine()[a], false, s, row);
                }
                if (p > 0) {
                    Rouard.sweep(stack, index, from, step, wavelength, view.sine()[a], true, p, row);
                }
            }
            return row;
        }).toArray(double[][]::new);
        return new FilmReflectance(from, step, values);
    }

    /** The spectrum at one thickness: 401 values. */
    public double[] spectrum(int thickness) {
        double[] spectrum = new double[values.length];
        for (int i = 0; i < spectrum.length; i++) {
            spectrum[i] = values[i][thickness];
        }
        return spectrum;
    }
}
