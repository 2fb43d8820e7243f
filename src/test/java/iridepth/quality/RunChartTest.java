package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class RunChartTest {

    /**
     * NIST/SEMATECH e-Handbook of Statistical Methods, 6.3.2.2, individuals control limits: ten flow rates, their mean 50.81 and
     * limits 45.8159 and 55.8041 with d2 = 1.128. Data and results from memory.
     */
    @Test
    void limitsAreThoseOfThePublishedExample() {
        RunChart chart = RunChart.of(49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1);
        assertEquals(50.81, chart.mean(), 5e-9);
        assertEquals(55.8041, chart.upper(), 5e-3);
        assertEquals(45.8159, chart.lower(), 5e-3);
        for (int i = 0; i < 10; i++) {
            assertFalse(chart.isBeyond(i));
        }
    }

    @Test
    void missingValuesArePassedOver() {
        RunChart gap = RunChart.of(1, Double.NaN, 2, 4);
        RunChart none = RunChart.of(1, 2, 4);
        assertEquals(none.mean(), gap.mean());
        assertEquals(none.upper(), gap.upper());
        assertEquals(4, gap.values().length);
        assertFalse(gap.isBeyond(1));
    }

    @Test
    void aJumpLiesBeyondTheLimits() {
        RunChart chart = RunChart.of(10, 10.1, 10, 10.1, 10, 10.1, 10, 10.1, 15);
        assertTrue(chart.isBeyond(8));
        assertFalse(chart.isBeyond(7));
    }

    @Test
    void fewValuesHaveNoLimits() {
        assertTrue(Double.isNaN(RunChart.of().mean()));
        RunChart one = RunChart.of(7);
        assertEquals(7, one.mean());
        assertTrue(Double.isNaN(one.lower()) && Double.isNaN(one.upper()));
        assertFalse(one.isBeyond(0));
    }
}
