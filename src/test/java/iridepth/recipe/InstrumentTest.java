package iridepth.recipe;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertNotSame;
import static org.junit.jupiter.api.Assertions.assertSame;

import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class InstrumentTest {
    @TempDir
    private Path folder;

    private Path photo(String name, int type) throws IOException {
        Path file = folder.resolve(name);
        ImageIO.write(new BufferedImage(8, 8, type), "png", file.toFile());
        return file;
    }

    private static PhotoInfo info(Path file) {
        try (PhotoFile photo = PhotoFile.open(file)) {
            return photo.info();
        }
    }

    private Instrument instrument() throws IOException {
        Files.writeString(folder.resolve("lamp.csv"), "wavelength_nm,power\n380,1\n780,2\n");
        return Instrument.of(Recipe.read(Files.writeString(folder.resolve("r.toml"), """
                [film]
                stack = "air / SiO2 / Si"
                range_nm = [0, 50]
                [light]
                table = "lamp.csv"
                """)));
    }

    @Test
    void photosOfOneKindShareACurve() throws IOException {
        Instrument instrument = instrument();
        PhotoInfo first = info(photo("a.png", BufferedImage.TYPE_INT_RGB));
        PhotoInfo second = info(photo("b.png", BufferedImage.TYPE_INT_RGB));
        assertSame(instrument.setup(first), instrument.setup(second));
    }

    @Test
    void greyPhotosGetACurveOfTheirOwn() throws IOException {
        Instrument instrument = instrument();
        Setup colour = instrument.setup(info(photo("a.png", BufferedImage.TYPE_INT_RGB)));
        Setup grey = instrument.setup(info(photo("g.png", BufferedImage.TYPE_BYTE_GRAY)));
        assertNotSame(colour, grey);
        assertEquals(3, colour.curve().channels());
        assertEquals(1, grey.curve().channels());
    }

    @Test
    void hashesNameRecipeTablesAndPhoto() throws IOException {
        Path photo = photo("a.png", BufferedImage.TYPE_INT_RGB);
        Map<String, String> before = instrument().hashes(photo);
        assertEquals(List.of("r.toml", "lamp.csv", "a.png"), List.copyOf(before.keySet()));
        Instrument later = instrument();
        Files.writeString(folder.resolve("lamp.csv"), "wavelength_nm,power\n380,1\n780,3\n");
        assertEquals(before.get("r.toml"), later.hashes(photo).get("r.toml"));
        assertNotEquals(before.get("lamp.csv"), later.hashes(photo).get("lamp.csv"));
    }

    @Test
    void hashesNameTheCalibrationThatWasMadeBefore() throws IOException {
        Path photo = photo("a.png", BufferedImage.TYPE_INT_RGB);
        Path calibration = Files.createDirectory(folder.resolve("calibration"));
        Files.writeString(calibration.resolve("calibration.json"), "{}");
        Instrument instrument = Instrument.of(instrument().recipe(), calibration);
        assertEquals(List.of("r.toml", "lamp.csv", "calibration/calibration.json", "a.png"),
                List.copyOf(instrument.hashes(photo).keySet()));
    }

    @Test
    void photoElsewhereOfATakenNameGoesByItsWholePath() throws IOException {
        Path elsewhere = Files.createDirectory(folder.resolve("other"));
        Path recipes = Files.createDirectory(folder.resolve("recipes"));
        Files.writeString(elsewhere.resolve("r.toml"), "a photo of that name");
        Recipe recipe = Recipe.read(Files.writeString(recipes.resolve("r.toml"), """
                [film]
                stack = "air / SiO2 / Si"
                range_nm = [0, 50]
                [light]
                illuminant = "D65"
                """));
        Map<String, String> hashes = Instrument.of(recipe).hashes(elsewhere.resolve("r.toml"));
        assertEquals(2, hashes.size());
        assertNotEquals(hashes.get("r.toml"), hashes.get(elsewhere.resolve("r.toml").toString().replace('\\', '/')));
    }
}
