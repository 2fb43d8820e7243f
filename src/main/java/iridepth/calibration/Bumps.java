package iridepth.calibration;

import iridepth.spectrum.Grid;
import java.util.Arrays;

/**
 * The overlapping smooth bumps of which a sensitivity is a non-negative sum: cubic B-splines on evenly spaced knots over the
 * wavelength grid. They sum to 1 at every wavelength, so equal weights leave the spectrum that they multiply as it is.
 */
final class Bumps {
    /** Spacing of the knots, nm. */
    static final double SPACING_NM = 12.5;
    /** Number of bumps. */
    static final int COUNT = (int) ((Grid.LAST_NM - Grid.FIRST_NM) / SPACING_NM) + 3;
    /** Bumps that are not 0 at a wavelength. */
    static final int OVERLAP = 4;

    private static final double[][] VALUES = new double[Grid.SIZE][];

    static {
        for (int i = 0; i < Grid.SIZE; i++) {
            VALUES[i] = values(i);
        }
    }

    private Bumps() {
    }

    /** Wavelength at which a bump peaks, nm; the outermost peak just outside the grid. */
    static double centre(int bump) {
        return Grid.FIRST_NM + (bump - 1) * SPACING_NM;
    }

    /** The first of the four bumps that are not 0 at a grid index. */
    static int first(int gridIndex) {
        return Math.min((int) (gridIndex / SPACING_NM), COUNT - OVERLAP);
    }

    /** Values at a grid index of the four bumps from {@link #first} on (de Boor's uniform cubic basis). */
    static double[] values(int gridIndex) {
        double t = gridIndex / SPACING_NM - first(gridIndex);
        double s = 1 - t;
        return new double[] {s * s * s / 6, (3 * t * t * t - 6 * t * t + 4) / 6, (3 * s * s * s - 6 * s * s + 4) / 6, t * t * t / 6};
    }

    /**
     * Sums a spectrum over each bump.
     *
     * @param spectrum {@link Grid#SIZE} values
     * @param into     receives the sum over wavelength of spectrum times bump, from place 0 on
     */
    static void project(double[] spectrum, double[] into) {
        Arrays.fill(into, 0, COUNT, 0);
        for (int i = 0; i < Grid.SIZE; i++) {
            double[] value = VALUES[i];
            int at = first(i);
            for (int b = 0; b < OVERLAP; b++) {
                into[at + b] += spectrum[i] * value[b];
            }
        }
    }

    /** The weighted sum of the bumps on the grid. */
    static double[] sum(double[] weights) {
        double[] result = new double[Grid.SIZE];
        for (int i = 0; i < Grid.SIZE; i++) {
            int at = first(i);
            for (int b = 0; b < OVERLAP; b++) {
                result[i] += weights[at + b] * VALUES[i][b];
            }
        }
        return result;
    }
}
