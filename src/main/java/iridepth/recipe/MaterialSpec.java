package iridepth.recipe;

import iridepth.optics.Material;
import iridepth.optics.Materials;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** The user's own materials, {@code [film.material.NAME]}: each one of n (and k), cauchy, sellmeier or table. */
final class MaterialSpec {
    private static final List<String> FORMS = List.of("n", "cauchy", "sellmeier", "table");

    private MaterialSpec() {
    }

    static Materials read(Section materials, Tables tables) {
        Map<String, Material> own = new LinkedHashMap<>();
        for (String name : materials.keys()) {
            Section section = materials.section(name);
            own.put(name, material(name, section.knows("fit_index"), tables));
            section.finish();
        }
        return new Materials(own);
    }

    /** Whether a material's index is to be fitted, {@code fit_index = true} beside its Cauchy form. */
    static boolean fitsIndex(Section materials, String name) {
        if (!materials.has(name)) {
            return false;
        }
        Section section = materials.section(name);
        boolean fits = section.flag("fit_index", false);
        if (fits && !section.has("cauchy")) {
            throw section.error("fit_index", section.path("fit_index") + " goes with a Cauchy form; give cauchy = [A, B] to start from");
        }
        return fits;
    }

    private static Material material(String name, Section section, Tables tables) {
        List<String> given = new ArrayList<>();
        for (String form : FORMS) {
            if (section.has(form)) {
                given.add(form);
            }
        }
        if (given.size() != 1) {
            throw section.error("", section.path("") + " needs exactly one of " + String.join(", ", FORMS) + ", not "
                    + (given.isEmpty() ? "none" : String.join(" and ", given)));
        }
        String form = given.get(0);
        if (form.equals("table") && section.has("k")) {
            throw section.error("k", section.path("k") + " goes with n, cauchy or sellmeier; a table has its own k column");
        }
        double k = section.number("k", 0, 0, 100);
        try {
            return switch (form) {
                case "n" -> Material.constant(name, section.number("n"), k);
                case "cauchy" -> cauchy(name, section.numbers("cauchy", 0), k);
                case "sellmeier" -> sellmeier(name, section.rows("sellmeier", 2), k);
                default -> Material.of(name, tables.read(section.text("table")));
            };
        } catch (IllegalArgumentException e) {
            throw section.error(form, section.path(form) + ": " + e.getMessage());
        }
    }

    private static Material cauchy(String name, double[] terms, double k) {
        if (terms.length < 1 || terms.length > 3) {
            throw new IllegalArgumentException("give one to three terms, A, B in um^2 and C in um^4");
        }
        return Material.cauchy(name, terms[0], terms.length > 1 ? terms[1] : 0, terms.length > 2 ? terms[2] : 0, k);
    }

    private static Material sellmeier(String name, List<double[]> pairs, double k) {
        double[] b = pairs.stream().mapToDouble(p -> p[0]).toArray();
        double[] c = pairs.stream().mapToDouble(p -> p[1]).toArray();
        return Material.sellmeier(name, b, c, k);
    }
}
