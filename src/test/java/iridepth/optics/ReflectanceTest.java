package iridepth.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.ReferenceTable;
import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.apache.commons.math3.complex.Complex;
import org.junit.jupiter.api.Test;

class ReflectanceTest {
    private static Stack stack(String text) {
        return Stack.parse(text, Materials.bundled());
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }

    private static double at(double[] spectrum, int nm) {
        return spectrum[nm - Grid.FIRST_NM];
    }

    private static final View NORMAL = View.incidence(0, Polarisation.NONE);

    /** An independent implementation by Rouard's recursion, see the table's head. */
    @Test
    void agreesWithRouardsRecursion() {
        for (Map<String, String> row : ReferenceTable.read("film-reflectance.csv")) {
            View view = View.incidence(number(row, "incidence_deg"),
                    Polarisation.valueOf(row.get("polarisation").toUpperCase(java.util.Locale.ROOT)));
            double[] r = Reflectance.of(stack(row.get("stack")), view).spectrum(number(row, "thickness_nm"));
            assertEquals(number(row, "R"), at(r, (int) number(row, "wavelength_nm")), 1e-8, row.toString());
        }
    }

    /**
     * Likewise, as tristimulus values and over an aperture. That table gives the sine of the half-angle inside the ambient,
     * so the numerical aperture is that times the ambient's index, which matters for the stack under water.
     */
    @Test
    void filmColoursAgreeWithRouardsRecursion() {
        Map<String, Reflectance> prepared = new HashMap<>();
        for (Map<String, String> row : ReferenceTable.read("film-colours.csv")) {
            Stack stack = stack(row.get("stack"));
            Reflectance reflectance = prepared.computeIfAbsent(row.get("stack") + row.get("numerical_aperture"), key ->
                    Reflectance.of(stack, View.aperture(number(row, "numerical_aperture") * stack.ambient().nAt(550), stack, 1500)));
            Xyz xyz = Observer.CIE_1931.xyz(Spectrum.of(reflectance.spectrum(number(row, "thickness_nm"))),
                    Light.illuminant(row.get("illuminant")));
            assertEquals(number(row, "X"), xyz.x(), 2e-4, row.toString());
            assertEquals(number(row, "Y"), xyz.y(), 2e-4, row.toString());
            assertEquals(number(row, "Z"), xyz.z(), 2e-4, row.toString());
        }
    }

    /** Fresnel: ((n - 1) / (n + 1))^2 = 0.04 for n = 1.5. */
    @Test
    void bareGlassReflectsFourPercent() {
        assertEquals(0.04, at(Reflectance.of(stack("v n=1 / g n=1.5"), NORMAL).spectrum(0), 550), 1e-9);
    }

    /** Quarter-wave rule ((ns - n^2) / (ns + n^2))^2; antireflection coating of optics textbooks. */
    @Test
    void quarterWaveCoatingReflectsWhatTheTextbookSays() {
        double d = 550 / (4 * 1.38);
        assertEquals(99.64, d, 0.01);
        double[] r = Reflectance.of(stack("v n=1 / c n=1.38 / g n=1.52"), NORMAL).spectrum(d);
        assertEquals(0.012601, at(r, 550), 1e-6);
    }

    /** Macleod, Thin-Film Optical Filters: Y = (nH / nL)^(2p) nH^2 / ns for (HL)^p H. */
    @Test
    void quarterWaveStackReflectsWhatMacleodSays() {
        String h = String.format("h n=2.35 %.12f nm", 550 / (4 * 2.35));
        String l = String.format("l n=1.38 %.12f nm", 550 / (4 * 1.38));
        String pair = " / " + h + " / " + l;
        double[] r = Reflectance.of(stack("v n=1" + pair.repeat(4) + " / " + h + " / g n=1.52"), NORMAL).spectrum(0);
        assertEquals(0.984552, at(r, 550), 1e-6);
    }

    /** Brewster: no p-polarised light is reflected at tan(theta) = n. */
    @Test
    void nothingIsReflectedAtBrewstersAngle() {
        View view = View.incidence(Math.toDegrees(Math.atan(1.5)), Polarisation.P);
        assertEquals(0, at(Reflectance.of(stack("v n=1 / g n=1.5"), view).spectrum(0), 550), 1e-12);
    }

    @Test
    void doublingTheApertureNodesChangesNothing() {
        Stack stack = stack("air / TiO2 / Ti");
        View view = View.aperture(0.6, stack, 1500);
        double[] chosen = Reflectance.of(stack, view).spectrum(1380);
        double[] doubled = Reflectance.of(stack, View.aperture(0.6, stack.ambient().nAt(550), 2 * view.sine().length)).spectrum(1380);
        for (int i = 0; i < Grid.SIZE; i++) {
            assertEquals(doubled[i], chosen[i], 1e-6);
        }
    }

    @Test
    void derivativeIsTheDifferenceQuotient() {
        Reflectance reflectance = Reflectance.of(stack("air / PMMA / SiO2 300 nm / Si"), NORMAL);
        double[] r = new double[3];
        double[] slope = new double[3];
        for (int i = 0; i < Grid.SIZE; i += 40) {
            reflectance.sweep(i, 432, 0.01, r, slope);
            assertEquals((r[2] - r[0]) / 0.02, slope[1], 1e-7);
        }
    }

    @Test
    void thickAbsorbingLayerIsAsGoodAsABareSubstrate() {
        double[] layer = Reflectance.of(stack("air / Cr 5000 nm / Si"), NORMAL).spectrum(0);
        double[] bare = Reflectance.of(stack("air / Cr"), NORMAL).spectrum(0);
        for (int i = 0; i < Grid.SIZE; i++) {
            assertEquals(bare[i], layer[i], 1e-9);
        }
    }

    /** Textbook cases of the phase on reflection, common practice. */
    @Test
    void reflectionShiftsByHalfAWaveFromASlowerMediumOnly() {
        assertTrue(Fringes.shifts(new Complex(1), new Complex(1.5)));
        assertTrue(!Fringes.shifts(new Complex(1.5), new Complex(1)));
        assertTrue(Fringes.shifts(new Complex(1.7), new Complex(1.0, 6.7)), "aluminium under its oxide");
    }

    /** Soap film of n = 1.33 at 600 nm, one shift: thinnest bright film lambda / (4 n) = 112.78 nm; optics textbooks. */
    @Test
    void soapFilmIsFirstBrightAtAQuarterWave() {
        Fringes fringes = Fringes.of(stack("v n=1 / soap n=1.33 / v n=1"), 600, 0, 0, 300);
        assertEquals(1, fringes.shiftCount());
        Fringes.Extremum first = fringes.extrema().stream().filter(Fringes.Extremum::bright).findFirst().orElseThrow();
        assertEquals(112.78, first.ruleNm(), 0.01);
        assertEquals(112.78, first.computedNm(), 0.01);
    }

    /** SiO of n = 1.45 on n = 3.5 at 550 nm, two shifts: thinnest dark film 94.83 nm; optics textbooks. */
    @Test
    void coatingOnASolarCellIsFirstDarkAtAQuarterWave() {
        Fringes fringes = Fringes.of(stack("v n=1 / SiO n=1.45 / cell n=3.5"), 550, 0, 0, 300);
        assertEquals(2, fringes.shiftCount());
        Fringes.Extremum first = fringes.extrema().stream().filter(e -> !e.bright()).findFirst().orElseThrow();
        assertEquals(94.83, first.ruleNm(), 0.01);
        assertEquals(0.5, first.order());
        assertEquals(94.83, first.computedNm(), 0.01);
    }

    /** Oil of n = 1.20, 460 nm on n = 1.30: bright in the visible at 2 n d / m = 552 nm for m = 2; optics textbooks. */
    @Test
    void oilOnADenserLiquidIsBrightWhereTheTextbookSays() {
        double[] r = Reflectance.of(stack("v n=1 / oil n=1.20 / water n=1.30"), NORMAL).spectrum(460);
        int best = 60;
        for (int i = 60; i < 300; i++) {
            best = r[i] > r[best] ? i : best;
        }
        assertEquals(552.0, Grid.wavelength(best), 0.5);
        List<Fringes.Extremum> extrema = Fringes.of(stack("v n=1 / oil n=1.20 / water n=1.30"), 552, 0, 450, 470).extrema();
        assertEquals(2, extrema.get(0).order());
        assertTrue(extrema.get(0).bright());
    }

    /** Oil on a liquid of lower index has one shift only: the thinnest film is dark. */
    @Test
    void oilOnALighterLiquidStartsDark() {
        Fringes fringes = Fringes.of(stack("air / oil n=1.47 / water"), 550, 0, 0, 200);
        assertEquals(1, fringes.shiftCount());
        assertTrue(!fringes.extrema().get(0).bright());
    }
}
