package iridepth.colour;

import iridepth.spectrum.Catalogue;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.util.List;

/**
 * A CIE standard colorimetric observer: its colour-matching functions (ISO/CIE 11664-1:2019).
 *
 * @param name what it is, for people
 * @param x    x-bar
 * @param y    y-bar
 * @param z    z-bar
 */
public record Observer(String name, Spectrum x, Spectrum y, Spectrum z) {
    /** CIE 1931, 2 degree field. */
    public static final Observer CIE_1931 = load("CIE 1931 2 degree observer", "cie1931-2deg-1nm.csv");
    /** CIE 1964, 10 degree field. */
    public static final Observer CIE_1964 = load("CIE 1964 10 degree observer", "cie1964-10deg-1nm.csv");

    private static Observer load(String name, String file) {
        SpectralTable table = new Catalogue("observer", "/iridepth/colour", List.of(name), List.of(file)).table(name);
        return new Observer(name, table.spectrum("x_bar"), table.spectrum("y_bar"), table.spectrum("z_bar"));
    }

    /**
     * Tristimulus values of a surface under a light, relative to a perfect diffuse white of Y = 1 under the same light:
     * X = sum of S R x-bar / sum of S y-bar, likewise Y and Z.
     */
    public Xyz xyz(Spectrum reflectance, Light light) {
        return xyz(reflectance.times(light.power())).times(1 / light.power().dot(y));
    }

    /** Tristimulus values of the perfect diffuse white under a light, Y = 1. */
    public Xyz white(Light light) {
        return xyz(light.power()).times(1 / light.power().dot(y));
    }

    private Xyz xyz(Spectrum stimulus) {
        return new Xyz(stimulus.dot(x), stimulus.dot(y), stimulus.dot(z));
    }
}
