package iridepth.spectrum;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.StringReader;
import org.junit.jupiter.api.Test;

class SpectralTableTest {
    private static SpectralTable read(String text) throws IOException {
        return SpectralTable.read("lamp.csv", new BufferedReader(new StringReader(text)));
    }

    private static String refusal(String text) {
        return assertThrows(IllegalArgumentException.class, () -> read(text)).getMessage();
    }

    @Test
    void valuesBetweenRowsAreLinearAndEndsAreHeld() throws IOException {
        SpectralTable table = read("# source: invented\nwavelength_nm,power\n400,1\n500,3\n700,5\n");
        Spectrum power = table.spectrum("power");
        assertEquals(1, power.at(0));
        assertEquals(2, power.at(450 - 380), 1e-12);
        assertEquals(4, power.at(600 - 380), 1e-12);
        assertEquals(5, power.at(Grid.SIZE - 1));
        assertTrue(table.isHeld());
        assertEquals("invented", table.remark("source"));
    }

    @Test
    void tablesThatDoNotCoverTheVisibleAreRefused() {
        assertTrue(refusal("wavelength_nm,n\n450,1\n451,1\n700,1\n").contains("must cover 400-700 nm"));
    }

    @Test
    void tableThatStartsOneSamplingStepShortStillCovers() throws IOException {
        StringBuilder text = new StringBuilder("wavelength_nm,n\n");
        for (int nm = 405; nm <= 700; nm += 5) {
            text.append(nm).append(",1.5\n");
        }
        assertTrue(read(text.toString()).isHeld());
    }

    @Test
    void badCellsAreNamedWithTheirLine() {
        assertEquals("lamp.csv, line 3: 'NaN' is not a finite number; leave the row out",
                refusal("wavelength_nm,n\n400,1\n500,NaN\n"));
        assertEquals("lamp.csv, line 2: 'x' is not a number", refusal("wavelength_nm,n\n400,x\n"));
        assertEquals("lamp.csv, line 2: 3 cells where the header has 2", refusal("wavelength_nm,n\n400,1,2\n"));
        assertEquals("lamp.csv, line 3: wavelengths must rise from row to row", refusal("wavelength_nm,n\n400,1\n400,2\n"));
        assertTrue(refusal("nm,n\n400,1\n").contains("the header must be wavelength_nm"));
        assertTrue(refusal("wavelength_nm,n\n").contains("at least two rows"));
    }

    @Test
    void nearestNameIsTheOneWithFewestEdits() {
        assertEquals("SiO2", Catalogue.nearest("SiO", java.util.List.of("TiO2", "SiO2", "Si3N4")));
        assertEquals("stack", Catalogue.nearest("stak", java.util.List.of("range_nm", "stack")));
    }
}
