package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class HistogramTest {

    @Test
    void widthIsThatOfFreedmanAndDiaconisRoundedUp() {
        // Hand-worked: 2 * (892.5 - 807.5) / 100^(1/3) = 36.6, rounded up to 50.
        Histogram h = Histogram.of(DistributionTest.michelson());
        assertEquals(50, h.width());
        assertEquals(600, h.edge(0));
        assertEquals(1100, h.edge(h.bins()));
        assertEquals(625, h.centre(0));
    }

    @Test
    void countsAreThoseOfTheValuesInEachBin() {
        // By numpy.histogram(speed, numpy.arange(600, 1101, 50)).
        Histogram h = Histogram.of(DistributionTest.michelson(), 50);
        assertArrayEquals(new long[] {1, 1, 6, 12, 27, 28, 10, 11, 3, 1}, h.counts());
        assertEquals(100, h.total());
    }

    @Test
    void edgesAreWholeMultiplesOfTheWidthPrintedWithoutFuzz() {
        Histogram h = Histogram.of(Distribution.of(0.15f, 0.25f, 0.75f), 0.1);
        assertEquals(0.1, h.edge(0));
        assertEquals(0.2, h.edge(1));
        assertEquals(0.3, h.edge(2));
        assertArrayEquals(new long[] {1, 1, 0, 0, 0, 0, 1}, h.counts());
    }

    @Test
    void negativeValuesFallIntoBinsBelowZero() {
        Histogram h = Histogram.of(Distribution.of(-0.5f, -1.5f, 0.5f), 1);
        assertEquals(-2, h.edge(0));
        assertArrayEquals(new long[] {1, 1, 1}, h.counts());
    }

    @Test
    void outliersWidenTheBinsRatherThanMakeThousands() {
        Random random = new Random(3);
        Distribution d = Distribution.over(0, 1500);
        for (int i = 0; i < 20_000; i++) {
            d.add(285 + 0.3 * random.nextGaussian());
        }
        assertEquals(0.05, Histogram.of(d).width());
        d.add(0);
        d.add(1500);
        Histogram h = Histogram.of(d);
        assertTrue(h.bins() <= Histogram.MOST_BINS, h.bins() + " bins");
        assertEquals(20_002, h.total());
        assertEquals(5, h.width());
    }

    @Test
    void equalValuesGiveOneBin() {
        Histogram h = Histogram.of(Distribution.of(285, 285, 285));
        assertArrayEquals(new long[] {3}, h.counts());
    }

    @Test
    void nothingGivesNoBins() {
        assertEquals(0, Histogram.of(Distribution.over(0, 450)).bins());
    }

    @Test
    void widthsThatAreNoMultipleOfAFineBinAreRefused() {
        Distribution d = DistributionTest.michelson();
        for (double width : new double[] {0, -1, 0.07, Double.NaN, Double.POSITIVE_INFINITY}) {
            assertThrows(IllegalArgumentException.class, () -> Histogram.of(d, width));
        }
    }
}
