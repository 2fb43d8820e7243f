package iridepth.simulation;

import java.util.function.DoubleUnaryOperator;

/** A quantity as a function of wavelength in nm. The simulation integrates it over 380 to 780 nm in steps of 1 nm. */
@FunctionalInterface
public interface Spectrum {
    /** First wavelength of the simulation, nm. */
    int FIRST = 380;
    /** Number of wavelengths, 1 nm apart. */
    int COUNT = 401;

    /** The value at a wavelength in nm. */
    double at(double wavelength);

    /** The values at 380, 381 .. 780 nm. */
    default double[] samples() {
        double[] values = new double[COUNT];
        for (int i = 0; i < COUNT; i++) {
            values[i] = at(FIRST + i);
        }
        return values;
    }

    /** This quantity times another at each wavelength. */
    default Spectrum times(Spectrum other) {
        return wavelength -> at(wavelength) * other.at(wavelength);
    }

    /** This quantity plus another at each wavelength. */
    default Spectrum plus(Spectrum other) {
        return wavelength -> at(wavelength) + other.at(wavelength);
    }

    /** This quantity with each value mapped. */
    default Spectrum map(DoubleUnaryOperator value) {
        return wavelength -> value.applyAsDouble(at(wavelength));
    }

    /** A lobe of Gaussian sides whose widths may differ. Widths are standard deviations in nm. */
    static Spectrum lobe(double height, double centre, double widthBelow, double widthAbove) {
        return wavelength -> {
            double u = (wavelength - centre) / (wavelength < centre ? widthBelow : widthAbove);
            return height * Math.exp(-u * u / 2);
        };
    }

    /** A symmetric Gaussian lobe; the width is its standard deviation in nm. */
    static Spectrum gaussian(double height, double centre, double width) {
        return lobe(height, centre, width, width);
    }

    /** A logistic edge that rises from 0 to 1 with wavelength; a negative width falls. 10-90 % within 4.4 widths. */
    static Spectrum edge(double centre, double width) {
        return wavelength -> 1 / (1 + Math.exp(-(wavelength - centre) / width));
    }
}
