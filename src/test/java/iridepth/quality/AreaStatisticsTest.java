package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.OvalRoi;
import ij.process.FloatProcessor;
import ij.process.ImageProcessor;
import ij.process.ImageStatistics;
import iridepth.photo.Region;
import java.util.Random;
import org.junit.jupiter.api.Test;

class AreaStatisticsTest {
    private static final int WIDTH = 60;
    private static final int HEIGHT = 50;

    private static float[] noise() {
        Random random = new Random(11);
        float[] values = new float[WIDTH * HEIGHT];
        for (int i = 0; i < values.length; i++) {
            values[i] = (float) (280 + 3 * random.nextGaussian());
        }
        return values;
    }

    private static MeasuredField field(float[] values, double correlated) {
        return new MeasuredField(Field.of(WIDTH, HEIGHT, values), Field.constant(WIDTH, HEIGHT, 0.6),
                Field.constant(WIDTH, HEIGHT, 0.2), correlated);
    }

    /** ImageJ's own measurement of the same selection is the reference. */
    @Test
    void anOvalMeasuresAsInImageJ() {
        float[] values = noise();
        FloatProcessor picture = new FloatProcessor(WIDTH, HEIGHT, values);
        OvalRoi oval = new OvalRoi(9, 5, 31, 40);
        picture.setRoi(oval);
        ImageStatistics expected = picture.getStatistics();
        ImageProcessor mask = oval.getMask();
        AreaStatistics measured = AreaStatistics.of(field(values, 1), Area.masked(9, 5, 31, 40, (x, y) -> mask.get(x, y) != 0));
        assertEquals(expected.pixelCount, measured.pixels());
        assertEquals(expected.mean, measured.average().thickness(), 1e-4);
        assertEquals(expected.stdDev, measured.average().spread(), 1e-4);
        assertEquals(expected.min, measured.uniformity().min(), 1e-4);
        assertEquals(expected.max, measured.uniformity().max(), 1e-4);
    }

    /** JCGM 100, 4.2.3 and 5.2.2: 0.6 / sqrt(900) = 0.02; the systematic part stays. */
    @Test
    void randomPartShrinksAndSystematicPartDoesNot() {
        AreaStatistics measured = AreaStatistics.of(field(noise(), 1), Area.of(new Region(0, 0, 30, 30)));
        assertEquals(0.02, measured.average().random(), 1e-12);
        assertEquals(0.2, measured.average().systematic(), 1e-12);
        assertEquals(0.04, AreaStatistics.of(field(noise(), 4), Area.of(new Region(0, 0, 30, 30))).average().random(), 1e-12);
    }

    @Test
    void unreadPixelsAndThoseBesideTheMapAreLeftOut() {
        float[] values = noise();
        values[0] = Float.NaN;
        AreaStatistics corner = AreaStatistics.of(field(values, 1), Area.of(new Region(0, 0, 2, 2)));
        assertEquals(4, corner.pixels());
        assertEquals(3, corner.average().count());
        assertEquals(4, AreaStatistics.of(field(values, 1), Area.masked(-3, -3, 5, 5, (x, y) -> true)).pixels());
        AreaStatistics outside = AreaStatistics.of(field(values, 1), Area.of(new Region(100, 100, 2, 2)));
        assertEquals(0, outside.pixels());
        assertTrue(Double.isNaN(outside.average().thickness()) && outside.uniformity().count() == 0);
    }
}
