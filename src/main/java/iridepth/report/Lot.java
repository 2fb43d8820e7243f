package iridepth.report;

import iridepth.quality.RunChart;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import iridepth.reading.State;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Photos read under one recipe, in order.
 *
 * @param title     what they show
 * @param rows      one per photo
 * @param tolerance the recipe's limits, if any
 */
public record Lot(String title, List<LotRow> rows, Optional<Tolerance> tolerance) {
    public Lot {
        rows = List.copyOf(rows);
    }

    /** Mean thickness of the photos in order, with the limits within which they vary by chance. */
    public RunChart means() {
        return RunChart.of(rows.stream().mapToDouble(LotRow::mean).toArray());
    }

    /** Standard deviation of the photos in order, likewise. */
    public RunChart deviations() {
        return RunChart.of(rows.stream().mapToDouble(LotRow::deviation).toArray());
    }

    /** Photos that could not be used. */
    public List<LotRow> unusable() {
        return rows.stream().filter(row -> !row.isUsable()).toList();
    }

    /** How many photos have a verdict. */
    public long count(Verdict verdict) {
        return rows.stream().filter(row -> row.verdict().filter(v -> v == verdict).isPresent()).count();
    }

    /** One line that says how the lot stands. */
    public String words() {
        List<String> words = new ArrayList<>();
        words.add(rows.size() + (rows.size() == 1 ? " photo" : " photos"));
        for (Verdict verdict : Verdict.values()) {
            if (count(verdict) > 0) {
                words.add(count(verdict) + " " + verdict.words());
            }
        }
        if (!unusable().isEmpty()) {
            words.add(unusable().size() + " could not be used");
        }
        return String.join(", ", words);
    }

    /** The lot as a table, one row per photo. */
    public CsvTable csv() {
        List<String> columns = new ArrayList<>(List.of("number", "photo", "result"));
        for (State state : State.values()) {
            columns.add(state.label().replace('-', '_') + "_px");
        }
        columns.addAll(List.of("mean_nm", "sd_nm", "median_nm", "p1_nm", "p99_nm", "sd_over_mean_percent", "random_nm",
                "systematic_nm", "verdict", "message"));
        CsvTable table = CsvTable.of(List.of(title + ": " + words(),
                "sd: over the pixels of a photo; random, systematic: standard uncertainty of one pixel, root mean square"), columns);
        for (int i = 0; i < rows.size(); i++) {
            LotRow row = rows.get(i);
            List<Object> cells = new ArrayList<>(List.of(i + 1, row.photo(), row.folder()));
            for (State state : State.values()) {
                cells.add(row.isUsable() ? row.pixels().get(state) : "");
            }
            cells.addAll(List.of(row.mean(), row.deviation(), row.median(), row.low(), row.high(), row.nonUniformity(), row.random(),
                    row.systematic(), row.verdict().map(Verdict::words).orElse(""), row.message()));
            table.row(cells.toArray());
        }
        return table;
    }

    /** The essentials for the lot's own JSON file. */
    public Map<String, Object> summary() {
        Map<String, Object> summary = new LinkedHashMap<>();
        summary.put("photos", rows.size());
        summary.put("unusable", unusable().size());
        Map<String, Object> verdicts = new LinkedHashMap<>();
        for (Verdict verdict : Verdict.values()) {
            verdicts.put(verdict.words(), count(verdict));
        }
        tolerance.ifPresent(t -> summary.put("limits_nm", new double[] {t.lower(), t.upper()}));
        tolerance.ifPresent(t -> summary.put("verdicts", verdicts));
        summary.put("mean_nm", chart(means()));
        summary.put("sd_nm", chart(deviations()));
        return summary;
    }

    private static Map<String, Object> chart(RunChart chart) {
        Map<String, Object> values = new LinkedHashMap<>();
        values.put("mean", chart.mean());
        values.put("lower_control_limit", chart.lower());
        values.put("upper_control_limit", chart.upper());
        return values;
    }
}
