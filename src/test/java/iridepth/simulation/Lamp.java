package iridepth.simulation;

import java.util.Locale;

/**
 * A light source.
 *
 * @param power relative spectral power at 380, 381 .. 780 nm
 * @param statement the lines that say this light in a recipe
 */
public record Lamp(double[] power, String statement) {
    /** The second radiation constant h c / k in nm K, CODATA 2018. */
    private static final double C2 = 1.438776877e7;

    /** A black body by Planck's law L^-5 / (exp(c2 / (L T)) - 1), scaled to 1 at 560 nm. */
    public static Lamp planck(double kelvin) {
        Spectrum law = w -> Math.pow(560 / w, 5) * Math.expm1(C2 / (560 * kelvin)) / Math.expm1(C2 / (w * kelvin));
        return new Lamp(law.samples(), "temperature_K = " + kelvin);
    }

    /** A CIE illuminant by name, such as D65, A, FL11 or LED-B4. */
    public static Lamp illuminant(String name) {
        Table table = Table.resource("/iridepth/colour/illuminant-" + name.toLowerCase(Locale.ROOT) + ".csv");
        return new Lamp(table.spectrum("relative_power").samples(), "illuminant = \"" + name + "\"");
    }

    /**
     * A white LED: a narrow blue pump and a broad phosphor with a longer red side.
     *
     * @param blue centre of the pump, nm
     * @param pump height of the pump relative to the phosphor's
     * @param phosphor centre of the phosphor, nm
     */
    public static Lamp led(double blue, double pump, double phosphor) {
        Spectrum light = Spectrum.lobe(pump, blue, 9, 12).plus(Spectrum.lobe(1, phosphor, 45, 70));
        return new Lamp(light.samples(), "table = \"lamp.csv\"");
    }

    /** A narrow Gaussian band of full width at half maximum {@code width}, both in nm. */
    public static Lamp band(double centre, double width) {
        Spectrum light = Spectrum.gaussian(1, centre, width / Math.sqrt(8 * Math.log(2)));
        return new Lamp(light.samples(), "wavelength_nm = " + centre + "\nbandwidth_nm = " + width);
    }
}
