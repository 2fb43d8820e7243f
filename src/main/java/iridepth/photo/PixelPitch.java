package iridepth.photo;

import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The pitch of the pixels on the object in um, from what a file says of its resolution. A resolution in dots per inch
 * that cameras and programs write when they know nothing better (72, 96, 300 and the like: common practice) says nothing
 * of the object and counts as unknown, as does a pitch that differs between x and y.
 */
final class PixelPitch {

    private static final double INCH_UM = 25400;
    private static final double[] MEANINGLESS_DPI = {72, 96, 100, 120, 150, 180, 200, 230, 240, 300, 314, 350, 360, 400, 600};
    private static final Pattern IMAGEJ_UNIT = Pattern.compile("(?m)^unit=(.*)$");
    private static final Pattern OME_SIZE = Pattern.compile("PhysicalSizeX=\"([0-9.eE+-]+)\"");
    private static final Pattern OME_UNIT = Pattern.compile("PhysicalSizeXUnit=\"([^\"]+)\"");

    private PixelPitch() {
    }

    /** Pitch from the fields of a TIFF page, NaN where unknown. An ImageJ description gives the unit of the resolution. */
    static double of(TiffDirectory tags) {
        String description = tags.text(TiffDirectory.IMAGE_DESCRIPTION);
        if (description.contains("<OME")) {
            Matcher size = OME_SIZE.matcher(description);
            Matcher unit = OME_UNIT.matcher(description);
            double um = unit.find() ? unitUm(unit.group(1)) : 1;
            return size.find() ? positive(number(size.group(1)) * um) : Double.NaN;
        }
        double perUnit = tags.rational(TiffDirectory.X_RESOLUTION);
        if (Math.abs(tags.rational(TiffDirectory.Y_RESOLUTION) / perUnit - 1) > 1e-3) {
            return Double.NaN;
        }
        Matcher unit = IMAGEJ_UNIT.matcher(description);
        if (description.startsWith("ImageJ=") && unit.find()) {
            return positive(unitUm(unit.group(1)) / perUnit);
        }
        return switch ((int) tags.integer(TiffDirectory.RESOLUTION_UNIT, 2)) {
            case 2 -> ofDpi(perUnit);
            case 3 -> ofDpi(perUnit * 2.54);
            default -> Double.NaN;
        };
    }

    /** Pitch from dots per inch, NaN where the figure is one that says nothing. */
    static double ofDpi(double dpi) {
        for (double meaningless : MEANINGLESS_DPI) {
            if (Math.abs(dpi - meaningless) < 0.02 * 2.54) {
                return Double.NaN;
            }
        }
        return dpi <= 1 ? Double.NaN : positive(INCH_UM / dpi);
    }

    /** One unit in um by the names that microscope programs use, NaN where it is unknown. */
    private static double unitUm(String name) {
        return switch (name.strip().replace("\\u00B5", "u").replace('\u00b5', 'u').replace('\u03bc', 'u')
                .toLowerCase(Locale.ROOT)) {
            case "nm", "nanometer", "nanometers" -> 1e-3;
            case "um", "micron", "microns", "micrometer", "micrometers" -> 1;
            case "mm", "millimeter", "millimeters" -> 1e3;
            case "cm", "centimeter", "centimeters" -> 1e4;
            case "m", "meter", "meters" -> 1e6;
            case "inch", "inches", "in" -> INCH_UM;
            default -> Double.NaN;
        };
    }

    private static double number(String text) {
        try {
            return Double.parseDouble(text);
        } catch (NumberFormatException e) {
            return Double.NaN;
        }
    }

    private static double positive(double um) {
        return um > 0 && um < Double.POSITIVE_INFINITY ? um : Double.NaN;
    }
}
