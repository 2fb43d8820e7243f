package iridepth.quality;

import java.util.Arrays;

/** Means over squares, to take the noise off a map before lines are drawn on it. */
public final class Smoothing {

    private Smoothing() {
    }

    /**
     * Each pixel replaced by the mean of the (2 r + 1) x (2 r + 1) pixels around it, of those that lie on the field and have a
     * value. A pixel without a value keeps none. A plane stays as it is, but for the rim of width r.
     *
     * @param field what to smooth; read once
     * @param radius r, 0 or more; 0 gives the field itself
     */
    public static Field mean(Field field, int radius) {
        if (radius < 0) {
            throw new IllegalArgumentException("smoothing over a radius of " + radius + " pixels: give 0 or more");
        }
        if (radius == 0) {
            return field;
        }
        int width = field.width();
        int height = field.height();
        float[] smooth = new float[Math.multiplyExact(width, height)];
        double[] sum = new double[width];
        int[] count = new int[width];
        for (int y = 0; y < Math.min(radius, height); y++) {
            addRow(field, y, 1, sum, count);
        }
        for (int y = 0; y < height; y++) {
            addRow(field, y + radius, 1, sum, count);
            addRow(field, y - radius - 1, -1, sum, count);
            smoothRow(field, y, radius, sum, count, smooth);
        }
        return Field.of(width, height, smooth);
    }

    /** Adds a row of the field to the sums of its columns, or takes it away; rows outside the field are nothing. */
    private static void addRow(Field field, int y, int sign, double[] sum, int[] count) {
        if (y < 0 || y >= field.height()) {
            return;
        }
        for (int x = 0; x < sum.length; x++) {
            double value = field.at(x, y);
            if (!Double.isNaN(value)) {
                sum[x] += sign * value;
                count[x] += sign;
            }
        }
    }

    private static void smoothRow(Field field, int y, int radius, double[] sum, int[] count, float[] smooth) {
        int width = sum.length;
        double total = Arrays.stream(sum, 0, Math.min(radius, width)).sum();
        int values = Arrays.stream(count, 0, Math.min(radius, width)).sum();
        for (int x = 0; x < width; x++) {
            if (x + radius < width) {
                total += sum[x + radius];
                values += count[x + radius];
            }
            if (x - radius - 1 >= 0) {
                total -= sum[x - radius - 1];
                values -= count[x - radius - 1];
            }
            smooth[y * width + x] = Double.isNaN(field.at(x, y)) ? Float.NaN : (float) (total / values);
        }
    }
}
