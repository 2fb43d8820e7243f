package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;

class RegionTest {

    private static Signal signal(int width, int height, double... values) {
        float[] value = new float[values.length];
        for (int i = 0; i < values.length; i++) {
            value[i] = (float) values[i];
        }
        return new Signal(width, height, 1, value, new float[value.length], new byte[value.length]);
    }

    @Test
    void impossibleRegionsAreTold() {
        assertEquals("the region [-1, 0, 5, 5] is not possible: x and y must be 0 or more, width and height 1 or more",
                assertThrows(IllegalArgumentException.class, () -> new Region(-1, 0, 5, 5)).getMessage());
        assertEquals("the region [0, 0, 5, 0] is not possible: x and y must be 0 or more, width and height 1 or more",
                assertThrows(IllegalArgumentException.class, () -> new Region(0, 0, 5, 0)).getMessage());
    }

    @Test
    void cropTakesTheRectangle() {
        Signal part = signal(4, 3, 0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11).crop(new Region(1, 1, 2, 2));
        assertTrue(Arrays.equals(new float[] {5, 6, 9, 10}, part.value()));
        assertEquals(2, part.height());
    }

    @Test
    void meanAndErrorAreThoseOfANormalSample() {
        Random random = new Random(1);
        double[] values = random.doubles(64 * 64).map(u -> 0.4 + 0.02 * random.nextGaussian()).toArray();
        RegionStatistics statistics = RegionStatistics.of(signal(64, 64, values))[0];
        assertEquals(0.4, statistics.mean(), 4 * 0.02 / 64);
        assertEquals(0.4, statistics.median(), 5 * 0.02 / 64);
        assertEquals(0.02, statistics.standardDeviation(), 0.001);
        assertEquals(0.02 / 64, statistics.standardError(), 0.2 * 0.02 / 64);
    }

    @Test
    void outliersDoNotMoveTheMean() {
        Random random = new Random(2);
        double[] values = random.doubles(1024).map(u -> 0.4 + 0.02 * random.nextGaussian()).toArray();
        for (int i = 0; i < 100; i++) {
            values[10 * i] = 1;
        }
        RegionStatistics statistics = RegionStatistics.of(signal(32, 32, values))[0];
        assertEquals(0.4, statistics.mean(), 4 * 0.02 / 30);
        assertEquals(924, statistics.samples(), 3);
    }

    /** Sixteen pixels that share their noise carry as much as one: the error must be four times that of independent ones. */
    @Test
    void correlatedNoiseWidensTheError() {
        Random random = new Random(3);
        double[] blocks = random.doubles(32 * 32).map(u -> 0.02 * random.nextGaussian()).toArray();
        double[] values = new double[128 * 128];
        Arrays.setAll(values, i -> 0.4 + blocks[i / 128 / 4 * 32 + i % 128 / 4]);
        assertEquals(0.02 / 32, RegionStatistics.of(signal(128, 128, values))[0].standardError(), 0.2 * 0.02 / 32);
    }

    @Test
    void limitsAreCountedAndLeftOut() {
        Signal signal = signal(4, 1, 1, 1, 0.3, 0.5);
        signal.limit()[0] = Signal.AT_LEAST;
        signal.limit()[1] = Signal.AT_MOST;
        RegionStatistics statistics = RegionStatistics.of(signal)[0];
        assertEquals(0.25, statistics.topFraction());
        assertEquals(0.25, statistics.bottomFraction());
        assertEquals(0.4, statistics.median(), 1e-7);
        assertEquals(2, statistics.samples());
        signal.limit()[2] = Signal.AT_LEAST;
        signal.limit()[3] = Signal.AT_LEAST;
        RegionStatistics none = RegionStatistics.of(signal)[0];
        assertTrue(Double.isNaN(none.mean()) && Double.isNaN(none.median()) && Double.isNaN(none.standardError()));
        assertEquals(0, none.samples());
    }

    @Test
    void equalValuesHaveNoScatter() {
        RegionStatistics statistics = RegionStatistics.of(signal(3, 1, 0.5, 0.5, 0.5))[0];
        assertEquals(0.5, statistics.mean());
        assertEquals(0, statistics.standardError());
    }
}
