package iridepth.report;

import iridepth.photo.Region;
import iridepth.quality.Estimate;
import iridepth.quality.Repeatability;
import iridepth.quality.Tolerance;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * Repeated maps of one part on paper: figure, table and a few lines.
 *
 * @param title         what was repeated
 * @param names         name of each map
 * @param width         pixels a row
 * @param repeatability the maps gathered
 * @param regions       regions to look at one by one; may be empty
 * @param tolerance     the limits that the part is held to, if any
 */
public record RepeatSheet(String title, List<String> names, int width, Repeatability repeatability, List<Region> regions,
                          Optional<Tolerance> tolerance) {
    private static final int HEIGHT = 640;

    private static String nm(double value) {
        return Numbers.fixed(value, 3);
    }

    private double inRegion(Region r) {
        return repeatability.standardDeviation(i -> i % width >= r.x() && i % width < r.x() + r.width() && i / width >= r.y()
                && i / width < r.y() + r.height());
    }

    /** A few lines for people. */
    public String text() {
        StringBuilder text = new StringBuilder(title).append('\n');
        double sr = repeatability.standardDeviation();
        text.append(String.format(Locale.ROOT, "within pixel s_r = %s nm; two readings of a pixel differ by less than %s nm in 95 %% of "
                + "cases\n", nm(sr), nm(repeatability.limit())));
        text.append(String.format(Locale.ROOT, "whole maps   shift against each other by %s nm (standard deviation); without it s_r is "
                + "%s nm\n", nm(repeatability.shiftStandardDeviation()), nm(repeatability.noise())));
        if (names.size() > 2) {
            Estimate drift = repeatability.drift();
            text.append(String.format(Locale.ROOT, "drift        %s nm per map (95 %%: %s to %s)%s\n", nm(drift.value()), nm(drift.lower()),
                    nm(drift.upper()), drift.covers(0) ? ": none shown" : ""));
        }
        for (Region region : regions) {
            text.append(String.format(Locale.ROOT, "region       %s: s_r = %s nm\n", region, nm(inRegion(region))));
        }
        tolerance.ifPresent(t -> text.append(ratio(sr, t)));
        return text.toString();
    }

    private static String ratio(double sr, Tolerance t) {
        double percent = 100 * 6 * sr / (t.upper() - t.lower());
        return String.format(Locale.ROOT, "tolerance    6 s_r is %.1f %% of the %s to %s nm: %s\n", percent,
                Numbers.significant(t.lower(), 6), Numbers.significant(t.upper(), 6), GaugeSheet.fitness(percent));
    }

    /** A row for each map, and in the remarks what they amount to. */
    public CsvTable csv() {
        List<String> remarks = new ArrayList<>(text().lines().toList());
        remarks.add("shift_nm: mean difference from the first map over the pixels that both read");
        CsvTable table = CsvTable.of(remarks, List.of("map", "name", "pixels", "mean_nm", "shared_pixels", "shift_nm"));
        for (int i = 0; i < names.size(); i++) {
            Repeatability.Run run = repeatability.runs().get(i);
            table.row(i + 1, names.get(i), run.read(), run.mean(), run.shared(), Numbers.fixed(run.shift(), 5));
        }
        return table;
    }

    /**
     * Draws how the maps shift as wholes, with what repeats of a pixel scatter by.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        double[] number = new double[names.size()];
        Arrays.setAll(number, i -> i + 1);
        double[] shift = repeatability.runs().stream().mapToDouble(Repeatability.Run::shift).toArray();
        LineFigure figure = LineFigure.of(title, "map", "mean difference from the first map (nm)")
                .remark("repeatability standard deviation of a pixel without the shift of whole maps: " + nm(repeatability.noise())
                        + " nm");
        if (names.size() > 2) {
            double slope = repeatability.drift().value();
            double mean = Arrays.stream(shift).average().orElseThrow();
            double middle = (number.length + 1) / 2.0;
            figure = figure.with(Curve.line("drift", number, Arrays.stream(number).map(n -> mean + slope * (n - middle)).toArray())
                    .inColour(0x8A8A8A));
        }
        figure = figure.with(Curve.points("maps", number, shift).inColour(0x0072B2));
        LineFigure.write(png, List.of(figure), HEIGHT);
    }
}
