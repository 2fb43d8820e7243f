package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Optional;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class StripSignalTest {
    @TempDir
    private Path folder;

    /** A grey photo whose rows tell their number: count = row modulo 251. */
    private PhotoFile rows(int width, int height) throws IOException {
        BufferedImage image = new BufferedImage(width, height, BufferedImage.TYPE_BYTE_GRAY);
        for (int y = 0; y < height; y++) {
            for (int x = 0; x < width; x++) {
                image.getRaster().setSample(x, y, 0, y % 251);
            }
        }
        Path file = folder.resolve("rows.png");
        ImageIO.write(image, "png", file.toFile());
        return PhotoFile.open(file);
    }

    private static SignalSource signal(PhotoFile photo) {
        return SignalSource.of(photo, Encoding.linear(255), Optional.empty(), Optional.empty(), NoiseModel.of(1, 10_000));
    }

    @Test
    void aSmallPhotoIsTakenWhole() throws IOException {
        try (PhotoFile photo = rows(20, 50)) {
            SignalSource whole = signal(photo);
            StripSignal strips = StripSignal.of(whole, 1 << 19);
            assertEquals(whole.info(), strips.info());
            assertArrayEquals(whole.rows(0, 0, 50).value(), strips.rows(0, 0, 50).value());
        }
    }

    @Test
    void stripsOfEightRowsReachFromTopToBottom() throws IOException {
        try (PhotoFile photo = rows(10, 1000)) {
            StripSignal strips = StripSignal.of(signal(photo), 10 * 80);
            assertEquals(80, strips.info().height());
            assertEquals(0, strips.row(0));
            assertEquals(999, strips.row(79));
            for (int y = 0; y < 80; y++) {
                assertEquals(strips.row(y - y % 8) + y % 8, strips.row(y));
            }
        }
    }

    @Test
    void rowsAreThoseOfThePhotoAlsoAcrossStrips() throws IOException {
        try (PhotoFile photo = rows(10, 1000)) {
            StripSignal strips = StripSignal.of(signal(photo), 1);
            float[] value = strips.rows(0, 5, 20).value();
            for (int y = 0; y < 20; y++) {
                float[] row = Arrays.copyOfRange(value, 10 * y, 10 * y + 10);
                float[] expected = new float[10];
                Arrays.fill(expected, strips.row(5 + y) % 251 / 255f);
                assertArrayEquals(expected, row, 1e-6f);
            }
        }
    }
}
