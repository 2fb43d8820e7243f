package iridepth.report;

import iridepth.colour.Xyz;
import iridepth.curve.ColourChart;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/** The colour chart of a film as a table: one row per thickness. */
public final class ChartTable {
    private static final List<String> COLUMNS = List.of("thickness_nm", "X", "Y", "Z", "x", "y", "L", "a", "b", "sRGB", "in_gamut",
            "delta_e00_per_nm");

    private ChartTable() {
    }

    /**
     * The table of a chart.
     *
     * @param view the directions of view, in words
     */
    public static CsvTable of(ColourChart chart, String view) {
        List<String> remarks = new ArrayList<>();
        remarks.add("Interference colours of " + chart.stack());
        remarks.addAll(ChartFigure.conditions(chart, view));
        remarks.add("X Y Z: relative to a perfect white of Y = 1; L a b: CIELAB under the stated white");
        remarks.add("sRGB: adapted to the white of the screen, times the brightness; in_gamut no: brought into the gamut");
        remarks.add("delta_e00_per_nm: CIEDE2000 per nm of thickness");
        CsvTable table = CsvTable.of(remarks, COLUMNS);
        for (ColourChart.Row row : chart.rows()) {
            Xyz xyz = row.xyz();
            table.row(row.thicknessNm(), rounded(xyz.x()), rounded(xyz.y()), rounded(xyz.z()), rounded(xyz.chromaticityX()),
                    rounded(xyz.chromaticityY()), Numbers.fixed(row.lab().l(), 4), Numbers.fixed(row.lab().a(), 4),
                    Numbers.fixed(row.lab().b(), 4), String.format(Locale.ROOT, "#%06X", row.srgb().toRgb()),
                    row.srgb().inGamut() ? "yes" : "no", Numbers.fixed(row.deltaEPerNm(), 4));
        }
        return table;
    }

    private static String rounded(double value) {
        return Numbers.fixed(value, 6);
    }
}
