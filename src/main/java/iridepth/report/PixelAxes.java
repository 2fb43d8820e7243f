package iridepth.report;

/**
 * The axes around a picture of pixels: ticks in mm, um or pixels from the upper left corner, and a scale bar where the pixel size
 * is known.
 *
 * @param left    left edge of the picture on the sheet, px
 * @param top     upper edge
 * @param width   width on the sheet
 * @param height  height on the sheet
 * @param zoom    px on the sheet per pixel
 * @param pixelUm edge of a pixel in um, NaN if unknown
 */
record PixelAxes(int left, int top, int width, int height, double zoom, double pixelUm) {
    private static final int PIXELS_PER_X_TICK = 110;
    private static final int PIXELS_PER_Y_TICK = 70;

    /** Place on the sheet of a column; the centre of the first is at 0. */
    double px(double x) {
        return left + (x + 0.5) * zoom;
    }

    /** Place on the sheet of a row. */
    double py(double y) {
        return top + (y + 0.5) * zoom;
    }

    /** Draws frame, ticks, titles and scale bar. */
    void draw(Picture picture) {
        LengthUnit unit = LengthUnit.of(Math.max(width, height) / zoom, pixelUm);
        double scale = zoom / unit.perPixel();
        Ticks xs = Ticks.of(0, width / scale, Math.max(1, width / PIXELS_PER_X_TICK));
        Ticks ys = Ticks.of(0, height / scale, Math.max(1, height / PIXELS_PER_Y_TICK));
        int bottom = top + height;
        picture.frame(left, top, width, height);
        picture.font(Picture.TEXT, false);
        for (double v : xs.at()) {
            double x = left + v * scale;
            picture.line(x, bottom, x, bottom + 7, Picture.INK, 1);
            picture.text(xs.label(v), x, bottom + 26, Picture.Align.CENTRE, Picture.INK);
        }
        for (double v : ys.at()) {
            double y = top + v * scale;
            picture.line(left - 7, y, left, y, Picture.INK, 1);
            picture.text(ys.label(v), left - 12, y + 6, Picture.Align.RIGHT, Picture.INK);
        }
        picture.text("x (" + unit.name() + ")", left + width / 2.0, bottom + 52, Picture.Align.CENTRE, Picture.INK);
        picture.textUpwards("y (" + unit.name() + ")", 26, top + height / 2.0, Picture.INK);
        if (!Double.isNaN(pixelUm)) {
            double length = Ticks.step(width / scale / 12);
            scaleBar(picture, left + width, bottom + 62, length * scale, new Ticks(length, xs.at()).label(length) + " " + unit.name());
        }
    }

    private static void scaleBar(Picture picture, double right, double y, double length, String label) {
        picture.fill(right - length, y, length, 6, Picture.INK);
        picture.text(label, right - length - 10, y + 9, Picture.Align.RIGHT, Picture.INK);
    }
}
