package iridepth.report;

import iridepth.quality.GaugeComponents;
import iridepth.quality.GaugeStudy;
import iridepth.quality.Tolerance;
import iridepth.quality.VarianceSource;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * A gauge study on paper: figure, table and a few lines.
 *
 * @param title     what was studied
 * @param parts     names of the parts
 * @param operators names of the operators
 * @param values    nm, [part][operator][repeat]
 * @param study     its analysis
 * @param tolerance the limits that parts are held to, if any
 */
public record GaugeSheet(String title, List<String> parts, List<String> operators, double[][][] values, GaugeStudy study,
                         Optional<Tolerance> tolerance) {
    private static final int HEIGHT = 700;
    /** Distance between operators on the axis of parts. */
    private static final double APART = 0.12;

    /** What the share of the tolerance, or of the study variation, that a gauge takes up means: common practice. */
    static String fitness(double percent) {
        return percent < 10 ? "good" : percent <= 30 ? "may do" : "not fit to tell good parts from bad";
    }

    /** A few lines for people. */
    public String text() {
        GaugeComponents c = study.components();
        StringBuilder text = new StringBuilder(title).append('\n');
        text.append(count(study.parts(), "part")).append(" by ").append(count(study.operators(), "operator")).append(" by ")
                .append(count(study.repeats(), "repeat")).append('\n');
        text.append(String.format(Locale.ROOT, "%-17s %4s %12s %12s %9s %8s\n", "source", "DF", "SS / nm2", "MS / nm2", "F", "p"));
        for (VarianceSource s : study.full()) {
            text.append(String.format(Locale.ROOT, "%-17s %4d %12s %12s %9s %8s\n", s.name(), s.degreesOfFreedom(),
                    Numbers.significant(s.sumOfSquares(), 5), Numbers.significant(s.meanSquare(), 5), Numbers.significant(s.f(), 4),
                    Numbers.fixed(s.p(), 4)));
        }
        if (study.pooled()) {
            text.append("part x operator is not significant and pooled into the repeatability\n");
        }
        text.append(String.format(Locale.ROOT, "%-17s %10s %13s %13s%s\n", "component", "sd / nm", "% of variance", "% of study",
                tolerance.isPresent() ? "  % of tolerance" : ""));
        row(text, "repeatability", c.repeatability());
        row(text, "reproducibility", c.reproducibility());
        row(text, "gauge", c.gauge());
        row(text, "parts", c.part());
        double percent = tolerance.map(t -> c.precisionToTolerance(c.gauge(), t)).orElse(c.percentStudyVariation(c.gauge()));
        if (!Double.isNaN(percent)) {
            text.append(String.format(Locale.ROOT, "gauge        takes up %.1f %% of the %s: %s\n", percent,
                    tolerance.isPresent() ? "tolerance" : "spread of the study", fitness(percent)));
        }
        double classes = c.distinctCategories();
        if (!Double.isNaN(classes)) {
            text.append(String.format(Locale.ROOT, "             it tells %s classes of these parts apart%s\n",
                    Double.isInfinite(classes) ? "any number of" : Numbers.fixed(classes, 0), classes < 5 ? "; 5 are wanted" : ""));
        }
        return text.toString();
    }

    private static String count(int n, String what) {
        return n + " " + what + (n == 1 ? "" : "s");
    }

    private void row(StringBuilder text, String name, double variance) {
        GaugeComponents c = study.components();
        text.append(String.format(Locale.ROOT, "%-17s %10s %13s %13s", name, Numbers.fixed(Math.sqrt(variance), 4),
                Numbers.fixed(c.percentContribution(variance), 2), Numbers.fixed(c.percentStudyVariation(variance), 2)));
        tolerance.ifPresent(t -> text.append(String.format(Locale.ROOT, "%16s", Numbers.fixed(c.precisionToTolerance(variance, t), 2))));
        text.append('\n');
    }

    /** The values, and in the remarks the analysis. */
    public CsvTable csv() {
        CsvTable table = CsvTable.of(text().lines().toList(), List.of("part", "operator", "repeat", "thickness_nm"));
        for (int p = 0; p < values.length; p++) {
            for (int o = 0; o < values[p].length; o++) {
                for (int r = 0; r < values[p][o].length; r++) {
                    table.row(parts.get(p), operators.get(o), r + 1, values[p][o][r]);
                }
            }
        }
        return table;
    }

    /**
     * Draws the deviation of every value from its part's mean, part by part, the operators side by side.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        LineFigure figure = LineFigure.of(title, "part", "difference from the mean of the part (nm)")
                .remark("parts in the order of the table: " + String.join(", ", parts));
        int repeats = study.repeats();
        for (int o = 0; o < operators.size(); o++) {
            double[] x = new double[values.length * repeats];
            double[] y = new double[x.length];
            for (int i = 0; i < x.length; i++) {
                int p = i / repeats;
                x[i] = p + 1 + APART * (o - (operators.size() - 1) / 2.0);
                y[i] = values[p][o][i % repeats] - Arrays.stream(values[p]).flatMapToDouble(Arrays::stream).average().orElseThrow();
            }
            figure = figure.with(Curve.points(operators.size() == 1 ? "repeats" : "operator " + operators.get(o), x, y));
        }
        LineFigure.write(png, List.of(figure), HEIGHT);
    }
}
