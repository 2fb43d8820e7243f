package iridepth.reading;

/** The factor L of a small symmetric positive definite matrix A = L L^T, to be filled anew for each matrix. */
final class Cholesky {
    private final double[] factor;
    private int size;

    /** @param most largest number of rows to come */
    Cholesky(int most) {
        this.factor = new double[most * most];
    }

    /**
     * Factors a matrix.
     *
     * @param matrix by rows; only its lower triangle is read
     * @param rows   number of rows
     */
    void factor(double[] matrix, int rows) {
        size = rows;
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j <= i; j++) {
                double sum = matrix[i * rows + j];
                for (int k = 0; k < j; k++) {
                    sum -= factor[i * rows + k] * factor[j * rows + k];
                }
                factor[i * rows + j] = i == j ? Math.sqrt(sum) : sum / factor[j * rows + j];
            }
        }
    }

    /** ln det of the leading rows and columns of A. */
    double logDeterminant(int leading) {
        double product = 1;
        for (int i = 0; i < leading; i++) {
            product *= factor[i * size + i];
        }
        return 2 * Math.log(product);
    }

    /** b^T A^-1 b. */
    double quadratic(double[] b, double[] scratch) {
        forward(b, scratch);
        double sum = 0;
        for (int i = 0; i < size; i++) {
            sum += scratch[i] * scratch[i];
        }
        return sum;
    }

    /** Solves L x = b. */
    void forward(double[] b, double[] x) {
        for (int i = 0; i < size; i++) {
            double sum = b[i];
            for (int k = 0; k < i; k++) {
                sum -= factor[i * size + k] * x[k];
            }
            x[i] = sum / factor[i * size + i];
        }
    }

    /** Solves A x = b. */
    void solve(double[] b, double[] x) {
        forward(b, x);
        for (int i = size - 1; i >= 0; i--) {
            double sum = x[i];
            for (int k = i + 1; k < size; k++) {
                sum -= factor[k * size + i] * x[k];
            }
            x[i] = sum / factor[i * size + i];
        }
    }
}
