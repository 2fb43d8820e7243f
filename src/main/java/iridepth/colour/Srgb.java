package iridepth.colour;

/**
 * A colour encoded as IEC 61966-2-1 (sRGB), each channel 0 to 1.
 *
 * @param red     encoded red
 * @param green   encoded green
 * @param blue    encoded blue
 * @param inGamut false if the colour lay outside the gamut and was brought in
 */
public record Srgb(double red, double green, double blue, boolean inGamut) {
    /** White of the encoding: the chromaticity of D65 as IEC 61966-2-1 rounds it, Y = 1. */
    public static final Xyz WHITE = new Xyz(0.3127 / 0.3290, 1, (1 - 0.3127 - 0.3290) / 0.3290);
    /** From linear sRGB to XYZ, derived from the chromaticities of IEC 61966-2-1. */
    public static final double[][] TO_XYZ = toXyz();
    /** From XYZ to linear sRGB. */
    public static final double[][] FROM_XYZ = Matrix3.inverse(TO_XYZ);
    /** Rounding in matrices leaves colours on the edge of the gamut a hair outside. */
    private static final double HAIR = 1e-6;

    private static double[][] toXyz() {
        double[][] xy = {{0.64, 0.33}, {0.30, 0.60}, {0.15, 0.06}};
        double[][] primaries = new double[3][3];
        for (int c = 0; c < 3; c++) {
            primaries[0][c] = xy[c][0] / xy[c][1];
            primaries[1][c] = 1;
            primaries[2][c] = (1 - xy[c][0] - xy[c][1]) / xy[c][1];
        }
        double[] strength = Matrix3.times(Matrix3.inverse(primaries), WHITE.toArray());
        for (double[] row : primaries) {
            for (int c = 0; c < 3; c++) {
                row[c] *= strength[c];
            }
        }
        return primaries;
    }

    /**
     * Encodes tristimulus values relative to D65 white of Y = 1. A colour outside the gamut keeps its CIELAB lightness and hue
     * and loses chroma until it fits; one lighter than white becomes white.
     */
    public static Srgb of(Xyz xyz) {
        double[] linear = Matrix3.times(FROM_XYZ, xyz.toArray());
        if (fits(linear)) {
            return encode(linear, true);
        }
        Lab lab = Lab.of(xyz, WHITE);
        double l = Math.min(100, Math.max(0, lab.l()));
        double low = 0;
        double high = 1;
        for (int i = 0; i < 24; i++) {
            double share = (low + high) / 2;
            if (fits(linear(l, lab, share))) {
                low = share;
            } else {
                high = share;
            }
        }
        return encode(linear(l, lab, low), false);
    }

    private static double[] linear(double l, Lab lab, double share) {
        return Matrix3.times(FROM_XYZ, new Lab(l, lab.a() * share, lab.b() * share).toXyz(WHITE).toArray());
    }

    private static boolean fits(double[] linear) {
        for (double v : linear) {
            if (v < -HAIR || v > 1 + HAIR) {
                return false;
            }
        }
        return true;
    }

    private static Srgb encode(double[] linear, boolean inGamut) {
        return new Srgb(encode(linear[0]), encode(linear[1]), encode(linear[2]), inGamut);
    }

    /** Encoded value of a linear one, both 0 to 1; values outside are clipped. */
    public static double encode(double linear) {
        double v = Math.min(1, Math.max(0, linear));
        return v <= 0.0031308 ? 12.92 * v : 1.055 * Math.pow(v, 1 / 2.4) - 0.055;
    }

    /** Linear value of an encoded one, both 0 to 1. */
    public static double decode(double encoded) {
        return encoded <= 0.04045 ? encoded / 12.92 : Math.pow((encoded + 0.055) / 1.055, 2.4);
    }

    /** The colour as 0xRRGGBB. */
    public int toRgb() {
        return (int) Math.round(red * 255) << 16 | (int) Math.round(green * 255) << 8 | (int) Math.round(blue * 255);
    }
}
