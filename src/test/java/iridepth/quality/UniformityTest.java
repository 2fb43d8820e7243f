package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class UniformityTest {

    @Test
    void michelsonHasTheCertifiedMomentsAndTheQuartilesThatRPrints() {
        // NIST StRD Michelso; quartiles of R's summary(morley$Speed), from memory.
        Uniformity u = Uniformity.of(PublishedTable.read("michelson.csv").column("speed"));
        assertEquals(852.4, u.mean(), 1e-12);
        assertEquals(79.0105478190518, u.standardDeviation(), 1e-12);
        assertEquals(807.5, u.percentile(25));
        assertEquals(850, u.median());
        assertEquals(892.5, u.percentile(75));
    }

    @Test
    void aFewValuesAndTheirDistributionAgree() {
        Uniformity exact = Uniformity.of(PublishedTable.read("michelson.csv").column("speed"));
        Uniformity binned = Uniformity.of(DistributionTest.michelson());
        assertEquals(exact.standardDeviation(), binned.standardDeviation(), 1e-9);
        for (double percent : Uniformity.PERCENTS) {
            assertEquals(exact.percentile(percent), binned.percentile(percent), 0.05);
        }
    }

    @Test
    void nonUniformityByEachDefinitionAsWorkedByHand() {
        // Five sites 98, 99, 100, 101, 104: mean 100.4, deviations squared 5.76 + 1.96 + 0.16 + 0.36 + 12.96 = 21.2, s = sqrt(5.3).
        // P1 = 98 + 0.04 * 1, P99 = 104 - 0.04 * 3.
        Uniformity u = Uniformity.of(98, 99, 100, 101, 104);
        assertEquals(100 * Math.sqrt(5.3) / 100.4, NonUniformity.SIGMA.percent(u), 1e-12);
        assertEquals(100 * 6 / 200.8, NonUniformity.HALF_RANGE.percent(u), 1e-12);
        assertEquals(100 * 6 / 202.0, NonUniformity.MID_RANGE.percent(u), 1e-12);
        assertEquals(100 * (103.88 - 98.04) / 200, NonUniformity.ROBUST.percent(u), 1e-9);
    }

    @Test
    void noThicknessGivesNoRatio() {
        for (NonUniformity definition : NonUniformity.values()) {
            assertTrue(Double.isNaN(definition.percent(Uniformity.of(Double.NaN))));
            assertTrue(Double.isNaN(definition.percent(Uniformity.of(-1, 0, 1))));
        }
    }

    @Test
    void naNIsSkipped() {
        assertEquals(Uniformity.of(1, 2, 4), Uniformity.of(4, Double.NaN, 1, 2));
    }

    @Test
    void onlyKeptPercentilesCanBeAskedFor() {
        assertThrows(IllegalArgumentException.class, () -> Uniformity.of(1, 2).percentile(42));
    }
}
