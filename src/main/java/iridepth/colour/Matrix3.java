package iridepth.colour;

/** Products and inverses of 3 x 3 matrices, rows first, as colour transforms need them. */
public final class Matrix3 {
    private Matrix3() {
    }

    /** Matrix times column vector. */
    public static double[] times(double[][] m, double[] v) {
        double[] result = new double[3];
        for (int i = 0; i < 3; i++) {
            result[i] = m[i][0] * v[0] + m[i][1] * v[1] + m[i][2] * v[2];
        }
        return result;
    }

    /** Matrix times matrix. */
    public static double[][] times(double[][] a, double[][] b) {
        double[][] result = new double[3][3];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                result[i][j] = a[i][0] * b[0][j] + a[i][1] * b[1][j] + a[i][2] * b[2][j];
            }
        }
        return result;
    }

    /** Inverse by cofactors. */
    public static double[][] inverse(double[][] m) {
        double[][] result = new double[3][3];
        double det = 0;
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                int a = (j + 1) % 3;
                int b = (j + 2) % 3;
                int c = (i + 1) % 3;
                int d = (i + 2) % 3;
                result[i][j] = m[a][c] * m[b][d] - m[a][d] * m[b][c];
            }
            det += m[0][i] * result[i][0];
        }
        if (!(Math.abs(det) > 1e-12)) {
            throw new IllegalArgumentException("the colour matrix cannot be inverted");
        }
        for (double[] row : result) {
            for (int j = 0; j < 3; j++) {
                row[j] /= det;
            }
        }
        return result;
    }
}
