package iridepth.photo;

import java.nio.ByteBuffer;
import java.util.function.DoubleUnaryOperator;

/**
 * Reads the tone curves of ICC profiles: from the file's value to linear light, both 0 to 1. ICC.1:2022 sections 10.6
 * (curveType) and 10.18 (parametricCurveType).
 */
final class ToneCurve {

    private static final int CURV = 0x63757276;
    private static final int PARA = 0x70617261;
    private static final int[] PARAMETERS = {1, 3, 4, 5, 7};
    private static final int CHECKED_POINTS = 1024;

    private ToneCurve() {
    }

    /**
     * @param tag content of a TRC tag, big-endian
     * @return the curve, clipped to 0..1
     * @throws IllegalArgumentException if the tag is damaged or the curve is not supported
     */
    static DoubleUnaryOperator parse(ByteBuffer tag) {
        if (tag.limit() < 12) {
            throw new IllegalArgumentException("a tone curve is cut short");
        }
        DoubleUnaryOperator curve = switch (tag.getInt(0)) {
            case CURV -> sampled(tag);
            case PARA -> parametric(tag);
            default -> throw new IllegalArgumentException("a tone curve is of an unknown type");
        };
        DoubleUnaryOperator clipped = x -> Math.min(1, Math.max(0, curve.applyAsDouble(Math.min(1, Math.max(0, x)))));
        for (int i = 1; i < CHECKED_POINTS; i++) {
            double step = clipped.applyAsDouble(i / (CHECKED_POINTS - 1.0))
                    - clipped.applyAsDouble((i - 1) / (CHECKED_POINTS - 1.0));
            if (!(step >= 0)) {
                throw new IllegalArgumentException("a tone curve does not rise throughout");
            }
        }
        if (!(clipped.applyAsDouble(1) > clipped.applyAsDouble(0))) {
            throw new IllegalArgumentException("a tone curve is constant");
        }
        return clipped;
    }

    private static DoubleUnaryOperator sampled(ByteBuffer tag) {
        int n = tag.getInt(8);
        if (n < 0 || n > (tag.limit() - 12) / 2) {
            throw new IllegalArgumentException("a tone curve is cut short");
        }
        if (n == 0) {
            return x -> x;
        }
        if (n == 1) {
            double gamma = (tag.getShort(12) & 0xffff) / 256.0;
            return x -> Math.pow(x, gamma);
        }
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            y[i] = (tag.getShort(12 + 2 * i) & 0xffff) / 65535.0;
        }
        return x -> {
            int i = Math.min(n - 2, (int) (x * (n - 1)));
            return y[i] + (x * (n - 1) - i) * (y[i + 1] - y[i]);
        };
    }

    private static DoubleUnaryOperator parametric(ByteBuffer tag) {
        int type = tag.getShort(8) & 0xffff;
        if (type >= PARAMETERS.length) {
            throw new IllegalArgumentException("a tone curve has an unknown formula " + type);
        }
        if (tag.limit() < 12 + 4 * PARAMETERS[type]) {
            throw new IllegalArgumentException("a tone curve is cut short");
        }
        double[] p = new double[7];
        for (int i = 0; i < PARAMETERS[type]; i++) {
            p[i] = tag.getInt(12 + 4 * i) / 65536.0;
        }
        double g = p[0];
        double a = p[1];
        double b = p[2];
        double c = p[3];
        return switch (type) {
            case 0 -> x -> Math.pow(x, g);
            case 1 -> x -> x >= -b / a ? Math.pow(a * x + b, g) : 0;
            case 2 -> x -> (x >= -b / a ? Math.pow(a * x + b, g) : 0) + c;
            default -> x -> x >= p[4] ? Math.pow(a * x + b, g) + p[5] : c * x + p[6];
        };
    }
}
