package iridepth.report;

import iridepth.quality.Distribution;
import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import java.awt.Color;
import java.awt.geom.Line2D;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * The thicknesses of a map as a histogram, with their mean and the limits they are held to; bars beyond a limit have another
 * colour.
 *
 * @param title        what the map shows
 * @param remarks      lines below the title, such as the count of every state
 * @param histogram    the histogram
 * @param distribution the distribution that it shows
 * @param tolerance    the limits, if any
 */
public record HistogramFigure(String title, List<String> remarks, Histogram histogram, Distribution distribution,
                              Optional<Tolerance> tolerance) {
    private static final int WIDTH = 1200;
    private static final int HEIGHT = 800;
    private static final int LEFT = 124;
    private static final Color INSIDE = new Color(0x4A86B8);
    private static final Color OUTSIDE = new Color(0xD55E00);
    private static final Color LIMIT = new Color(0x8A2500);
    private static final float[] DASHES = {9, 4};
    /** A limit farther from the thicknesses than this many times their range is told in words only. */
    private static final double FAR = 3;
    /** Share of the pixels at either end that may lie beyond the axis, so that a few stray ones do not squash the rest. */
    private static final double STRAY = 0.001;

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
        picture.text(picture.fitted(title, WIDTH - 40.0), 20, 38, Picture.Align.LEFT, Picture.INK);
        picture.font(Picture.TEXT, false);
        int y = 66;
        for (String remark : remarks) {
            picture.text(picture.fitted(remark, WIDTH - 40.0), 20, y, Picture.Align.LEFT, Picture.SOFT);
            y += 25;
        }
        int top = legend(picture, y + 6) + 14;
        if (histogram.bins() == 0) {
            picture.text("No pixel has been read.", WIDTH / 2.0, HEIGHT / 2.0, Picture.Align.CENTRE, Picture.INK);
            return picture;
        }
        Axes axes = axes(picture, top);
        axes.grid();
        drawBars(axes);
        drawLines(axes);
        axes.full("Thickness (nm), bins of " + Numbers.significant(histogram.width(), 6) + " nm" + beyond(axes), "Pixels");
        return picture;
    }

    /** The thicknesses to show: those of all but a few pixels, with half as much on either side. */
    private Span core() {
        Span most = new Span(distribution.percentile(100 * STRAY), distribution.percentile(100 - 100 * STRAY)).widened(0.5);
        return new Span(Math.max(most.from(), histogram.edge(0)), Math.min(most.to(), histogram.edge(histogram.bins())));
    }

    private String beyond(Axes axes) {
        long count = 0;
        for (int i = 0; i < histogram.bins(); i++) {
            count += histogram.centre(i) < axes.x0() || histogram.centre(i) > axes.x1() ? histogram.count(i) : 0;
        }
        return count == 0 ? "" : "; " + count + (count == 1 ? " pixel lies" : " pixels lie") + " beyond the axis";
    }

    private boolean shown(double limit) {
        Span core = core();
        double reach = FAR * (core.to() - core.from());
        return Double.isFinite(limit) && limit > core.from() - reach && limit < core.to() + reach;
    }

    Axes axes(Picture picture, int top) {
        Span span = core();
        for (double limit : limits()) {
            span = shown(limit) ? span.with(limit) : span;
        }
        Span x = span.widened(0.03);
        long most = 1;
        for (int i = 0; i < histogram.bins(); i++) {
            most = Math.max(most, histogram.count(i));
        }
        return new Axes(picture, LEFT, top, WIDTH - LEFT - 40, HEIGHT - top - 80, x.from(), x.to(), 0, 1.05 * most);
    }

    private double[] limits() {
        return tolerance.map(t -> new double[] {t.lower(), t.upper()}).orElse(new double[0]);
    }

    private void drawBars(Axes axes) {
        axes.clipped(() -> drawEachBar(axes));
    }

    private void drawEachBar(Axes axes) {
        for (int i = 0; i < histogram.bins(); i++) {
            double left = axes.px(histogram.edge(i));
            double right = axes.px(histogram.edge(i + 1));
            double gap = right - left > 4 ? 1 : 0;
            double centre = histogram.centre(i);
            boolean outside = tolerance.isPresent() && (centre < tolerance.get().lower() || centre > tolerance.get().upper());
            double height = axes.py(0) - axes.py(histogram.count(i));
            axes.picture().fill(left, axes.py(histogram.count(i)), right - left - gap, height, outside ? OUTSIDE : INSIDE);
        }
    }

    private void drawLines(Axes axes) {
        axes.clipped(() -> {
            for (double limit : limits()) {
                axes.picture().stroke(upright(axes, limit), LIMIT, 2, DASHES);
            }
            axes.picture().stroke(upright(axes, distribution.mean()), Picture.INK, 2);
        });
    }

    private static Line2D upright(Axes axes, double x) {
        return new Line2D.Double(axes.px(x), axes.top(), axes.px(x), axes.top() + axes.height());
    }

    private int legend(Picture picture, int firstLine) {
        Legend legend = new Legend(picture, 20, firstLine);
        if (histogram.bins() > 0) {
            legend.entry("mean " + nm(distribution.mean()), (x, y) -> line(picture, x, y, Picture.INK));
        }
        tolerance.ifPresent(t -> {
            legend.entry(words(t), (x, y) -> line(picture, x, y, LIMIT, DASHES));
            if (distribution.count() > 0) {
                double beyond = 1 - distribution.shareWithin(t.lower(), t.upper());
                legend.entry(String.format(Locale.ROOT, "beyond the limits: %.2f %%", 100 * beyond),
                        (x, y) -> picture.fill(x, y - 8, Legend.SAMPLE, 16, OUTSIDE));
            }
        });
        return legend.bottom();
    }

    private static void line(Picture picture, double x, double y, Color ink, float... dashes) {
        picture.stroke(new Line2D.Double(x, y, x + Legend.SAMPLE, y), ink, 2, dashes);
    }

    private static String nm(double value) {
        return Numbers.fixed(value, 2) + " nm";
    }

    private static String words(Tolerance t) {
        if (Double.isInfinite(t.lower())) {
            return "upper limit " + Numbers.significant(t.upper(), 6) + " nm";
        }
        return Double.isInfinite(t.upper()) ? "lower limit " + Numbers.significant(t.lower(), 6) + " nm"
                : "limits " + Numbers.significant(t.lower(), 6) + " to " + Numbers.significant(t.upper(), 6) + " nm";
    }

    /** The histogram as a table: lower and upper edge of every bin, its count and its share of all readings. */
    public CsvTable csv() {
        CsvTable table = CsvTable.of(List.of("Histogram of film thickness: " + title, "share: of the pixels that were read"),
                List.of("from_nm", "to_nm", "pixels", "share"));
        for (int i = 0; i < histogram.bins(); i++) {
            table.row(histogram.edge(i), histogram.edge(i + 1), histogram.count(i),
                    (double) histogram.count(i) / histogram.total());
        }
        return table;
    }
}
