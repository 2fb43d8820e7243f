package iridepth.colour;

/**
 * CIE 1976 L*a*b* colour (ISO/CIE 11664-4:2019).
 *
 * @param l lightness, 100 for the adopted white
 * @param a red (+) to green (-)
 * @param b yellow (+) to blue (-)
 */
public record Lab(double l, double a, double b) {
    private static final double EDGE = 6.0 / 29;

    /**
     * Colour of tristimulus values under an adopted white.
     *
     * @param xyz   the stimulus
     * @param white the adopted white, on the same scale
     */
    public static Lab of(Xyz xyz, Xyz white) {
        double fx = f(xyz.x() / white.x());
        double fy = f(xyz.y() / white.y());
        double fz = f(xyz.z() / white.z());
        return new Lab(116 * fy - 16, 500 * (fx - fy), 200 * (fy - fz));
    }

    private static double f(double t) {
        return t > EDGE * EDGE * EDGE ? Math.cbrt(t) : t / (3 * EDGE * EDGE) + 4.0 / 29;
    }

    /** Tristimulus values of this colour under an adopted white: the inverse of {@link #of}. */
    public Xyz toXyz(Xyz white) {
        double fy = (l + 16) / 116;
        return new Xyz(white.x() * inverse(fy + a / 500), white.y() * inverse(fy), white.z() * inverse(fy - b / 200));
    }

    private static double inverse(double f) {
        return f > EDGE ? f * f * f : 3 * EDGE * EDGE * (f - 4.0 / 29);
    }

    /** Chroma C*ab. */
    public double chroma() {
        return Math.hypot(a, b);
    }

    /** Hue angle h_ab in degrees, 0 to below 360; 0 for a neutral. */
    public double hueDeg() {
        double h = Math.toDegrees(Math.atan2(b, a));
        return h < 0 ? h + 360 : h;
    }

    /**
     * CIEDE2000 colour difference with unit factors (ISO/CIE 11664-6:2014; formulas as in Sharma, Wu and Dalal, Color Res.
     * Appl. 30, 21-30, 2005).
     */
    public double deltaE2000(Lab other) {
        double meanC = (chroma() + other.chroma()) / 2;
        double g = 0.5 * (1 - root(meanC));
        double a1 = a * (1 + g);
        double a2 = other.a * (1 + g);
        double c1 = Math.hypot(a1, b);
        double c2 = Math.hypot(a2, other.b);
        double h1 = hue(a1, b);
        double h2 = hue(a2, other.b);
        double dl = other.l - l;
        double dc = c2 - c1;
        double dh = c1 * c2 == 0 ? 0 : h2 - h1;
        if (dh > 180) {
            dh -= 360;
        } else if (dh < -180) {
            dh += 360;
        }
        double bigDh = 2 * Math.sqrt(c1 * c2) * sin(dh / 2);
        double lm = (l + other.l) / 2;
        double cm = (c1 + c2) / 2;
        double hm = meanHue(c1, c2, h1, h2);
        double t = 1 - 0.17 * cos(hm - 30) + 0.24 * cos(2 * hm) + 0.32 * cos(3 * hm + 6) - 0.20 * cos(4 * hm - 63);
        double turn = 30 * Math.exp(-Math.pow((hm - 275) / 25, 2));
        double sl = 1 + 0.015 * (lm - 50) * (lm - 50) / Math.sqrt(20 + (lm - 50) * (lm - 50));
        double sc = 1 + 0.045 * cm;
        double sh = 1 + 0.015 * cm * t;
        double rt = -sin(2 * turn) * 2 * root(cm);
        double x = dl / sl;
        double y = dc / sc;
        double z = bigDh / sh;
        return Math.sqrt(x * x + y * y + z * z + rt * y * z);
    }

    private static double root(double c) {
        double seventh = Math.pow(c, 7);
        return Math.sqrt(seventh / (seventh + Math.pow(25, 7)));
    }

    private static double meanHue(double c1, double c2, double h1, double h2) {
        if (c1 * c2 == 0) {
            return h1 + h2;
        }
        if (Math.abs(h1 - h2) <= 180) {
            return (h1 + h2) / 2;
        }
        return h1 + h2 < 360 ? (h1 + h2 + 360) / 2 : (h1 + h2 - 360) / 2;
    }

    private static double hue(double a, double b) {
        return new Lab(0, a, b).hueDeg();
    }

    private static double sin(double degrees) {
        return Math.sin(Math.toRadians(degrees));
    }

    private static double cos(double degrees) {
        return Math.cos(Math.toRadians(degrees));
    }
}
