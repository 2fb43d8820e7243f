package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.io.Opener;
import iridepth.recipe.JointScene;
import iridepth.simulation.Detector;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Photograph;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.Sensor;
import iridepth.simulation.Shading;
import iridepth.simulation.Steps;
import iridepth.simulation.TiffFile;
import iridepth.simulation.View;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Several photos of one field, each under its own light. */
class SeveralLightsTest {
    private static final Lamp BLUE = Lamp.band(450, 12);
    private static final Lamp RED = Lamp.band(640, 12);

    @TempDir
    private Path folder;
    private JointScene scene;

    /** A dusty dome of oxide before a monochrome camera that nobody has characterised, in two narrow bands. */
    @BeforeEach
    void photograph() throws IOException {
        Rig rig = Rig.of(Sensor.monochrome(), BLUE, View.aperture(0), Detector.linear(60_000))
                .shading(new Shading(0.06, 0.05, 30, 0.1, 0, 0)).glare(0.005);
        Steps steps = new Steps(280, 90, new double[] {20, 60, 100, 140, 190, 240, 300}, 4);
        Field field = Field.dome(280, 90, 60, 200).specks(12, 3, 5);
        scene = JointScene.write(folder, new Scene("two-bands", rig, FilmStack.parse("air / SiO2 / Si"),
                FilmStack.parse("air / SiO2 1.5 nm / Si"), new double[] {0, 320}, steps, field, BLUE, rig.view(), 31),
                List.of(BLUE, RED), false);
    }

    private Path photo(int light) {
        return scene.photos().get(light);
    }

    private Object[] map(Object... photos) {
        Object[] args = new Object[5 + photos.length];
        System.arraycopy(new Object[] {"map", "--recipe", scene.recipe(), "--out", folder.resolve("result")}, 0, args, 0, 5);
        System.arraycopy(photos, 0, args, 5, photos.length);
        return args;
    }

    @Test
    void twoBandsReadTogetherWhatNeitherTellsAlone() throws IOException {
        Answer answer = Answer.to(map(photo(0), photo(1)));
        assertTrue(answer.out().startsWith("two-bands: read"), answer.out());
        float[] thickness = (float[]) new Opener().openImage(folder.resolve("result/thickness.tif").toString()).getProcessor()
                .getPixels();
        int film = 0;
        int right = 0;
        for (int i = 0; i < thickness.length; i++) {
            if (!Double.isNaN(scene.truth()[i])) {
                film++;
                right += Math.abs(thickness[i] - scene.truth()[i]) < 5 ? 1 : 0;
            }
        }
        assertTrue(right > 0.98 * film, right + " of " + film);
        String summary = Files.readString(folder.resolve("result/summary.json"));
        assertTrue(summary.contains("\"read_jointly\"") && summary.contains("light-1/photo.tif"), summary);
        assertTrue(summary.contains("light-1/flat.tif") && summary.contains("light-1/steps.tif"), summary);
    }

    @Test
    void photosThatDoNotBelongTogetherAreTold() throws IOException {
        Answer.refusal(2, "it has 2 lights: give 2 photos of one field, in their order, not 1", map(photo(0)));
        Photograph shifted = shifted(photo(1), 3);
        Path moved = folder.resolve("moved.tif");
        TiffFile.write(moved, shifted);
        Answer.refusal(3, "moved.tif: is shifted by", map(photo(0), moved));
        Path small = folder.resolve("small.tif");
        TiffFile.write(small, new Photograph(60, 90, 1, 65535, new short[60 * 90]));
        Answer.refusal(3, "small.tif: has 60 x 90 pixels, but", map(photo(0), small));
    }

    private static Photograph shifted(Path photo, int columns) {
        short[] counts = (short[]) new Opener().openImage(photo.toString()).getProcessor().getPixels();
        short[] moved = new short[counts.length];
        for (int i = 0; i < moved.length; i++) {
            moved[i] = counts[i / 280 * 280 + Math.max(0, i % 280 - columns)];
        }
        return new Photograph(280, 90, 1, 65535, moved);
    }

    @Test
    void recipeOfSeveralLightsNamesAPhotoForEach() throws IOException {
        String text = Files.readString(scene.recipe());
        Files.writeString(scene.recipe(), text.replaceFirst("flat = \\[\"light-0/flat.tif\", \"light-1/flat.tif\"\\]",
                "flat = \"light-0/flat.tif\""));
        Answer.refusal(2, "camera.flat: the recipe has 2 lights, so give a list of 2 photos in their order, not 1",
                map(photo(0), photo(1)));
        Files.writeString(scene.recipe(), text.replace("\"light-0/steps.tif\", ", ""));
        Answer.refusal(2, "camera.steps.image: the recipe has 2 lights", map(photo(0), photo(1)));
        Files.writeString(scene.recipe(), text.replaceFirst("dark = \\[.*?\\]", "dark = \"light-0/dark.tif\""));
        assertEquals(0, Answer.to(map(photo(0), photo(1))).code());
    }

    @Test
    void calibrateServesSeveralLights() {
        Answer.to("calibrate", "--recipe", scene.recipe(), "--out", folder.resolve("calibration"));
        Answer answer = Answer.to(map("--calibration", folder.resolve("calibration"), photo(0), photo(1)));
        assertTrue(answer.out().startsWith("two-bands: read 9"), answer.out());
    }
}
