package iridepth.recipe;

import iridepth.simulation.Lamp;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;

/**
 * One field photographed under several lights, each with its own dark and flat, and a recipe that reads the photos jointly.
 *
 * @param recipe the recipe's file
 * @param photos one photo per light
 * @param truth  thickness of every pixel, nm
 */
public record JointScene(Path recipe, List<Path> photos, double[] truth) {
    /**
     * Photographs a scene under lights.
     *
     * @param known whether the recipe tells the sensor's sensitivities; steps of the scene go into it otherwise
     */
    public static JointScene write(Path dir, Scene scene, List<Lamp> lamps, boolean known) throws IOException {
        List<Path> photos = new ArrayList<>();
        double[] truth = new double[0];
        for (int l = 0; l < lamps.size(); l++) {
            Lamp lamp = lamps.get(l);
            Scene under = new Scene(scene.name(), scene.rig().lamp(lamp), scene.stack(), scene.flatStack(), scene.rangeNm(),
                    scene.steps(), scene.field(), lamp, scene.believedView(), scene.seed() + 10L * l);
            SceneFolder folder = SceneFolder.write(dir.resolve("light-" + l), under, known);
            photos.add(folder.photo());
            truth = folder.truth();
        }
        String single = Files.readString(dir.resolve("light-0/recipe.toml"));
        String lights = lamps.stream().map(lamp -> "[[light]]\n" + lamp.statement() + "\n\n").collect(Collectors.joining());
        String joint = single.replaceAll("(?s)\\[light\\].*?\\n\\n", java.util.regex.Matcher.quoteReplacement(lights))
                .replaceAll("sensitivities = \"(.*?)\"", "sensitivities = \"light-0/$1\"")
                .replaceAll("(dark|flat|image) = \"(.*?)\"", "$1 = [" + java.util.stream.IntStream.range(0, lamps.size())
                        .mapToObj(l -> "\"light-" + l + "/$2\"").collect(Collectors.joining(", ")) + "]");
        return new JointScene(Files.writeString(dir.resolve("recipe.toml"), joint), List.copyOf(photos), truth);
    }
}
