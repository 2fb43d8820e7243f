package iridepth.simulation;

/**
 * The Cramer-Rao bound: no unbiased reading of one pixel has a standard deviation below
 * 1 / sqrt(sum over channels of (df_c / dd)^2 / var_c), with f_c the channel's fraction of full scale and var_c its
 * variance with rounding. All that a calibration might not know is taken as known.
 */
public final class CramerRao {
    private CramerRao() {
    }

    /** The bound in nm at a thickness seen at one pixel of a picture. */
    public static double bound(Shot shot, double thickness, int x, int y, int width, int height) {
        double information = 0;
        for (int c = 0; c < shot.rig().channels(); c++) {
            double slope = shot.curve().slope(c, thickness) * shot.fractionSlope(c, x, y, width, height);
            double f = shot.fraction(shot.curve().signal(c, thickness), c, x, y, width, height);
            double noise = shot.rig().detector().noiseRounded(f);
            information += slope * slope / (noise * noise);
        }
        return 1 / Math.sqrt(information);
    }

    /** The bound at each pixel of a field, row by row; NaN where the truth is NaN. */
    public static double[] bounds(Shot shot, Field field) {
        double[] bounds = field.truth();
        for (int i = 0; i < bounds.length; i++) {
            if (!Double.isNaN(bounds[i])) {
                bounds[i] = bound(shot, bounds[i], i % field.width(), i / field.width(), field.width(),
                        field.height());
            }
        }
        return bounds;
    }
}
