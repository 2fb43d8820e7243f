package iridepth.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import org.junit.jupiter.api.Test;

class StackTest {
    private static final Materials MATERIALS = new Materials(Map.of("resist", Material.constant("resist", 1.6, 0)));

    private static String refusal(String text) {
        return assertThrows(IllegalArgumentException.class, () -> Stack.parse(text, MATERIALS).filmIndex()).getMessage();
    }

    @Test
    void notationIsReadAndWrittenBack() {
        for (String text : new String[] {"air / SiO2 / Si", "air / PMMA / SiO2 300 nm / Si", "air / resist / Si",
            "water / PS / BK7"}) {
            assertEquals(text, Stack.parse(text, MATERIALS).toString());
        }
        Stack micrometres = Stack.parse("air/ink n=1.6 k=0.02 0.04 um/SiO2/Si", MATERIALS);
        assertEquals(40, micrometres.layers().get(0).thicknessNm(), 1e-9);
        assertEquals(0.02, micrometres.layers().get(0).material().k().at(0));
        assertEquals(1, micrometres.filmIndex());
    }

    @Test
    void mistakesAreNamed() {
        assertTrue(refusal("air / SiO3 / Si").startsWith("unknown material 'SiO3'; the nearest known is 'SiO'"));
        assertTrue(refusal("air").contains("needs at least an ambient and a substrate"));
        assertTrue(refusal("air / / Si").contains("cannot read an empty medium"));
        assertTrue(refusal("air / SiO2 300 mm / Si").contains("cannot read 'SiO2 300 mm'"));
        assertTrue(refusal("air / SiO2 / PMMA / Si").contains("two layers have no thickness (SiO2, PMMA)"));
        assertTrue(refusal("air / SiO2 30 nm / Si").contains("has no film"));
        assertTrue(refusal("air / SiO2 / Si 3 nm").contains("ambient and substrate are taken as thick"));
        assertTrue(refusal("air / SiO2 -3 nm / Si").contains("must be 0 nm or more"));
    }

    /** Malitson 1965: n of fused silica is 1.4585 at 587.6 nm (handbook value, from memory). */
    @Test
    void bundledSilicaHasItsHandbookIndex() {
        assertEquals(1.4585, MATERIALS.get("SiO2").nAt(587.6), 1e-4);
    }

    /** Malitson's three-term Sellmeier formula gives the bundled table. */
    @Test
    void sellmeierFormulaReproducesTheTable() {
        Material formula = Material.sellmeier("silica", new double[] {0.6961663, 0.4079426, 0.8974794},
                new double[] {0.0684043 * 0.0684043, 0.1162414 * 0.1162414, 9.896161 * 9.896161}, 0);
        for (double nm = 380; nm <= 780; nm += 20) {
            assertEquals(MATERIALS.get("SiO2").nAt(nm), formula.nAt(nm), 1e-6);
        }
    }

    @Test
    void everyBundledMaterialCanBeRead() {
        for (String name : Materials.catalogue().names()) {
            assertTrue(MATERIALS.get(name).source().length() > 10, name);
        }
    }
}
