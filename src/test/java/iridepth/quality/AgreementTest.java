package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class AgreementTest {

    @Test
    void peakFlowMetersAgreeAsBlandAndAltmanPrint() {
        // The Lancet 1986: bias -2.1, s = 38.8, its standard error 9.4, interval -22.0 to 17.8.
        Agreement a = peakFlow();
        assertEquals(17, a.pairs());
        assertEquals(-2.1, a.bias().value(), 0.05);
        assertEquals(38.8, a.standardDeviation(), 0.05);
        assertEquals(9.4, a.bias().standardError(), 0.05);
        assertEquals(-22.0, a.bias().lower(), 0.05);
        assertEquals(17.8, a.bias().upper(), 0.05);
    }

    @Test
    void limitsOfAgreementAreThoseOfThePaper() {
        // The Lancet 1986: limits -79.7 and 75.5 with standard error 16.3, intervals -114.3 to -45.1 and 40.9 to 110.1. The paper
        // computes them from the rounded -2.1, 38.8 and 16.3, hence 0.2 rather than 0.05.
        Agreement a = peakFlow();
        assertEquals(-79.7, a.lowerLimit().value(), 0.1);
        assertEquals(75.5, a.upperLimit().value(), 0.1);
        assertEquals(16.3, a.lowerLimit().standardError(), 0.05);
        assertEquals(-114.3, a.lowerLimit().lower(), 0.2);
        assertEquals(-45.1, a.lowerLimit().upper(), 0.2);
        assertEquals(40.9, a.upperLimit().lower(), 0.2);
        assertEquals(110.1, a.upperLimit().upper(), 0.2);
    }

    @Test
    void proportionalBiasIsTheSlopeThatNistCertifies() {
        // NIST StRD, set Norris: with y as differences and x as means, the slope is certified.
        PublishedTable norris = PublishedTable.read("norris.csv");
        double[] d = norris.column("y");
        double[] m = norris.column("x");
        double[] readings = new double[d.length];
        double[] references = new double[d.length];
        for (int i = 0; i < d.length; i++) {
            readings[i] = m[i] + d[i] / 2;
            references[i] = m[i] - d[i] / 2;
        }
        Estimate slope = Agreement.of(readings, references).proportionalBias();
        assertEquals(1.00211681802045, slope.value(), 1e-12);
        assertEquals(0.429796848199937e-3, slope.standardError(), 1e-12);
        assertTrue(slope.covers(1.0018) && !slope.covers(1));
    }

    @Test
    void aConstantOffsetIsAllBiasAndNoScatter() {
        Agreement a = Agreement.of(new double[] {102, 202, 302}, new double[] {100, 200, 300});
        assertEquals(2, a.bias().value(), 1e-12);
        assertEquals(0, a.standardDeviation(), 1e-12);
        assertEquals(0, a.proportionalBias().value(), 1e-12);
        assertEquals(2, a.rootMeanSquare(), 1e-12);
    }

    @Test
    void rootMeanSquareHoldsBiasAndScatter() {
        // Differences 1 and 3: sqrt((1 + 9) / 2).
        assertEquals(Math.sqrt(5), Agreement.of(new double[] {11, 23}, new double[] {10, 20}).rootMeanSquare(), 1e-12);
    }

    @Test
    void pairsWithoutAValueAreSkipped() {
        Agreement a = Agreement.of(new double[] {1, Double.NaN, 4, 7}, new double[] {0, 5, Double.NaN, 6});
        assertEquals(2, a.pairs());
        assertEquals(1, a.bias().value());
    }

    @Test
    void onePairGivesABiasWithoutInterval() {
        Agreement a = Agreement.of(new double[] {101}, new double[] {100});
        assertEquals(1, a.bias().value());
        assertTrue(Double.isNaN(a.bias().lower()) && Double.isNaN(a.standardDeviation())
                && Double.isNaN(a.upperLimit().value()));
        assertFalse(a.bias().covers(1));
    }

    @Test
    void pairsThatAreNoneAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> Agreement.of(new double[0], new double[0]));
        assertThrows(IllegalArgumentException.class, () -> Agreement.of(new double[1], new double[2]));
        assertThrows(IllegalArgumentException.class,
                () -> Agreement.of(new double[] {Double.NaN}, new double[] {1}));
    }

    private static Agreement peakFlow() {
        PublishedTable table = PublishedTable.read("peak-flow.csv");
        return Agreement.of(table.column("large_meter"), table.column("mini_meter"));
    }
}
