package iridepth.report;

import java.nio.file.Path;
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
    private static final int TOP = 88;
    private static final int RIGHT = 190;
    private static final int BAR_GAP = 36;
    private static final int LEAST_BAR = 300;
    private static final int LEAST_SHEET = 1000;
    private static final int LEGEND_LINE = 30;
    private static final int HATCH_PERIOD = 8;
    private static final int HATCH_WIDTH = 2;
    private static final int BINS = 4096;
    private static final double BIN_SHARE = 1.0 / BINS;
    /** Share of the cells left beyond either end of the colour scale, so that a few stray ones do not stretch it. */
    private static final double BEYOND = 0.001;

    /**
     * Loads letters and drawing code, which takes some 150 ms in a fresh process: call it on a thread of its own while the map
     * is being read. Figures need no such call.
     */
    public static void prepare() {
        Picture picture = new Picture(1, 1);
        picture.font(Picture.TEXT, false);
        picture.text("0", 0, 0, Picture.Align.LEFT, Picture.INK);
        picture.line(0, 0, 1, 1, Picture.INK, 1);
        ColourScale.thickness();
    }

    /**
     * A figure whose scale spans the thicknesses in the map, but for a thousandth of the cells at either end; rounded outwards.
     */
    public static MapFigure of(String title, MapCells cells, double pixelUm) {
        double least = Double.POSITIVE_INFINITY;
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < cells.columns() * cells.rows(); i++) {
            if (cells.state(i).hasThickness()) {
                least = Math.min(least, cells.mean(i));
                most = Math.max(most, cells.mean(i));
            }
        }
        if (least > most) {
            return new MapFigure(title, cells, pixelUm, 0, 1);
        }
        double low = least + BIN_SHARE * (most - least) * strays(cells, least, most, false);
        double high = most - BIN_SHARE * (most - least) * strays(cells, least, most, true);
        double step = Ticks.step(Math.max((high - low) / 20, 0.05));
        double from = Math.floor(low / step) * step;
        double to = Math.ceil(high / step) * step;
        return new MapFigure(title, cells, pixelUm, from, to > from ? to : from + step);
    }

    /** How many bins at one end of the thicknesses hold no more than a thousandth of the cells together. */
    private static int strays(MapCells cells, double least, double most, boolean upper) {
        int[] bin = new int[BINS];
        int count = 0;
        for (int i = 0; i < cells.columns() * cells.rows(); i++) {
            if (cells.state(i).hasThickness()) {
                double share = (cells.mean(i) - least) / Math.max(most - least, Double.MIN_NORMAL);
                bin[Math.min(BINS - 1, (int) ((upper ? 1 - share : share) * BINS))]++;
                count++;
            }
        }
        int bins = 0;
        for (int beyond = bin[0]; beyond <= BEYOND * count; beyond += bin[bins]) {
            bins++;
        }
        return bins;
    }

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    private int enlarge() {
        return (LEAST_EDGE - 1) / Math.max(cells.columns(), cells.rows()) + 1;
    }

    /** Where the map lies on the sheet. */
    PixelAxes axes() {
        return new PixelAxes(LEFT, TOP, cells.columns() * enlarge(), cells.rows() * enlarge(), (double) enlarge() / cells.factor(),
                pixelUm);
    }

    Picture draw() {
        int enlarge = enlarge();
        int mapWidth = cells.columns() * enlarge;
        int mapHeight = cells.rows() * enlarge;
        int sheet = Math.max(LEAST_SHEET, LEFT + mapWidth + RIGHT);
        int top = TOP;
        int body = Math.max(mapHeight, LEAST_BAR);
        Picture picture = new Picture(sheet, top + body + 122 + 2 * LEGEND_LINE);
        drawTitle(picture);
        drawMap(picture, LEFT, top, enlarge);
        axes().draw(picture);
        ColourBar.draw(picture, LEFT + mapWidth + BAR_GAP, top, body, "Thickness (nm)", fromNm, toNm);
        drawLegend(picture, top + body + 118);
        return picture;
    }

    private void drawTitle(Picture picture) {
        picture.font(Picture.TITLE, true);
        picture.text(picture.fitted(title, picture.width() - 40.0), 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.SMALL, false);
        String size = cells.width() + " \u00d7 " + cells.height() + " pixels";
        if (cells.factor() > 1) {
            size += ", each point shown is the mean of " + cells.factor() + " \u00d7 " + cells.factor();
        }
        picture.text("Film thickness, " + size, 20, 64, Picture.Align.LEFT, Picture.SOFT);
    }

    private void drawMap(Picture picture, int left, int top, int enlarge) {
        int[] pixels = picture.pixels();
        for (int cellRow = 0; cellRow < cells.rows(); cellRow++) {
            for (int cellColumn = 0; cellColumn < cells.columns(); cellColumn++) {
                int cell = cellRow * cells.columns() + cellColumn;
                StateStyle state = cells.state(cell);
                int rgb = state.hasThickness() ? colour(cells.mean(cell)) : state.rgb();
                for (int y = cellRow * enlarge; y < (cellRow + 1) * enlarge; y++) {
                    int place = (top + y) * picture.width() + left;
                    for (int x = cellColumn * enlarge; x < (cellColumn + 1) * enlarge; x++) {
                        pixels[place + x] = state == StateStyle.ORDER_DOUBTFUL && isHatch(x, y) ? hatch(rgb) : rgb;
                    }
                }
            }
        }
    }

    private int colour(double nm) {
        return ColourScale.thickness().rgb(ColourScale.index((nm - fromNm) / (toNm - fromNm)));
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

    private void drawLegend(Picture picture, int firstLine) {
        long[] total = cells.total();
        double pixels = (double) cells.width() * cells.height();
        double x = 20;
        int y = firstLine;
        picture.font(Picture.TEXT, false);
        for (StateStyle state : StateStyle.values()) {
            if (total[state.code()] == 0) {
                continue;
            }
            String text = state.label() + " " + percent(total[state.code()] / pixels);
            double width = 40 + picture.widthOf(text) + 30;
            if (x > 20 && x + width > picture.width()) {
                x = 20;
                y += LEGEND_LINE;
            }
            swatch(picture, (int) x, y - 15, state);
            picture.text(text, x + 40, y, Picture.Align.LEFT, Picture.INK);
            x += width;
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
