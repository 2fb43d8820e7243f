package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.curve.ColourChart;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Fringes;
import iridepth.optics.Materials;
import iridepth.optics.Polarisation;
import iridepth.optics.Stack;
import iridepth.optics.View;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ChartFigureTest {
    private static final View NORMAL = View.incidence(0, Polarisation.NONE);

    @TempDir
    Path folder;

    private static Stack stack(String text) {
        return Stack.parse(text, Materials.bundled());
    }

    private static ColourChart chart(String stack, double toNm, double stepNm) {
        return ColourChart.of(stack(stack), NORMAL, Light.illuminant("D65"), Observer.CIE_1931, ColourChart.White.PERFECT,
                new ThicknessRange(0, toNm), stepNm, Double.NaN);
    }

    private static ChartFigure figure(String stack, double toNm, double stepNm) {
        return new ChartFigure(chart(stack, toNm, stepNm), NORMAL.text(), Fringes.of(stack(stack), 550, 0, 0, toNm));
    }

    private static int pixel(Picture picture, double x, double y) {
        return picture.pixels()[(int) y * picture.width() + (int) x] & 0xFFFFFF;
    }

    @Test
    void stripShowsTheColourOfEveryThickness() {
        ChartFigure figure = figure("air / n14 n=1.4 / air", 1100, 5);
        Picture picture = figure.draw();
        assertEquals(3, figure.rowCount());
        for (ColourChart.Row row : figure.chart().rows()) {
            double nm = row.thicknessNm();
            if (nm == 0 || nm == 1100 || nm % 500 == 0) {
                continue;
            }
            Axes strip = figure.strip(picture, (int) (nm / 500));
            assertEquals(row.srgb().toRgb(), pixel(picture, strip.px(nm), strip.top() + 20), "at " + nm + " nm");
        }
    }

    @Test
    void coloursBeyondTheGamutAreMarkedAndOthersAreNot() {
        ChartFigure figure = figure("air / n14 n=1.4 / air", 500, 2);
        Picture picture = figure.draw();
        Axes strip = figure.strip(picture, 0);
        int marked = 0;
        for (ColourChart.Row row : figure.chart().rows().subList(2, 249)) {
            int x = (int) strip.px(row.thicknessNm());
            boolean dot = false;
            for (int i = -3; i <= 3; i++) {
                dot |= pixel(picture, x + i, strip.top() + strip.height() + 8) != 0xFFFFFF;
            }
            if (!row.srgb().inGamut()) {
                marked++;
                assertTrue(dot, "a dot at " + row.thicknessNm());
            } else if (Math.abs(row.thicknessNm() - 100) < 20) {
                assertEquals(false, dot, "no dot at " + row.thicknessNm());
            }
        }
        assertTrue(marked > 20, "a soap film has colours beyond sRGB");
    }

    @Test
    void longRangesAreWrappedIntoFewRows() {
        assertEquals(1, figure("air / n14 n=1.4 / air", 450, 10).rowCount());
        assertEquals(1, figure("air / n14 n=1.4 / air", 600, 10).rowCount());
        assertEquals(4, figure("air / n14 n=1.4 / air", 1800, 10).rowCount());
        ChartFigure longest = figure("air / n14 n=1.4 / air", 6400, 10);
        assertTrue(longest.rowCount() <= 6 && longest.rowSpan() * longest.rowCount() >= 6400);
    }

    @Test
    void samePictureGivesTheSameBytes() throws IOException {
        figure("air / SiO2 / Si", 450, 5).write(folder.resolve("a.png"));
        figure("air / SiO2 / Si", 450, 5).write(folder.resolve("b.png"));
        assertArrayEquals(Files.readAllBytes(folder.resolve("a.png")), Files.readAllBytes(folder.resolve("b.png")));
    }

    @Test
    void tableHoldsTheChartRowByRow() {
        ColourChart chart = chart("air / SiO2 / Si", 100, 10);
        List<String> lines = ChartTable.of(chart, NORMAL.text()).toString().lines().toList();
        List<String> rows = lines.stream().filter(l -> !l.startsWith("#")).toList();
        assertTrue(lines.get(0).equals("# Interference colours of air / SiO2 / Si"));
        assertTrue(lines.contains("# light: D65"));
        assertEquals("thickness_nm,X,Y,Z,x,y,L,a,b,sRGB,in_gamut,delta_e00_per_nm", rows.get(0));
        assertEquals(12, rows.size());
        String[] fields = rows.get(8).split(",");
        ColourChart.Row row = chart.rows().get(7);
        assertEquals(70, Double.parseDouble(fields[0]));
        assertEquals(row.xyz().y(), Double.parseDouble(fields[2]), 5e-7);
        assertEquals(row.xyz().chromaticityX(), Double.parseDouble(fields[4]), 5e-7);
        assertEquals(row.lab().b(), Double.parseDouble(fields[8]), 5e-5);
        assertEquals(row.srgb().toRgb(), Integer.parseInt(fields[9].substring(1), 16));
        assertEquals(row.srgb().inGamut() ? "yes" : "no", fields[10]);
        assertEquals(row.deltaEPerNm(), Double.parseDouble(fields[11]), 5e-5);
    }

    /**
     * A soap film in air has one half-wave shift: black where it is thinnest, first bright at lambda / 4n (textbook rule, e.g.
     * Hecht, Optics, section 9.4: d cos(theta) = (2m + 1) lambda_f / 4 for maxima, lambda_f = lambda / n).
     */
    @Test
    void fringeTableListsBrightAndDarkByOrder() {
        Stack soap = stack("air n=1 / soap n=1.35 / air n=1");
        FringeTable table = new FringeTable(soap, Fringes.of(soap, 540, 0, 0, 310));
        List<String> rows = table.csv().toString().lines().filter(l -> !l.startsWith("#")).toList();
        assertEquals(List.of("order,kind,rule_nm,computed_nm", "0,dark,0.000,0.000", "0.5,bright,100.000,100.000",
                "1,dark,200.000,200.000", "1.5,bright,300.000,300.000"), rows);
        assertTrue(table.text().contains("a half-wave shift at the film's upper boundary: dark where"), table.text());
        assertTrue(table.text().contains("     1.5  bright        300.0 nm        300.0 nm\n"), table.text());
    }
}
