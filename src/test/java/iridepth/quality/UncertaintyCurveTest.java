package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class UncertaintyCurveTest {
    private static UncertaintyCurve curve() {
        UncertaintyCurve.Gathering gathering = new UncertaintyCurve.Gathering(0, 300);
        gathering.add(100.2, 3, 1);
        gathering.add(100.9, 4, 1);
        gathering.add(110.5, 1, 2);
        gathering.add(300, 1, 5);
        return gathering.curve();
    }

    @Test
    void readingsOfOneNanometreShareTheirRootMeanSquare() {
        UncertaintyCurve curve = curve();
        assertArrayEquals(new double[] {100.5, 110.5, 300.5}, curve.thickness());
        assertArrayEquals(new long[] {2, 1, 1}, curve.pixels());
        assertEquals(Math.sqrt(12.5), curve.random()[0], 1e-12);
        assertEquals(1, curve.systematic()[0], 1e-12);
    }

    @Test
    void systematicPartIsLinearBetweenAndHeldBeyond() {
        UncertaintyCurve curve = curve();
        assertEquals(1.3, curve.systematicAt(103.5), 1e-12);
        assertEquals(2, curve.systematicAt(110.5), 1e-12);
        assertEquals(1, curve.systematicAt(20), 1e-12);
        assertEquals(5, curve.systematicAt(400), 1e-12);
        assertTrue(Double.isNaN(curve.systematicAt(Double.NaN)));
        assertTrue(Double.isNaN(new UncertaintyCurve.Gathering(0, 1).curve().systematicAt(1)));
    }

    @Test
    void partsOfAPixelMakeUpItsUncertainty() {
        Field thickness = Field.of(3, 1, new float[] {100.5f, 300.5f, Float.NaN});
        Field combined = Field.of(3, 1, new float[] {1.25f, 2, Float.NaN});
        MeasuredField field = curve().divide(thickness, combined, 1);
        assertEquals(1, field.systematic().at(0, 0), 1e-12);
        assertEquals(0.75, field.random().at(0, 0), 1e-12);
        assertEquals(2, field.systematic().at(1, 0), 1e-12);
        assertEquals(0, field.random().at(1, 0), 1e-12);
        assertTrue(Double.isNaN(field.random().at(2, 0)) && Double.isNaN(field.systematic().at(2, 0)));
    }

    @Test
    void fallingThicknessesAreRefused() {
        assertThrows(IllegalArgumentException.class,
                () -> new UncertaintyCurve(new double[] {2, 1}, new long[2], new double[2], new double[2]));
        assertThrows(IllegalArgumentException.class,
                () -> new UncertaintyCurve(new double[] {1}, new long[2], new double[1], new double[1]));
    }
}
