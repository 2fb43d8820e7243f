package iridepth.report;

import iridepth.quality.RunChart;
import iridepth.quality.Tolerance;
import java.awt.Color;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.nio.file.Path;
import java.util.function.IntToDoubleFunction;
import java.util.stream.IntStream;

/**
 * The run chart of a lot: the mean thickness of each photo in order with the spread of its pixels, and below it the spread
 * itself, each with the limits within which it varies by chance; the means also with the recipe's limits.
 *
 * @param lot the lot
 */
public record LotFigure(Lot lot) {
    private static final int WIDTH = 1200;
    private static final int HEIGHT = 900;
    private static final int LEFT = 118;
    private static final int RIGHT = 40;
    private static final int LOWER_HEIGHT = 190;
    private static final int LOWER_TOP = HEIGHT - 80 - LOWER_HEIGHT;
    private static final Color VALUE = new Color(0x0072B2);
    private static final Color SPREAD = new Color(0x500072B2, true);
    private static final Color BEYOND = new Color(0xD55E00);
    private static final Color TOLERANCE = new Color(0x8A2500);
    private static final Color CONTROL = new Color(0x5A5A5A);
    private static final float[] CONTROL_DASH = {9, 5};
    private static final float[] TOLERANCE_DASH = {12, 4, 2, 4};
    /** A limit farther from the values than this many times their range is told in words only. */
    private static final double FAR = 3;
    private static final int MOST_X_TICKS = 12;

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    Picture draw() {
        Picture picture = new Picture(WIDTH, HEIGHT);
        picture.font(Picture.TITLE, true);
        picture.text(picture.fitted(lot.title(), WIDTH - 40.0), 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.TEXT, false);
        picture.text(picture.fitted(lot.words(), WIDTH - 40.0), 20, 66, Picture.Align.LEFT, Picture.SOFT);
        int top = legend(picture, 100) + 14;
        RunChart means = lot.means();
        if (Double.isNaN(means.mean())) {
            picture.text("No photo has been read.", WIDTH / 2.0, HEIGHT / 2.0, Picture.Align.CENTRE, Picture.INK);
            return picture;
        }
        Axes upper = axes(picture, top, LOWER_TOP - 46 - top, meanSpan(means));
        panel(upper, means, "Mean thickness (nm)", i -> lot.rows().get(i).deviation());
        lot.tolerance().ifPresent(t -> {
            level(upper, t.lower(), TOLERANCE, TOLERANCE_DASH);
            level(upper, t.upper(), TOLERANCE, TOLERANCE_DASH);
        });
        RunChart deviations = lot.deviations();
        Span spread = Span.NONE.with(0).with(deviations.values()).with(deviations.upper()).widened(0.05);
        Axes lower = axes(picture, LOWER_TOP, LOWER_HEIGHT, new Span(0, spread.to()));
        panel(lower, deviations, "Spread (nm)", i -> Double.NaN);
        picture.text("Photo", LEFT + (WIDTH - LEFT - RIGHT) / 2.0, LOWER_TOP + LOWER_HEIGHT + 54, Picture.Align.CENTRE, Picture.INK);
        return picture;
    }

    private Axes axes(Picture picture, int top, int height, Span y) {
        return new Axes(picture, LEFT, top, WIDTH - LEFT - RIGHT, height, 0.5, lot.rows().size() + 0.5, y.from(), y.to());
    }

    private Span meanSpan(RunChart means) {
        Span span = Span.NONE.with(means.values());
        for (LotRow row : lot.rows()) {
            span = span.with(row.mean() - row.deviation(), row.mean() + row.deviation());
        }
        span = span.with(means.lower(), means.upper());
        if (lot.tolerance().isPresent()) {
            Tolerance t = lot.tolerance().get();
            double reach = FAR * (span.to() - span.from());
            Span core = span;
            span = t.lower() > core.from() - reach ? span.with(t.lower()) : span;
            span = t.upper() < core.to() + reach ? span.with(t.upper()) : span;
        }
        return span.widened(0.05);
    }

    /** Draws one chart: limits, spread, a line from photo to photo, and the values. */
    private void panel(Axes axes, RunChart chart, String yTitle, IntToDoubleFunction spread) {
        Picture picture = axes.picture();
        for (double y : axes.yTicks().at()) {
            picture.line(axes.left(), axes.py(y), axes.left() + axes.width(), axes.py(y), Picture.GRID, 1);
        }
        level(axes, chart.mean(), CONTROL);
        level(axes, chart.lower(), CONTROL, CONTROL_DASH);
        level(axes, chart.upper(), CONTROL, CONTROL_DASH);
        double[] x = new double[chart.values().length];
        for (int i = 0; i < x.length; i++) {
            x[i] = i + 1;
            double half = spread.applyAsDouble(i);
            if (Double.isFinite(half)) {
                picture.line(axes.px(x[i]), axes.py(chart.values()[i] - half), axes.px(x[i]), axes.py(chart.values()[i] + half), SPREAD, 4);
            }
        }
        axes.curve(x, chart.values(), VALUE, 1.2);
        for (int i = 0; i < x.length; i++) {
            if (Double.isFinite(chart.values()[i])) {
                dot(picture, axes.px(x[i]), axes.py(chart.values()[i]), chart.isBeyond(i));
            } else {
                cross(picture, axes.px(x[i]), axes.top() + axes.height() - 12);
            }
        }
        picture.frame(axes.left(), axes.top(), axes.width(), axes.height());
        double labels = axes.yAxis(Picture.TEXT);
        picture.textUpwards(yTitle, axes.left() - labels - 23, axes.top() + axes.height() / 2.0, Picture.INK);
        int step = (int) Math.max(1, Ticks.step((double) x.length / MOST_X_TICKS));
        for (int i = step; i <= x.length; i += step) {
            picture.line(axes.px(i), axes.top() + axes.height(), axes.px(i), axes.top() + axes.height() + 6, Picture.INK, 1);
            picture.text(String.valueOf(i), axes.px(i), axes.top() + axes.height() + 25, Picture.Align.CENTRE, Picture.INK);
        }
    }

    private static void level(Axes axes, double y, Color ink, float... dashes) {
        if (Double.isFinite(y)) {
            axes.clipped(() -> axes.picture().stroke(new Line2D.Double(axes.left(), axes.py(y), axes.left() + axes.width(), axes.py(y)),
                    ink, 1.8, dashes));
        }
    }

    private static void dot(Picture picture, double x, double y, boolean beyond) {
        picture.graphics().setColor(VALUE);
        picture.graphics().fill(new Ellipse2D.Double(x - 4, y - 4, 8, 8));
        if (beyond) {
            picture.stroke(new Ellipse2D.Double(x - 8, y - 8, 16, 16), BEYOND, 2);
        }
    }

    private static void cross(Picture picture, double x, double y) {
        picture.line(x - 5, y - 5, x + 5, y + 5, BEYOND, 2);
        picture.line(x - 5, y + 5, x + 5, y - 5, BEYOND, 2);
    }

    private int legend(Picture picture, int firstLine) {
        Legend legend = new Legend(picture, 20, firstLine);
        legend.entry("one photo", (x, y) -> dot(picture, x + 20, y, false));
        legend.entry("\u00b1 standard deviation of its pixels", (x, y) -> picture.line(x + 20, y - 10, x + 20, y + 10, SPREAD, 4));
        legend.entry("mean of all", (x, y) -> picture.line(x, y, x + Legend.SAMPLE, y, CONTROL, 1.8));
        legend.entry("control limits (mean moving range)", (x, y) ->
                picture.stroke(new Line2D.Double(x, y, x + Legend.SAMPLE, y), CONTROL, 1.8, CONTROL_DASH));
        lot.tolerance().ifPresent(t -> legend.entry("tolerance " + range(t), (x, y) ->
                picture.stroke(new Line2D.Double(x, y, x + Legend.SAMPLE, y), TOLERANCE, 1.8, TOLERANCE_DASH)));
        RunChart means = lot.means();
        RunChart deviations = lot.deviations();
        boolean beyond = IntStream.range(0, lot.rows().size()).anyMatch(i -> means.isBeyond(i) || deviations.isBeyond(i));
        if (beyond) {
            legend.entry("beyond the control limits", (x, y) -> dot(picture, x + 20, y, true));
        }
        if (lot.rows().stream().anyMatch(row -> Double.isNaN(row.mean()))) {
            legend.entry("no thickness", (x, y) -> cross(picture, x + 20, y));
        }
        return legend.bottom();
    }

    private static String range(Tolerance t) {
        return Numbers.significant(t.lower(), 6) + " to " + Numbers.significant(t.upper(), 6) + " nm";
    }
}
