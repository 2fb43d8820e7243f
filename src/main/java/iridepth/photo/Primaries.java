package iridepth.photo;

/** Matrices from linear values of three primaries to CIE XYZ, and between white points. */
final class Primaries {

    /** The cone response matrix of the Bradford adaptation, ICC.1:2022 annex E. */
    private static final double[][] BRADFORD = {
        {0.8951, 0.2664, -0.1614}, {-0.7502, 1.7135, 0.0367}, {0.0389, -0.0685, 1.0296}};

    private Primaries() {
    }

    /** The matrix for chromaticities x, y of red, green, blue and white, with Y = 1 for (1, 1, 1). */
    static double[][] toXyz(double[][] xy) {
        double[][] columns = new double[3][3];
        for (int c = 0; c < 3; c++) {
            double[] xyz = white(xy[c]);
            for (int i = 0; i < 3; i++) {
                columns[i][c] = xyz[i];
            }
        }
        double[] amount = times(inverse(columns), white(xy[3]));
        for (double[] row : columns) {
            for (int c = 0; c < 3; c++) {
                row[c] *= amount[c];
            }
        }
        return columns;
    }

    /** XYZ with Y = 1 of a chromaticity x, y. */
    static double[] white(double[] xy) {
        return new double[] {xy[0] / xy[1], 1, (1 - xy[0] - xy[1]) / xy[1]};
    }

    /** The linear Bradford adaptation of XYZ from one white to another. */
    static double[][] bradford(double[] from, double[] to) {
        double[] source = times(BRADFORD, from);
        double[] target = times(BRADFORD, to);
        double[][] scaled = new double[3][3];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                scaled[i][j] = BRADFORD[i][j] * target[i] / source[i];
            }
        }
        return times(inverse(BRADFORD), scaled);
    }

    static double[][] times(double[][] a, double[][] b) {
        double[][] product = new double[a.length][b[0].length];
        for (int i = 0; i < a.length; i++) {
            for (int j = 0; j < b[0].length; j++) {
                for (int k = 0; k < b.length; k++) {
                    product[i][j] += a[i][k] * b[k][j];
                }
            }
        }
        return product;
    }

    private static double[] times(double[][] a, double[] v) {
        double[] product = new double[3];
        for (int i = 0; i < 3; i++) {
            product[i] = a[i][0] * v[0] + a[i][1] * v[1] + a[i][2] * v[2];
        }
        return product;
    }

    /** Inverse of a 3 x 3 matrix by its cofactors. */
    private static double[][] inverse(double[][] m) {
        double[][] inverse = new double[3][3];
        double determinant = 0;
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                int a = (j + 1) % 3;
                int b = (j + 2) % 3;
                int c = (i + 1) % 3;
                int d = (i + 2) % 3;
                inverse[i][j] = m[a][c] * m[b][d] - m[a][d] * m[b][c];
            }
            determinant += m[0][i] * inverse[i][0];
        }
        for (double[] row : inverse) {
            for (int j = 0; j < 3; j++) {
                row[j] /= determinant;
            }
        }
        return inverse;
    }
}
