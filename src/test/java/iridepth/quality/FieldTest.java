package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class FieldTest {

    private static final float NAN = Float.NaN;

    @Test
    void bilinearInterpolationIsExactOnThePlaneXyPlusXPlusY() {
        float[] values = new float[12];
        for (int i = 0; i < 12; i++) {
            int x = i % 4;
            int y = i / 4;
            values[i] = 3 + 2 * x - y + 0.5f * x * y;
        }
        Field f = Field.of(4, 3, values);
        assertEquals(3 + 2 * 1.25 - 0.75 + 0.5 * 1.25 * 0.75, f.interpolate(1.25, 0.75), 1e-12);
        assertEquals(f.at(3, 2), f.interpolate(3, 2));
        assertEquals(f.at(0, 1), f.interpolate(0, 1));
    }

    @Test
    void aPixelWithoutAValueTakesTheValueFromAllThatNeedIt() {
        Field f = Field.of(2, 2, new float[] {1, 2, 3, NAN});
        assertTrue(Double.isNaN(f.interpolate(0.1, 0.1)));
        assertEquals(1.5, f.interpolate(0.5, 0), 1e-12);
        assertEquals(2, f.interpolate(0, 0.5), 1e-12);
        assertTrue(Double.isNaN(f.interpolate(1, 0.5)));
    }

    @Test
    void aHairBesideAPixelIsThatPixel() {
        Field f = Field.of(2, 1, new float[] {1, NAN});
        assertEquals(1, f.interpolate(1e-12, 0));
        assertEquals(1, f.interpolate(-1e-12, 1e-12));
        assertTrue(Double.isNaN(f.interpolate(1e-6, 0)));
    }

    @Test
    void outsideThePixelCentresThereIsNoValue() {
        Field f = Field.constant(3, 2, 7);
        assertEquals(7, f.interpolate(2, 1));
        assertTrue(Double.isNaN(f.interpolate(-0.01, 0)) && Double.isNaN(f.interpolate(2.01, 0))
                && Double.isNaN(f.interpolate(0, 1.01)) && Double.isNaN(f.interpolate(Double.NaN, 0)));
    }

    @Test
    void arraysOfAnotherSizeAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> Field.of(2, 2, new float[3]));
        assertThrows(IllegalArgumentException.class, () -> Field.of(0, 2, new float[0]));
        Field f = Field.constant(2, 2, 1);
        assertThrows(IllegalArgumentException.class, () -> MeasuredField.of(f, f, Field.constant(2, 3, 1)));
        assertThrows(IllegalArgumentException.class, () -> new MeasuredField(f, f, f, 0.5));
    }
}
