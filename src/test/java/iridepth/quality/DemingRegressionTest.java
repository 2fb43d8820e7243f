package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;

class DemingRegressionTest {

    @Test
    void publishedExampleHasThePrintedLineAndJackknifeErrors() {
        // Documentation of NCSS, chapter 303, from memory: error variances x : y as 4 : 1, slope 1.001194, intercept -0.0897,
        // jackknife standard errors 0.187 and 1.7; no more digits are asked for than are remembered.
        DemingRegression line = fit("deming.csv", 0.25);
        assertEquals(1.001194, line.slope().value(), 5e-7);
        assertEquals(-0.0897, line.intercept().value(), 5e-5);
        assertEquals(0.187, line.slope().standardError(), 5e-4);
        assertEquals(1.7, line.intercept().standardError(), 0.05);
        assertTrue(line.slope().covers(1) && line.intercept().covers(0));
    }

    @Test
    void equalErrorsGiveTheLineOfClosestFitOfPearson() {
        // Pearson 1901, as reprinted by York (Canadian Journal of Physics 44, 1079, 1966), from memory: y = 5.784 - 0.546 x.
        DemingRegression line = fit("pearson.csv", 1);
        assertEquals(5.784, line.intercept().value(), 5e-4);
        assertEquals(-0.546, line.slope().value(), 5e-4);
        assertEquals(5.784 - 0.546 * 10, line.at(10), 5e-3);
    }

    @Test
    void exchangingTheInstrumentsInvertsTheLine() {
        PublishedTable table = PublishedTable.read("deming.csv");
        DemingRegression there = DemingRegression.fit(table.column("x"), table.column("y"), 0.25);
        DemingRegression back = DemingRegression.fit(table.column("y"), table.column("x"), 4);
        assertEquals(1, there.slope().value() * back.slope().value(), 1e-12);
    }

    @Test
    void anExactXGivesTheLineThatNistCertifiesForLeastSquares() {
        // NIST StRD, set Norris, errors all in y: slope 1.00211681802045, intercept -0.262323073774029.
        DemingRegression line = fit("norris.csv", 1e12);
        assertEquals(1.00211681802045, line.slope().value(), 1e-10);
        assertEquals(-0.262323073774029, line.intercept().value(), 1e-7);
    }

    @Test
    void pointsOnALineAreFoundWithoutError() {
        double[] x = {0, 100, 250, 400};
        DemingRegression line = DemingRegression.fit(x, Arrays.stream(x).map(v -> 3 + 1.02 * v).toArray(), 1);
        assertEquals(1.02, line.slope().value(), 1e-12);
        assertEquals(3, line.intercept().value(), 1e-9);
        assertEquals(0, line.slope().standardError(), 1e-9);
    }

    @Test
    void pairsThatLeaveTheSlopeOpenAreRefused() {
        double[] same = {5, 5, 5};
        assertThrows(IllegalArgumentException.class, () -> DemingRegression.fit(same, new double[] {1, 2, 3}, 1));
        assertThrows(IllegalArgumentException.class, () -> DemingRegression.fit(same, same, 1));
        assertThrows(IllegalArgumentException.class, () -> DemingRegression.fit(new double[2], new double[2], 1));
        assertThrows(IllegalArgumentException.class,
                () -> DemingRegression.fit(new double[] {1, 2, 3}, new double[] {1, 2, 3}, 0));
    }

    private static DemingRegression fit(String name, double ratio) {
        PublishedTable table = PublishedTable.read(name);
        return DemingRegression.fit(table.column("x"), table.column("y"), ratio);
    }
}
