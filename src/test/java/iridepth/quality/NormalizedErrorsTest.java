package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class NormalizedErrorsTest {

    @Test
    void scoresAreThoseWorkedByHandFromTheFormulaOfIso13528() {
        // (102 - 100) / sqrt(1.5^2 + 2^2) = 0.8; (97 - 100) / sqrt(1.5^2 + 2^2) = -1.2; exactly 1 is satisfactory.
        NormalizedErrors e = NormalizedErrors.of(new double[] {102, 97, 103}, new double[] {1.5, 1.5, 0},
                new double[] {100, 100, 100}, new double[] {2, 2, 3});
        assertEquals(0.8, e.score(0), 1e-12);
        assertEquals(-1.2, e.score(1), 1e-12);
        assertEquals(1, e.score(2));
        assertEquals(2 / 3.0, e.satisfactoryShare(), 1e-12);
    }

    @Test
    void aPairWithoutAValueHasNoScoreAndDoesNotCount() {
        NormalizedErrors e = NormalizedErrors.of(new double[] {Double.NaN, 101}, new double[] {Double.NaN, 1},
                new double[] {100, 100}, new double[] {1, 1});
        assertTrue(Double.isNaN(e.score(0)));
        assertEquals(2, e.pairs());
        assertEquals(1, e.satisfactoryShare());
    }

    @Test
    void noScoreGivesNoShare() {
        assertTrue(Double.isNaN(
                NormalizedErrors.of(new double[0], new double[0], new double[0], new double[0]).satisfactoryShare()));
    }

    @Test
    void uncertaintiesThatAreMissingNegativeOrBothZeroAreRefused() {
        for (double bad : new double[] {0, -1, Double.NaN}) {
            assertThrows(IllegalArgumentException.class, () -> NormalizedErrors.of(new double[] {1}, new double[] {bad},
                    new double[] {1}, new double[] {0}));
        }
        assertThrows(IllegalArgumentException.class,
                () -> NormalizedErrors.of(new double[2], new double[2], new double[2], new double[1]));
    }
}
