package iridepth.report;

import java.awt.Color;
import java.awt.Shape;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;

/**
 * A rectangle of a picture with linear axes.
 *
 * @param left   left edge, px
 * @param top    top edge, px
 * @param width  width, px
 * @param height height, px
 * @param x0     value at the left edge
 * @param x1     value at the right edge, above it
 * @param y0     value at the bottom edge
 * @param y1     value at the top edge, above it
 */
record Axes(Picture picture, int left, int top, int width, int height, double x0, double x1, double y0, double y1) {
    private static final int PIXELS_PER_X_TICK = 100;
    private static final int PIXELS_PER_Y_TICK = 48;
    private static final int TICK = 6;

    Axes {
        if (!(x1 > x0 && y1 > y0)) {
            throw new IllegalArgumentException("axes must rise, not run from " + x0 + " to " + x1 + " and " + y0 + " to " + y1);
        }
    }

    double px(double x) {
        return left + (x - x0) / (x1 - x0) * width;
    }

    double py(double y) {
        return top + height - (y - y0) / (y1 - y0) * height;
    }

    Ticks xTicks() {
        return Ticks.of(x0, x1, Math.max(2, width / PIXELS_PER_X_TICK));
    }

    Ticks yTicks() {
        return Ticks.of(y0, y1, Math.max(3, height / PIXELS_PER_Y_TICK));
    }

    /** Draws pale lines at the ticks, to go under the curves. */
    void grid() {
        for (double x : xTicks().at()) {
            picture.line(px(x), top, px(x), top + height, Picture.GRID, 1);
        }
        for (double y : yTicks().at()) {
            picture.line(left, py(y), left + width, py(y), Picture.GRID, 1);
        }
    }

    /** Draws the ticks and labels of the thickness or other quantity along the bottom edge. */
    void xAxis(int size) {
        Ticks ticks = xTicks();
        picture.font(size, false);
        for (double x : ticks.at()) {
            picture.line(px(x), top + height, px(x), top + height + TICK, Picture.INK, 1);
            picture.text(ticks.label(x), px(x), top + height + TICK + size + 1, Picture.Align.CENTRE, Picture.INK);
        }
    }

    /** Draws the ticks and labels along the left edge and tells how wide the labels are. */
    double yAxis(int size) {
        Ticks ticks = yTicks();
        double widest = 0;
        picture.font(size, false);
        for (double y : ticks.at()) {
            picture.line(left - TICK, py(y), left, py(y), Picture.INK, 1);
            picture.text(ticks.label(y), left - TICK - 5, py(y) + size / 3.0, Picture.Align.RIGHT, Picture.INK);
            widest = Math.max(widest, picture.widthOf(ticks.label(y)));
        }
        return widest;
    }

    /** Draws axis titles, the frame, ticks and labels. */
    void full(String xTitle, String yTitle) {
        picture.frame(left, top, width, height);
        xAxis(Picture.TEXT);
        double labels = yAxis(Picture.TEXT);
        picture.text(xTitle, left + width / 2.0, top + height + 54, Picture.Align.CENTRE, Picture.INK);
        picture.textUpwards(yTitle, left - TICK - labels - 17, top + height / 2.0, Picture.INK);
    }

    /** Draws a curve; where a value is missing it is interrupted. */
    void curve(double[] x, double[] y, Color ink, double strokeWidth, float... dashes) {
        Path2D path = new Path2D.Double();
        boolean open = false;
        for (int i = 0; i < x.length; i++) {
            boolean here = Double.isFinite(x[i]) && Double.isFinite(y[i]);
            if (here && open) {
                path.lineTo(px(x[i]), py(y[i]));
            } else if (here) {
                path.moveTo(px(x[i]), py(y[i]));
            }
            open = here;
        }
        clipped(() -> picture.stroke(path, ink, strokeWidth, dashes));
    }

    /** Fills the band between two curves; where a value is missing it is interrupted. */
    void band(double[] x, double[] lower, double[] upper, Color ink) {
        Path2D path = new Path2D.Double();
        for (int i = 0; i < x.length; ) {
            int end = i;
            while (end < x.length && Double.isFinite(x[end]) && Double.isFinite(lower[end]) && Double.isFinite(upper[end])) {
                end++;
            }
            if (end - i > 1) {
                path.moveTo(px(x[i]), py(lower[i]));
                for (int k = i + 1; k < end; k++) {
                    path.lineTo(px(x[k]), py(lower[k]));
                }
                for (int k = end - 1; k >= i; k--) {
                    path.lineTo(px(x[k]), py(upper[k]));
                }
                path.closePath();
            }
            i = end + 1;
        }
        clipped(() -> {
            picture.graphics().setColor(ink);
            picture.graphics().fill(path);
        });
    }

    /** Draws something of which only the part inside the axes shows. */
    void clipped(Runnable drawing) {
        Shape before = picture.graphics().getClip();
        picture.graphics().clip(new Rectangle2D.Double(left, top, width, height));
        drawing.run();
        picture.graphics().setClip(before);
    }
}
