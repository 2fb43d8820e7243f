package iridepth.recipe;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.calibration.StepSignal;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.photo.SignalSource;
import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Optional;
import java.util.Random;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class FilmSliceTest {
    private static final double SIGMA = 0.005;

    @TempDir
    private Path folder;

    private StepSignal film(FilmSlice slice) throws IOException {
        Path file = folder.resolve("photo.png");
        ImageIO.write(new BufferedImage(8, 8, BufferedImage.TYPE_INT_RGB), "png", file.toFile());
        try (PhotoFile photo = PhotoFile.open(file)) {
            SignalSource signal = SignalSource.of(photo, Encoding.linear(255), Optional.empty(), Optional.empty(), NoiseModel.of(0, 10_000));
            return slice.film(signal);
        }
    }

    private static FilmSlice filled(int good, int bad) {
        FilmSlice slice = new FilmSlice(300, 3);
        Random random = new Random(5);
        for (int i = 0; i < good + bad; i++) {
            float off = i < good ? 0 : 0.1f;
            slice.add(new float[] {(float) (0.3 + off + SIGMA * random.nextGaussian()), (float) (0.5 + SIGMA * random.nextGaussian()),
                (float) (0.2 - off + SIGMA * random.nextGaussian())}, 0, 0.3, 0.4);
        }
        return slice;
    }

    @Test
    void meanIsThatOfThePixelsWithItsScatter() throws IOException {
        StepSignal film = film(filled(1000, 0));
        assertEquals(0.3, film.signal()[0], 5e-4);
        assertEquals(SIGMA / Math.sqrt(1000), Math.sqrt(film.variance()[1]), 2e-5);
    }

    @Test
    void pixelsOfAnotherColourAreLeftOut() throws IOException {
        StepSignal film = film(filled(1000, 300));
        assertEquals(0.3, film.signal()[0], 1e-3);
        assertEquals(0.2, film.signal()[2], 1e-3);
    }

    @Test
    void thicknessCountsAsKnownToThreeStandardUncertaintiesOrThreeNanometres() throws IOException {
        assertEquals(3, film(filled(100, 0)).uncertaintyNm(), 1e-9);
        FilmSlice vague = new FilmSlice(300, 1);
        for (int i = 0; i < 30; i++) {
            vague.add(new float[] {0.5f}, 0, 3, 4);
        }
        assertEquals(15, film(vague).uncertaintyNm(), 1e-9);
        assertEquals(4, vague.systematicNm(), 1e-9);
    }

    @Test
    void aFewPixelsAreNotEnough() {
        assertFalse(filled(19, 0).counts());
        assertTrue(filled(20, 0).counts());
    }
}
