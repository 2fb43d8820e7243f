package iridepth.colour;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.ReferenceTable;
import iridepth.spectrum.Grid;
import java.util.Map;
import org.junit.jupiter.api.Test;

class ColourTest {
    /** CIE 015:2018, tables T.3 and T.8.1. */
    @Test
    void whitePointsAreThoseOfTheStandard() {
        for (Map<String, String> row : ReferenceTable.read("white-points.csv")) {
            Xyz white = Observer.CIE_1931.white(Light.illuminant(row.get("illuminant")));
            assertEquals(Double.parseDouble(row.get("x")), white.chromaticityX(), 1e-4, row.get("illuminant"));
            assertEquals(Double.parseDouble(row.get("y")), white.chromaticityY(), 1e-4, row.get("illuminant"));
        }
    }

    /** CIE 015:2018, table T.3: D65 for the 10 degree observer is (0.31381, 0.33098); from memory. */
    @Test
    void tenDegreeWhiteOfD65IsThatOfTheStandard() {
        Xyz white = Observer.CIE_1964.white(Light.illuminant("D65"));
        assertEquals(0.31381, white.chromaticityX(), 1e-4);
        assertEquals(0.33098, white.chromaticityY(), 1e-4);
    }

    /** Sharma, Wu and Dalal, Color Res. Appl. 30, 21-30 (2005), table 1. */
    @Test
    void ciede2000AgreesWithThePublishedPairs() {
        for (Map<String, String> row : ReferenceTable.read("ciede2000.csv")) {
            Lab one = new Lab(number(row, "L1"), number(row, "a1"), number(row, "b1"));
            Lab two = new Lab(number(row, "L2"), number(row, "a2"), number(row, "b2"));
            assertEquals(number(row, "delta_e"), one.deltaE2000(two), 1e-4, row.toString());
            assertEquals(number(row, "delta_e"), two.deltaE2000(one), 1e-4, row.toString());
        }
    }

    private static double number(Map<String, String> row, String column) {
        return Double.parseDouble(row.get(column));
    }

    /** IEC 61966-2-1, from memory: the matrix to four decimals, and mid-grey 0.5 encoded is 0.2140 linear. */
    @Test
    void srgbMatrixAndTransferAreThoseOfTheStandard() {
        double[][] published = {{0.4124, 0.3576, 0.1805}, {0.2126, 0.7152, 0.0722}, {0.0193, 0.1192, 0.9505}};
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                assertEquals(published[i][j], Srgb.TO_XYZ[i][j], 1e-4);
            }
        }
        assertEquals(0.2140, Srgb.decode(0.5), 1e-4);
        for (double v = 0; v <= 1; v += 0.01) {
            assertEquals(v, Srgb.decode(Srgb.encode(v)), 1e-9);
        }
    }

    @Test
    void colourOutsideTheGamutKeepsHueAndLightness() {
        Xyz green = new Lab(70, -120, 60).toXyz(Srgb.WHITE);
        Srgb shown = Srgb.of(green);
        assertFalse(shown.inGamut());
        double[] linear = {Srgb.decode(shown.red()), Srgb.decode(shown.green()), Srgb.decode(shown.blue())};
        Lab back = Lab.of(Xyz.of(Matrix3.times(Srgb.TO_XYZ, linear)), Srgb.WHITE);
        assertEquals(70, back.l(), 0.01);
        assertEquals(new Lab(70, -120, 60).hueDeg(), back.hueDeg(), 0.05);
        assertTrue(back.chroma() < Math.hypot(120, 60));
    }

    /** Wien's displacement law: the maximum of a black body lies at 2.897772e6 nm K over T (CODATA 2018). */
    @Test
    void blackbodyPeaksWhereWienSays() {
        Light sun = Light.blackbody(5000);
        int brightest = 0;
        for (int i = 0; i < Grid.SIZE; i++) {
            brightest = sun.power().at(i) > sun.power().at(brightest) ? i : brightest;
        }
        assertEquals(2.897772e6 / 5000, Grid.wavelength(brightest), 1);
    }

    /** Illuminant A is defined as Planck's law at 2848 K with c2 = 1.435e7 nm K, so 2855.5 K on today's scale (CIE 015). */
    @Test
    void blackbodyAgreesWithIlluminantA() {
        Light body = Light.blackbody(2848 * 1.438776877e7 / 1.435e7);
        Light a = Light.illuminant("A");
        for (int i = 0; i < Grid.SIZE; i += 5) {
            double ratio = body.power().at(i) / body.power().at(180) / (a.power().at(i) / a.power().at(180));
            assertEquals(1, ratio, 2e-4);
        }
    }

    /** CIE 015:2018: D65 is daylight of 6504 K on today's scale. */
    @Test
    void daylightOf6504KelvinIsD65() {
        Xyz white = Observer.CIE_1931.white(Light.daylight(6504));
        assertEquals(0.31272, white.chromaticityX(), 2e-4);
        assertEquals(0.32903, white.chromaticityY(), 2e-4);
    }

    @Test
    void narrowBandKeepsItsCentreAndWidth() {
        Light band = Light.narrowBand(546, 10);
        assertEquals(0.5, band.power().at(541 - 380) / band.power().at(546 - 380), 0.01);
        double mean = 0;
        for (int i = 0; i < Grid.SIZE; i++) {
            mean += Grid.wavelength(i) * band.power().at(i);
        }
        assertEquals(546, mean / band.power().integral(), 1e-6);
    }

    @Test
    void unknownIlluminantNamesTheNearest() {
        String message = assertThrows(IllegalArgumentException.class, () -> Light.illuminant("D66")).getMessage();
        assertEquals("unknown illuminant 'D66'; the nearest known is 'D65'", message);
    }
}
