package iridepth.report;

import iridepth.quality.Average;
import iridepth.quality.Position;
import iridepth.quality.Profile;
import iridepth.quality.Tolerance;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * A profile as a figure, thickness with the band of its expanded uncertainty, and as a table.
 *
 * @param title     what the map shows
 * @param remark    where the profile runs
 * @param axis      quantity along x
 * @param profile   the profile
 * @param start     where a line starts; empty for a radial profile
 * @param end       where it ends; empty likewise
 * @param pixelUm   edge of a pixel in um, NaN if unknown
 * @param tolerance limits, if any
 */
public record ProfileFigure(String title, String remark, String axis, Profile profile, Optional<Position> start,
                            Optional<Position> end, double pixelUm, Optional<Tolerance> tolerance) {
    /** Coverage factor of the band. */
    private static final double COVERAGE = 2;
    /** A limit farther from the thicknesses than this many times their range would flatten the curve and is left out. */
    private static final double FAR = 3;

    /** A profile along a line. */
    public static ProfileFigure along(String title, Profile profile, Position start, Position end, int width, double pixelUm,
                                      Optional<Tolerance> tolerance) {
        String remark = "from " + text(start) + " to " + text(end) + (width > 1 ? ", mean of " + width + " samples across" : "");
        return new ProfileFigure(title, remark, "Distance", profile, Optional.of(start), Optional.of(end), pixelUm, tolerance);
    }

    /** A radial profile. */
    public static ProfileFigure radial(String title, Profile profile, Position centre, double ring, double pixelUm,
                                       Optional<Tolerance> tolerance) {
        String remark = "about " + text(centre) + ", mean of rings of " + Numbers.significant(ring, 4)
                + (ring == 1 ? " pixel" : " pixels");
        return new ProfileFigure(title, remark, "Radius", profile, Optional.empty(), Optional.empty(), pixelUm, tolerance);
    }

    private static String text(Position p) {
        return "(" + Numbers.significant(p.x(), 7) + ", " + Numbers.significant(p.y(), 7) + ")";
    }

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        figure().write(png);
    }

    LineFigure figure() {
        List<Profile.Point> points = profile.points();
        LengthUnit unit = LengthUnit.of(points.get(points.size() - 1).distance(), pixelUm);
        double[] x = points.stream().mapToDouble(p -> p.distance() * unit.perPixel()).toArray();
        double[] y = points.stream().mapToDouble(p -> p.average().thickness()).toArray();
        double[] half = points.stream().mapToDouble(p -> COVERAGE * p.average().standardUncertainty()).toArray();
        Curve curve = Curve.line("thickness, with the band of its expanded uncertainty (k = 2)", x, y).withHalfWidth(half);
        LineFigure figure = LineFigure.of(title, axis + " (" + unit.name() + ")", "Thickness (nm)").remark("Profile " + remark)
                .with(curve);
        return limited(figure, Span.NONE.with(y).with(curve.lower()).with(curve.upper()));
    }

    private LineFigure limited(LineFigure figure, Span seen) {
        LineFigure limited = figure;
        double reach = FAR * (seen.to() - seen.from());
        if (tolerance.isPresent()) {
            Tolerance t = tolerance.get();
            if (t.lower() > seen.from() - reach) {
                limited = limited.yLimit("lower limit", t.lower());
            }
            if (t.upper() < seen.to() + reach) {
                limited = limited.yLimit("upper limit", t.upper());
            }
        }
        return limited;
    }

    /** The profile as a table, one row per point. */
    public CsvTable csv() {
        boolean line = start.isPresent();
        boolean scaled = !Double.isNaN(pixelUm);
        String distance = line ? "distance" : "radius";
        List<String> columns = new ArrayList<>(List.of(distance + "_px"));
        if (scaled) {
            columns.add(distance + "_um");
        }
        if (line) {
            columns.addAll(List.of("x_px", "y_px"));
        }
        columns.addAll(List.of("readings", "thickness_nm", "spread_nm", "random_nm", "systematic_nm", "uncertainty_nm"));
        CsvTable table = CsvTable.of(List.of(title + ": profile " + remark,
                "spread: standard deviation of the readings of a point; random, systematic: parts of the standard uncertainty of "
                + "their mean; uncertainty: both together"), columns);
        for (Profile.Point point : profile.points()) {
            table.row(row(point, scaled).toArray());
        }
        return table;
    }

    private List<Object> row(Profile.Point point, boolean scaled) {
        List<Object> row = new ArrayList<>(List.of(point.distance()));
        if (scaled) {
            row.add(point.distance() * pixelUm);
        }
        if (start.isPresent()) {
            Position from = start.get();
            Position to = end.orElseThrow();
            double share = point.distance() / from.distanceTo(to);
            row.add(from.x() + share * (to.x() - from.x()));
            row.add(from.y() + share * (to.y() - from.y()));
        }
        Average a = point.average();
        row.addAll(List.of(a.count(), a.thickness(), a.spread(), a.random(), a.systematic(), a.standardUncertainty()));
        return row;
    }
}
