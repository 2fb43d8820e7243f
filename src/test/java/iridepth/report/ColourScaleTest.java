package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.colour.Lab;
import iridepth.colour.Matrix3;
import iridepth.colour.Srgb;
import iridepth.colour.Xyz;
import org.junit.jupiter.api.Test;

/**
 * Red-green blindness is simulated as Vienot, Brettel and Mollon do, Color Res. Appl. 24, 243-252 (1999): linear RGB to cone
 * signals by their equation 4, then their projections onto the plane through white, blue and black (equations 5 and 6).
 * The constants are from memory; {@link #simulationLeavesGreyAndBlueAlone} holds them to the property that defines them.
 */
class ColourScaleTest {
    private static final double[][] TO_CONES = {
        {17.8824, 43.5161, 4.11935}, {3.45565, 27.1554, 3.86714}, {0.0299566, 0.184309, 1.46709}};
    private static final double[][] PROTANOPE = {{0, 2.02344, -2.52581}, {0, 1, 0}, {0, 0, 1}};
    private static final double[][] DEUTERANOPE = {{1, 0, 0}, {0.494207, 0, 1.24827}, {0, 0, 1}};
    private static final double[][] NORMAL = {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}};

    private final ColourScale scale = ColourScale.thickness();

    private static Lab seen(double[] linear, double[][] eye) {
        double[] cones = Matrix3.times(eye, Matrix3.times(TO_CONES, linear));
        double[] shown = Matrix3.times(Matrix3.inverse(TO_CONES), cones);
        return Lab.of(Xyz.of(Matrix3.times(Srgb.TO_XYZ, shown)), Srgb.WHITE);
    }

    private static double[] linear(int rgb) {
        double[] v = new double[3];
        for (int c = 0; c < 3; c++) {
            v[c] = Srgb.decode((rgb >> 16 - 8 * c & 255) / 255.0);
        }
        return v;
    }

    @Test
    void simulationLeavesGreyAndBlueAlone() {
        for (double[][] eye : new double[][][] {PROTANOPE, DEUTERANOPE}) {
            for (double[] kept : new double[][] {{1, 1, 1}, {0.3, 0.3, 0.3}, {0, 0, 1}}) {
                assertEquals(0, seen(kept, eye).deltaE2000(seen(kept, NORMAL)), 0.01);
            }
        }
        assertTrue(seen(new double[] {1, 0, 0}, DEUTERANOPE).deltaE2000(seen(new double[] {1, 0, 0}, NORMAL)) > 20);
    }

    @Test
    void stepsLookEquallyLarge() {
        double least = Double.MAX_VALUE;
        double most = 0;
        for (int i = 1; i < ColourScale.SIZE; i++) {
            double step = scale.lab(i - 1).deltaE2000(scale.lab(i));
            least = Math.min(least, step);
            most = Math.max(most, step);
        }
        assertTrue(most / least < 1.01, least + " to " + most);
        assertTrue(least > 0.3, "a step is " + least);
    }

    @Test
    void coarseStepsOfTheColoursInThePictureLookEquallyLarge() {
        double least = Double.MAX_VALUE;
        double most = 0;
        for (int i = 16; i < ColourScale.SIZE; i += 16) {
            double step = seen(linear(scale.rgb(i - 16)), NORMAL).deltaE2000(seen(linear(scale.rgb(i)), NORMAL));
            least = Math.min(least, step);
            most = Math.max(most, step);
        }
        assertTrue(most / least < 1.2, least + " to " + most);
    }

    @Test
    void everyColourLiesInTheGamut() {
        for (int i = 0; i < ColourScale.SIZE; i++) {
            assertTrue(Srgb.of(scale.lab(i).toXyz(Srgb.WHITE)).inGamut(), "colour " + i);
        }
    }

    @Test
    void lightnessRisesForNormalAndColourBlindEyes() {
        for (double[][] eye : new double[][][] {NORMAL, PROTANOPE, DEUTERANOPE}) {
            double first = seen(linear(scale.rgb(0)), eye).l();
            double before = first;
            for (int i = 4; i < ColourScale.SIZE; i += 4) {
                Lab now = seen(linear(scale.rgb(i)), eye);
                assertTrue(now.l() > before, "lightness at " + i);
                before = now.l();
            }
            assertTrue(before - first > 70, "from " + first + " to " + before);
        }
    }

    @Test
    void stepsRemainVisibleForColourBlindEyes() {
        for (double[][] eye : new double[][][] {PROTANOPE, DEUTERANOPE}) {
            for (int i = 16; i < ColourScale.SIZE; i += 16) {
                double step = seen(linear(scale.rgb(i - 16)), eye).deltaE2000(seen(linear(scale.rgb(i)), eye));
                assertTrue(step > 2.3, "step to " + i + " is " + step);
            }
        }
    }

    @Test
    void statesDifferFromTheScaleAndFromEachOtherForAllEyes() {
        for (double[][] eye : new double[][][] {NORMAL, PROTANOPE, DEUTERANOPE}) {
            for (StateStyle state : StateStyle.values()) {
                if (state.hasThickness()) {
                    continue;
                }
                Lab tone = seen(linear(state.rgb()), eye);
                for (int i = 0; i < ColourScale.SIZE; i++) {
                    double difference = tone.deltaE2000(seen(linear(scale.rgb(i)), eye));
                    assertTrue(difference > 8, state + " against colour " + i + ": " + difference);
                }
                for (StateStyle other : StateStyle.values()) {
                    assertTrue(other == state || tone.deltaE2000(seen(linear(other.rgb()), eye)) > 8, state + " against " + other);
                }
            }
        }
    }

    @Test
    void valuesBeyondTheEndsTakeTheEndAndMissingOnesNone() {
        assertEquals(0, ColourScale.index(-3));
        assertEquals(255, ColourScale.index(1.5));
        assertEquals(128, ColourScale.index(0.5));
        assertThrows(IllegalArgumentException.class, () -> ColourScale.index(Double.NaN));
    }
}
