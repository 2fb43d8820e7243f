package iridepth.recipe;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import iridepth.photo.OpenPhotos;
import iridepth.photo.SignalSource;
import iridepth.reading.ThicknessMap;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Test;

/** The test images, simulated by another program, against their truth and the Cramer-Rao bound of each of their pixels. */
class ScenesTest {
    private static final Path IMAGES = Path.of("test-images");
    private static final double NORMAL_QUARTILE = 0.6745;

    /** Figures over the pixels whose truth is at least some thickness. */
    private record Figures(double read, double near, double within5, double rms, double bias, double normalised, double within,
                           double withinTwice) {
        static Figures of(String scene, String photo, double leastNm) {
            Path folder = IMAGES.resolve(scene);
            float[] truth = plane(folder.resolve("truth.tif"));
            float[] bound = plane(folder.resolve("limit.tif"));
            Recipe recipe = Recipe.read(folder.resolve("recipe.toml"));
            Instrument instrument = Instrument.of(recipe);
            try (OpenPhotos files = OpenPhotos.of(List.of(folder.resolve(photo)))) {
                SignalSource signal = instrument.signal(files.files());
                ThicknessMap map = instrument.setup(signal).reader(recipe, signal.info()).read(signal, 0, done -> { });
                return of(map, truth, bound, leastNm);
            }
        }

        private static float[] plane(Path tiff) {
            return (float[]) IJ.openImage(tiff.toString()).getProcessor().getPixels();
        }

        private static Figures of(ThicknessMap map, float[] truth, float[] bound, double leastNm) {
            int pixels = 0;
            int read = 0;
            double[] sums = new double[6];
            double[] ratio = new double[truth.length];
            for (int i = 0; i < truth.length; i++) {
                if (truth[i] >= leastNm) {
                    pixels++;
                    double error = map.thickness()[i] - truth[i];
                    if (!Double.isNaN(error)) {
                        double size = Math.abs(error);
                        sums[0] += size <= 40 ? 1 : 0;
                        sums[1] += size <= 5 ? 1 : 0;
                        sums[2] += error * error;
                        sums[3] += error;
                        sums[4] += size <= map.uncertainty(i) ? 1 : 0;
                        sums[5] += size <= 2 * map.uncertainty(i) ? 1 : 0;
                        ratio[read++] = size / bound[i];
                    }
                }
            }
            double[] sorted = Arrays.copyOf(ratio, read);
            Arrays.sort(sorted);
            return new Figures((double) read / pixels, sums[0] / read, sums[1] / read, Math.sqrt(sums[2] / read), sums[3] / read,
                    sorted[read / 2] / NORMAL_QUARTILE, sums[4] / read, sums[5] / read);
        }
    }

    @Test
    void oxideWedgeIsReadAtTheCramerRaoBound() {
        Figures f = Figures.of("P1-oxide-wedge", "photo.png", 10);
        assertAll(f.toString(), () -> assertTrue(f.read >= 0.99), () -> assertTrue(f.near >= 0.995),
                () -> assertTrue(f.normalised <= 1.15), () -> assertTrue(f.within >= 0.63 && f.within <= 0.73));
    }

    @Test
    void waferIsReadWithACameraThatNobodyCharacterised() {
        Figures f = Figures.of("P2-wafer", "photo.tif", 0);
        assertAll(f.toString(), () -> assertTrue(f.within5 == 1), () -> assertTrue(f.rms <= 0.6),
                () -> assertTrue(Math.abs(f.bias) <= 0.3), () -> assertTrue(f.withinTwice >= 0.9 && f.withinTwice <= 0.99));
    }

    @Test
    void domeOfSeveralOrdersIsReadInTheRightOne() {
        Figures f = Figures.of("P3-resist-dome", "photo.tif", 0);
        assertAll(f.toString(), () -> assertTrue(f.read >= 0.98), () -> assertTrue(f.near >= 0.999),
                () -> assertTrue(f.normalised <= 1.3), () -> assertTrue(f.withinTwice >= 0.9 && f.withinTwice <= 0.99));
    }
}
