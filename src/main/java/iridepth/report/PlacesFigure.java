package iridepth.report;

import iridepth.quality.AreaStatistics;
import iridepth.quality.Average;
import iridepth.quality.NonUniformity;
import iridepth.quality.Tolerance;
import iridepth.quality.Uniformity;
import iridepth.quality.Verdict;
import java.awt.Color;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * What has been measured at places of a map: a figure with their outlines on the map, and a table.
 *
 * @param map       the map
 * @param places    the places
 * @param measured  the readings of each
 * @param tolerance limits for the mean of each, if any
 */
public record PlacesFigure(MapFigure map, List<Place> places, List<AreaStatistics> measured, Optional<Tolerance> tolerance) {
    private static final Color RIM = new Color(0x101010);
    private static final Color LABEL = new Color(255, 255, 255, 215);
    private static final double COVERAGE = 2;

    public PlacesFigure {
        places = List.copyOf(places);
        measured = List.copyOf(measured);
    }

    /**
     * How the mean of a place stands against the limits, with the expanded uncertainty (k = 2) as guard band.
     *
     * @return empty if there are no limits
     */
    public Optional<Verdict> verdict(int place) {
        Average mean = measured.get(place).average();
        return tolerance.map(t -> mean.count() == 0 ? Verdict.UNDECIDED
                : t.verdict(mean.thickness(), COVERAGE * mean.standardUncertainty()));
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
        Picture picture = map.draw();
        PixelAxes axes = map.axes();
        picture.graphics().setClip(axes.left(), axes.top(), axes.width(), axes.height());
        AffineTransform toSheet = new AffineTransform(axes.zoom(), 0, 0, axes.zoom(), axes.left(), axes.top());
        for (Place place : places) {
            Shape outline = toSheet.createTransformedShape(place.outline());
            picture.stroke(outline, RIM, 3.6);
            picture.stroke(outline, Color.WHITE, 1.6);
        }
        picture.font(Picture.SMALL, true);
        for (Place place : places) {
            Rectangle2D box = toSheet.createTransformedShape(place.outline()).getBounds2D();
            double width = picture.widthOf(place.name()) + 6;
            double right = Math.min(box.getMaxX() + 4, axes.left() + axes.width() - width);
            double y = Math.max(axes.top() + 9, box.getCenterY());
            picture.fill(right, y - 9, width, 19, LABEL);
            picture.text(place.name(), right + 3, y + 6, Picture.Align.LEFT, Picture.INK);
        }
        picture.graphics().setClip(null);
        return picture;
    }

    /** The readings as a table, one row per place. */
    public CsvTable csv() {
        List<String> columns = new ArrayList<>(List.of("place", "x_px", "y_px", "pixels", "readings", "mean_nm", "sd_nm", "median_nm",
                "min_nm", "max_nm", "sd_over_mean_percent", "half_range_over_mean_percent", "random_nm", "systematic_nm",
                "uncertainty_nm"));
        tolerance.ifPresent(t -> columns.add("verdict"));
        CsvTable table = CsvTable.of(List.of(map.title() + ": thickness at places",
                "pixels: of the place on the map; readings: those of them that were read; sd: of the readings about their mean; random, "
                + "systematic: parts of the standard uncertainty of the mean; uncertainty: both together"), columns);
        for (int i = 0; i < places.size(); i++) {
            Place place = places.get(i);
            AreaStatistics m = measured.get(i);
            Uniformity u = m.uniformity();
            Average a = m.average();
            List<Object> row = new ArrayList<>(List.of(place.name(), place.centre().x(), place.centre().y(), m.pixels(), a.count(),
                    a.thickness(), a.spread(), u.median(), u.min(), u.max(), NonUniformity.SIGMA.percent(u),
                    NonUniformity.HALF_RANGE.percent(u), a.random(), a.systematic(), a.standardUncertainty()));
            verdict(i).ifPresent(v -> row.add(v.words()));
            table.row(row.toArray());
        }
        return table;
    }
}
