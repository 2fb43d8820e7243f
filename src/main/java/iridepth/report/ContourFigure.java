package iridepth.report;

import iridepth.quality.Contour;
import iridepth.quality.Position;
import java.awt.Color;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import java.awt.image.BufferedImage;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.TreeMap;

/**
 * Lines of equal thickness over the photo, white with a dark rim so that they show on any colour, each thickness labelled where
 * its longest lines have room for it.
 *
 * @param title    what the map shows
 * @param remark   how the lines were made
 * @param photo    the photo
 * @param contours the lines
 * @param pixelUm  edge of a pixel in um, NaN if unknown
 */
public record ContourFigure(String title, String remark, PagePhoto photo, List<Contour> contours, double pixelUm) {
    private static final int LEAST_EDGE = 700;
    private static final int LEAST_SHEET = 700;
    private static final int LEFT = 96;
    private static final int RIGHT = 40;
    private static final int TOP = 88;
    private static final Color RIM = new Color(0x101010);
    private static final Color LABEL = new Color(255, 255, 255, 225);
    /** Lines shorter than this on the sheet get no label. */
    private static final double LEAST_LABELLED = 60;
    private static final int LABELS_PER_LEVEL = 3;

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    Picture draw() {
        PageGrid grid = photo.grid();
        int enlarge = (LEAST_EDGE - 1) / Math.max(grid.columns(), grid.rows()) + 1;
        int width = grid.columns() * enlarge;
        int height = grid.rows() * enlarge;
        Picture picture = new Picture(Math.max(LEAST_SHEET, LEFT + width + RIGHT), TOP + height + 90);
        picture.font(Picture.TITLE, true);
        picture.text(picture.fitted(title, picture.width() - 40.0), 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.SMALL, false);
        picture.text(picture.fitted(remark, picture.width() - 40.0), 20, 64, Picture.Align.LEFT, Picture.SOFT);
        BufferedImage image = photo.picture();
        picture.graphics().drawImage(image, LEFT, TOP, width, height, null);
        PixelAxes axes = new PixelAxes(LEFT, TOP, width, height, (double) enlarge / grid.factor(), pixelUm);
        picture.graphics().setClip(LEFT, TOP, width, height);
        List<Path2D> lines = contours.stream().map(c -> line(c, axes)).toList();
        lines.forEach(line -> picture.stroke(line, RIM, 3.6));
        lines.forEach(line -> picture.stroke(line, Color.WHITE, 1.5));
        drawLabels(picture, axes);
        picture.graphics().setClip(null);
        axes.draw(picture);
        return picture;
    }

    private static Path2D line(Contour contour, PixelAxes axes) {
        Path2D path = new Path2D.Double();
        Position first = contour.points().get(0);
        path.moveTo(axes.px(first.x()), axes.py(first.y()));
        contour.points().forEach(p -> path.lineTo(axes.px(p.x()), axes.py(p.y())));
        if (contour.closed()) {
            path.closePath();
        }
        return path;
    }

    private void drawLabels(Picture picture, PixelAxes axes) {
        picture.font(Picture.SMALL, true);
        List<Rectangle2D> taken = new ArrayList<>();
        TreeMap<Double, List<Contour>> levels = new TreeMap<>();
        contours.forEach(c -> levels.computeIfAbsent(c.level(), level -> new ArrayList<>()).add(c));
        for (List<Contour> lines : levels.values()) {
            lines.stream().filter(c -> c.length() * axes.zoom() >= LEAST_LABELLED)
                    .sorted(Comparator.comparingDouble(Contour::length).reversed()).limit(LABELS_PER_LEVEL)
                    .forEach(c -> label(picture, axes, c, taken));
        }
    }

    /** Labels a line at the first of some places along it where the label lies inside the photo and covers no other. */
    private static void label(Picture picture, PixelAxes axes, Contour contour, List<Rectangle2D> taken) {
        String text = Numbers.significant(contour.level(), 6) + " nm";
        double width = picture.widthOf(text) + 8;
        Rectangle2D inside = new Rectangle2D.Double(axes.left(), axes.top(), axes.width(), axes.height());
        for (int part : new int[] {8, 4, 12, 6, 10, 2, 14, 1, 15}) {
            Position p = contour.points().get(contour.points().size() * part / 16);
            Rectangle2D box = new Rectangle2D.Double(axes.px(p.x()) - width / 2, axes.py(p.y()) - 11, width, 22);
            if (inside.contains(box) && taken.stream().noneMatch(box::intersects)) {
                picture.fill(box.getX(), box.getY(), width, 22, LABEL);
                picture.text(text, box.getCenterX(), box.getY() + 17, Picture.Align.CENTRE, Picture.INK);
                taken.add(box);
                return;
            }
        }
    }

    /** The corners of the lines as a table; lines are numbered within their thickness. */
    public CsvTable csv() {
        boolean scaled = !Double.isNaN(pixelUm);
        List<String> columns = new ArrayList<>(List.of("thickness_nm", "line", "closed", "x_px", "y_px"));
        if (scaled) {
            columns.addAll(List.of("x_um", "y_um"));
        }
        CsvTable table = CsvTable.of(List.of(title + ": " + remark), columns);
        double level = Double.NaN;
        int number = 0;
        for (Contour contour : contours) {
            number = contour.level() == level ? number + 1 : 1;
            level = contour.level();
            for (Position p : contour.points()) {
                List<Object> row = new ArrayList<>(List.of(level, number, contour.closed() ? "yes" : "no", p.x(), p.y()));
                if (scaled) {
                    row.addAll(List.of(p.x() * pixelUm, p.y() * pixelUm));
                }
                table.row(row.toArray());
            }
        }
        return table;
    }
}
