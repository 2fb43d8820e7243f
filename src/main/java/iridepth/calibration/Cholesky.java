package iridepth.calibration;

/** The factor L of a symmetric positive definite matrix A = L L^T. */
final class Cholesky {
    private final double[][] factor;

    private Cholesky(double[][] factor) {
        this.factor = factor;
    }

    /**
     * Factors a matrix.
     *
     * @param a symmetric; only the lower triangle is read, nothing is changed
     * @throws ArithmeticException if it is not positive definite
     */
    static Cholesky of(double[][] a) {
        int n = a.length;
        double[][] l = new double[n][];
        for (int i = 0; i < n; i++) {
            l[i] = new double[i + 1];
            for (int j = 0; j <= i; j++) {
                double sum = a[i][j];
                for (int k = 0; k < j; k++) {
                    sum -= l[i][k] * l[j][k];
                }
                if (i == j && !(sum > 0)) {
                    throw new ArithmeticException("the matrix is not positive definite");
                }
                l[i][j] = i == j ? Math.sqrt(sum) : sum / l[j][j];
            }
        }
        return new Cholesky(l);
    }

    /** Solves L y = b. */
    double[] forward(double[] b) {
        double[] y = b.clone();
        for (int i = 0; i < y.length; i++) {
            for (int k = 0; k < i; k++) {
                y[i] -= factor[i][k] * y[k];
            }
            y[i] /= factor[i][i];
        }
        return y;
    }

    /** Solves A x = b. */
    double[] solve(double[] b) {
        double[] x = forward(b);
        for (int i = x.length - 1; i >= 0; i--) {
            for (int k = i + 1; k < x.length; k++) {
                x[i] -= factor[k][i] * x[k];
            }
            x[i] /= factor[i][i];
        }
        return x;
    }

    /** ln det A. */
    double logDeterminant() {
        double sum = 0;
        for (int i = 0; i < factor.length; i++) {
            sum += 2 * Math.log(factor[i][i]);
        }
        return sum;
    }

    /** The quadratic form b^T A^-1 b. */
    double quadratic(double[] b) {
        double sum = 0;
        for (double y : forward(b)) {
            sum += y * y;
        }
        return sum;
    }
}
