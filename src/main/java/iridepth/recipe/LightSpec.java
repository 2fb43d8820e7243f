package iridepth.recipe;

import iridepth.colour.Light;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** The lights of a recipe, {@code [light]} or {@code [[light]]} repeated, and of a command line. */
public final class LightSpec {
    private static final List<String> FORMS = List.of("temperature_K", "daylight_K", "illuminant", "table", "wavelength_nm");
    private static final Pattern TEMPERATURE = Pattern.compile("([\\d.]+)\\s*K");
    private static final Pattern BAND = Pattern.compile("([\\d.]+)\\s*nm\\s*\\+-\\s*([\\d.]+)\\s*nm");

    private LightSpec() {
    }

    /**
     * Reads a light from a command line: an illuminant's name, a black body as {@code 3200K}, a narrow band by centre and half
     * its width as {@code 546nm+-5nm}, or a CSV file.
     *
     * @throws RecipeException if it is none of these
     */
    public static Light parse(String text) {
        Matcher temperature = TEMPERATURE.matcher(text);
        Matcher band = BAND.matcher(text);
        try {
            if (temperature.matches()) {
                return Light.blackbody(Double.parseDouble(temperature.group(1)));
            }
            if (band.matches()) {
                return Light.narrowBand(Double.parseDouble(band.group(1)), 2 * Double.parseDouble(band.group(2)));
            }
            return text.endsWith(".csv") ? Light.table(new Tables(Path.of("command line")).read(text)) : Light.illuminant(text);
        } catch (IllegalArgumentException e) {
            throw new RecipeException("light '" + text + "': " + e.getMessage()
                    + "; give an illuminant, a black body as 3200K, a band as 546nm+-5nm, or a CSV file");
        }
    }

    static List<Light> read(Section top, Tables tables) {
        List<Light> lights = new ArrayList<>();
        for (Section section : top.sections("light")) {
            lights.add(light(section, tables));
            section.finish();
        }
        if (lights.isEmpty()) {
            throw top.error("light", "the table [light] is missing; give illuminant, temperature_K, table or wavelength_nm");
        }
        return List.copyOf(lights);
    }

    private static Light light(Section section, Tables tables) {
        List<String> given = FORMS.stream().filter(section::has).toList();
        if (given.size() != 1) {
            throw section.error("", "[light] needs exactly one of " + String.join(", ", FORMS) + ", not "
                    + (given.isEmpty() ? "none" : String.join(" and ", given)));
        }
        String form = given.get(0);
        section.knows("bandwidth_nm");
        try {
            return switch (form) {
                case "temperature_K" -> Light.blackbody(section.number(form));
                case "daylight_K" -> Light.daylight(section.number(form));
                case "illuminant" -> Light.illuminant(section.text(form));
                case "wavelength_nm" -> Light.narrowBand(section.number(form), section.number("bandwidth_nm"));
                default -> Light.table(tables.read(section.text(form)));
            };
        } catch (IllegalArgumentException e) {
            throw section.error(form, section.path(form) + ": " + e.getMessage());
        }
    }
}
