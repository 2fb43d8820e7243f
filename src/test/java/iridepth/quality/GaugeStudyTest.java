package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Test;

/** The study of the AIAG manual has 10 parts, 3 operators and 3 trials; printed figures are from memory. */
class GaugeStudyTest {

    @Test
    void sumsOfSquaresAreThoseOfTheManual() {
        List<VarianceSource> table = manual().full();
        double[] printed = {88.3619, 3.1673, 0.3590, 2.7589, 94.6471};
        int[] freedoms = {9, 2, 18, 60, 89};
        for (int i = 0; i < printed.length; i++) {
            assertEquals(printed[i], table.get(i).sumOfSquares(), 5e-5, table.get(i).name());
            assertEquals(freedoms[i], table.get(i).degreesOfFreedom());
        }
    }

    @Test
    void testsAreThoseOfTheManual() {
        // With interaction: F = 492.291, 79.406, 0.434, p of the interaction 0.974; after pooling F = 245.614 and 39.617.
        GaugeStudy study = manual();
        assertEquals(492.291, study.full().get(0).f(), 5e-4);
        assertEquals(79.406, study.full().get(1).f(), 5e-4);
        assertEquals(0.434, study.full().get(2).f(), 5e-4);
        assertEquals(0.974, study.full().get(2).p(), 5e-4);
        assertTrue(study.pooled());
        assertEquals(245.614, study.used().get(0).f(), 5e-4);
        assertEquals(39.617, study.used().get(1).f(), 5e-4);
        assertEquals(78, study.used().get(2).degreesOfFreedom());
    }

    @Test
    void componentsAreThoseOfTheManual() {
        // EV 0.199933, AV 0.226838, R and R 0.302373, PV 1.042327. The manual adds the rounded EV and AV, hence 2e-6 for R and R.
        GaugeComponents c = manual().components();
        assertEquals(0.199933, Math.sqrt(c.repeatability()), 5e-7);
        assertEquals(0.226838, Math.sqrt(c.reproducibility()), 5e-7);
        assertEquals(0.302373, Math.sqrt(c.gauge()), 2e-6);
        assertEquals(1.042327, Math.sqrt(c.part()), 5e-7);
        assertEquals(0, c.interaction());
    }

    @Test
    void sharesRatiosAndCategoriesAreThosePrintedForTheStudy() {
        // Widely reprinted with these data: contribution 7.76, 3.39, 4.37, 92.24 %; study variation 27.86, 18.42, 20.90,
        // 96.04 %; with a tolerance of 8 wide 22.68 % for the gauge; 4 categories.
        GaugeComponents c = manual().components();
        assertEquals(7.76, c.percentContribution(c.gauge()), 0.005);
        assertEquals(3.39, c.percentContribution(c.repeatability()), 0.005);
        assertEquals(4.37, c.percentContribution(c.reproducibility()), 0.005);
        assertEquals(92.24, c.percentContribution(c.part()), 0.005);
        assertEquals(27.86, c.percentStudyVariation(c.gauge()), 0.005);
        assertEquals(18.42, c.percentStudyVariation(c.repeatability()), 0.005);
        assertEquals(20.90, c.percentStudyVariation(c.reproducibility()), 0.005);
        assertEquals(96.04, c.percentStudyVariation(c.part()), 0.005);
        assertEquals(22.68, c.precisionToTolerance(c.gauge(), Tolerance.between(-4, 4)), 0.005);
        assertTrue(Double.isNaN(c.precisionToTolerance(c.gauge(), Tolerance.atLeast(-4))));
        assertEquals(4, c.distinctCategories());
    }

    @Test
    void aStrongInteractionIsKeptAsWorkedByHand() {
        // Cell means 10, 14 / 14, 10, repeats -+1 about them: parts and operators do not vary, SS interaction = 2 * 16 = 32
        // with 1 freedom, SS error = 8 with 4; repeatability 2, interaction (32 - 2) / 2 = 15.
        GaugeStudy study = GaugeStudy.of(new double[][][] {{{9, 11}, {13, 15}}, {{13, 15}, {9, 11}}});
        assertFalse(study.pooled());
        assertEquals(32, study.full().get(2).sumOfSquares(), 1e-12);
        assertEquals(16, study.full().get(2).f(), 1e-12);
        assertEquals(new GaugeComponents(2, 0, 15, 0), study.components());
    }

    @Test
    void repeatsOfSeveralPartsByOneOperatorAsWorkedByHand() {
        // Parts {1, 3} and {11, 13}: MS within 2, MS between 100, part (100 - 2) / 2 = 49.
        GaugeStudy study = GaugeStudy.ofRepeats(new double[][] {{1, 3}, {11, 13}});
        assertEquals(new GaugeComponents(2, 0, 0, 49), study.components());
        assertEquals(104, study.used().get(2).sumOfSquares(), 1e-12);
        assertEquals(Math.floor(1.41 * 7 / Math.sqrt(2)), study.components().distinctCategories());
    }

    @Test
    void repeatsOfOnePartGiveRepeatabilityAlone() {
        // NIST StRD, set Michelso: standard deviation 79.0105478190518 of 100 repeats.
        GaugeComponents c = GaugeStudy.ofRepeats(
                new double[][] {PublishedTable.read("michelson.csv").column("speed")}).components();
        assertEquals(79.0105478190518, Math.sqrt(c.gauge()), 1e-11);
        assertTrue(Double.isNaN(c.part()) && Double.isNaN(c.total()) && Double.isNaN(c.distinctCategories()));
    }

    @Test
    void identicalRepeatsHaveNoScatter() {
        GaugeStudy study = GaugeStudy.of(new double[][][] {{{1, 1}, {1, 1}}, {{2, 2}, {2, 2}}});
        assertEquals(0, study.components().gauge());
        assertEquals(Double.POSITIVE_INFINITY, study.components().distinctCategories());
    }

    @Test
    void unbalancedIncompleteAndTooSmallStudiesAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> GaugeStudy.of(new double[0][][]));
        assertThrows(IllegalArgumentException.class, () -> GaugeStudy.of(new double[2][2][1]));
        assertThrows(IllegalArgumentException.class,
                () -> GaugeStudy.of(new double[][][] {{{1, 1}, {1, 1}}, {{2, 2}}}));
        assertThrows(IllegalArgumentException.class,
                () -> GaugeStudy.of(new double[][][] {{{1, 1}, {1, 1}}, {{2, 2}, {2, Double.NaN}}}));
        assertThrows(IllegalArgumentException.class,
                () -> GaugeStudy.ofRepeats(new double[][] {{1, 2}, {1, 2, 3}}));
        assertThrows(IllegalArgumentException.class, () -> GaugeStudy.ofRepeats(new double[][] {{1}}));
    }

    private static GaugeStudy manual() {
        PublishedTable table = PublishedTable.read("gauge-study.csv");
        double[][][] values = new double[10][3][3];
        int[] part = table.indices("part");
        int[] operator = table.indices("operator");
        int[] trial = table.indices("trial");
        double[] value = table.column("value");
        Arrays.stream(values).flatMap(Arrays::stream).forEach(cell -> Arrays.fill(cell, Double.NaN));
        for (int i = 0; i < value.length; i++) {
            values[part[i] - 1][operator[i] - 1][trial[i] - 1] = value[i];
        }
        return GaugeStudy.of(values);
    }
}
