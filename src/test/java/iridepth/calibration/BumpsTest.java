package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import iridepth.spectrum.Grid;
import java.util.Arrays;
import org.junit.jupiter.api.Test;

class BumpsTest {
    @Test
    void bumpsSumToOneEverywhere() {
        double[] ones = new double[Bumps.COUNT];
        Arrays.fill(ones, 1);
        double[] flat = new double[Grid.SIZE];
        Arrays.fill(flat, 1);
        assertArrayEquals(flat, Bumps.sum(ones), 1e-12);
    }

    /** The cubic B-spline on uniform knots peaks at 2/3 and ends two knots away (de Boor, A Practical Guide to Splines, chapter IX). */
    @Test
    void aBumpHasTheValuesOfTheUniformCubicSpline() {
        double[] one = new double[Bumps.COUNT];
        int bump = 9;
        one[bump] = 1;
        double[] spectrum = Bumps.sum(one);
        int centre = (int) Bumps.centre(bump) - Grid.FIRST_NM;
        assertEquals(2.0 / 3, spectrum[centre], 1e-12);
        // 2/3 - u^2 + |u|^3 / 2 within a knot of the peak; here u = 5 / 12.5.
        assertEquals(2.0 / 3 - 0.16 + 0.032, spectrum[centre + 5], 1e-12);
        assertEquals(0, spectrum[centre + (int) (2 * Bumps.SPACING_NM)], 1e-12);
    }

    @Test
    void projectionIsTheTransposeOfTheSum() {
        double[] weights = new double[Bumps.COUNT];
        Arrays.setAll(weights, k -> Math.sin(k));
        double[] spectrum = new double[Grid.SIZE];
        Arrays.setAll(spectrum, i -> Math.cos(0.05 * i));
        double[] projected = new double[Bumps.COUNT];
        Bumps.project(spectrum, projected);
        double left = 0;
        for (int k = 0; k < weights.length; k++) {
            left += weights[k] * projected[k];
        }
        double right = 0;
        double[] sum = Bumps.sum(weights);
        for (int i = 0; i < sum.length; i++) {
            right += sum[i] * spectrum[i];
        }
        assertEquals(right, left, 1e-9);
    }
}
