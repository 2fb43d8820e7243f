package iridepth.recipe;

import iridepth.calibration.InputUncertainty;
import iridepth.colour.Light;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Materials;
import iridepth.optics.Polarisation;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.photo.Region;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * What is known of film, view, light, camera and tolerance: the content of a recipe file, checked.
 *
 * @param file      the recipe file
 * @param title     a title, for reports
 * @param stack     the stack with its film
 * @param range     thicknesses to consider
 * @param view      directions of view
 * @param lights    one or more lights, one photo each
 * @param camera    the camera
 * @param pixelUm   size of a pixel in um, NaN to take it from the photo
 * @param excluded  regions to leave out
 * @param tolerance limits in nm, lower and upper, or null
 * @param tables    tables of materials and lamps that it names, as read
 * @param pins      what is known of the thickness at places
 * @param fitIndex  whether the steps are also to fix the film's index
 * @param inputs    how well the inputs are known, empty where the recipe does not say
 */
public record Recipe(Path file, String title, Stack stack, ThicknessRange range, ViewSpec view, List<Light> lights,
                     CameraSpec camera, double pixelUm, List<Region> excluded, double[] tolerance, List<Path> tables,
                     PinSpec pins, boolean fitIndex, Optional<InputUncertainty> inputs) {
    /**
     * Directions of view as the recipe gives them.
     *
     * @param numericalAperture aperture of the objective, or NaN when an angle is given
     * @param incidenceDeg      angle of incidence, or NaN
     * @param polarisation      polarisation at that angle
     */
    public record ViewSpec(double numericalAperture, double incidenceDeg, Polarisation polarisation) {
        /** The quadrature that serves a stack up to a thickness in nm. */
        public View view(Stack stack, double thickestNm) {
            return Double.isNaN(incidenceDeg) ? View.aperture(numericalAperture, stack, thickestNm)
                    : View.incidence(incidenceDeg, polarisation);
        }
    }

    /**
     * Reads and checks a recipe. Files that it names are not opened yet, except tables of materials and lamps.
     *
     * @throws RecipeException if something in it is wrong; the message names file and line
     */
    public static Recipe read(Path file) {
        RecipeText text = RecipeText.read(file);
        Section top = Section.top(text);
        Section film = top.section("film");
        if (!top.has("film")) {
            throw top.error("", "the table [film] is missing; it needs stack and range_nm");
        }
        Tables tables = new Tables(file);
        Materials materials = MaterialSpec.read(film.section("material"), tables);
        Stack stack = stack(film, "stack", materials);
        if (!stack.hasFilm()) {
            throw film.error("stack", "film.stack has no unknown layer; leave out the thickness of the film that is to be read");
        }
        ThicknessRange range = range(film, stack);
        boolean fitIndex = MaterialSpec.fitsIndex(film.section("material"), stack.film().name());
        PinSpec pins = PinSpec.read(film);
        film.finish();
        ViewSpec view = view(top.section("view"), stack, range);
        List<Light> lights = LightSpec.read(top, tables);
        CameraSpec camera = CameraSpec.read(top.section("camera"), tables, materials, lights.size());
        Section scale = top.section("scale");
        double pixelUm = scale.has("pixel_um") ? scale.number("pixel_um", 0, 1e-4, 1e6) : Double.NaN;
        scale.finish();
        List<Region> excluded = excluded(top.section("exclude"));
        double[] tolerance = tolerance(top.section("tolerance"));
        Optional<InputUncertainty> inputs = top.has("uncertainty") ? Optional.of(InputSpec.read(top.section("uncertainty"),
                camera.isCalibrated() ? InputUncertainty.DEFAULT : InputUncertainty.NONE)) : Optional.empty();
        String title = top.text("title", file.getFileName().toString());
        top.finish();
        return new Recipe(file, title, stack, range, view, lights, camera, pixelUm, excluded, tolerance,
                List.copyOf(tables.read()), pins, fitIndex, inputs);
    }

    static Stack stack(Section section, String key, Materials materials) {
        String notation = section.text(key);
        try {
            return Stack.parse(notation, materials);
        } catch (IllegalArgumentException e) {
            throw section.error(key, section.path(key) + ": " + e.getMessage());
        }
    }

    private static ThicknessRange range(Section film, Stack stack) {
        double[] ends = film.numbers("range_nm", 2);
        try {
            ThicknessRange range = new ThicknessRange(ends[0], ends[1]);
            range.requireResolved(stack);
            return range;
        } catch (IllegalArgumentException e) {
            throw film.error("range_nm", "film.range_nm: " + e.getMessage());
        }
    }

    private static ViewSpec view(Section section, Stack stack, ThicknessRange range) {
        if (section.has("numerical_aperture") && section.has("incidence_deg")) {
            throw section.error("incidence_deg", "view: give numerical_aperture or incidence_deg, not both");
        }
        section.knows("polarisation");
        ViewSpec view;
        if (section.has("incidence_deg")) {
            String word = section.choice("polarisation", "none", List.of("none", "s", "p"));
            view = new ViewSpec(Double.NaN, section.number("incidence_deg", 0, 0, 89.9),
                    Polarisation.valueOf(word.toUpperCase(java.util.Locale.ROOT)));
        } else {
            if (section.has("polarisation")) {
                throw section.error("polarisation", "view.polarisation goes with incidence_deg; over an aperture light is taken "
                        + "as unpolarised");
            }
            double highest = Math.min(0.95, 0.99 * stack.ambient().nAt(550));
            view = new ViewSpec(section.number("numerical_aperture", 0, 0, highest), Double.NaN, Polarisation.NONE);
        }
        section.finish();
        return view;
    }

    private static List<Region> excluded(Section section) {
        List<Region> regions = new ArrayList<>();
        for (double[] row : section.rows("regions", 4)) {
            regions.add(region(section, "regions", row));
        }
        section.finish();
        return List.copyOf(regions);
    }

    static Region region(Section section, String key, double[] row) {
        for (double number : row) {
            if (number != Math.rint(number)) {
                throw section.error(key, section.path(key) + ": a region is [x, y, width, height] in whole pixels");
            }
        }
        try {
            return new Region((int) row[0], (int) row[1], (int) row[2], (int) row[3]);
        } catch (IllegalArgumentException e) {
            throw section.error(key, section.path(key) + ": " + e.getMessage());
        }
    }

    private static double[] tolerance(Section section) {
        double[] limits = null;
        if (section.has("limits_nm")) {
            limits = section.numbers("limits_nm", 2);
            if (!(limits[0] < limits[1])) {
                throw section.error("limits_nm", "tolerance.limits_nm must rise, lower limit first");
            }
        }
        section.finish();
        return limits;
    }
}
