package iridepth.simulation;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;

/**
 * Ambient, layers and substrate in the order in which light meets them. The film is the one inner layer without a
 * thickness; a stack without any (a bare substrate, or all layers fixed) has film -1.
 *
 * @param text the stack as written, such as {@code air / PMMA / SiO2 300 nm / Si}
 * @param media one medium per part
 * @param thickness nm of each part; NaN for ambient, substrate and film
 * @param film position of the film, or -1
 */
public record FilmStack(String text, List<Medium> media, List<Double> thickness, int film) {

    /**
     * Reads a stack. A part is a material of the tables, one of the given media, or {@code NAME n=VALUE}; a layer of
     * fixed thickness carries {@code VALUE nm}.
     */
    public static FilmStack parse(String text, Medium... own) {
        List<Medium> media = new ArrayList<>();
        List<Double> thickness = new ArrayList<>();
        int film = -1;
        String[] parts = text.split("/");
        for (int i = 0; i < parts.length; i++) {
            String[] words = parts[i].trim().split("\\s+");
            boolean fixed = words.length == 3 && words[2].equals("nm");
            thickness.add(fixed ? Double.parseDouble(words[1]) : Double.NaN);
            media.add(words.length == 2 ? Medium.constant(words[0], Double.parseDouble(words[1].substring(2)))
                    : medium(words[0], own));
            if (!fixed && i > 0 && i < parts.length - 1) {
                film = i;
            }
        }
        return new FilmStack(text, List.copyOf(media), List.copyOf(thickness), film);
    }

    private static Medium medium(String name, Medium... own) {
        for (Medium medium : own) {
            if (medium.name().equals(name)) {
                return medium;
            }
        }
        return Medium.table(name);
    }

    /** The complex index of each part at a wavelength in nm. */
    public Complex[] indices(double wavelength) {
        return media.stream().map(medium -> medium.index(wavelength)).toArray(Complex[]::new);
    }
}
