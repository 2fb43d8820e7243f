package iridepth.colour;

import iridepth.spectrum.Catalogue;
import iridepth.spectrum.Grid;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import org.apache.commons.math3.special.Erf;

/**
 * A light: its relative spectral power. Only the shape counts.
 *
 * @param name  what it is, for people
 * @param power relative spectral power, nowhere negative
 * @param held  whether the end values of its table are held for part of the grid
 */
public record Light(String name, Spectrum power, boolean held) {
    private static final Catalogue ILLUMINANTS = Catalogue.open("illuminant", "/iridepth/colour");
    /** Second radiation constant h c / k_B in nm K (CODATA 2018, exact). */
    private static final double C2_NM_K = 1.438776877e7;

    /**
     * Checks the power.
     *
     * @throws IllegalArgumentException if it is negative somewhere or zero everywhere
     */
    public Light {
        for (int i = 0; i < Grid.SIZE; i++) {
            if (power.at(i) < 0) {
                throw new IllegalArgumentException("light " + name + ": the power is negative at " + Grid.wavelength(i) + " nm");
            }
        }
        if (!(power.integral() > 0)) {
            throw new IllegalArgumentException("light " + name + ": the power is zero at every wavelength");
        }
    }

    /** The catalogue of CIE illuminants. */
    public static Catalogue illuminants() {
        return ILLUMINANTS;
    }

    /**
     * A CIE illuminant by its name, such as D65, A or LED-B4.
     *
     * @throws IllegalArgumentException if there is none of that name; the message names the nearest
     */
    public static Light illuminant(String name) {
        return new Light(ILLUMINANTS.canonical(name), ILLUMINANTS.table(name).spectrum("relative_power"), false);
    }

    /**
     * A black body by Planck's law, power proportional to lambda^-5 / (exp(c2 / (lambda T)) - 1), 1 at 560 nm.
     *
     * @param temperatureK 1000 to 25000 K
     */
    public static Light blackbody(double temperatureK) {
        if (!(temperatureK >= 1000 && temperatureK <= 25000)) {
            throw new IllegalArgumentException("the lamp's temperature must be 1000 to 25000 K, not " + temperatureK);
        }
        double reference = planck(560, temperatureK);
        return new Light("black body at " + Math.round(temperatureK) + " K",
                Spectrum.sample(nm -> planck(nm, temperatureK) / reference), false);
    }

    private static double planck(double nm, double kelvin) {
        return Math.pow(nm / 560, -5) / Math.expm1(C2_NM_K / (nm * kelvin));
    }

    /**
     * This light as if its lamp were hotter by some kelvin: multiplied by the ratio of black bodies, one hotter by that much than
     * the other of 3200 K.
     */
    public Light hotter(double kelvin) {
        Spectrum hot = blackbody(3200 + kelvin).power();
        Spectrum cool = blackbody(3200).power();
        double[] moved = power.toArray();
        for (int i = 0; i < moved.length; i++) {
            moved[i] *= hot.at(i) / cool.at(i);
        }
        return new Light(name, Spectrum.of(moved), held);
    }

    /**
     * CIE daylight of a correlated colour temperature, S0 + M1 S1 + M2 S2 (CIE 015:2018, 4.1.2).
     *
     * @param temperatureK 4000 to 25000 K
     */
    public static Light daylight(double temperatureK) {
        if (!(temperatureK >= 4000 && temperatureK <= 25000)) {
            throw new IllegalArgumentException("daylight has a colour temperature of 4000 to 25000 K, not " + temperatureK);
        }
        double t = 1000 / temperatureK;
        double x = temperatureK <= 7000 ? 0.244063 + t * (0.09911 + t * (2.9678 - 4.6070 * t))
                : 0.237040 + t * (0.24748 + t * (1.9018 - 2.0064 * t));
        double y = -3.000 * x * x + 2.870 * x - 0.275;
        double m = 0.0241 + 0.2562 * x - 0.7341 * y;
        double m1 = (-1.3515 - 1.7703 * x + 5.9114 * y) / m;
        double m2 = (0.0300 - 31.4424 * x + 30.0717 * y) / m;
        SpectralTable parts = new Catalogue("daylight", "/iridepth/colour", java.util.List.of("components"),
                java.util.List.of("cie-daylight-components.csv")).table("components");
        return new Light("daylight of " + Math.round(temperatureK) + " K",
                parts.spectrum("s0").plus(parts.spectrum("s1").times(m1)).plus(parts.spectrum("s2").times(m2)), false);
    }

    /**
     * A narrow band of Gaussian shape, such as an interference filter or a single LED, each sample the mean over its
     * nanometre so that bands narrower than the grid keep their power.
     *
     * @param centreNm    centre wavelength, 380-780 nm
     * @param bandwidthNm full width at half maximum, above 0 nm
     */
    public static Light narrowBand(double centreNm, double bandwidthNm) {
        if (!(centreNm >= Grid.FIRST_NM && centreNm <= Grid.LAST_NM && bandwidthNm > 0 && bandwidthNm <= 400)) {
            throw new IllegalArgumentException("a band needs a centre of 380 to 780 nm and a bandwidth above 0 nm, not "
                    + centreNm + " and " + bandwidthNm);
        }
        double spread = bandwidthNm / Math.sqrt(4 * Math.log(2));
        return new Light(String.format("%.0f nm band, %.0f nm wide", centreNm, bandwidthNm), Spectrum.sample(nm ->
                Erf.erf((nm - 0.5 - centreNm) / spread, (nm + 0.5 - centreNm) / spread)), false);
    }

    /**
     * A lamp from a table with one column of relative power.
     *
     * @throws IllegalArgumentException if the table has a negative value
     */
    public static Light table(SpectralTable table) {
        return new Light(table.name(), table.spectrum(table.columns().get(0)), table.isHeld());
    }
}
