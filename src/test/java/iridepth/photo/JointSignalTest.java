package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.simulation.Photograph;
import iridepth.simulation.TiffFile;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class JointSignalTest {
    private static final int WIDTH = 7;
    private static final int HEIGHT = 5;

    @TempDir
    private Path folder;

    /** A photo whose count at (x, y) of channel c is 1000 (c + 1) + 10 y + x + offset. */
    private SignalSource photo(String name, int channels, int height, int offset, double well) throws IOException {
        short[] counts = new short[WIDTH * height * channels];
        for (int i = 0; i < counts.length; i++) {
            int pixel = i / channels;
            counts[i] = (short) (1000 * (i % channels + 1) + 10 * (pixel / WIDTH) + pixel % WIDTH + offset);
        }
        Path file = folder.resolve(name);
        TiffFile.write(file, new Photograph(WIDTH, height, channels, 65535, counts));
        return SignalSource.of(PhotoFile.open(file), Encoding.linear(65535), Optional.empty(), Optional.empty(),
                NoiseModel.of(0, well));
    }

    @Test
    void channelsOfAllPhotosFollowEachOther() throws IOException {
        SignalSource colour = photo("colour.tif", 3, HEIGHT, 0, 10_000);
        SignalSource grey = photo("grey.tif", 1, HEIGHT, 50, 40_000);
        SignalSource joint = SignalSource.jointly(List.of(colour, grey));
        assertEquals(4, joint.info().channels());
        assertEquals(List.of(colour, grey), joint.parts());
        Signal rows = joint.rows(0, 1, 3);
        Signal first = colour.rows(0, 1, 3);
        Signal second = grey.rows(0, 1, 3);
        for (int i = 0; i < WIDTH * 3; i++) {
            for (int c = 0; c < 3; c++) {
                assertEquals(first.value()[3 * i + c], rows.value()[4 * i + c]);
            }
            assertEquals(second.value()[i], rows.value()[4 * i + 3]);
        }
        assertEquals((1050 + 10 + 3) / 65535f, rows.value()[4 * 3 + 3], 1e-7f);
        assertArrayEquals(first.light(), rows.light());
    }

    @Test
    void noiseOfEachPhotoIsItsOwn() throws IOException {
        SignalSource joint = SignalSource.jointly(List.of(photo("a.tif", 1, HEIGHT, 0, 10_000), photo("b.tif", 1, HEIGHT, 0, 40_000)));
        double rounding = 1 / 65535.0 / 65535.0 / 12;
        assertEquals(0.5 / 10_000 + rounding, joint.variance(0, 0.5, 1), 1e-12);
        assertEquals(0.5 / 40_000 + rounding, joint.variance(1, 0.5, 1), 1e-12);
        assertEquals(1.0 / 40_000, joint.noise().gain(1), 1e-15);
        assertEquals(2, joint.noise().channels());
    }

    @Test
    void onePhotoIsItself() throws IOException {
        SignalSource photo = photo("a.tif", 1, HEIGHT, 0, 10_000);
        assertSame(photo, SignalSource.jointly(List.of(photo)));
        assertEquals(List.of(photo), photo.parts());
    }

    @Test
    void photosOfOtherSizeAreRefused() throws IOException {
        List<SignalSource> photos = List.of(photo("a.tif", 1, HEIGHT, 0, 10_000), photo("b.tif", 1, HEIGHT + 1, 0, 10_000));
        assertTrue(assertThrows(PhotoException.class, () -> SignalSource.jointly(photos)).getMessage().contains("b.tif: has 7 x 6"));
    }
}
