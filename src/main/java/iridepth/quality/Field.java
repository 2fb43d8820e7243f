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

    /** A number at a pixel. */
    @FunctionalInterface
    interface Values {

        /** The number in column x and row y; NaN is 'no value'. */
        double at(int x, int y);
    }

    /** A view of numbers that are told pixel by pixel. */
    static Field view(int width, int height, Values values) {
        return new ViewField(width, height, values);
    }

    /** One value everywhere. */
    static Field constant(int width, int height, double value) {
        return new ConstantField(width, height, value);
    }

    /**
     * Value between the pixels, bilinear: the mean of the four pixels around the point, weighted by nearness. A coordinate
     * within 1e-9 of a whole number is taken as that number, since rounding leaves points that are meant to lie on a pixel's
     * centre a hair beside it.
     *
     * @return NaN outside the rectangle of the pixels' centres, and where a pixel that has weight has no value
     */
    default double interpolate(double x, double y) {
        double column = settled(x);
        double row = settled(y);
        if (!(column >= 0 && row >= 0 && column <= width() - 1 && row <= height() - 1)) {
            return Double.NaN;
        }
        int left = (int) column;
        int top = (int) row;
        double right = column - left;
        double below = row - top;
        return weighted((1 - right) * (1 - below), left, top) + weighted(right * (1 - below), left + 1, top)
                + weighted((1 - right) * below, left, top + 1) + weighted(right * below, left + 1, top + 1);
    }

    private double weighted(double weight, int x, int y) {
        return weight > 0 ? weight * at(x, y) : 0;
    }

    private static double settled(double coordinate) {
        double whole = Math.rint(coordinate);
        return Math.abs(coordinate - whole) < 1e-9 ? whole : coordinate;
    }
}

/** A field over an array, row after row. */
record ArrayField(int width, int height, float[] values) implements Field {

    @Override
    public double at(int x, int y) {
        return values[y * width + x];
    }
}

/** A field of numbers told pixel by pixel. */
record ViewField(int width, int height, Field.Values values) implements Field {

    @Override
    public double at(int x, int y) {
        return values.at(x, y);
    }
}

/** A field of one value. */
record ConstantField(int width, int height, double value) implements Field {

    @Override
    public double at(int x, int y) {
        return value;
    }
}
