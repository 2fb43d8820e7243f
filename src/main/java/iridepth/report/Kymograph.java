package iridepth.report;

import iridepth.quality.Profile;
import iridepth.reading.State;
import java.awt.Color;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * Thickness along a line against time: time to the right, the line downwards, thickness in the colours of {@link ColourScale}.
 *
 * @param title    what the photos show
 * @param remark   where the line runs
 * @param profiles the profile of each photo along the same line, in order; empty where a photo could not be used
 * @param interval seconds from one photo to the next
 * @param pixelUm  edge of a pixel in um, NaN if unknown
 */
public record Kymograph(String title, String remark, List<Optional<Profile>> profiles, double interval, double pixelUm) {
    private static final int WIDTH = 1200;
    private static final int HEIGHT = 820;
    private static final int LEFT = 118;
    private static final int RIGHT = 190;
    private static final int TOP = 92;
    private static final int MOST_CELLS = 1600;
    private static final Color NOT_READ = new Color(StateStyle.OFF_CURVE.rgb());

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        draw().write(png);
    }

    private List<Profile.Point> line() {
        return profiles.stream().flatMap(Optional::stream).findFirst().orElseThrow().points();
    }

    private int samples() {
        return line().size();
    }

    /** Length of the line, pixels. */
    private double length() {
        return line().get(samples() - 1).distance();
    }

    /** Thickness of one sample of the line in every photo, nm. */
    private float[] row(int sample) {
        float[] row = new float[profiles.size()];
        for (int i = 0; i < row.length; i++) {
            row[i] = profiles.get(i).map(p -> (float) p.points().get(sample).average().thickness()).orElse(Float.NaN);
        }
        return row;
    }

    /**
     * Writes the numbers as a 32-bit TIFF, nm, NaN where not read: one column per photo, one row per sample of the line.
     *
     * @throws OutputException if the file cannot be written
     */
    public void writeNumbers(Path tiff) {
        try (TiffWriter out = MapTiff.nanometres(tiff, profiles.size(), samples(), Double.NaN)) {
            for (int sample = 0; sample < samples(); sample++) {
                out.writeRows(sample, row(sample));
            }
        }
    }

    Picture draw() {
        MapCells cells = MapCells.of(profiles.size(), samples(), MOST_CELLS);
        for (int sample = 0; sample < samples(); sample++) {
            float[] row = row(sample);
            byte[] states = new byte[row.length];
            for (int i = 0; i < row.length; i++) {
                states[i] = (Float.isNaN(row[i]) ? State.OFF_CURVE : State.READ).code();
            }
            cells.add(sample, row, states);
        }
        MapFigure scale = MapFigure.of(title, cells, Double.NaN);
        Picture picture = new Picture(WIDTH, HEIGHT);
        picture.font(Picture.TITLE, true);
        picture.text(picture.fitted(title, WIDTH - 40.0), 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.TEXT, false);
        boolean gaps = IntStream.range(0, cells.columns() * cells.rows()).anyMatch(i -> !cells.state(i).hasThickness());
        picture.text(picture.fitted(remark + (gaps ? "; grey where nothing was read" : ""), WIDTH - 40.0), 20, 66, Picture.Align.LEFT, Picture.SOFT);
        int width = WIDTH - LEFT - RIGHT;
        int height = HEIGHT - TOP - 80;
        drawCells(picture, cells, scale, width, height);
        TimeUnit time = TimeUnit.of((profiles.size() - 1) * interval);
        LengthUnit length = LengthUnit.of(length(), pixelUm);
        double step = interval / time.seconds();
        // Turned upside down: the line runs downwards from its start, which lies in the middle of the first row.
        double half = 0.5 * length() / Math.max(1, samples() - 1);
        Axes axes = new Axes(picture, LEFT, TOP, width, height, -0.5 * step, (profiles.size() - 0.5) * step,
                -(length() + half) * length.perPixel(), half * length.perPixel());
        picture.frame(LEFT, TOP, width, height);
        axes.xAxis(Picture.TEXT);
        double widest = distances(axes);
        picture.text("Time (" + time.name() + ")", LEFT + width / 2.0, TOP + height + 54, Picture.Align.CENTRE, Picture.INK);
        picture.textUpwards("Distance along the line (" + length.name() + ")", LEFT - widest - 30, TOP + height / 2.0, Picture.INK);
        ColourBar.draw(picture, LEFT + width + 36, TOP, height, "Thickness (nm)", scale.fromNm(), scale.toNm());
        return picture;
    }

    private static void drawCells(Picture picture, MapCells cells, MapFigure scale, int width, int height) {
        int[] pixels = picture.pixels();
        for (int y = 0; y < height; y++) {
            int row = (int) ((long) y * cells.rows() / height);
            for (int x = 0; x < width; x++) {
                int cell = row * cells.columns() + (int) ((long) x * cells.columns() / width);
                double share = (cells.mean(cell) - scale.fromNm()) / (scale.toNm() - scale.fromNm());
                pixels[(TOP + y) * picture.width() + LEFT + x] = cells.state(cell).hasThickness()
                        ? ColourScale.thickness().rgb(ColourScale.index(share)) : NOT_READ.getRGB();
            }
        }
    }

    /** Draws the ticks of the distance, which grows downwards, and tells how wide the labels are. */
    private static double distances(Axes axes) {
        Ticks ticks = axes.yTicks();
        Picture picture = axes.picture();
        double widest = 0;
        for (double y : ticks.at()) {
            String label = ticks.label(-y);
            picture.line(axes.left() - 6, axes.py(y), axes.left(), axes.py(y), Picture.INK, 1);
            picture.text(label, axes.left() - 11, axes.py(y) + 6, Picture.Align.RIGHT, Picture.INK);
            widest = Math.max(widest, picture.widthOf(label));
        }
        return widest;
    }
}
