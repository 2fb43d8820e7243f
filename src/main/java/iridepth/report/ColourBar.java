package iridepth.report;

import java.awt.Color;
import java.awt.geom.Path2D;

/** The upright bar that says which value has which colour of {@link ColourScale}; its points stand for values beyond it. */
final class ColourBar {
    private static final int WIDTH = 30;
    private static final int POINT = 12;
    private static final int GAP = 12;
    private static final int PIXELS_PER_TICK = 55;

    private ColourBar() {
    }

    /**
     * Draws a bar with its ticks and title to the right of it.
     *
     * @param left   left edge, px
     * @param top    upper point, px
     * @param height from point to point, px
     * @param title  quantity and unit
     * @param from   value of the first colour
     * @param to     value of the last colour, above the first
     */
    static void draw(Picture picture, int left, int top, int height, String title, double from, double to) {
        ColourScale scale = ColourScale.thickness();
        int upper = top + POINT + 2;
        int length = height - 2 * (POINT + 2);
        for (int i = 0; i < length; i++) {
            picture.fill(left, upper + i, WIDTH, 1, new Color(scale.rgb(ColourScale.index(1 - (i + 0.5) / length))));
        }
        point(picture, left, upper, -POINT, scale.rgb(ColourScale.SIZE - 1));
        point(picture, left, upper + length, POINT, scale.rgb(0));
        picture.frame(left, upper, WIDTH, length);
        picture.font(Picture.TEXT, false);
        Ticks ticks = Ticks.of(from, to, Math.max(2, length / PIXELS_PER_TICK));
        double widest = 0;
        for (double v : ticks.at()) {
            double y = upper + length * (to - v) / (to - from);
            picture.line(left + WIDTH, y, left + WIDTH + 7, y, Picture.INK, 1);
            picture.text(ticks.label(v), left + WIDTH + GAP, y + 6, Picture.Align.LEFT, Picture.INK);
            widest = Math.max(widest, picture.widthOf(ticks.label(v)));
        }
        picture.textUpwards(title, left + WIDTH + GAP + widest + 28, top + height / 2.0, Picture.INK);
    }

    private static void point(Picture picture, int left, int y, int height, int rgb) {
        Path2D path = new Path2D.Double();
        path.moveTo(left, y);
        path.lineTo(left + WIDTH / 2.0, y + height);
        path.lineTo(left + WIDTH, y);
        path.closePath();
        picture.graphics().setColor(new Color(rgb));
        picture.graphics().fill(path);
        picture.graphics().setColor(Picture.INK);
        picture.graphics().draw(path);
    }
}
