package iridepth.simulation;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;

/**
 * Photographs of many samples before one rig, as files in one folder beside a recipe: {@code photos/part-1.tif} and so
 * on, and all in {@code stack.tiff}.
 *
 * @param recipe the recipe's file
 * @param photos the folder of the photographs
 * @param stack the same photographs as pages of one file
 * @param truth nm per pixel of each photograph, NaN where a reading should give none
 */
public record Batch(Path recipe, Path photos, Path stack, List<double[]> truth) {

    /**
     * Writes a batch.
     *
     * @param dir folder, made where it is missing
     * @param scene rig, stack, flat, steps and what is believed of them; without steps the sensor is known; the noise of each
     *     photograph follows from the seed
     * @param fields the samples
     * @param more lines to add to the recipe
     */
    public static Batch write(Path dir, Scene scene, List<Field> fields, String more) throws IOException {
        SceneFolder folder = SceneFolder.write(dir, scene, scene.steps() == null);
        Files.delete(folder.photo());
        Files.writeString(folder.recipe(), Files.readString(folder.recipe()) + more);
        Path photos = Files.createDirectories(dir.resolve("photos"));
        List<double[]> truth = new ArrayList<>();
        double least = fields.stream().mapToDouble(f -> f.range()[0]).min().orElse(0);
        double most = fields.stream().mapToDouble(f -> f.range()[1]).max().orElse(0);
        Shot shot = Shot.of(scene.rig(), scene.stack(), scene.flatStack(), Math.floor(least), Math.ceil(most) + 1);
        List<Photograph> taken = new ArrayList<>();
        for (int i = 0; i < fields.size(); i++) {
            taken.add(shot.photo(fields.get(i), scene.seed() + 10 + i));
            TiffFile.write(photos.resolve("part-" + (i + 1) + ".tif"), taken.get(i));
            truth.add(fields.get(i).truth());
        }
        Path stack = dir.resolve("stack.tiff");
        TiffFile.write(stack, taken.toArray(Photograph[]::new));
        return new Batch(folder.recipe(), photos, stack, truth);
    }

    /** A draining soap film, frame by frame, before a camera that nobody has characterised, with steps. */
    public static Batch soap(Path dir, int frames) throws IOException {
        List<Scene> scenes = Fields.drainingSoap(frames);
        return write(dir, scenes.get(0), scenes.stream().map(Scene::field).toList(), "");
    }

    /** Oxide of about 100 nm on small pieces of silicon, tilted by 4 nm across, before a camera of known sensitivities. */
    public static Batch oxide(Path dir, double[] centres, String more) throws IOException {
        Rig rig = Rig.of(Sensor.mixture(), Lamp.planck(3200), View.aperture(0.1), Detector.linear(80_000));
        List<Field> fields = new ArrayList<>();
        for (double centre : centres) {
            fields.add(Field.wedge(48, 36, centre - 2, centre + 2));
        }
        Scene scene = new Scene("Oxide lot", rig, FilmStack.parse("air / SiO2 / Si"), FilmStack.parse("air / Si"),
                new double[] {0, 200}, null, fields.get(0), rig.lamp(), rig.view(), 700);
        return write(dir, scene, fields, more);
    }
}
