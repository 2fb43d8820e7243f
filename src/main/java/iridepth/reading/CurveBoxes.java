package iridepth.reading;

import iridepth.curve.ColourCurve;
import java.util.Arrays;

/** For every piece of the curve between two samples the box in channel space that holds all pixels it can explain. */
final class CurveBoxes {
    private final double[][] value;
    private final double[][] half;

    private CurveBoxes(int axes, int samples) {
        this.value = new double[axes][samples];
        this.half = new double[axes][samples];
    }

    /** The boxes of a curve; see {@link CurveCells}. */
    static CurveBoxes of(ColourCurve curve, ExpectedNoise noise, double light, TangentTable table, CellAxes axes,
                         double threshold) {
        CurveBoxes boxes = new CurveBoxes(axes.count(), table.size());
        CurvePoint point = new CurvePoint(curve, noise, light);
        for (int k = 0; k < table.size(); k++) {
            point.moveTo(table.thickness(k));
            for (int i = 0; i < axes.count(); i++) {
                double[] weight = axes.weight()[i];
                boxes.half[i][k] = Math.sqrt(threshold * point.varianceIn(weight));
                for (int c = 0; c < weight.length; c++) {
                    boxes.value[i][k] += weight[c] * point.signal(c);
                }
            }
        }
        return boxes;
    }

    int axes() {
        return value.length;
    }

    /** Lower end of the box of samples k and k + 1. */
    double low(int k, int axis) {
        double[] v = value[axis];
        double[] w = half[axis];
        return Math.min(v[k] - w[k], v[k + 1] - w[k + 1]) - sagitta(v, k);
    }

    /** Upper end of the box of samples k and k + 1. */
    double high(int k, int axis) {
        double[] v = value[axis];
        double[] w = half[axis];
        return Math.max(v[k] + w[k], v[k + 1] + w[k + 1]) + sagitta(v, k);
    }

    /** How far the curve may leave its chord: h^2 |s''| / 8 by the second differences beside, doubled. */
    private static double sagitta(double[] v, int k) {
        double worst = 0;
        for (int j = Math.max(1, k); j <= Math.min(k + 1, v.length - 2); j++) {
            worst = Math.max(worst, Math.abs(v[j - 1] - 2 * v[j] + v[j + 1]));
        }
        return worst / 4;
    }

    /** Mean half-width of the boxes along an axis. */
    double halfWidth(int axis) {
        return Arrays.stream(half[axis]).average().orElseThrow();
    }

    /** The least value on each axis. */
    double[] least() {
        double[] least = new double[axes()];
        Arrays.setAll(least, this::least);
        return least;
    }

    double least(int axis) {
        double least = Double.POSITIVE_INFINITY;
        for (int k = 0; k + 1 < value[axis].length; k++) {
            least = Math.min(least, low(k, axis));
        }
        return least;
    }

    /** The largest value on each axis. */
    double[] most() {
        double[] most = new double[axes()];
        Arrays.setAll(most, this::most);
        return most;
    }

    double most(int axis) {
        double most = Double.NEGATIVE_INFINITY;
        for (int k = 0; k + 1 < value[axis].length; k++) {
            most = Math.max(most, high(k, axis));
        }
        return most;
    }
}
