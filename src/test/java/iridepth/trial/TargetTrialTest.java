package iridepth.trial;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.PhotoException;
import iridepth.recipe.RecipeException;
import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import iridepth.simulation.TiffFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A reference target, seen askew, in the place of steps or beside them. Its patches are invented: edges and bands across the
 * spectrum, as of paints, and greys.
 */
class TargetTrialTest {
    private static final int COLUMNS = 6;
    private static final int ROWS = 4;
    private static final String TARGET = "target = { image = \"target.tif\", patches = \"target.txt\", "
            + "corners = [[20, 14], [185, 14], [164.25, 131.5], [26.25, 131.5]], grid = [6, 4] }\n";

    @TempDir
    private Path folder;
    private SceneFolder scene;
    private String recipe;
    private String steps;

    @BeforeEach
    void takeThePictures() throws IOException {
        Scene rig = Rigs.named("oxide-mixture");
        scene = SceneFolder.write(folder, rig);
        double[][] paints = new double[COLUMNS * ROWS][];
        for (int k = 0; k < paints.length; k++) {
            paints[k] = paint(k);
        }
        int width = rig.field().width();
        int height = rig.field().height();
        TiffFile.write(folder.resolve("target.tif"), rig.shot().target(width, height, TargetTrialTest::patch, paints, 77));
        Files.writeString(folder.resolve("target.txt"), table(paints));
        String text = Files.readString(scene.recipe());
        int from = text.indexOf("steps = [");
        recipe = text.substring(0, from);
        steps = text.substring(from);
    }

    /** The projective map that takes the unit square to the corners in the recipe, backwards: w = 1 + v / 5. */
    private static int patch(int x, int y) {
        double v = (y + 0.5 - 14) / (143.8 - (y + 0.5) / 5);
        double u = ((x + 0.5) * (1 + v / 5) - 20 - 11.5 * v) / (165 + 0.6 * v);
        boolean isFrame = u < 0 || v < 0 || u >= 1 || v >= 1 || u * COLUMNS % 1 < 0.08 || v * ROWS % 1 < 0.08;
        return isFrame ? -1 : (int) (v * ROWS) * COLUMNS + (int) (u * COLUMNS);
    }

    private static double[] paint(int k) {
        double[] r = new double[401];
        for (int i = 0; i < r.length; i++) {
            double nm = 380 + i;
            double centre = 400 + 14 * (k % 20);
            r[i] = k >= 20 ? 0.1 + 0.2 * (k - 20) : k % 3 == 0 ? 0.05 + 0.6 * Math.exp(-Math.pow((nm - centre) / 30, 2))
                    : 0.05 + 0.6 / (1 + Math.exp((k % 3 == 1 ? -1 : 1) * (nm - centre) / 18));
        }
        return r;
    }

    private static String table(double[][] paints) {
        StringBuilder text = new StringBuilder("CGATS.17\nBEGIN_DATA_FORMAT\nSAMPLE_ID");
        for (int nm = 380; nm <= 780; nm += 10) {
            text.append(" SPECTRAL_NM_").append(nm);
        }
        text.append("\nEND_DATA_FORMAT\nBEGIN_DATA\n");
        for (int k = 0; k < paints.length; k++) {
            text.append(k + 1);
            for (int nm = 380; nm <= 780; nm += 10) {
                text.append(String.format(Locale.ROOT, " %.5f", paints[k][nm - 380]));
            }
            text.append('\n');
        }
        return text.append("END_DATA\n").toString();
    }

    private Outcome read(String camera) throws IOException {
        Files.writeString(scene.recipe(), recipe + camera);
        return Trial.of(scene).stepsOnly(0);
    }

    /** The first so many of the steps. */
    private String steps(int count) {
        String[] lines = steps.split("\n");
        return String.join("\n", java.util.Arrays.copyOf(lines, count + 1)) + "\n]\n";
    }

    @Test
    void aTargetCalibratesACameraByItself() throws IOException {
        Outcome o = read(TARGET);
        assertAll(o.toString(), () -> assertTrue(o.read() >= 0.99), () -> assertTrue(o.within5() == 1),
                () -> assertTrue(Math.abs(o.bias()) <= 1), () -> assertTrue(o.within2u() >= 0.9));
    }

    @Test
    void aTargetAndThreeStepsDoBetterThanTheTarget() throws IOException {
        double alone = read(TARGET).rms();
        Outcome o = read(TARGET + steps(3));
        assertTrue(o.rms() < alone && o.rms() <= 0.6, alone + " to " + o);
        assertThrows(RecipeException.class, () -> read(steps(2)));
    }

    @Test
    void whatCannotBeUsedIsRefusedInALine() throws IOException {
        String message = assertThrows(RecipeException.class, () -> read(TARGET.replace("[6, 4]", "[6, 5]"))).getMessage();
        assertTrue(message.contains("24 patches where the grid has 6 x 5"), message);
        message = assertThrows(PhotoException.class, () -> read(TARGET.replace("[185, 14]", "[985, 14]"))).getMessage();
        assertTrue(message.contains("would lie outside it"), message);
        message = assertThrows(RecipeException.class, () -> read(TARGET.replace("[185, 14], [164.25, 131.5]",
                "[164.25, 131.5], [185, 14]"))).getMessage();
        assertTrue(message.contains("must go around the grid"), message);
        message = assertThrows(RecipeException.class, () -> read(TARGET.replace("grid", "gird"))).getMessage();
        assertTrue(message.contains("grid"), message);
        Files.writeString(folder.resolve("target.txt"), "no such table");
        message = assertThrows(PhotoException.class, () -> read(TARGET)).getMessage();
        assertTrue(message.contains("no CGATS.17 file"), message);
        assertEquals(1, message.lines().count());
    }
}
