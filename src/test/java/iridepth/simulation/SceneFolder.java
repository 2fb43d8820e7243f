package iridepth.simulation;

import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.Locale;
import java.util.Map;
import java.util.StringJoiner;
import javax.imageio.ImageIO;

/**
 * A scene as files: {@code photo}, {@code flat}, {@code dark} and {@code steps} as 16-bit TIFF or 8-bit PNG, what the user
 * believes in {@code recipe.toml}, the truth and the Cramer-Rao limit as 32-bit TIFF.
 *
 * @param photo the photograph's file
 * @param recipe the recipe's file
 * @param truth nm per pixel, row by row, NaN where a reading should give none
 * @param limit Cramer-Rao bound per pixel in nm
 */
public record SceneFolder(Path photo, Path recipe, double[] truth, double[] limit) {

    /** Writes a scene whose sensor the user does not know. */
    public static SceneFolder write(Path dir, Scene scene) throws IOException {
        return write(dir, scene, false);
    }

    /**
     * Writes a scene.
     *
     * @param dir folder, made where it is missing
     * @param scene what to photograph
     * @param knownSensor true to add the true sensitivities as {@code camera.csv}
     */
    public static SceneFolder write(Path dir, Scene scene, boolean knownSensor) throws IOException {
        Files.createDirectories(dir);
        Shot shot = scene.shot();
        Scene.Pictures pictures = scene.shoot(shot);
        Path photo = picture(dir, "photo", pictures.photo());
        picture(dir, "flat", pictures.flat());
        picture(dir, "dark", pictures.dark());
        picture(dir, "steps", pictures.steps());
        if (scene.believedLamp().statement().contains("lamp.csv")) {
            Files.writeString(dir.resolve("lamp.csv"), spectra("relative_power", scene.believedLamp().power()));
        }
        if (knownSensor) {
            StringJoiner names = new StringJoiner(",");
            for (int c = 0; c < scene.rig().channels(); c++) {
                names.add("channel_" + (c + 1));
            }
            Files.writeString(dir.resolve("camera.csv"), spectra(names.toString(), scene.rig().sensor().curves()));
        }
        Path recipe = Files.writeString(dir.resolve("recipe.toml"), recipe(scene, shot, knownSensor));
        double[] truth = scene.field().truth();
        double[] limit = CramerRao.bounds(shot, scene.field());
        TiffFile.write(dir.resolve("truth.tif"), scene.field().width(), scene.field().height(), truth);
        TiffFile.write(dir.resolve("limit.tif"), scene.field().width(), scene.field().height(), limit);
        return new SceneFolder(photo, recipe, truth, limit);
    }

    private static Path picture(Path dir, String name, Photograph photo) throws IOException {
        if (photo == null) {
            return null;
        }
        Path file = dir.resolve(name + extension(photo.fullScale()));
        if (photo.fullScale() == 255) {
            writePng(file, photo);
        } else {
            TiffFile.write(file, photo);
        }
        return file;
    }

    private static String extension(int fullScale) {
        return fullScale == 255 ? ".png" : ".tif";
    }

    private static void writePng(Path file, Photograph photo) throws IOException {
        boolean grey = photo.channels() == 1;
        BufferedImage image = new BufferedImage(photo.width(), photo.height(),
                grey ? BufferedImage.TYPE_BYTE_GRAY : BufferedImage.TYPE_INT_RGB);
        int[] samples = new int[photo.counts().length];
        for (int i = 0; i < samples.length; i++) {
            samples[i] = Short.toUnsignedInt(photo.counts()[i]);
        }
        image.getRaster().setPixels(0, 0, photo.width(), photo.height(), samples);
        ImageIO.write(image, "png", file.toFile());
    }

    private static String spectra(String names, double[]... columns) {
        StringBuilder text = new StringBuilder("wavelength_nm," + names + "\n");
        for (int i = 0; i < Spectrum.COUNT; i++) {
            text.append(Spectrum.FIRST + i);
            for (double[] column : columns) {
                text.append(String.format(Locale.ROOT, ",%.12g", column[i]));
            }
            text.append('\n');
        }
        return text.toString();
    }

    private static String recipe(Scene scene, Shot shot, boolean knownSensor) {
        StringBuilder text = new StringBuilder();
        text.append("title = \"").append(scene.name()).append("\"\n\n[film]\nstack = \"").append(scene.stack().text())
                .append("\"\nrange_nm = ").append(Arrays.toString(scene.rangeNm())).append('\n');
        for (Map.Entry<String, String> own : ownMedia(scene).entrySet()) {
            text.append("\n[film.material.").append(own.getKey()).append("]\n").append(own.getValue()).append('\n');
        }
        text.append("\n[view]\n").append(scene.believedView().statement()).append("\n\n[light]\n")
                .append(scene.believedLamp().statement()).append("\n\n[camera]\n");
        Detector detector = scene.rig().detector();
        String extension = extension(detector.fullScale());
        text.append("encoding = \"").append(detector.encoded() ? "srgb" : "linear").append("\"\n");
        if (detector.encoded() || knownSensor) {
            text.append("white_reflectance = ").append(shot.whiteReflectance()).append('\n');
        }
        if (knownSensor) {
            text.append("sensitivities = \"camera.csv\"\n");
        }
        if (scene.hasDark()) {
            text.append("dark = \"dark").append(extension).append("\"\n");
        }
        if (scene.flatStack() != null) {
            text.append("flat = \"flat").append(extension)
                    .append("\"\nflat_stack = \"").append(scene.flatStack().text()).append("\"\n");
        }
        if (scene.steps() != null) {
            text.append(steps(scene.steps(), "steps" + extension));
        }
        return text.toString();
    }

    private static Map<String, String> ownMedia(Scene scene) {
        Map<String, String> own = new LinkedHashMap<>();
        for (Medium medium : scene.stack().media()) {
            if (!medium.statement().isEmpty()) {
                own.put(medium.name(), medium.statement());
            }
        }
        return own;
    }

    private static String steps(Steps steps, String image) {
        StringBuilder text = new StringBuilder("steps = [\n");
        for (int i = 0; i < steps.thickness().length; i++) {
            text.append("  { image = \"").append(image).append("\", region = ")
                    .append(Arrays.toString(steps.region(i))).append(", thickness_nm = ").append(steps.thickness()[i])
                    .append(" },\n");
        }
        return text.append("]\n").toString();
    }
}
