package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class SmoothingTest {

    @Test
    void eachPixelIsTheMeanOfItsSquare() {
        Random random = new Random(5);
        float[] values = new float[13 * 9];
        for (int i = 0; i < values.length; i++) {
            values[i] = random.nextInt(5) == 0 ? Float.NaN : 200 + random.nextFloat();
        }
        Field field = Field.of(13, 9, values);
        for (int radius : new int[] {1, 2, 20}) {
            Field smooth = Smoothing.mean(field, radius);
            for (int y = 0; y < 9; y++) {
                for (int x = 0; x < 13; x++) {
                    assertEquals(Double.isNaN(field.at(x, y)) ? Double.NaN : mean(field, x, y, radius), smooth.at(x, y), 2e-5);
                }
            }
        }
    }

    private static double mean(Field field, int x, int y, int radius) {
        double sum = 0;
        int count = 0;
        for (int v = Math.max(0, y - radius); v <= Math.min(field.height() - 1, y + radius); v++) {
            for (int u = Math.max(0, x - radius); u <= Math.min(field.width() - 1, x + radius); u++) {
                if (!Double.isNaN(field.at(u, v))) {
                    sum += field.at(u, v);
                    count++;
                }
            }
        }
        return sum / count;
    }

    @Test
    void noRadiusChangesNothing() {
        Field field = Field.constant(3, 3, 1);
        assertSame(field, Smoothing.mean(field, 0));
        assertThrows(IllegalArgumentException.class, () -> Smoothing.mean(field, -1));
        assertTrue(Double.isNaN(Smoothing.mean(Field.constant(3, 3, Double.NaN), 1).at(1, 1)));
    }
}
