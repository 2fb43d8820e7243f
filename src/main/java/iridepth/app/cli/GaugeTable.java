package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.photo.Region;
import iridepth.quality.Area;
import iridepth.quality.AreaStatistics;
import iridepth.quality.GaugeStudy;
import iridepth.quality.MeasuredField;
import iridepth.quality.Tolerance;
import iridepth.report.CsvFile;
import iridepth.report.GaugeSheet;
import iridepth.report.SavedResult;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The list of a gauge study: a CSV table with the columns part, operator where there are several, and thickness_nm or result.
 *
 * @param file   the table
 * @param region where the mean of a result is taken; empty for the whole map
 */
record GaugeTable(Path file, Optional<Region> region) {
    /** Analyses the study. */
    GaugeSheet sheet(Optional<Tolerance> tolerance) {
        CsvFile table = CsvFile.read(file);
        List<String> parts = table.texts("part");
        List<String> operators = table.has("operator") ? table.texts("operator") : parts.stream().map(p -> "operator").toList();
        double[] thickness = table.has("thickness_nm") ? table.numbers("thickness_nm") : results(table);
        Map<String, Map<String, List<Double>>> cells = new LinkedHashMap<>();
        for (int i = 0; i < thickness.length; i++) {
            if (Double.isNaN(thickness[i])) {
                throw new PhotoException(file + ", line " + table.lines().get(i) + ": the thickness is missing");
            }
            cells.computeIfAbsent(parts.get(i), p -> new LinkedHashMap<>()).computeIfAbsent(operators.get(i), o -> new ArrayList<>())
                    .add(thickness[i]);
        }
        List<String> who = operators.stream().distinct().toList();
        List<String> what = List.copyOf(cells.keySet());
        double[][][] values = values(cells, who);
        try {
            GaugeStudy study = who.size() == 1 ? GaugeStudy.ofRepeats(alone(values)) : GaugeStudy.of(values);
            return new GaugeSheet("Gauge study " + file.getFileName(), what, who, values, study, tolerance);
        } catch (IllegalArgumentException e) {
            throw new PhotoException(file, e.getMessage());
        }
    }

    private double[] results(CsvFile table) {
        List<String> folders = table.texts("result");
        double[] means = new double[folders.size()];
        for (int i = 0; i < means.length; i++) {
            Path folder = file.toAbsolutePath().getParent().resolve(folders.get(i));
            MeasuredField field = SavedResult.open(folder).measured();
            int width = field.thickness().width();
            int height = field.thickness().height();
            Region where = region.orElse(new Region(0, 0, width, height));
            means[i] = AreaStatistics.of(field, Area.of(where)).average()
                    .thickness();
            if (Double.isNaN(means[i])) {
                throw new PhotoException(file + ", line " + table.lines().get(i) + ": nothing is read in " + where + " of "
                        + folders.get(i));
            }
        }
        return means;
    }

    /** The cells as an array; an operator who did not measure a part leaves an empty cell, which the study refuses. */
    private static double[][][] values(Map<String, Map<String, List<Double>>> cells, List<String> operators) {
        return cells.values().stream().map(part -> operators.stream().map(o -> part.getOrDefault(o, List.of()).stream()
                .mapToDouble(v -> v).toArray()).toArray(double[][]::new)).toArray(double[][][]::new);
    }

    private static double[][] alone(double[][][] values) {
        double[][] alone = new double[values.length][];
        for (int p = 0; p < values.length; p++) {
            alone[p] = values[p][0];
        }
        return alone;
    }
}
