package iridepth.report;

import iridepth.calibration.StepDesign;
import iridepth.planning.ConfusablePair;
import iridepth.planning.ExpectedUncertainty;
import iridepth.planning.Forecast;
import iridepth.planning.LightChoice.Option;
import iridepth.planning.Plan;
import iridepth.planning.Plan;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;

/**
 * A plan on paper: what single pixels of a rig will tell of a film, against thickness, as a figure, a table and a few lines.
 *
 * @param title      what is planned
 * @param conditions view, camera and so on, a line each
 * @param plan       the plan
 * @param limit      chi-square up to which two thicknesses are confusable
 */
public record PlanSheet(String title, List<String> conditions, Plan plan, double limit) {
    private static final int MOST_PAIRS = 5;
    private static final int UPPER = 620;
    private static final int LOWER = 640;
    private static final double TABLE_STEP_NM = 1;
    /** Where uncertainty runs off the figure: above so many times its median. */
    private static final double CUT = 8;

    private Forecast forecast() {
        return plan.option().forecast();
    }

    private static String nm(double value) {
        return Numbers.fixed(value, value == 0 ? 0 : value < 10 ? 2 : 1);
    }

    /** A few lines for people. */
    public String text() {
        StringBuilder text = new StringBuilder(title).append('\n');
        conditions.forEach(line -> text.append(line).append('\n'));
        text.append("light        ").append(plan.option().name()).append(plan.option().lights().size() > 1 ? ", read jointly\n" : "\n");
        double[] sorted = values(ExpectedUncertainty::combinedNm);
        Arrays.sort(sorted);
        text.append(String.format(Locale.ROOT, "uncertainty  of one pixel: median %s nm, 90 %% below %s nm (standard)\n",
                nm(sorted[sorted.length / 2]), nm(sorted[(int) (0.9 * (sorted.length - 1))])));
        text.append(String.format(Locale.ROOT, "             median of its parts: random %s nm, systematic %s nm\n",
                nm(median(ExpectedUncertainty::randomNm)), nm(median(ExpectedUncertainty::systematicNm))));
        text.append(order());
        plan.design().ifPresent(d -> text.append(steps(d)));
        if (!plan.ranked().isEmpty()) {
            text.append(ranking());
        }
        return text.toString();
    }

    private double[] values(ToDoubleFunction<ExpectedUncertainty> part) {
        double[] values = new double[forecast().size()];
        Arrays.setAll(values, i -> part.applyAsDouble(forecast().uncertainty(i)));
        return values;
    }

    private double median(ToDoubleFunction<ExpectedUncertainty> part) {
        double[] sorted = values(part);
        Arrays.sort(sorted);
        return sorted[sorted.length / 2];
    }

    private String order() {
        Forecast f = forecast();
        if (f.stretches().isEmpty()) {
            return "order        no two thicknesses are confusable: every pixel tells its order\n";
        }
        StringBuilder text = new StringBuilder(String.format(Locale.ROOT,
                "order        a pixel alone takes a wrong one in %.2f %% of cases; %.1f %% of the thicknesses are confusable\n",
                100 * f.meanWrongOrder(), 100 * f.doubtfulShare()));
        text.append(String.format(Locale.ROOT, "             free of doubt: a range from %s to %s nm\n",
                nm(f.thickness(0)), nm(f.freeToNm())));
        text.append(String.format(Locale.ROOT, "pairs        %d confusable pairs of thicknesses 1 nm apart (chi-square up to %s), in %d "
                + "stretches%s\n", f.confusablePairs(), Numbers.significant(limit, 4), f.stretches().size(),
                f.stretches().size() > MOST_PAIRS ? "; the widest:" : ":"));
        f.stretches().stream().sorted(Comparator.comparingDouble(p -> p.thinFromNm() - p.thinToNm())).limit(MOST_PAIRS)
                .forEach(p -> text.append("             ").append(words(p)).append('\n'));
        return text.toString();
    }

    private static String words(ConfusablePair p) {
        return String.format(Locale.ROOT, "%s-%s nm and %s-%s nm, least chi-square %s", nm(p.thinFromNm()), nm(p.thinToNm()),
                nm(p.thickFromNm()), nm(p.thickToNm()), Numbers.fixed(p.chiSquare(), 1));
    }

    private static String steps(StepDesign design) {
        String films = Arrays.stream(design.thicknesses()).mapToObj(d -> Numbers.fixed(d, 0)).collect(Collectors.joining(", "));
        StringBuilder text = new StringBuilder(String.format(Locale.ROOT,
                "steps        calibrate with %d: %s nm\n", design.thicknesses().length, films));
        text.append("             mean systematic uncertainty by number of steps:");
        double[] means = design.meanByCount();
        for (int n = 2; n <= means.length; n++) {
            text.append(n == 2 ? " " : ", ").append(n).append(": ").append(Numbers.fixed(means[n - 1], 2));
        }
        return text.append(" nm\n").toString();
    }

    private String ranking() {
        StringBuilder text = new StringBuilder(String.format(Locale.ROOT, "lights       %-52s %9s %11s %7s %9s %9s\n", "",
                "wrong %", "confus. %", "pairs", "free to", "median u"));
        for (Option o : plan.ranked()) {
            Forecast f = o.forecast();
            text.append(String.format(Locale.ROOT, "             %-52s %9.2f %11.1f %7d %9s %9s\n", o.name(),
                    100 * f.meanWrongOrder(), 100 * f.doubtfulShare(), f.confusablePairs(), nm(f.freeToNm()),
                    nm(f.medianUncertaintyNm())));
        }
        return text.toString();
    }

    /** The table: a row about every nanometre; the confusable pairs and the lights compared stand in its remarks. */
    public CsvTable csv() {
        Forecast f = forecast();
        List<String> remarks = new ArrayList<>(List.of(title));
        remarks.addAll(conditions);
        remarks.add("light: " + plan.option().name());
        f.stretches().forEach(p -> remarks.add("confusable: " + words(p)));
        plan.design().ifPresent(d -> steps(d).lines().forEach(remarks::add));
        if (!plan.ranked().isEmpty()) {
            ranking().lines().forEach(remarks::add);
        }
        remarks.add("random_nm, systematic_nm, combined_nm: standard uncertainty to expect of one pixel");
        remarks.add("rivals: other thicknesses that are confusable; wrong_order: probability that a pixel alone takes one of them");
        CsvTable table = CsvTable.of(remarks, List.of("thickness_nm", "random_nm", "systematic_nm", "combined_nm", "rivals",
                "wrong_order"));
        int stride = (int) Math.max(1, Math.round(TABLE_STEP_NM / (f.thickness(1) - f.thickness(0))));
        for (int i = 0; i < f.size(); i += stride) {
            ExpectedUncertainty u = f.uncertainty(i);
            table.row(Numbers.fixed(f.thickness(i), 3), Numbers.significant(u.randomNm(), 4),
                    Numbers.significant(u.systematicNm(), 4), Numbers.significant(u.combinedNm(), 4), f.rivals(i),
                    Numbers.significant(f.wrongOrder(i), 3));
        }
        return table;
    }

    /**
     * Draws the uncertainty and, below it, the confusable thicknesses against each other.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        Forecast f = forecast();
        double[] x = new double[f.size()];
        Arrays.setAll(x, f::thickness);
        String remark = plan.option().name() + "; " + String.join("; ", conditions);
        LineFigure upper = LineFigure.of(title, "thickness (nm)", "standard uncertainty of one pixel (nm)").remark(remark)
                .zeroBased().with(Curve.line("combined", x, cut(values(ExpectedUncertainty::combinedNm))))
                .with(Curve.line("random part", x, cut(values(ExpectedUncertainty::randomNm))));
        if (plan.option().curve().hasCovariance()) {
            upper = upper.with(Curve.line("systematic part", x, cut(values(ExpectedUncertainty::systematicNm))));
        }
        if (plan.design().isPresent()) {
            double[] steps = plan.design().get().thicknesses();
            upper = upper.with(Curve.points("steps to calibrate with", steps, level(steps.length)));
        }
        if (f.stretches().isEmpty()) {
            LineFigure.write(png, List.of(upper), UPPER + 80);
            return;
        }
        double[] wrong = new double[x.length];
        Arrays.setAll(wrong, i -> 100 * f.wrongOrder(i));
        LineFigure lower = LineFigure.of("", "thickness (nm)", "pixels that take a wrong order (%)").zeroBased()
                .with(Curve.line("wrong order, each pixel on its own", x, wrong).inColour(0xCC79A7))
                .xLimit("a range up to here is free of order doubt", f.freeToNm());
        LineFigure.write(png, List.of(upper, lower), UPPER, LOWER);
    }

    /** A level just above the axis, so that points on it show whole. */
    private double[] level(int count) {
        double[] level = new double[count];
        Arrays.fill(level, 0.03 * Arrays.stream(cut(values(ExpectedUncertainty::combinedNm))).filter(v -> !Double.isNaN(v)).max()
                .orElse(1));
        return level;
    }

    /** The values as far as they stay on the figure. */
    private double[] cut(double[] values) {
        double most = CUT * median(ExpectedUncertainty::combinedNm);
        return Arrays.stream(values).map(v -> v > most ? Double.NaN : v).toArray();
    }
}
