package iridepth.report;

import iridepth.colour.Srgb;
import iridepth.curve.ColourChart;
import iridepth.optics.Fringes;
import java.awt.Color;
import java.awt.geom.Ellipse2D;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;

/**
 * The colour chart of a film as a picture for the wall: the colours over a thickness axis, in several rows where the range is
 * long, with the interference orders at one wavelength above and the sensitivity, in CIEDE2000 per nm, below. Colours that
 * sRGB cannot show are marked.
 *
 * @param chart   the colours
 * @param view    the directions of view, in words
 * @param fringes bright and dark thicknesses at the wavelength that names the orders, over the chart's range
 */
public record ChartFigure(ColourChart chart, String view, Fringes fringes) {
    private static final int SHEET = 1600;
    private static final int LEFT = 100;
    private static final int WIDTH = SHEET - LEFT - 60;
    private static final int HEAD = 128;
    private static final int FOOT = 190;
    private static final int ORDERS = 44;
    private static final int STRIP = 170;
    private static final int STRIP_OF_MANY = 120;
    private static final int MARKS = 16;
    private static final int LABELS = 34;
    private static final int TRACE = 90;
    private static final int GAP = 34;
    private static final double ROW_NM = 500;
    private static final int MOST_ROWS = 6;
    /** Labels of orders closer than this are left out. */
    private static final int ORDER_SPACING = 46;
    private static final int MARK_SIZE = 5;
    private static final String CAUTION = "A guide for the eye, not a measurement: screens, printers, paper and lamps differ. Judge a "
            + "sample under the stated light, and check the chart against a film of known thickness before relying on it.";

    private double from() {
        return chart.rows().get(0).thicknessNm();
    }

    private double to() {
        return chart.rows().get(chart.rows().size() - 1).thicknessNm();
    }

    private double stepNm() {
        return (to() - from()) / (chart.rows().size() - 1);
    }

    /** Thicknesses that one row of the picture spans, nm. */
    double rowSpan() {
        double range = to() - from();
        if (range <= ROW_NM * 1.2) {
            return range;
        }
        return Math.max(ROW_NM, Ticks.step(range / MOST_ROWS * (1 - 1e-9)));
    }

    int rowCount() {
        return (int) Math.ceil((to() - from()) / rowSpan() - 1e-9);
    }

    private int stripHeight() {
        return rowCount() == 1 ? STRIP : STRIP_OF_MANY;
    }

    private int rowHeight() {
        return ORDERS + stripHeight() + MARKS + LABELS + TRACE + GAP;
    }

    /** The strip of a row: its thicknesses along x, nothing along y. */
    Axes strip(Picture picture, int row) {
        double first = from() + row * rowSpan();
        double last = Math.min(first + rowSpan(), to());
        int width = (int) Math.round(WIDTH * (last - first) / rowSpan());
        return new Axes(picture, LEFT, HEAD + row * rowHeight() + ORDERS, Math.max(1, width), stripHeight(), first, last, 0, 1);
    }

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    Picture draw() {
        Picture picture = new Picture(SHEET, HEAD + rowCount() * rowHeight() + FOOT);
        drawHead(picture);
        double most = 0;
        for (ColourChart.Row row : chart.rows()) {
            most = Math.max(most, row.deltaEPerNm());
        }
        for (int row = 0; row < rowCount(); row++) {
            Axes strip = strip(picture, row);
            drawColours(strip);
            drawOrders(strip);
            drawGamutMarks(strip);
            drawThicknesses(strip);
            drawSensitivity(strip, most > 0 ? most * 1.05 : 1);
        }
        drawFoot(picture, HEAD + rowCount() * rowHeight() + 8);
        return picture;
    }

    private void drawHead(Picture picture) {
        picture.font(30, true);
        picture.text(picture.fitted("Interference colours of " + chart.stack(), SHEET - 80.0), 40, 52, Picture.Align.LEFT,
                Picture.INK);
        picture.font(20, false);
        picture.text(picture.fitted(String.join("  \u00b7  ", conditions(chart, view)), SHEET - 80.0), 40, 88, Picture.Align.LEFT,
                Picture.SOFT);
    }

    /** What the colours depend on, in words. */
    static List<String> conditions(ColourChart chart, String view) {
        return List.of("light: " + chart.light().name(), chart.observer().name(),
                "white: " + (chart.white() == ColourChart.White.BARE ? "the stack without its film" : "a perfect white"),
                "view: " + view, String.format(Locale.ROOT, "brightness \u00d7 %.3g", chart.exposure()));
    }

    private ColourChart.Row nearest(double nm) {
        long index = Math.round((nm - from()) / stepNm());
        return chart.rows().get((int) Math.min(Math.max(index, 0), chart.rows().size() - 1));
    }

    private void drawColours(Axes strip) {
        Picture picture = strip.picture();
        for (int x = 0; x < strip.width(); x++) {
            int rgb = colourAt(strip, x).toRgb();
            for (int y = 0; y < strip.height(); y++) {
                picture.pixels()[(strip.top() + y) * picture.width() + strip.left() + x] = rgb;
            }
        }
        picture.frame(strip.left(), strip.top(), strip.width(), strip.height());
    }

    private Srgb colourAt(Axes strip, int x) {
        return nearest(strip.x0() + (x + 0.5) / strip.width() * (strip.x1() - strip.x0())).srgb();
    }

    private void drawOrders(Axes strip) {
        Picture picture = strip.picture();
        picture.font(Picture.TEXT, false);
        double free = Double.NEGATIVE_INFINITY;
        for (Fringes.Extremum e : fringes.extrema()) {
            double nm = Double.isNaN(e.computedNm()) ? e.ruleNm() : e.computedNm();
            if (nm < strip.x0() || nm > strip.x1()) {
                continue;
            }
            double x = strip.px(nm);
            picture.line(x, strip.top() - 9, x, strip.top(), Picture.INK, 1.5);
            Ellipse2D dot = new Ellipse2D.Double(x - MARK_SIZE, strip.top() - 9 - 2 * MARK_SIZE, 2 * MARK_SIZE, 2 * MARK_SIZE);
            picture.graphics().setColor(e.bright() ? Color.WHITE : Picture.INK);
            picture.graphics().fill(dot);
            picture.stroke(dot, Picture.INK, 1.5);
            if (x - free >= ORDER_SPACING) {
                picture.text(orderLabel(e.order()), x, strip.top() - 25, Picture.Align.CENTRE, Picture.INK);
                free = x;
            }
        }
    }

    private static String orderLabel(double order) {
        long whole = (long) order;
        return order == whole ? String.valueOf(whole) : (whole == 0 ? "" : String.valueOf(whole)) + "\u00bd";
    }

    private void drawGamutMarks(Axes strip) {
        int y = strip.top() + strip.height() + 7;
        for (int x = 0; x < strip.width(); x++) {
            if (!colourAt(strip, x).inGamut() && x % 6 < 3) {
                strip.picture().fill(strip.left() + x, y, 1, 3, Picture.INK);
            }
        }
    }

    private void drawThicknesses(Axes strip) {
        Axes scale = new Axes(strip.picture(), strip.left(), strip.top(), strip.width(),
                strip.height() + MARKS, strip.x0(), strip.x1(), 0, 1);
        scale.xAxis(20);
        double minor = scale.xTicks().step() / 5;
        for (long k = (long) Math.ceil(strip.x0() / minor - 1e-9); k * minor <= strip.x1() + 1e-9; k++) {
            double x = strip.px(k * minor);
            double y = strip.top() + strip.height() + MARKS;
            strip.picture().line(x, y, x, y + 3, Picture.INK, 1);
        }
        strip.picture().text("nm", strip.left() - 50.0, strip.top() + strip.height() + MARKS + 27, Picture.Align.RIGHT,
                Picture.INK);
    }

    private void drawSensitivity(Axes strip, double most) {
        int top = strip.top() + strip.height() + MARKS + LABELS;
        Axes trace = new Axes(strip.picture(), strip.left(), top, strip.width(), TRACE, strip.x0(), strip.x1(), 0, most);
        trace.grid();
        double[] x = chart.rows().stream().mapToDouble(ColourChart.Row::thicknessNm).toArray();
        double[] y = chart.rows().stream().mapToDouble(ColourChart.Row::deltaEPerNm).toArray();
        trace.curve(x, y, new Color(0x0072B2), 2);
        strip.picture().frame(strip.left(), top, strip.width(), TRACE);
        trace.yAxis(Picture.SMALL);
        strip.picture().textUpwards("\u0394E / nm", 30, top + TRACE / 2.0, Picture.SOFT);
    }

    private void drawFoot(Picture picture, int top) {
        long outside = chart.rows().stream().filter(r -> !r.srgb().inGamut()).count();
        picture.font(Picture.TEXT, false);
        int y = top + 14;
        String orders = String.format(Locale.ROOT, "Above the colours: order of interference at %s nm, the round trip in the film "
                + "(index %.3f) in wavelengths; \u25cb bright, \u25cf dark.", Numbers.significant(fringes.wavelengthNm(), 6),
                fringes.filmIndex());
        String gamut = outside == 0 ? "All colours lie in the gamut of sRGB." : String.format(Locale.ROOT, "Dotted below: beyond the "
                + "gamut of sRGB (%.0f %% of the range); shown with the same hue, and less vivid or no lighter than white.",
                100.0 * outside / chart.rows().size());
        String trace = "Lower curve: how fast the colour changes, in CIEDE2000 per nm; where it is low, the eye sees little of a "
                + "change of thickness.";
        for (String remark : List.of(orders, gamut, trace, CAUTION)) {
            for (String line : picture.wrap(remark, SHEET - 80.0)) {
                picture.text(line, 40, y, Picture.Align.LEFT, Picture.SOFT);
                y += 27;
            }
        }
    }
}
