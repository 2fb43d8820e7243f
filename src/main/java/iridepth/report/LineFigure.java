package iridepth.report;

import java.awt.Color;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Curves and points over one quantity, with their bands of uncertainty and the limits they are held to.
 *
 * @param title    what the figure shows
 * @param remark   a line below the title; may be empty
 * @param xTitle   quantity and unit along x
 * @param yTitle   quantity and unit along y
 * @param curves   what is drawn, the first lowest
 * @param xLimits  upright dashed lines
 * @param yLimits  level dashed lines
 * @param fromZero whether the y axis shall hold zero
 */
public record LineFigure(String title, String remark, String xTitle, String yTitle, List<Curve> curves, List<Limit> xLimits,
                         List<Limit> yLimits, boolean fromZero) {
    /**
     * A curve, or points.
     *
     * @param name   for the legend
     * @param x      values along x, rising for a curve
     * @param y      values along y; NaN interrupts a curve
     * @param lower  lower end of the band or error bar, or empty
     * @param upper  upper end
     * @param points whether the values are drawn as points
     * @param rgb    colour 0xRRGGBB, or -1 for the next of the palette
     */
    public record Curve(String name, double[] x, double[] y, double[] lower, double[] upper, boolean points, int rgb) {
        /** Checks the lengths. */
        public Curve {
            if (x.length != y.length || lower.length != upper.length || lower.length != 0 && lower.length != x.length) {
                throw new IllegalArgumentException("curve " + name + ": " + x.length + " x, " + y.length + " y, " + lower.length
                        + " lower and " + upper.length + " upper values do not belong together");
            }
        }

        /** A curve without a band. */
        public static Curve line(String name, double[] x, double[] y) {
            return new Curve(name, x, y, new double[0], new double[0], false, -1);
        }

        /** Points without error bars. */
        public static Curve points(String name, double[] x, double[] y) {
            return new Curve(name, x, y, new double[0], new double[0], true, -1);
        }

        /** This curve with a band, or these points with error bars, y minus and plus the half width. */
        public Curve withHalfWidth(double[] half) {
            double[] low = new double[x.length];
            double[] high = new double[x.length];
            for (int i = 0; i < x.length; i++) {
                low[i] = y[i] - half[i];
                high[i] = y[i] + half[i];
            }
            return new Curve(name, x, y, low, high, points, rgb);
        }

        /** This curve in a colour of its own, 0xRRGGBB. */
        public Curve inColour(int colour) {
            return new Curve(name, x, y, lower, upper, points, colour);
        }
    }

    /**
     * A value to which others are held.
     *
     * @param name  for the legend
     * @param value its place; NaN or infinite is not drawn
     */
    public record Limit(String name, double value) {
    }

    /** Colours told apart by colour-blind readers: Okabe and Ito, Color Universal Design (2008); values from memory. */
    private static final int[] PALETTE = {0x0072B2, 0xD55E00, 0x009E73, 0xCC79A7, 0x56B4E9, 0xE69F00, 0x000000};
    private static final float[][] DASHES = {{}, {9, 4}, {2, 3}, {12, 4, 2, 4}};
    private static final int WIDTH = 1200;
    private static final int HEIGHT = 800;
    private static final int LEFT = 118;
    private static final Color LIMIT = new Color(0x8A2500);

    /** A figure without curves yet. */
    public static LineFigure of(String title, String xTitle, String yTitle) {
        return new LineFigure(title, "", xTitle, yTitle, List.of(), List.of(), List.of(), false);
    }

    /** This figure with a line below the title. */
    public LineFigure remark(String text) {
        return new LineFigure(title, text, xTitle, yTitle, curves, xLimits, yLimits, fromZero);
    }

    /** This figure with another curve on top. */
    public LineFigure with(Curve curve) {
        return new LineFigure(title, remark, xTitle, yTitle, plus(curves, curve), xLimits, yLimits, fromZero);
    }

    /** This figure with an upright limit. */
    public LineFigure xLimit(String name, double value) {
        return new LineFigure(title, remark, xTitle, yTitle, curves, plus(xLimits, new Limit(name, value)), yLimits, fromZero);
    }

    /** This figure with a level limit. */
    public LineFigure yLimit(String name, double value) {
        return new LineFigure(title, remark, xTitle, yTitle, curves, xLimits, plus(yLimits, new Limit(name, value)), fromZero);
    }

    /** This figure with zero on its y axis. */
    public LineFigure zeroBased() {
        return new LineFigure(title, remark, xTitle, yTitle, curves, xLimits, yLimits, true);
    }

    private static <T> List<T> plus(List<T> list, T item) {
        List<T> longer = new ArrayList<>(list);
        longer.add(item);
        return List.copyOf(longer);
    }

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    /**
     * Draws figures one below the other and writes them as one PNG; a file that stands there is overwritten.
     *
     * @param heights height of each in px
     * @throws OutputException if the file cannot be written
     */
    public static void write(Path png, List<LineFigure> figures, int... heights) {
        Picture picture = new Picture(WIDTH, Arrays.stream(heights).sum());
        int top = 0;
        for (int i = 0; i < heights.length; i++) {
            figures.get(i).draw(picture, top, heights[i]);
            top += heights[i];
        }
        picture.write(png);
    }

    Picture draw() {
        Picture picture = new Picture(WIDTH, HEIGHT);
        draw(picture, 0, HEIGHT);
        return picture;
    }

    private void draw(Picture picture, int from, int height) {
        picture.font(Picture.TITLE, true);
        picture.text(picture.fitted(title, WIDTH - 40.0), 20, from + 38.0, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.TEXT, false);
        picture.text(picture.fitted(remark, WIDTH - 40.0), 20, from + 66.0, Picture.Align.LEFT, Picture.SOFT);
        int top = from + (title.isEmpty() ? 20 : remark.isEmpty() ? 64 : 90);
        int plotTop = legend(picture, top + 10) + 14;
        Span x = xSpan();
        Span y = ySpan();
        Axes axes = new Axes(picture, LEFT, plotTop, WIDTH - LEFT - 40, from + height - plotTop - 80, x.from(), x.to(), y.from(),
                y.to());
        axes.grid();
        for (int i = 0; i < curves.size(); i++) {
            if (!curves.get(i).points && curves.get(i).lower.length > 0) {
                axes.band(curves.get(i).x, curves.get(i).lower, curves.get(i).upper, pale(colour(i)));
            }
        }
        for (int i = 0; i < curves.size(); i++) {
            drawCurve(axes, i);
        }
        drawLimits(axes);
        axes.full(xTitle, yTitle);
    }

    private Color colour(int i) {
        int own = curves.get(i).rgb;
        return new Color(own >= 0 ? own : PALETTE[i % PALETTE.length]);
    }

    private static Color pale(Color ink) {
        return new Color(ink.getRed(), ink.getGreen(), ink.getBlue(), 56);
    }

    private void drawCurve(Axes axes, int i) {
        Curve curve = curves.get(i);
        if (!curve.points) {
            axes.curve(curve.x, curve.y, colour(i), 2.2, DASHES[i % DASHES.length]);
            return;
        }
        axes.clipped(() -> {
            for (int k = 0; k < curve.x.length; k++) {
                double x = axes.px(curve.x[k]);
                if (curve.lower.length > 0 && Double.isFinite(curve.lower[k]) && Double.isFinite(curve.upper[k])) {
                    axes.picture().line(x, axes.py(curve.lower[k]), x, axes.py(curve.upper[k]), colour(i), 1.5);
                }
                if (Double.isFinite(curve.y[k])) {
                    dot(axes.picture(), x, axes.py(curve.y[k]), colour(i));
                }
            }
        });
    }

    private static void dot(Picture picture, double x, double y, Color ink) {
        picture.graphics().setColor(ink);
        picture.graphics().fill(new Ellipse2D.Double(x - 4, y - 4, 8, 8));
    }

    private void drawLimits(Axes axes) {
        axes.clipped(() -> {
            for (int i = 0; i < xLimits.size(); i++) {
                double x = axes.px(xLimits.get(i).value);
                axes.picture().stroke(new Line2D.Double(x, axes.top(), x, axes.top() + axes.height()), LIMIT, 1.8, limitDash(i));
            }
            for (int i = 0; i < yLimits.size(); i++) {
                double y = axes.py(yLimits.get(i).value);
                axes.picture().stroke(new Line2D.Double(axes.left(), y, axes.left() + axes.width(), y), LIMIT, 1.8,
                        limitDash(xLimits.size() + i));
            }
        });
    }

    private static float[] limitDash(int i) {
        return DASHES[1 + i % (DASHES.length - 1)];
    }

    /** Draws the legend from a height on and tells where it ends. */
    private int legend(Picture picture, int firstLine) {
        Legend legend = new Legend(picture, 20, firstLine);
        for (int i = 0; i < curves.size(); i++) {
            Color ink = colour(i);
            Curve curve = curves.get(i);
            float[] dashes = DASHES[i % DASHES.length];
            legend.entry(curve.name, (x, y) -> {
                if (curve.points) {
                    dot(picture, x + Legend.SAMPLE / 2.0, y, ink);
                } else {
                    picture.fill(x, y - 8, Legend.SAMPLE, curve.lower.length > 0 ? 16 : 0, pale(ink));
                    picture.stroke(new Line2D.Double(x, y, x + Legend.SAMPLE, y), ink, 2.2, dashes);
                }
            });
        }
        List<Limit> limits = new ArrayList<>(xLimits);
        limits.addAll(yLimits);
        for (int i = 0; i < limits.size(); i++) {
            float[] dashes = limitDash(i);
            legend.entry(limits.get(i).name, (x, y) -> picture.stroke(new Line2D.Double(x, y, x + Legend.SAMPLE, y), LIMIT, 1.8,
                    dashes));
        }
        return legend.bottom();
    }

    private Span xSpan() {
        Span span = Span.NONE;
        for (Curve c : curves) {
            span = span.with(c.x);
        }
        for (Limit l : xLimits) {
            span = span.with(l.value);
        }
        boolean points = curves.stream().anyMatch(Curve::points);
        return span.widened(points || !xLimits.isEmpty() ? 0.03 : 0);
    }

    private Span ySpan() {
        Span span = fromZero ? Span.NONE.with(0) : Span.NONE;
        for (Curve c : curves) {
            span = span.with(c.y).with(c.lower).with(c.upper);
        }
        for (Limit l : yLimits) {
            span = span.with(l.value);
        }
        Span wide = span.widened(0.05);
        return fromZero && span.from() == 0 ? new Span(0, wide.to()) : wide;
    }
}
