package iridepth.simulation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

/** The simulation's optics against tables of films computed elsewhere and against textbook cases. */
class OpticsTest {

    /** Source: film-reflectance.csv, nine digits printed. */
    @Test
    void reflectanceAgreesWithTheReferenceTableToThePrintedDigits() {
        Table table = Table.resource("/iridepth/reference/film-reflectance.csv");
        for (int row = 0; row < table.size(); row++) {
            double sine = Math.sin(Math.toRadians(table.number(row, "incidence_deg")));
            double r = Rouard.reflectance(FilmStack.parse(table.text(row, "stack")), table.number(row, "thickness_nm"),
                    table.number(row, "wavelength_nm"), sine, table.text(row, "polarisation").equals("p"));
            assertEquals(table.number(row, "R"), r, 5.1e-10, "row " + row);
        }
        assertTrue(table.size() > 200);
    }

    /** Source: film-colours.csv, six digits printed. */
    @Test
    void coloursAgreeWithTheReferenceTableToOneUnitOfTheLastDigit() {
        Table table = Table.resource("/iridepth/reference/film-colours.csv");
        double[][] observer = Sensor.cie1931().curves();
        // every third row, for the time that so many directions take
        for (int row = 0; row < table.size(); row += 3) {
            View view = View.aperture(table.number(row, "numerical_aperture"), 224);
            double[] r = FilmReflectance.of(FilmStack.parse(table.text(row, "stack")), view,
                    table.number(row, "thickness_nm"), 1, 1).spectrum(0);
            double[] light = Lamp.illuminant(table.text(row, "illuminant")).power();
            double white = 0;
            double[] xyz = new double[3];
            for (int i = 0; i < light.length; i++) {
                white += light[i] * observer[1][i];
                for (int c = 0; c < 3; c++) {
                    xyz[c] += light[i] * observer[c][i] * r[i];
                }
            }
            String where = "row " + row + " " + table.text(row, "stack");
            assertEquals(table.number(row, "X"), xyz[0] / white, 1.1e-6, where);
            assertEquals(table.number(row, "Y"), xyz[1] / white, 1.1e-6, where);
            assertEquals(table.number(row, "Z"), xyz[2] / white, 1.1e-6, where);
        }
        assertTrue(table.size() > 300);
    }

    /** Source: the quarter-wave rule R = ((ns - n^2) / (ns + n^2))^2, textbook antireflection coating. */
    @Test
    void quarterWaveCoatingFollowsTheQuarterWaveRule() {
        FilmStack stack = FilmStack.parse("void n=1 / coat n=1.38 / glass n=1.52");
        double expected = Math.pow((1.52 - 1.38 * 1.38) / (1.52 + 1.38 * 1.38), 2);
        assertEquals(expected, Rouard.reflectance(stack, 550 / 1.38 / 4, 550, 0, false), 1e-12);
    }

    @Test
    void aSweepOverThicknessEqualsSingleThicknesses() {
        FilmStack stack = FilmStack.parse("air / PMMA / SiO2 300 nm / Si");
        double[] sweep = new double[1501];
        Rouard.sweep(stack, stack.indices(450), 0, 1, 450, 0.3, true, 1, sweep);
        assertEquals(Rouard.reflectance(stack, 777, 450, 0.3, true), sweep[777], 1e-12);
        assertEquals(Rouard.reflectance(stack, 1500, 450, 0.3, true), sweep[1500], 1e-12);
    }
}
