package iridepth.quality;

/**
 * A field of numbers on pixels, such as the thickness in nm or its uncertainty; NaN is 'no value'.
 *
 * <p>Pixel coordinates: the centre of the pixel in column x and row y is the point (x, y); x grows to the right, y downwards.
 */
public interface Field {

    /** Columns. */
    int width();

    /** Rows. */
    int height();

    /** Value at a pixel with 0 &lt;= x &lt; width and 0 &lt;= y &lt; height. */
    double at(int x, int y);

    /**
     * A view of an array; later changes of the array show.
     *
     * @param values row after row, width * height of them
     * @throws IllegalArgumentException if the number of values does not fit
     */
    static Field of(int width, int height, float[] values) {
        if (width < 1 || height < 1 || values.length != (long) width * height) {
            throw new IllegalArgumentException(values.length + " values do not make a field of " + width + " x " + height
                    + " pixels: give width times height of them");
        }
        return new ArrayField(width, height, values);
    }

    /** One value everywhere. */
    static Field constant(int width, int height, double value) {
        return new ConstantField(width, height, value);
    }

    /**
     * Value between the pixels, bilinear: the mean of the four pixels around the point, weighted by nearness. Pixels without a
     * value are left out, as long as the others carry at least half of the weight.
     *
     * @return NaN outside the rectangle of the pixels' centres, and where less than half of the weight has a value
     */
    default double interpolate(double x, double y) {
        if (!(x >= 0 && y >= 0 && x <= width() - 1 && y <= height() - 1)) {
            return Double.NaN;
        }
        int left = (int) x;
        int top = (int) y;
        double sum = 0;
        double weights = 0;
        for (int row = top; row <= Math.min(top + 1, height() - 1); row++) {
            for (int column = left; column <= Math.min(left + 1, width() - 1); column++) {
                double weight = (1 - Math.abs(x - column)) * (1 - Math.abs(y - row));
                double value = weight > 0 ? at(column, row) : Double.NaN;
                if (!Double.isNaN(value)) {
                    sum += weight * value;
                    weights += weight;
                }
            }
        }
        return weights >= 0.5 ? sum / weights : Double.NaN;
    }
}

/** A field over an array, row after row. */
record ArrayField(int width, int height, float[] values) implements Field {

    @Override
    public double at(int x, int y) {
        return values[y * width + x];
    }
}

/** A field of one value. */
record ConstantField(int width, int height, double value) implements Field {

    @Override
    public double at(int x, int y) {
        return value;
    }
}
