package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import java.awt.image.BufferedImage;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Base64;
import java.util.Optional;
import java.util.Random;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;

class PagePhotoTest {
    private static Signal signal(int width, int height, int channels, float... value) {
        return new Signal(width, height, channels, value, new float[width * height], new byte[value.length]);
    }

    private static BufferedImage decoded(PagePhoto photo) throws IOException {
        String uri = photo.dataUri();
        return ImageIO.read(new ByteArrayInputStream(Base64.getDecoder().decode(uri.substring(uri.indexOf(',') + 1))));
    }

    /** Linear 0.21586 is the encoded grey 128 / 255 by IEC 61966-2-1: ((128 / 255 + 0.055) / 1.055)^2.4. */
    @Test
    void colourManagedPhotoIsShownAsItIs() throws IOException {
        PagePhoto photo = PagePhoto.of(2, 2, false);
        photo.add(1, signal(2, 1, 3, 0, 0, 1, 0.21586f, 0.21586f, 0.21586f));
        photo.add(0, signal(2, 1, 3, 1, 0, 0, 1.5f, -0.1f, Float.NaN));
        BufferedImage image = decoded(photo);
        assertEquals(0xFF0000, image.getRGB(0, 0) & 0xFFFFFF);
        assertEquals(0xFF0000, image.getRGB(1, 0) & 0xFFFFFF);
        assertEquals(0x0000FF, image.getRGB(0, 1) & 0xFFFFFF);
        assertEquals(0x808080, image.getRGB(1, 1) & 0xFFFFFF);
    }

    @Test
    void linearPhotoIsBrightenedUntilItsLightestPixelsAreNearlyWhite() throws IOException {
        PagePhoto photo = PagePhoto.of(100, 1, true);
        float[] grey = new float[100];
        Arrays.fill(grey, 0.02f);
        grey[99] = 0.01f;
        photo.add(0, signal(100, 1, 1, grey));
        BufferedImage image = decoded(photo);
        assertEquals(0xF9F9F9, image.getRGB(0, 0) & 0xFFFFFF);
        assertTrue((image.getRGB(99, 0) & 255) < 0xF0);
    }

    @Test
    void darkPhotoStaysDark() throws IOException {
        PagePhoto photo = PagePhoto.of(3, 1, true);
        photo.add(0, signal(3, 1, 1, 0, 0, 0));
        assertEquals(0, decoded(photo).getRGB(1, 0) & 0xFFFFFF);
    }

    @Test
    void largeNoisyPhotoBecomesSmall() {
        PagePhoto photo = PagePhoto.of(1000, 800, false);
        Random random = new Random(1);
        float[] value = new float[3 * 1000 * 800];
        for (int i = 0; i < value.length; i++) {
            value[i] = 0.3f + 0.02f * (float) random.nextGaussian();
        }
        photo.add(0, signal(1000, 800, 3, value));
        assertTrue(photo.dataUri().length() < 1_400_000);
    }

    @Test
    void signalOfAnotherSizeIsRefused() {
        PagePhoto photo = PagePhoto.of(3, 1, true);
        assertThrows(IllegalArgumentException.class, () -> photo.add(0, signal(2, 1, 1, 0, 0)));
        assertThrows(IllegalArgumentException.class, () -> photo.add(1, signal(3, 1, 1, 0, 0, 0)));
    }

    @Test
    void photoFileIsShownInItsOwnColours() throws IOException {
        Path file = Path.of("test-images/P1-oxide-wedge/photo.png");
        BufferedImage expected = ImageIO.read(file.toFile());
        try (PhotoFile open = PhotoFile.open(file)) {
            SignalSource source = SignalSource.of(open, Encoding.srgb(8), Optional.empty(), Optional.empty(), NoiseModel.of(1, 1e4));
            BufferedImage shown = PagePhoto.of(source, 0, false).picture();
            for (int y = 0; y < expected.getHeight(); y += 7) {
                for (int x = 0; x < expected.getWidth(); x += 3) {
                    assertEquals(expected.getRGB(x, y) & 0xFFFFFF, shown.getRGB(x, y) & 0xFFFFFF);
                }
            }
        }
    }
}
