package iridepth.simulation;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.dataformat.toml.TomlMapper;
import ij.IJ;
import ij.ImagePlus;
import java.awt.image.BufferedImage;
import java.awt.image.Raster;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Scene folders as other programs read them: ImageIO, ImageJ and a TOML parser. */
class SceneFolderTest {
    @TempDir
    Path dir;

    private static void assertHolds(Photograph expected, Path file) throws IOException {
        BufferedImage image = ImageIO.read(file.toFile());
        Raster raster = image.getRaster();
        assertEquals(expected.width(), image.getWidth());
        assertEquals(expected.height(), image.getHeight());
        assertEquals(expected.channels(), raster.getNumBands());
        for (int y = 0; y < image.getHeight(); y += 7) {
            for (int x = 0; x < image.getWidth(); x += 7) {
                for (int c = 0; c < raster.getNumBands(); c++) {
                    assertEquals(expected.count(x, y, c), raster.getSample(x, y, c));
                }
            }
        }
    }

    @Test
    void picturesComeBackAsTheyWereTaken() throws IOException {
        Scene scene = Rigs.resistSkewed();
        SceneFolder.write(dir, scene);
        Scene.Pictures pictures = scene.shoot();
        assertHolds(pictures.photo(), dir.resolve("photo.tif"));
        assertHolds(pictures.flat(), dir.resolve("flat.tif"));
        assertHolds(pictures.dark(), dir.resolve("dark.tif"));
        assertHolds(pictures.steps(), dir.resolve("steps.tif"));
    }

    @Test
    void oneAndFourChannelsAndEightBitsComeBackToo() throws IOException {
        for (Scene scene : new Scene[] {Rigs.oxideOneBand(), Rigs.pmmaFourChannels(), Rigs.oxideEightBit()}) {
            SceneFolder folder = SceneFolder.write(dir.resolve(scene.name()), scene);
            assertHolds(scene.shoot().photo(), folder.photo());
        }
        assertTrue(Files.exists(dir.resolve("oxide-eight-bit/photo.png")));
    }

    @Test
    void truthOpensInImageJAsFloatingPoint() throws IOException {
        Scene scene = Rigs.oxideMixture();
        SceneFolder folder = SceneFolder.write(dir, scene);
        ImagePlus truth = IJ.openImage(dir.resolve("truth.tif").toString());
        assertEquals(32, truth.getBitDepth());
        assertTrue(Float.isNaN(truth.getProcessor().getf(0, 0)));
        assertEquals((float) folder.truth()[75 * 300 + 100], truth.getProcessor().getf(100, 75));
        assertArrayEquals(CramerRao.bounds(scene.shot(), scene.field()), folder.limit());
    }

    @Test
    void theRecipeStatesWhatTheUserBelieves() throws IOException {
        SceneFolder folder = SceneFolder.write(dir, Rigs.resistRipple());
        JsonNode recipe = new TomlMapper().readTree(folder.recipe().toFile());
        assertEquals("air / resist / Si", recipe.at("/film/stack").asText());
        assertEquals(1.6, recipe.at("/film/material/resist/n").asDouble());
        assertEquals(3150, recipe.at("/light/temperature_K").asDouble());
        assertEquals(0.10, recipe.at("/view/numerical_aperture").asDouble());
        assertEquals("air / Si", recipe.at("/camera/flat_stack").asText());
        assertEquals(7, recipe.at("/camera/steps").size());
        assertEquals(70, recipe.at("/camera/steps/1/thickness_nm").asDouble());
        assertEquals(50, recipe.at("/camera/steps/1/region/0").asInt());
    }

    @Test
    void aKnownSensorComesAsATableOfSensitivities() throws IOException {
        Scene scene = Fields.wedge();
        SceneFolder folder = SceneFolder.write(dir, scene, true);
        JsonNode camera = new TomlMapper().readTree(folder.recipe().toFile()).at("/camera");
        assertEquals("camera.csv", camera.at("/sensitivities").asText());
        assertEquals(scene.shot().whiteReflectance(), camera.at("/white_reflectance").asDouble(), 1e-12);
        String[] lines = Files.readString(dir.resolve("camera.csv")).split("\n");
        assertEquals("wavelength_nm,channel_1,channel_2,channel_3", lines[0]);
        assertEquals(402, lines.length);
        assertEquals(scene.rig().sensor().curves()[1][150], Double.parseDouble(lines[151].split(",")[2]), 1e-8);
    }

    @Test
    void aColourManagedSceneHasAnEncodedPhotoAlone() throws IOException {
        Rig rig = Rig.srgb(Lamp.illuminant("D65"), View.aperture(0), 20_000);
        Scene scene = new Scene("oxide-wedge", rig, FilmStack.parse("air / SiO2 / Si"), null, new double[] {0, 520}, null,
                Field.wedge(64, 48, 0, 500), rig.lamp(), rig.view(), 1);
        SceneFolder folder = SceneFolder.write(dir, scene);
        assertHolds(scene.shoot().photo(), dir.resolve("photo.png"));
        String recipe = Files.readString(folder.recipe());
        assertTrue(recipe.contains("encoding = \"srgb\"\nwhite_reflectance = 1.0\n"));
        assertTrue(recipe.contains("illuminant = \"D65\""));
        assertTrue(!recipe.contains("flat") && !Files.exists(dir.resolve("flat.png")));
    }
}
