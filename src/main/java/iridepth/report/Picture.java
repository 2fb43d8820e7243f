package iridepth.report;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.Shape;
import java.awt.geom.Line2D;
import java.awt.geom.Rectangle2D;
import java.awt.image.BufferedImage;
import java.awt.image.DataBufferInt;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;

/** A white sheet to draw a figure on, in pixels from the upper left corner, with the project's letters and inks. */
final class Picture {
    /** Where a text stands relative to its point. */
    enum Align {
        LEFT(0), CENTRE(0.5), RIGHT(1);

        private final double share;

        Align(double share) {
            this.share = share;
        }
    }

    static final Color INK = new Color(0x1A1A1A);
    static final Color SOFT = new Color(0x5A5A5A);
    static final Color GRID = new Color(0xDCDCDC);
    static final int TITLE = 24;
    static final int TEXT = 18;
    static final int SMALL = 16;

    private final BufferedImage image;
    private final Graphics2D graphics;

    Picture(int width, int height) {
        image = new BufferedImage(width, height, BufferedImage.TYPE_INT_RGB);
        graphics = image.createGraphics();
        graphics.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_TEXT_ANTIALIASING, RenderingHints.VALUE_TEXT_ANTIALIAS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_FRACTIONALMETRICS, RenderingHints.VALUE_FRACTIONALMETRICS_ON);
        graphics.setRenderingHint(RenderingHints.KEY_STROKE_CONTROL, RenderingHints.VALUE_STROKE_PURE);
        graphics.setColor(Color.WHITE);
        graphics.fillRect(0, 0, width, height);
    }

    int width() {
        return image.getWidth();
    }

    int height() {
        return image.getHeight();
    }

    Graphics2D graphics() {
        return graphics;
    }

    /** The pixels, 0xRRGGBB, row after row; writing there draws. */
    int[] pixels() {
        return ((DataBufferInt) image.getRaster().getDataBuffer()).getData();
    }

    void font(int size, boolean bold) {
        graphics.setFont(new Font(Font.SANS_SERIF, bold ? Font.BOLD : Font.PLAIN, size));
    }

    /** Width of a text in the present font. */
    double widthOf(String text) {
        return graphics.getFontMetrics().getStringBounds(text, graphics).getWidth();
    }

    /** Draws a text whose base line passes through y. */
    void text(String text, double x, double y, Align align, Color ink) {
        graphics.setColor(ink);
        graphics.drawString(text, (float) (x - align.share * widthOf(text)), (float) y);
    }

    /** Draws a text turned to read upwards, its middle at y and its base line at x. */
    void textUpwards(String text, double x, double y, Color ink) {
        graphics.rotate(-Math.PI / 2, x, y);
        text(text, x, y, Align.CENTRE, ink);
        graphics.rotate(Math.PI / 2, x, y);
    }

    /** A text cut to a width in the present font, with an ellipsis where something is missing. */
    String fitted(String text, double width) {
        String line = text;
        while (line.length() > 1 && widthOf(line) > width) {
            line = line.substring(0, line.length() - 2).stripTrailing() + "\u2026";
        }
        return line;
    }

    /** Breaks a text at blanks into lines no wider than a width in the present font; a longer word stands alone. */
    List<String> wrap(String text, double width) {
        List<String> lines = new ArrayList<>();
        StringBuilder line = new StringBuilder();
        for (String word : text.strip().split("\\s+")) {
            if (line.length() > 0 && widthOf(line + " " + word) > width) {
                lines.add(line.toString());
                line.setLength(0);
            }
            line.append(line.length() == 0 ? "" : " ").append(word);
        }
        if (line.length() > 0) {
            lines.add(line.toString());
        }
        return lines;
    }

    void line(double x0, double y0, double x1, double y1, Color ink, double width) {
        stroke(new Line2D.Double(x0, y0, x1, y1), ink, width);
    }

    /** Draws an outline, dashed by lengths of line and gap in px if any are given. */
    void stroke(Shape shape, Color ink, double width, float... dashes) {
        graphics.setColor(ink);
        graphics.setStroke(new BasicStroke((float) width, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 10,
                dashes.length == 0 ? null : dashes, 0));
        graphics.draw(shape);
    }

    void fill(double x, double y, double width, double height, Color ink) {
        graphics.setColor(ink);
        graphics.fill(new Rectangle2D.Double(x, y, width, height));
    }

    /** Draws the outline of a rectangle one pixel outside it. */
    void frame(int x, int y, int width, int height) {
        graphics.setColor(INK);
        graphics.setStroke(new BasicStroke(1));
        graphics.draw(new Rectangle2D.Double(x - 0.5, y - 0.5, width + 1, height + 1));
    }

    /** Writes the picture as PNG; a file that stands there is overwritten. */
    void write(Path file) {
        graphics.dispose();
        PngWriter.write(image, file);
    }
}
