package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;

class DistributionTest {

    @Test
    void michelsonHasTheCertifiedMeanAndStandardDeviation() {
        // NIST Statistical Reference Datasets, Michelso: mean 299.852400000000, standard deviation 0.0790105478190518.
        Distribution d = Distribution.over(299_000, 301_000);
        for (double speed : PublishedTable.read("michelson.csv").column("speed")) {
            d.add(299_000 + speed);
        }
        assertEquals(100, d.count());
        assertEquals(299_852.4, d.mean(), 1e-9);
        assertEquals(79.0105478190518, d.standardDeviation(), 1e-12);
    }

    @Test
    void michelsonHasTheQuartilesThatRPrints() {
        // R, summary(morley$Speed): 620.0 807.5 850.0 852.4 892.5 1070.0 (from memory).
        Distribution d = michelson();
        assertEquals(620, d.min());
        assertEquals(1070, d.max());
        assertEquals(807.5, d.percentile(25), 0.05);
        assertEquals(850, d.percentile(50), 0.05);
        assertEquals(892.5, d.percentile(75), 0.05);
        assertEquals(620, d.percentile(0));
        assertEquals(1070, d.percentile(100));
    }

    @Test
    void percentilesLieWithinAFineBinOfThoseOfTheSortedValues() {
        Random random = new Random(1);
        double[] values = random.doubles(5001, 100, 130).toArray();
        Distribution d = Distribution.over(0, 450);
        for (double value : values) {
            d.add(value);
        }
        Arrays.sort(values);
        for (int percent = 0; percent <= 100; percent++) {
            assertEquals(values[50 * percent], d.percentile(percent), 0.05);
        }
    }

    @Test
    void anySplitAndOrderOfBandsGivesTheSameBits() {
        Random random = new Random(2);
        float[] values = new float[10_000];
        for (int i = 0; i < values.length; i++) {
            values[i] = i % 7 == 0 ? Float.NaN : (float) (1000 + 300 * random.nextGaussian());
        }
        Distribution whole = Distribution.over(-1000, 3000);
        whole.addAll(values, 0, values.length);
        Distribution[] bands = new Distribution[4];
        int[] edges = {0, 17, 3000, 3001, values.length};
        for (int b = 0; b < 4; b++) {
            bands[b] = Distribution.over(-1000, 3000);
            bands[b].addAll(values, edges[b], edges[b + 1]);
        }
        Distribution combined = bands[3].combine(bands[1]).combine(bands[0].combine(bands[2]));
        assertEquals(Uniformity.of(whole), Uniformity.of(combined));
        assertEquals(10_000 - 1429, whole.count());
    }

    @Test
    void aMillionEqualValuesLoseNothing() {
        Distribution d = Distribution.over(0, 2000);
        for (int i = 0; i < 1_000_000; i++) {
            d.add(1999.5);
        }
        assertEquals(1999.5, d.mean(), 1e-12);
        assertEquals(0, d.standardDeviation());
        assertEquals(1999.5, d.percentile(99.9), 0.05);
    }

    @Test
    void shareWithinIncludesBothLimits() {
        Distribution d = Distribution.of(10, 20, 30, 40);
        assertEquals(0.5, d.shareWithin(15, 35));
        assertEquals(1, d.shareWithin(10, 40));
        assertEquals(0.75, d.shareWithin(Double.NEGATIVE_INFINITY, 39));
        assertEquals(0.25, d.shareWithin(31, Double.POSITIVE_INFINITY));
        assertEquals(0, d.shareWithin(35, 15));
        assertEquals(0, d.shareWithin(50, 60));
    }

    @Test
    void nothingButNaNIsEmpty() {
        Distribution d = Distribution.of(Float.NaN, Float.NaN);
        assertEquals(0, d.count());
        assertTrue(Double.isNaN(d.mean()) && Double.isNaN(d.standardDeviation()) && Double.isNaN(d.percentile(50))
                && Double.isNaN(d.min()) && Double.isNaN(d.max()) && Double.isNaN(d.shareWithin(0, 1)));
    }

    @Test
    void oneValueHasNoStandardDeviation() {
        Distribution d = Distribution.of(285.25f);
        assertEquals(285.25, d.mean(), 1e-9);
        assertEquals(285.25, d.percentile(1));
        assertTrue(Double.isNaN(d.standardDeviation()));
    }

    @Test
    void valuesOutsideTheRangeAndOtherRangesAreRefused() {
        Distribution d = Distribution.over(0, 450);
        assertThrows(IllegalArgumentException.class, () -> d.add(450.1));
        assertThrows(IllegalArgumentException.class, () -> d.add(Double.POSITIVE_INFINITY));
        assertThrows(IllegalArgumentException.class, () -> d.combine(Distribution.over(0, 451)));
        assertThrows(IllegalArgumentException.class, () -> Distribution.over(450, 0));
        assertThrows(IllegalArgumentException.class, () -> Distribution.over(0, Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> Distribution.over(0, 1e7));
        assertThrows(IllegalArgumentException.class, () -> d.percentile(101));
        assertEquals(0, d.count());
    }

    static Distribution michelson() {
        Distribution d = Distribution.over(0, 2000);
        for (double speed : PublishedTable.read("michelson.csv").column("speed")) {
            d.add(speed);
        }
        return d;
    }
}
