package iridepth.recipe;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.simulation.Rigs;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import iridepth.simulation.TiffFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The noise as two exposures of one surface tell it (EMVA Standard 1288), against that of the independent simulation. */
class NoiseFlatsTest {
    @TempDir
    private Path folder;

    private NoiseModel noise(SceneFolder files, String keys) throws IOException {
        Path recipe = folder.resolve("noise.toml");
        Files.writeString(recipe, Files.readString(files.recipe()).replace("[camera]\n", "[camera]\n" + keys));
        try (PhotoFile photo = PhotoFile.open(files.photo())) {
            return Instrument.of(Recipe.read(recipe)).signal(photo).noise();
        }
    }

    @Test
    void theWellComesFromTheDifferenceOfExposures() throws IOException {
        Scene scene = Rigs.named("oxide-mixture");
        SceneFolder files = SceneFolder.write(folder, scene);
        for (int i = 0; i < 2; i++) {
            TiffFile.write(folder.resolve("even" + i + ".tif"), scene.shot().flatFrame(300, 200, 40 + i));
        }
        NoiseModel noise = noise(files, "noise_flats = [\"even0.tif\", \"even1.tif\"]\n");
        for (int c = 0; c < 3; c++) {
            assertEquals(scene.rig().detector().well(), 1 / noise.gain(c), 0.1 * scene.rig().detector().well());
        }
        String message = assertThrows(PhotoException.class, () -> noise(files, "noise_flats = [\"none.tif\"]\n")).getMessage();
        assertTrue(message.contains("none.tif"), message);
    }
}
