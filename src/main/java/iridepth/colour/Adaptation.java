package iridepth.colour;

/**
 * Chromatic adaptation from one white to another by the linear Bradford transform, as the ICC profile specification uses it
 * (ISO 15076-1:2010, annex E).
 */
public final class Adaptation {
    private static final double[][] BRADFORD = {
        {0.8951, 0.2664, -0.1614}, {-0.7502, 1.7135, 0.0367}, {0.0389, -0.0685, 1.0296}};

    private Adaptation() {
    }

    /**
     * The matrix that carries tristimulus values seen under one white to those of the same look under another.
     *
     * @param from white adapted to
     * @param to   white wanted; only its chromaticity counts
     */
    public static double[][] matrix(Xyz from, Xyz to) {
        double[] a = Matrix3.times(BRADFORD, from.times(1 / from.y()).toArray());
        double[] b = Matrix3.times(BRADFORD, to.times(1 / to.y()).toArray());
        double[][] scale = {{b[0] / a[0], 0, 0}, {0, b[1] / a[1], 0}, {0, 0, b[2] / a[2]}};
        return Matrix3.times(Matrix3.inverse(BRADFORD), Matrix3.times(scale, BRADFORD));
    }
}
