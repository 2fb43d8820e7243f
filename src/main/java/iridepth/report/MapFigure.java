package iridepth.report;

import java.awt.Color;
import java.awt.geom.Path2D;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Locale;

/**
 * A thickness map as a picture: the colours of {@link ColourScale} with a colour bar in nm, axes in um, mm or pixels, a scale
 * bar where the pixel size is known, and a legend of the states that occur. Small maps are enlarged by a whole factor, large
 * ones come reduced as {@link MapCells}; the picture says so.
 *
 * @param title   what the map shows
 * @param cells   the map
 * @param pixelUm edge of a pixel of the original map in um, or NaN if unknown
 * @param fromNm  thickness of the first colour, nm
 * @param toNm    thickness of the last colour, nm; above the first
 */
public record MapFigure(String title, MapCells cells, double pixelUm, double fromNm, double toNm) {
    /** Cells along a row or column that a picture shows at most. */
    public static final int MOST_CELLS = 1600;

    private static final int LEAST_EDGE = 700;
    private static final int LEFT = 96;
    private static final int RIGHT = 190;
    private static final int BAR_GAP = 36;
    private static final int BAR_WIDTH = 30;
    private static final int LEAST_BAR = 300;
    private static final int LEAST_SHEET = 1000;
    private static final int HATCH_PERIOD = 8;
    private static final int HATCH_WIDTH = 2;
    /** Share of the cells left beyond either end of the colour scale, so that a few stray ones do not stretch it. */
    private static final double BEYOND = 0.001;

    /**
     * A figure whose scale spans the thicknesses in the map, but for a thousandth of the cells at either end; rounded outwards.
     */
    public static MapFigure of(String title, MapCells cells, double pixelUm) {
        double[] means = new double[cells.columns() * cells.rows()];
        int count = 0;
        for (int i = 0; i < means.length; i++) {
            if (cells.state(i).hasThickness()) {
                means[count++] = cells.mean(i);
            }
        }
        if (count == 0) {
            return new MapFigure(title, cells, pixelUm, 0, 1);
        }
        Arrays.sort(means, 0, count);
        int cut = (int) (BEYOND * count);
        double low = means[cut];
        double high = means[count - 1 - cut];
        double step = Ticks.step(Math.max((high - low) / 20, 0.05));
        double from = Math.floor(low / step) * step;
        double to = Math.ceil(high / step) * step;
        return new MapFigure(title, cells, pixelUm, from, to > from ? to : from + step);
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
        int enlarge = Math.max(1, LEAST_EDGE / Math.max(cells.columns(), cells.rows()));
        int mapWidth = cells.columns() * enlarge;
        int mapHeight = cells.rows() * enlarge;
        int sheet = Math.max(LEAST_SHEET, LEFT + mapWidth + RIGHT);
        int top = 88;
        int body = Math.max(mapHeight, LEAST_BAR);
        Picture picture = new Picture(sheet, top + body + 152);
        drawTitle(picture);
        drawMap(picture, LEFT, top, enlarge);
        picture.frame(LEFT, top, mapWidth, mapHeight);
        drawAxes(picture, LEFT, top, enlarge);
        drawBar(picture, LEFT + mapWidth + BAR_GAP, top, body);
        drawLegend(picture, top + body + 128);
        return picture;
    }

    private void drawTitle(Picture picture) {
        picture.font(Picture.TITLE, true);
        double room = picture.width() - 40.0;
        String line = title;
        while (line.length() > 1 && picture.widthOf(line) > room) {
            line = line.substring(0, line.length() - 2).stripTrailing() + "\u2026";
        }
        picture.text(line, 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.SMALL, false);
        String size = cells.width() + " \u00d7 " + cells.height() + " pixels";
        if (cells.factor() > 1) {
            size += ", each point shown is the mean of " + cells.factor() + " \u00d7 " + cells.factor();
        }
        picture.text("Film thickness, " + size, 20, 64, Picture.Align.LEFT, Picture.SOFT);
    }

    private void drawMap(Picture picture, int left, int top, int enlarge) {
        ColourScale scale = ColourScale.thickness();
        int[] pixels = picture.pixels();
        for (int row = 0; row < cells.rows() * enlarge; row++) {
            int place = (top + row) * picture.width() + left;
            int cellRow = row / enlarge * cells.columns();
            for (int column = 0; column < cells.columns(); column++) {
                int cell = cellRow + column;
                StateStyle state = cells.state(cell);
                int rgb = state.hasThickness() ? scale.rgb(ColourScale.index((cells.mean(cell) - fromNm) / (toNm - fromNm)))
                        : state.rgb();
                for (int i = 0; i < enlarge; i++, place++) {
                    boolean hatched = state == StateStyle.ORDER_DOUBTFUL && isHatch(column * enlarge + i, row);
                    pixels[place] = hatched ? hatch(rgb) : rgb;
                }
            }
        }
    }

    private static boolean isHatch(int x, int y) {
        return (x + y) % HATCH_PERIOD < HATCH_WIDTH;
    }

    /** Ink of the hatch on a colour: light on dark, dark on light. */
    private static int hatch(int rgb) {
        int green = rgb >> 8 & 255;
        int red = rgb >> 16 & 255;
        return 0.3 * red + 0.6 * green < 110 ? 0xFFFFFF : 0x000000;
    }

    private void drawAxes(Picture picture, int left, int top, int enlarge) {
        boolean known = !Double.isNaN(pixelUm);
        double longest = Math.max(cells.width(), cells.height()) * (known ? pixelUm : 1);
        double perUnit = !known ? 1 : longest >= 5000 ? 1000 / pixelUm : 1 / pixelUm;
        String unit = !known ? "pixels" : longest >= 5000 ? "mm" : "\u00b5m";
        double scale = enlarge * perUnit / cells.factor();
        double columns = cells.columns() * enlarge / scale;
        double rows = cells.rows() * enlarge / scale;
        Ticks xs = Ticks.of(0, columns, Math.max(2, cells.columns() * enlarge / 110));
        Ticks ys = Ticks.of(0, rows, Math.max(2, cells.rows() * enlarge / 70));
        int bottom = top + cells.rows() * enlarge;
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
        picture.text("x (" + unit + ")", left + cells.columns() * enlarge / 2.0, bottom + 52, Picture.Align.CENTRE, Picture.INK);
        picture.textUpwards("y (" + unit + ")", 26, top + cells.rows() * enlarge / 2.0, Picture.INK);
        if (known) {
            double length = Ticks.step(columns / 12);
            drawScaleBar(picture, left + cells.columns() * enlarge, bottom + 62, length * scale,
                    new Ticks(length, xs.at()).label(length) + " " + unit);
        }
    }

    private static void drawScaleBar(Picture picture, double right, double y, double length, String label) {
        picture.fill(right - length, y, length, 6, Picture.INK);
        picture.text(label, right - length - 10, y + 9, Picture.Align.RIGHT, Picture.INK);
    }

    private void drawBar(Picture picture, int left, int top, int height) {
        ColourScale scale = ColourScale.thickness();
        int margin = 14;
        int bar = height - 2 * margin;
        for (int i = 0; i < bar; i++) {
            Color ink = new Color(scale.rgb(ColourScale.index(1 - (i + 0.5) / bar)));
            picture.fill(left, top + margin + i, BAR_WIDTH, 1, ink);
        }
        triangle(picture, left, top + margin, -margin + 2, scale.rgb(ColourScale.SIZE - 1));
        triangle(picture, left, top + margin + bar, margin - 2, scale.rgb(0));
        picture.frame(left, top + margin, BAR_WIDTH, bar);
        picture.font(Picture.TEXT, false);
        Ticks ticks = Ticks.of(fromNm, toNm, Math.max(2, bar / 55));
        double widest = 0;
        for (double v : ticks.at()) {
            double y = top + margin + bar * (toNm - v) / (toNm - fromNm);
            picture.line(left + BAR_WIDTH, y, left + BAR_WIDTH + 7, y, Picture.INK, 1);
            picture.text(ticks.label(v), left + BAR_WIDTH + 12, y + 6, Picture.Align.LEFT, Picture.INK);
            widest = Math.max(widest, picture.widthOf(ticks.label(v)));
        }
        picture.textUpwards("Thickness (nm)", left + BAR_WIDTH + 12 + widest + 28, top + height / 2.0, Picture.INK);
    }

    /** Points beyond the bar's end: thicker or thinner cells have the end's colour. */
    private static void triangle(Picture picture, int left, int y, int height, int rgb) {
        Path2D path = new Path2D.Double();
        path.moveTo(left, y);
        path.lineTo(left + BAR_WIDTH / 2.0, y + height);
        path.lineTo(left + BAR_WIDTH, y);
        path.closePath();
        picture.graphics().setColor(new Color(rgb));
        picture.graphics().fill(path);
        picture.graphics().setColor(Picture.INK);
        picture.graphics().draw(path);
    }

    private void drawLegend(Picture picture, int y) {
        long[] total = cells.total();
        double pixels = (double) cells.width() * cells.height();
        double x = 20;
        picture.font(Picture.TEXT, false);
        for (StateStyle state : StateStyle.values()) {
            if (total[state.code()] == 0) {
                continue;
            }
            swatch(picture, (int) x, y - 15, state);
            String text = state.label() + " " + percent(total[state.code()] / pixels);
            picture.text(text, x + 40, y, Picture.Align.LEFT, Picture.INK);
            x += 40 + picture.widthOf(text) + 32;
        }
    }

    private static String percent(double share) {
        return share > 0 && share < 0.0005 ? "<0.1 %" : String.format(Locale.ROOT, "%.1f %%", 100 * share);
    }

    private static void swatch(Picture picture, int left, int top, StateStyle state) {
        for (int x = 0; x < 30; x++) {
            int scaled = ColourScale.thickness().rgb(ColourScale.index(x / 29.0));
            int rgb = state.hasThickness() ? scaled : state.rgb();
            for (int y = 0; y < 18; y++) {
                boolean hatched = state == StateStyle.ORDER_DOUBTFUL && isHatch(x, y);
                picture.pixels()[(top + y) * picture.width() + left + x] = hatched ? hatch(rgb) : rgb;
            }
        }
        picture.frame(left, top, 30, 18);
    }
}
