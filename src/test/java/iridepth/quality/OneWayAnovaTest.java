package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

class OneWayAnovaTest {

    @Test
    void siliconResistivityHasTheCertifiedAnalysis() {
        // NIST StRD, analysis of variance, SiRstv (lower difficulty): all certified figures.
        OneWayAnova a = OneWayAnova.of(byInstrument("sirstv.csv", 5));
        assertEquals(4, a.between().degreesOfFreedom());
        assertEquals(20, a.within().degreesOfFreedom());
        assertClose(5.11462616000000e-02, a.between().sumOfSquares(), 1e-11);
        assertClose(1.27865654000000e-02, a.between().meanSquare(), 1e-11);
        assertClose(2.16636560000000e-01, a.within().sumOfSquares(), 1e-11);
        assertClose(1.08318280000000e-02, a.within().meanSquare(), 1e-11);
        assertClose(1.18046237440255, a.between().f(), 1e-11);
        assertClose(1.90999039051129e-01, a.rSquared(), 1e-11);
        assertClose(1.04076068334656e-01, a.residualStandardDeviation(), 1e-11);
    }

    @Test
    void silverAtomicWeightHasTheCertifiedAnalysisDespiteSevenLeadingDigits() {
        // NIST StRD, AtmWtAg (average difficulty); doubles hold the data to about 1e-9 of their spread.
        OneWayAnova a = OneWayAnova.of(byInstrument("atmwtag.csv", 2));
        assertClose(3.63834187500000e-09, a.between().sumOfSquares(), 1e-8);
        assertClose(1.04951729166667e-08, a.within().sumOfSquares(), 1e-8);
        assertClose(15.9467335677930, a.between().f(), 1e-8);
        assertClose(1.51048314446410e-05, a.residualStandardDeviation(), 1e-8);
    }

    @Test
    void pIsTheUpperTailOfF() {
        // F tables: F(0.95; 4, 20) = 2.866, F(0.99; 1, 46) = 7.220 (from memory, four digits).
        assertEquals(0.05, tail(4, 20, 2.866), 5e-5);
        assertEquals(0.01, tail(1, 46, 7.220), 5e-5);
    }

    @Test
    void groupsOfUnequalSizeAsWorkedByHand() {
        // {1, 3} and {5, 6, 10}: means 2 and 7, grand mean 5; between 2 * 9 + 3 * 4 = 30; within 2 + 14 = 16 with 3 freedoms.
        OneWayAnova a = OneWayAnova.of(new double[] {1, 3}, new double[] {5, 6, 10});
        assertEquals(30, a.between().sumOfSquares(), 1e-12);
        assertEquals(16, a.within().sumOfSquares(), 1e-12);
        assertEquals(30 / (16 / 3.0), a.between().f(), 1e-12);
    }

    @Test
    void oneGroupHasOnlyItsOwnScatter() {
        OneWayAnova a = OneWayAnova.of(new double[] {1, 2, 3});
        assertEquals(1, a.residualStandardDeviation(), 1e-12);
        assertTrue(Double.isNaN(a.between().meanSquare()) && Double.isNaN(a.between().p()));
    }

    @Test
    void groupsThatSayNothingAreRefused() {
        assertThrows(IllegalArgumentException.class, OneWayAnova::of);
        assertThrows(IllegalArgumentException.class, () -> OneWayAnova.of(new double[] {1}, new double[] {2}));
        assertThrows(IllegalArgumentException.class, () -> OneWayAnova.of(new double[0], new double[] {1, 2}));
        assertThrows(IllegalArgumentException.class, () -> OneWayAnova.of(new double[] {1, Double.NaN}));
    }

    private static double tail(int freedoms, int freedomsOfError, double f) {
        return VarianceSource.untested("effect", freedoms, f * freedoms)
                .against(VarianceSource.untested("error", freedomsOfError, freedomsOfError)).p();
    }

    private static double[][] byInstrument(String name, int instruments) {
        PublishedTable table = PublishedTable.read(name);
        int[] instrument = table.indices("instrument");
        double[] value = table.column("value");
        return IntStream.rangeClosed(1, instruments).mapToObj(group -> IntStream.range(0, value.length)
                .filter(i -> instrument[i] == group).mapToDouble(i -> value[i]).toArray()).toArray(double[][]::new);
    }

    private static void assertClose(double expected, double actual, double relative) {
        assertEquals(expected, actual, relative * expected);
    }
}
