package iridepth.recipe;

import iridepth.optics.Materials;
import iridepth.optics.Stack;
import iridepth.photo.Region;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;

/**
 * The camera and the photographs that characterise it, {@code [camera]}.
 *
 * @param encoding         "linear" or "srgb"
 * @param whiteReflectance reflectance that fills the scale
 * @param fullScale        the count that is full scale, NaN for that of the file's bit depth
 * @param sensitivities    table of the sensor's spectral sensitivities, or null
 * @param darks            photo with no light for each of the recipe's lights, or none
 * @param flats            photo of the reference surface under each of the recipe's lights, or none
 * @param flatStack        stack of that surface, or null
 * @param steps            patches of known thickness
 * @param target           a reference target, or null
 * @param noiseFlats       single exposures of an even surface from which to take the noise, or none
 * @param readNoise        read noise in counts, NaN to estimate
 * @param fullWell         electrons at full scale, NaN to estimate
 */
public record CameraSpec(String encoding, double whiteReflectance, double fullScale, Path sensitivities,
                         List<Path> darks, List<Path> flats, Stack flatStack, List<Step> steps, TargetSpec target, List<Path> noiseFlats,
                         double readNoise, double fullWell) {
    /**
     * A patch of the film of known thickness.
     *
     * @param images        the photos that show it, one under each of the recipe's lights
     * @param region        where it is in the photo
     * @param thicknessNm   its thickness
     * @param uncertaintyNm standard uncertainty of that, NaN where nobody stated it
     */
    public record Step(List<Path> images, Region region, double thicknessNm, double uncertaintyNm) {
    }

    static CameraSpec read(Section camera, Tables tables, Materials materials, int lights) {
        String encoding = camera.choice("encoding", "srgb", List.of("srgb", "linear"));
        double white = camera.number("white_reflectance", 1, 1e-4, 100);
        double fullScale = camera.number("full_scale", Double.NaN, 1, 65535);
        Path sensitivities = path(camera, "sensitivities", tables);
        List<Path> darks = photos(camera, "dark", tables, lights, true);
        List<Path> flats = photos(camera, "flat", tables, lights, false);
        Stack flatStack = camera.has("flat_stack") ? Recipe.stack(camera, "flat_stack", materials) : null;
        if (flats.isEmpty() != (flatStack == null)) {
            throw camera.error(flats.isEmpty() ? "flat_stack" : "flat", "camera.flat and camera.flat_stack go together: the photo of "
                    + "the reference surface and what it is made of");
        }
        if (flatStack != null && flatStack.hasFilm()) {
            throw camera.error("flat_stack", "camera.flat_stack: every inner layer needs its thickness, as in 'air / SiO2 1.5 nm / Si'");
        }
        List<Step> steps = new ArrayList<>();
        for (Section section : camera.sections("steps")) {
            steps.add(step(section, tables, lights));
            section.finish();
        }
        TargetSpec target = null;
        if (camera.has("target")) {
            Section section = camera.section("target");
            target = TargetSpec.read(section, tables, photos(section, "image", tables, lights, false));
        }
        List<Path> noiseFlats = camera.has("noise_flats") ? camera.texts("noise_flats").stream().map(tables::resolve).toList() : List.of();
        double readNoise = camera.number("read_noise_counts", Double.NaN, 0, 65535);
        double fullWell = camera.number("full_well_e", Double.NaN, 1, 1e9);
        if (Double.isNaN(readNoise) != Double.isNaN(fullWell)) {
            throw camera.error("read_noise_counts", "camera.read_noise_counts and camera.full_well_e go together");
        }
        camera.finish();
        return new CameraSpec(encoding, white, fullScale, sensitivities, darks, flats, flatStack, List.copyOf(steps), target, noiseFlats,
                readNoise, fullWell);
    }

    /** One photo for each light; a single one may serve all where it does not depend on the light. */
    private static List<Path> photos(Section section, String key, Tables tables, int lights, boolean shared) {
        if (!section.has(key) && !key.equals("image")) {
            return List.of();
        }
        List<Path> photos = section.texts(key).stream().map(tables::resolve).toList();
        if (photos.size() == 1 && shared) {
            return Collections.nCopies(lights, photos.get(0));
        }
        if (photos.size() != lights) {
            throw section.error(key, section.path(key) + ": the recipe has " + lights + (lights == 1 ? " light, so give one photo"
                    : " lights, so give a list of " + lights + " photos in their order") + ", not " + photos.size());
        }
        return photos;
    }

    private static Path path(Section camera, String key, Tables tables) {
        return camera.has(key) ? tables.resolve(camera.text(key)) : null;
    }

    private static Step step(Section section, Tables tables, int lights) {
        Region region = Recipe.region(section, "region", section.numbers("region", 4));
        double thickness = section.number("thickness_nm", Double.NaN, 0, 1e6);
        if (Double.isNaN(thickness)) {
            throw section.error("", section.path("thickness_nm") + " is missing from a step");
        }
        return new Step(photos(section, "image", tables, lights, false), region, thickness,
                section.number("uncertainty_nm", Double.NaN, 0, 1e4));
    }

    /** Whether there is something to calibrate on, steps or a target. */
    public boolean isCalibrated() {
        return !steps.isEmpty() || target != null;
    }

    /** Photos that show what to calibrate on, one under each of the recipe's lights; only where there is something. */
    public List<Path> calibrationPhotos() {
        return steps.isEmpty() ? target.images() : steps.get(0).images();
    }

    /** Whether the file's values are colour-managed. */
    public boolean isColourManaged() {
        return encoding.equals("srgb");
    }
}
