package iridepth.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.spectrum.Spectrum;
import java.io.IOException;
import java.io.StringReader;
import java.util.List;
import org.junit.jupiter.api.Test;

/** The layout is that of ANSI CGATS.17; the patches are invented. */
class TargetFileTest {
    private static List<TargetFile.Patch> read(String text) throws IOException {
        return TargetFile.read("target.txt", new StringReader(text));
    }

    @Test
    void coloursStandForTheSmoothestSpectrumOfThatColour() throws IOException {
        List<TargetFile.Patch> patches = read("""
                CGATS.17
                ORIGINATOR "BEGIN of nothing"
                NUMBER_OF_FIELDS 5
                BEGIN_DATA_FORMAT
                SAMPLE_ID SAMPLE_NAME XYZ_X XYZ_Y XYZ_Z
                END_DATA_FORMAT
                NUMBER_OF_SETS 2 # two patches
                BEGIN_DATA
                1 "mid grey" 18.52 19.20 15.84
                2 A2 20.1 12.4 6.3
                END_DATA
                """);
        assertEquals(2, patches.size());
        assertEquals("mid grey", patches.get(0).label());
        for (TargetFile.Patch patch : patches) {
            Xyz xyz = Observer.CIE_1931.xyz(patch.reflectance(), Light.illuminant("D50"));
            double[] wanted = patch.label().equals("A2") ? new double[] {0.201, 0.124, 0.063} : new double[] {0.1852, 0.1920, 0.1584};
            assertEquals(wanted[0], xyz.x(), 1e-3);
            assertEquals(wanted[1], xyz.y(), 1e-3);
            assertEquals(wanted[2], xyz.z(), 1e-3);
        }
        // 18.52 : 19.20 : 15.84 is D50 (96.42 : 100 : 82.49, ISO 13655) times 0.192: a neutral patch has a level spectrum.
        assertEquals(0.192, patches.get(0).reflectance().at(0), 2e-3);
        assertEquals(0.192, patches.get(0).reflectance().at(300), 2e-3);
    }

    @Test
    void labIsThatOfD50() throws IOException {
        TargetFile.Patch patch = read("BEGIN_DATA_FORMAT\nSampleID LAB_L LAB_A LAB_B\nEND_DATA_FORMAT\nBEGIN_DATA\nx 50 0 0\nEND_DATA\n")
                .get(0);
        // L* = 50 is Y = ((50 + 16) / 116)^3 = 0.18419 (ISO/CIE 11664-4).
        assertEquals(0.18419, patch.reflectance().at(150), 2e-3);
    }

    @Test
    void spectraAreTakenWhereThereAreAny() throws IOException {
        StringBuilder text = new StringBuilder("CGATS.17\nBEGIN_DATA_FORMAT\nSAMPLE_ID LAB_L LAB_A LAB_B");
        StringBuilder row = new StringBuilder("p 50 0 0");
        for (int nm = 380; nm <= 730; nm += 10) {
            text.append(" SPECTRAL_NM_").append(nm);
            row.append(' ').append(10 + (nm - 380) / 10.0);
        }
        Spectrum spectrum = read(text + "\nEND_DATA_FORMAT\nBEGIN_DATA\n" + row + "\nEND_DATA\n").get(0).reflectance();
        assertEquals(0.10, spectrum.at(0), 1e-12);
        assertEquals(0.225, spectrum.at(125), 1e-12);
        assertEquals(0.45, spectrum.at(400), 1e-12);
    }

    /**
     * The smoothest spectrum of a colour stands for the true one to about the stated 5 % in a broad channel: tried on the gentle edges
     * and humps of ordinary paints, and on lobes of 35 nm standard deviation.
     */
    @Test
    void signalsFromColoursAreGoodToAFewPerCent() {
        Light d50 = Light.illuminant("D50");
        double square = 0;
        int n = 0;
        for (double centre = 450; centre <= 650; centre += 25) {
            double at = centre;
            for (Spectrum paint : List.of(Spectrum.sample(nm -> 0.06 + 0.5 / (1 + Math.exp(-(nm - at) / 22))),
                    Spectrum.sample(nm -> 0.06 + 0.5 / (1 + Math.exp((nm - at) / 22))),
                    Spectrum.sample(nm -> 0.1 + 0.4 * Math.exp(-(nm - at) * (nm - at) / (2 * 55 * 55))))) {
                Spectrum guess = SmoothReflectance.of(Observer.CIE_1931.xyz(paint, d50));
                for (double peak : new double[] {455, 535, 605}) {
                    Spectrum channel = Spectrum.sample(nm -> Math.exp(-(nm - peak) * (nm - peak) / (2 * 35 * 35)));
                    square += Math.pow(guess.dot(channel) / paint.dot(channel) - 1, 2);
                    n++;
                }
            }
        }
        double rms = Math.sqrt(square / n);
        assertTrue(rms < 0.05 && rms > 0.01, "rms " + rms);
    }

    @Test
    void otherFilesAreRefusedInOneLine() {
        String no = assertThrows(IllegalArgumentException.class, () -> read("hello\n")).getMessage();
        assertTrue(no.startsWith("target.txt: no CGATS.17 file"), no);
        String rows = assertThrows(IllegalArgumentException.class, () -> read(
                "BEGIN_DATA_FORMAT\nA LAB_L LAB_A LAB_B\nEND_DATA_FORMAT\nBEGIN_DATA\n1 2 3\nEND_DATA\n")).getMessage();
        assertTrue(rows.contains("do not make rows of 4 fields"), rows);
        String number = assertThrows(IllegalArgumentException.class, () -> read(
                "BEGIN_DATA_FORMAT\nSAMPLE_ID LAB_L LAB_A LAB_B\nEND_DATA_FORMAT\nBEGIN_DATA\n1 2 x 4\nEND_DATA\n")).getMessage();
        assertTrue(number.contains("patch 1: 'x' in field LAB_A is no number"), number);
        String fields = assertThrows(IllegalArgumentException.class, () -> read(
                "BEGIN_DATA_FORMAT\nSAMPLE_ID RGB_R\nEND_DATA_FORMAT\nBEGIN_DATA\n1 2\nEND_DATA\n")).getMessage();
        assertTrue(fields.contains("neither spectra"), fields);
    }
}
