package iridepth.recipe;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.PhotoException;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class RecipeTest {
    private static final String GOOD = """
            title = "Oxide"
            [film]
            stack = "air / SiO2 / Si"
            range_nm = [0, 450]
            [light]
            illuminant = "D65"
            """;

    @TempDir
    private Path folder;

    private Recipe read(String text) throws IOException {
        return Recipe.read(Files.writeString(folder.resolve("r.toml"), text));
    }

    private String refusal(String text) {
        String message = assertThrows(RecipeException.class, () -> read(text)).getMessage();
        assertEquals(1, message.lines().count(), message);
        return message.substring(message.indexOf("r.toml"));
    }

    @Test
    void shortRecipeTakesTheDefaults() throws IOException {
        Recipe recipe = read(GOOD);
        assertEquals("Oxide", recipe.title());
        assertEquals("air / SiO2 / Si", recipe.stack().toString());
        assertEquals(0, recipe.view().numericalAperture());
        assertTrue(recipe.camera().isColourManaged());
        assertEquals("D65", recipe.lights().get(0).name());
    }

    @Test
    void everyTableIsRead() throws IOException {
        Files.writeString(folder.resolve("lamp.csv"), "wavelength_nm,power\n380,1\n780,2\n");
        Recipe recipe = read("""
                [film]
                stack = "air / resist / Si"
                range_nm = [0, 900]
                [film.material.resist]
                cauchy = [1.6, 0.01]
                k = 0.001
                [view]
                incidence_deg = 45
                polarisation = "s"
                [light]
                table = "lamp.csv"
                [camera]
                encoding = "linear"
                flat = "flat.tif"
                flat_stack = "air / SiO2 1.5 nm / Si"
                steps = [ { image = "s.tif", region = [1, 2, 3, 4], thickness_nm = 25 },
                          { image = "s.tif", region = [5, 2, 3, 4], thickness_nm = 60, uncertainty_nm = 1 } ]
                [scale]
                pixel_um = 0.65
                [exclude]
                regions = [[0, 0, 40, 40]]
                [tolerance]
                limits_nm = [275, 295]
                """);
        assertEquals(2, recipe.lights().get(0).power().at(400) / recipe.lights().get(0).power().at(0), 1e-9);
        assertEquals(2, recipe.camera().steps().size());
        assertEquals(folder.toAbsolutePath().resolve("s.tif"), recipe.camera().steps().get(0).images().get(0));
        assertEquals(1, recipe.camera().steps().get(1).uncertaintyNm());
        assertEquals(1.6 + 0.01 / 0.25, recipe.stack().film().nAt(500), 1e-9);
        assertEquals(295, recipe.tolerance()[1]);
        assertEquals(40, recipe.excluded().get(0).width());
    }

    @Test
    void knownPlacesPinTheOrder() throws IOException {
        Recipe recipe = read(GOOD.replace("[light]", "zero_edge = \"left\"\n[[film.known]]\npixel = [10, 20]\nthickness_nm = 300\n[light]"));
        assertEquals(300, recipe.pins().points().get(0).thicknessNm());
        assertEquals("left", recipe.pins().edges().get(0));
        assertTrue(refusal(GOOD.replace("[light]", "zero_edge = \"middle\"\n[light]")).contains("must be one of left, right"));
        assertTrue(refusal(GOOD.replace("[light]", "[[film.known]]\npixel = [1.5, 2]\nthickness_nm = 3\n[light]"))
                .contains("in whole pixels"));
    }

    @Test
    void indexCanBeFittedFromACauchyFormOnly() throws IOException {
        String own = GOOD.replace("SiO2", "resist").replace("[light]", "[film.material.resist]\ncauchy = [1.6, 0.01]\nfit_index = true\n[light]");
        assertTrue(read(own).fitIndex());
        assertTrue(refusal(own.replace("cauchy = [1.6, 0.01]", "n = 1.6")).contains("goes with a Cauchy form"));
        assertTrue(!read(GOOD).fitIndex());
    }

    @Test
    void uncertaintiesOfInputsAreReadInTheirUnits() throws IOException {
        Recipe recipe = read(GOOD + "[uncertainty]\nfilm_index_percent = 0.5\nlamp_K = 100\n");
        assertEquals(0.005, recipe.inputs().orElseThrow().relativeIndex(), 1e-12);
        assertEquals(0, recipe.inputs().orElseThrow().numericalAperture());
        assertTrue(read(GOOD).inputs().isEmpty());
    }

    @Test
    void unknownKeyNamesItsLineAndTheNearestKey() {
        assertEquals("r.toml, line 4: unknown key film.range_mm; the nearest known is film.range_nm",
                refusal(GOOD.replace("range_nm", "range_mm = [0, 450]\nrange_nm")));
        assertEquals("r.toml, line 7: unknown key tolerence; the nearest known is tolerance",
                refusal(GOOD + "[tolerence]\nlimits_nm = [1, 2]\n"));
    }

    @Test
    void wrongTypeNamesItsLine() {
        assertEquals("r.toml, line 3: film.stack must be a text in quotes, not 7",
                refusal(GOOD.replace("\"air / SiO2 / Si\"", "7")));
        assertEquals("r.toml, line 4: film.range_nm must be a list of 2 numbers, not [0]", refusal(GOOD.replace("0, 450", "0")));
        assertTrue(refusal(GOOD + "[view]\nnumerical_aperture = nan\n").contains("line 8: view.numerical_aperture must be a finite"));
    }

    @Test
    void impossibleValuesAreRefused() {
        assertTrue(refusal(GOOD.replace("0, 450", "450, 0")).startsWith("r.toml, line 4: film.range_nm: the thickness range must"));
        assertTrue(refusal(GOOD.replace("0, 450", "-5, 450")).contains("must rise from 0 nm or more"));
        assertTrue(refusal(GOOD.replace("0, 450", "0, 90000")).contains("finer than the 1 nm wavelength grid"));
        assertTrue(refusal(GOOD.replace("SiO2", "SiO9")).contains("line 3: film.stack: unknown material 'SiO9'"));
        assertTrue(refusal(GOOD.replace("D65", "D66")).contains("line 6: light.illuminant: unknown illuminant 'D66'"));
        assertTrue(refusal(GOOD.replace("/ SiO2 /", "/ SiO2 30 nm /")).contains("has no unknown layer"));
        assertTrue(refusal(GOOD + "[view]\nnumerical_aperture = 2\n").contains("must be 0 to 0.95"));
        assertTrue(refusal(GOOD + "[tolerance]\nlimits_nm = [3, 2]\n").contains("lower limit first"));
        assertTrue(refusal(GOOD + "[camera]\nencoding = \"log\"\n").contains("must be one of srgb, linear"));
        assertTrue(refusal(GOOD + "[camera]\nflat = \"f.tif\"\n").contains("go together"));
        assertTrue(refusal(GOOD + "[exclude]\nregions = [[0, 0, 0, 4]]\n").contains("is not possible"));
        assertTrue(refusal(GOOD.replace("illuminant = \"D65\"", "wavelength_nm = 546")).contains("light.bandwidth_nm is missing"));
    }

    @Test
    void missingTablesAreRefused() {
        assertTrue(refusal("title = \"x\"\n").contains("the table [film] is missing"));
        assertTrue(refusal(GOOD.substring(0, GOOD.indexOf("[light]"))).contains("the table [light] is missing"));
    }

    @Test
    void textThatIsNoTomlNamesItsLine() {
        assertTrue(refusal("[film\n").startsWith("r.toml, line"));
        assertTrue(assertThrows(RecipeException.class, () -> Recipe.read(folder.resolve("none.toml"))).getMessage()
                .contains("there is no such recipe"));
    }

    @Test
    void missingLampTableIsAnInputThatCannotBeUsed() {
        assertThrows(PhotoException.class, () -> read(GOOD.replace("illuminant = \"D65\"", "table = \"none.csv\"")));
    }
}
