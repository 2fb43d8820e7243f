package iridepth.optics;

import iridepth.spectrum.Catalogue;
import java.util.LinkedHashMap;
import java.util.Map;

/**
 * The materials that a stack may name: those that come with the program, and the user's own, which take precedence.
 *
 * @param own the user's materials by name
 */
public record Materials(Map<String, Material> own) {
    private static final Catalogue BUNDLED = Catalogue.open("material", "/iridepth/materials");

    /** Keeps a copy of the user's materials. */
    public Materials {
        own = java.util.Collections.unmodifiableMap(new LinkedHashMap<>(own));
    }

    /** The bundled materials alone. */
    public static Materials bundled() {
        return new Materials(Map.of());
    }

    /** The catalogue of bundled tables. */
    public static Catalogue catalogue() {
        return BUNDLED;
    }

    /**
     * The material of a name.
     *
     * @throws IllegalArgumentException if there is none; the message names the nearest
     */
    public Material get(String name) {
        if (own.containsKey(name)) {
            return own.get(name);
        }
        if (BUNDLED.has(name)) {
            return Material.of(BUNDLED.canonical(name), BUNDLED.table(name));
        }
        java.util.List<String> all = new java.util.ArrayList<>(own.keySet());
        all.addAll(BUNDLED.names());
        throw new IllegalArgumentException("unknown material '" + name + "'; the nearest known is '"
                + Catalogue.nearest(name, all) + "' (give its index beside the name, as in 'oil n=1.47', or list all with "
                + "the materials command)");
    }
}
