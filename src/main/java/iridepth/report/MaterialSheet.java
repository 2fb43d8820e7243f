package iridepth.report;

import iridepth.optics.Material;
import iridepth.report.LineFigure.Curve;
import iridepth.spectrum.Grid;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.stream.IntStream;

/**
 * A material on paper: n and k against wavelength as a figure and a table.
 *
 * @param material the material
 */
public record MaterialSheet(Material material) {
    private static final int ALONE = 640;
    private static final int UPPER = 520;
    private static final int LOWER = 440;
    private static final int ROW_EVERY_NM = 50;

    private String title() {
        return material.name() + (material.description().isEmpty() ? "" : ": " + material.description());
    }

    private boolean transparent() {
        return IntStream.range(0, Grid.SIZE).allMatch(i -> material.k().at(i) == 0);
    }

    private String range() {
        String range = String.format(Locale.ROOT, "tabulated for %.0f-%.0f nm", material.firstNm(), material.lastNm());
        return material.isHeld() ? range + "; end values are held beyond" : range;
    }

    /** A few lines for people: what it is, where the values come from, and n and k every 50 nm. */
    public String text() {
        StringBuilder text = new StringBuilder(title()).append('\n').append(range()).append('\n');
        if (!material.source().isEmpty()) {
            text.append("source: ").append(material.source()).append('\n');
        }
        text.append("    nm         n         k\n");
        for (int nm = 400; nm <= Grid.LAST_NM; nm += ROW_EVERY_NM) {
            int i = nm - Grid.FIRST_NM;
            text.append(String.format(Locale.ROOT, "%6d  %8.4f  %8.4f\n", nm, material.n().at(i), material.k().at(i)));
        }
        return text.toString();
    }

    /** Every nanometre, as the program takes it: linear between the rows of the source. */
    public CsvTable csv() {
        CsvTable table = CsvTable.of(List.of("material: " + title(), "source: " + material.source(), range(),
                "n and k: real refractive index and extinction coefficient, linear between the rows of the source"),
                List.of("wavelength_nm", "n", "k"));
        for (int i = 0; i < Grid.SIZE; i++) {
            table.row(Grid.wavelength(i), material.n().at(i), material.k().at(i));
        }
        return table;
    }

    /**
     * Draws n, and below it k unless the material is transparent.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        double[] nm = new double[Grid.SIZE];
        Arrays.setAll(nm, Grid::wavelength);
        String remark = range() + (transparent() ? "; k = 0 throughout" : "") + "; "
                + (material.source().isEmpty() ? "no source given" : material.source());
        LineFigure n = LineFigure.of(title(), "wavelength (nm)", "refractive index n").remark(remark)
                .with(Curve.line("n", nm, material.n().toArray()));
        if (transparent()) {
            LineFigure.write(png, List.of(n), ALONE);
            return;
        }
        LineFigure k = LineFigure.of("", "wavelength (nm)", "extinction coefficient k").zeroBased()
                .with(Curve.line("k", nm, material.k().toArray()).inColour(0xD55E00));
        LineFigure.write(png, List.of(n, k), UPPER, LOWER);
    }
}
