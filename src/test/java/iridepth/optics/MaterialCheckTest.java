package iridepth.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.spectrum.SpectralTable;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.StringReader;
import java.util.List;
import java.util.Locale;
import java.util.function.DoubleUnaryOperator;
import org.junit.jupiter.api.Test;

class MaterialCheckTest {
    /** Cauchy's formula with the coefficients of a common resist; invented, for a smooth table. */
    private static final DoubleUnaryOperator SMOOTH = nm -> 1.6 + 8000 / (nm * nm);

    private static MaterialCheck check(String header, double from, double to, double step, DoubleUnaryOperator n) throws IOException {
        StringBuilder text = new StringBuilder("# source: invented\n" + header + "\n");
        for (double nm = from; nm <= to; nm += step) {
            text.append(String.format(Locale.ROOT, "%.0f,%.6f,%d%n", nm, n.applyAsDouble(nm), 0));
        }
        return MaterialCheck.of(SpectralTable.read("table", new BufferedReader(new StringReader(text.toString()))));
    }

    @Test
    void bundledTablesAreFreeOfFaultsJumpsAndWideGaps() {
        for (String name : Materials.catalogue().names()) {
            MaterialCheck check = MaterialCheck.of(Materials.catalogue().table(name));
            assertEquals(List.of(), check.faults(), name);
            assertTrue(check.remarks().stream().noneMatch(r -> r.contains("jumps") || r.contains("no row")
                    || r.contains("source") || r.contains("not used")), name + ": " + check.remarks());
        }
    }

    @Test
    void smoothTableHasNothingToRemark() throws IOException {
        assertEquals(new MaterialCheck(List.of(), List.of()), check("wavelength_nm,n,k", 380, 780, 10, SMOOTH));
    }

    @Test
    void mistypedNumberIsAJump() throws IOException {
        MaterialCheck check = check("wavelength_nm,n,k", 380, 780, 10, nm -> nm == 550 ? 1.662 : SMOOTH.applyAsDouble(nm));
        assertEquals(1, check.remarks().size(), check.remarks().toString());
        assertTrue(check.remarks().get(0).startsWith("n jumps from"), check.remarks().toString());
        assertTrue(check.remarks().get(0).contains("550"), check.remarks().toString());
    }

    @Test
    void twoSourcesThatDoNotMeetAreAJump() throws IOException {
        MaterialCheck check = check("wavelength_nm,n,k", 380, 780, 10, nm -> SMOOTH.applyAsDouble(nm) + (nm < 600 ? 0 : 0.01));
        assertTrue(check.remarks().toString().contains("at 590 nm to"), check.remarks().toString());
    }

    @Test
    void indexBelowZeroIsAFault() throws IOException {
        assertTrue(check("wavelength_nm,n,k", 380, 780, 10, nm -> nm - 390).faults().get(0).startsWith("n is -10.0 at 380 nm"));
        assertTrue(check("wavelength_nm,k,n", 380, 780, 10, nm -> -0.1).faults().toString().contains("k is -0.1 at 380 nm"));
    }

    @Test
    void tableWithoutNIsAFault() throws IOException {
        assertTrue(check("wavelength_nm,N,K", 380, 780, 10, SMOOTH).faults().get(0).startsWith("there is no column n; it has N, K"));
    }

    @Test
    void wideGapsHeldEndsAndStrayColumnsAreRemarked() throws IOException {
        String remarks = check("wavelength_nm,n,density", 400, 720, 80, SMOOTH).remarks().toString();
        assertTrue(remarks.contains("no row between 400 and 480 nm"), remarks);
        assertTrue(remarks.contains("it covers 400-720 nm of the 380-780 nm in use"), remarks);
        assertTrue(remarks.contains("column density is not used"), remarks);
        assertTrue(remarks.contains("taken as transparent"), remarks);
    }
}
