package iridepth.photo;

import java.util.Locale;
import org.apache.commons.math3.complex.Complex;
import org.apache.commons.math3.transform.DftNormalization;
import org.apache.commons.math3.transform.FastFourierTransformer;
import org.apache.commons.math3.transform.TransformType;

/**
 * How far one photo of a field is shifted against another, by phase correlation (C. D. Kuglin and D. C. Hines, 1975) of
 * their gradients with the angle doubled (orientation correlation, A. J. Fitch et al., 2002). An edge counts alike whether
 * it goes from dark to bright or back, so that photos of interference colours under different lights can be compared.
 *
 * @param dx columns by which the content of the second photo lies to the right of the first's; NaN when it cannot be told
 * @param dy rows by which it lies lower; NaN when it cannot be told
 * @param peak height of the correlation peak over the scatter of the rest: below {@value #LEAST_PEAK} the photos share too
 *     little structure
 */
public record Registration(double dx, double dy, double peak) {

    private static final double LEAST_PEAK = 8;
    private static final int LARGEST = 512;
    private static final int SMALLEST = 32;
    /** Standard deviation in pixels of the smoothing before gradients are taken, and of the correlation peak. */
    private static final double SMOOTHING = 1.2;
    /** Share of the mean power added where little is, so that noise is not blown up. */
    private static final double FLOOR = 0.1;

    /**
     * Compares the middle of two photos.
     *
     * @param first the one
     * @param second the other
     * @return the shift of the second against the first
     * @throws PhotoException if their sizes differ or are too small
     */
    public static Registration of(PhotoFile first, PhotoFile second) {
        PhotoInfo a = first.info();
        PhotoInfo b = second.info();
        if (a.width() != b.width() || a.height() != b.height()) {
            throw new PhotoException(b.path(), "has " + b.width() + " x " + b.height() + " pixels, but " + a.path() + " has "
                    + a.width() + " x " + a.height() + "; take all photos of a field with the same camera settings");
        }
        int side = Integer.highestOneBit(Math.min(LARGEST, Math.min(a.width(), a.height())));
        if (side < SMALLEST) {
            throw new PhotoException(a.path(), "is too small to be registered; give photos of " + SMALLEST + " x " + SMALLEST
                    + " pixels or more");
        }
        return of(orientation(grey(first, side), side), orientation(grey(second, side), side), side);
    }

    /**
     * Refuses photos that are shifted by a pixel or more. Photos with too little structure to tell pass.
     *
     * @param first the one
     * @param second the other
     * @return their registration
     * @throws PhotoException if they are shifted, or differ in size
     */
    public static Registration require(PhotoFile first, PhotoFile second) {
        Registration found = of(first, second);
        if (Math.hypot(found.dx, found.dy) >= 1) {
            throw new PhotoException(second.info().path(), String.format(Locale.ROOT,
                    "is shifted by %.1f columns and %.1f rows against %s; take the photos without moving camera or sample",
                    found.dx, found.dy, first.info().path()));
        }
        return found;
    }

    /** @return whether the photos share enough structure to tell their shift */
    public boolean known() {
        return peak >= LEAST_PEAK;
    }

    private static double[][] grey(PhotoFile photo, int side) {
        PhotoInfo info = photo.info();
        int top = (info.height() - side) / 2;
        int left = (info.width() - side) / 2;
        Frame rows = photo.rows(top, side);
        double[][] grey = new double[side][side];
        for (int y = 0; y < side; y++) {
            for (int x = 0; x < side; x++) {
                for (int c = 0; c < rows.channels(); c++) {
                    grey[y][x] += rows.count(left + x, y, c);
                }
            }
        }
        return grey;
    }

    /** The windowed field g^2 / |g|, with g = gx + i gy the gradient of the smoothed picture. */
    private static Complex[][] orientation(double[][] grey, int side) {
        double[][] smooth = transpose(smoothRows(transpose(smoothRows(grey))));
        Complex[][] field = new Complex[side][side];
        for (int y = 0; y < side; y++) {
            for (int x = 0; x < side; x++) {
                double gx = smooth[y][Math.min(side - 1, x + 1)] - smooth[y][Math.max(0, x - 1)];
                double gy = smooth[Math.min(side - 1, y + 1)][x] - smooth[Math.max(0, y - 1)][x];
                double weight = hann(x, side) * hann(y, side) / Math.max(1e-9, Math.hypot(gx, gy));
                field[y][x] = new Complex((gx * gx - gy * gy) * weight, 2 * gx * gy * weight);
            }
        }
        return field;
    }

    private static double hann(int i, int side) {
        double sine = Math.sin(Math.PI * (i + 0.5) / side);
        return sine * sine;
    }

    private static double[][] smoothRows(double[][] rows) {
        int side = rows.length;
        int reach = 4;
        double[][] smooth = new double[side][side];
        for (int y = 0; y < side; y++) {
            for (int x = 0; x < side; x++) {
                double weights = 0;
                for (int d = -reach; d <= reach; d++) {
                    double weight = Math.exp(-d * d / (2 * SMOOTHING * SMOOTHING));
                    smooth[y][x] += weight * rows[y][Math.max(0, Math.min(side - 1, x + d))];
                    weights += weight;
                }
                smooth[y][x] /= weights;
            }
        }
        return smooth;
    }

    private static double[][] transpose(double[][] rows) {
        double[][] columns = new double[rows.length][rows.length];
        for (int y = 0; y < rows.length; y++) {
            for (int x = 0; x < rows.length; x++) {
                columns[x][y] = rows[y][x];
            }
        }
        return columns;
    }

    private static Registration of(Complex[][] first, Complex[][] second, int side) {
        Complex[][] a = transform(first, TransformType.FORWARD);
        Complex[][] b = transform(second, TransformType.FORWARD);
        double mean = 0;
        for (int i = 0; i < side * side; i++) {
            mean += a[i / side][i % side].abs() * b[i / side][i % side].abs() / (side * side);
        }
        Complex[][] cross = new Complex[side][side];
        for (int i = 0; i < side * side; i++) {
            Complex product = b[i / side][i % side].multiply(a[i / side][i % side].conjugate());
            double frequency2 = square(i % side, side) + square(i / side, side);
            double low = Math.exp(-2 * Math.PI * Math.PI * SMOOTHING * SMOOTHING * frequency2);
            cross[i / side][i % side] = product.multiply(low / (product.abs() + FLOOR * mean + Double.MIN_NORMAL));
        }
        return peak(transform(cross, TransformType.INVERSE), side);
    }

    private static double square(int index, int side) {
        double frequency = (double) (index < side / 2 ? index : index - side) / side;
        return frequency * frequency;
    }

    private static Complex[][] transform(Complex[][] field, TransformType type) {
        FastFourierTransformer fourier = new FastFourierTransformer(DftNormalization.STANDARD);
        int side = field.length;
        Complex[][] out = new Complex[side][];
        for (int y = 0; y < side; y++) {
            out[y] = fourier.transform(field[y], type);
        }
        for (int x = 0; x < side; x++) {
            Complex[] column = new Complex[side];
            for (int y = 0; y < side; y++) {
                column[y] = out[y][x];
            }
            column = fourier.transform(column, type);
            for (int y = 0; y < side; y++) {
                out[y][x] = column[y];
            }
        }
        return out;
    }

    private static Registration peak(Complex[][] correlation, int side) {
        int best = 0;
        double squares = 0;
        for (int i = 0; i < side * side; i++) {
            double value = correlation[i / side][i % side].getReal();
            squares += value * value / (side * side);
            best = value > correlation[best / side][best % side].getReal() ? i : best;
        }
        int x = best % side;
        int y = best / side;
        double top = correlation[y][x].getReal();
        double height = squares > 0 ? top / Math.sqrt(squares) : 0;
        if (height < LEAST_PEAK) {
            return new Registration(Double.NaN, Double.NaN, height);
        }
        double right = vertex(correlation[y][(x + side - 1) % side].getReal(), top, correlation[y][(x + 1) % side].getReal());
        double below = vertex(correlation[(y + side - 1) % side][x].getReal(), top, correlation[(y + 1) % side][x].getReal());
        return new Registration((x < side / 2 ? x : x - side) + right, (y < side / 2 ? y : y - side) + below, height);
    }

    /** Offset of the vertex of a Gaussian through three neighbouring values. */
    private static double vertex(double before, double middle, double after) {
        double floor = 1e-3 * middle;
        double a = Math.log(Math.max(floor, before));
        double b = Math.log(middle);
        double c = Math.log(Math.max(floor, after));
        double curvature = a - 2 * b + c;
        return curvature < 0 ? Math.max(-0.5, Math.min(0.5, 0.5 * (a - c) / curvature)) : 0;
    }
}
