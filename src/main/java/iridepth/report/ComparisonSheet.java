package iridepth.report;

import iridepth.quality.Agreement;
import iridepth.quality.Comparison;
import iridepth.quality.Comparison.Point;
import iridepth.quality.DemingRegression;
import iridepth.quality.Estimate;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;

/**
 * A map against a reference instrument on paper: figure, table and a few lines.
 *
 * @param title      what is compared
 * @param comparison the comparison
 */
public record ComparisonSheet(String title, Comparison comparison) {
    private static final int UPPER = 640;
    private static final int LOWER = 640;

    private static String nm(double value) {
        return Numbers.fixed(value, 2);
    }

    private static String interval(Estimate e, String unit) {
        return Double.isNaN(e.lower()) ? nm(e.value()) + unit
                : String.format(Locale.ROOT, "%s%s (95 %%: %s to %s)", nm(e.value()), unit, nm(e.lower()), nm(e.upper()));
    }

    /** A few lines for people. */
    public String text() {
        Agreement a = comparison.agreement();
        StringBuilder text = new StringBuilder(title).append('\n');
        text.append(String.format(Locale.ROOT, "points       %d of %d read\n", comparison.read(), comparison.points().size()));
        text.append("bias         ").append(interval(a.bias(), " nm"));
        text.append(a.bias().covers(0) ? ": none shown\n" : "\n");
        if (a.pairs() > 1) {
            text.append("scatter      standard deviation of the differences ").append(nm(a.standardDeviation())).append(" nm\n");
            text.append("agreement    about 95 % of differences lie between ").append(interval(a.lowerLimit(), ""))
                    .append("\n             and ").append(interval(a.upperLimit(), " nm")).append('\n');
        }
        if (a.pairs() > 2) {
            text.append("             the difference changes by ").append(interval(a.proportionalBias(), " nm per nm of thickness"))
                    .append(a.proportionalBias().covers(0) ? ": no trend shown\n" : "\n");
        }
        double share = comparison.errors().satisfactoryShare();
        text.append(Double.isNaN(share) ? "E_n          none: the points state no uncertainty\n"
                : String.format(Locale.ROOT, "E_n          within 1 at %.0f %% of the points; largest %s%s\n", 100 * share,
                        nm(largest()), share < 0.8 ? ": the stated uncertainties are too small" : ""));
        comparison.regression().ifPresent(r -> text.append(String.format(Locale.ROOT,
                "line         reading = %s + %s x reference, nm (Deming, ratio of error variances %s)\n",
                interval(r.intercept(), ""), factor(r.slope()), Numbers.significant(r.varianceRatio(), 3))));
        return text.toString();
    }

    private static String factor(Estimate slope) {
        return String.format(Locale.ROOT, "%.4f (95 %%: %.4f to %.4f)", slope.value(), slope.lower(), slope.upper());
    }

    private double largest() {
        return IntStream.range(0, comparison.errors().pairs()).mapToDouble(i -> Math.abs(comparison.errors().score(i)))
                .filter(e -> !Double.isNaN(e)).max().orElse(Double.NaN);
    }

    /** The points, with the results in the remarks. */
    public CsvTable csv() {
        List<String> remarks = text().lines().toList();
        CsvTable table = CsvTable.of(remarks, List.of("x", "y", "reference_nm", "reference_uncertainty_nm", "reading_nm",
                "random_nm", "systematic_nm", "readings", "difference_nm", "E_n"));
        for (int i = 0; i < comparison.points().size(); i++) {
            Point p = comparison.points().get(i);
            table.row(p.reference().position().x(), p.reference().position().y(), p.reference().thicknessNm(),
                    p.reference().uncertaintyNm(), Numbers.fixed(p.reading().thickness(), 4), Numbers.significant(p.reading().random(), 4),
                    Numbers.significant(p.reading().systematic(), 4), p.reading().count(), Numbers.fixed(p.difference(), 4),
                    Numbers.fixed(comparison.errors().score(i), 3));
        }
        return table;
    }

    /**
     * Draws the differences over the means, with bias and limits of agreement, and below them reading over reference.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        List<Point> read = comparison.points().stream().filter(p -> p.reading().count() > 0).toList();
        double[] reference = read.stream().mapToDouble(p -> p.reference().thicknessNm()).toArray();
        double[] reading = read.stream().mapToDouble(p -> p.reading().thickness()).toArray();
        double[] mean = IntStream.range(0, read.size()).mapToDouble(i -> (reference[i] + reading[i]) / 2).toArray();
        double[] difference = read.stream().mapToDouble(Point::difference).toArray();
        double[] half = read.stream().mapToDouble(p -> 2 * Math.hypot(p.reading().standardUncertainty(),
                Double.isNaN(p.reference().uncertaintyNm()) ? 0 : p.reference().uncertaintyNm())).toArray();
        LineFigure upper = LineFigure.of(title, "mean of reading and reference (nm)", "reading less reference (nm)")
                .remark("limits of agreement by Bland and Altman; bands: 95 % intervals; bars: expanded uncertainties of both");
        Agreement a = comparison.agreement();
        upper = upper.with(level("bias", a.bias(), mean, 0x0072B2));
        if (a.pairs() > 1) {
            upper = upper.with(level("upper limit of agreement", a.upperLimit(), mean, 0xD55E00))
                    .with(level("lower limit of agreement", a.lowerLimit(), mean, 0xD55E00));
        }
        upper = upper.with(Curve.points("points", mean, difference).withHalfWidth(half).inColour(0x1A1A1A));
        double[] ends = ends(reference);
        LineFigure lower = LineFigure.of("", "reference (nm)", "reading (nm)").with(Curve.line("equal", ends, ends).inColour(0x8A8A8A));
        if (comparison.regression().isPresent()) {
            DemingRegression line = comparison.regression().get();
            lower = lower.with(Curve.line("Deming regression", ends, Arrays.stream(ends).map(line::at).toArray()));
        }
        lower = lower.with(Curve.points("points", reference, reading).inColour(0x1A1A1A));
        LineFigure.write(png, List.of(upper, lower), UPPER, LOWER);
    }

    private static double[] ends(double[] values) {
        double least = Arrays.stream(values).min().orElse(0);
        double most = Arrays.stream(values).max().orElse(1);
        double margin = most > least ? 0.02 * (most - least) : 1;
        return new double[] {least - margin, most + margin};
    }

    private static Curve level(String name, Estimate e, double[] over, int rgb) {
        double[] ends = ends(over);
        boolean known = !Double.isNaN(e.lower());
        return new Curve(name, ends, new double[] {e.value(), e.value()}, known ? new double[] {e.lower(), e.lower()} : new double[0],
                known ? new double[] {e.upper(), e.upper()} : new double[0], false, rgb);
    }
}
