package iridepth.quality;

import static iridepth.quality.Verdict.FAIL;
import static iridepth.quality.Verdict.PASS;
import static iridepth.quality.Verdict.UNDECIDED;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class ToleranceTest {

    @Test
    void conformanceOfTheDiodeAndTheOilOfJcgm106() {
        // JCGM 106:2012, examples of 7.4 and 7.5, from memory: breakdown voltage -5.47 V, u = 0.05 V, at most -5.40 V: 0.92;
        // kinematic viscosity 13.6 mm2/s, u = 1.8, within 12.5 to 16.3: 0.66.
        assertEquals(0.92, Tolerance.atMost(-5.40).conformance(-5.47, 0.05), 0.005);
        assertEquals(0.66, Tolerance.between(12.5, 16.3).conformance(13.6, 1.8), 0.005);
    }

    @Test
    void guardBandLeavesTheThreeZonesOfIso14253() {
        Tolerance t = Tolerance.between(275, 295);
        assertEquals(FAIL, t.verdict(272.9, 2));
        assertEquals(UNDECIDED, t.verdict(273, 2));
        assertEquals(UNDECIDED, t.verdict(276.9, 2));
        assertEquals(PASS, t.verdict(277, 2));
        assertEquals(PASS, t.verdict(293, 2));
        assertEquals(UNDECIDED, t.verdict(297, 2));
        assertEquals(FAIL, t.verdict(297.1, 2));
    }

    @Test
    void withoutGuardBandEveryValueIsDecided() {
        Tolerance t = Tolerance.between(275, 295);
        assertEquals(PASS, t.verdict(275, 0));
        assertEquals(FAIL, t.verdict(Math.nextDown(275.0), 0));
        assertEquals(UNDECIDED, t.verdict(Double.NaN, 0));
    }

    @Test
    void tooCoarseAMeasurementProvesNothingInTolerance() {
        assertEquals(UNDECIDED, Tolerance.between(275, 295).verdict(285, 11));
    }

    @Test
    void oneSidedLimitsLeaveTheOtherSideFree() {
        assertEquals(PASS, Tolerance.atLeast(100).verdict(1e6, 5));
        assertEquals(FAIL, Tolerance.atLeast(100).verdict(94, 5));
        assertEquals(PASS, Tolerance.atMost(100).verdict(-1e6, 5));
        Tolerance.Judgement j = Tolerance.atMost(100).judge(Distribution.of(10, 20, 30), 1, 1);
        assertEquals(0, j.below());
        assertEquals(1, j.provenInside());
        assertEquals(PASS, j.verdict());
    }

    @Test
    void sharesOfAMapAreCounted() {
        // 10 pixels below, 1000 within but 100 of these near the upper limit, 30 above.
        Distribution d = Distribution.over(0, 450);
        add(d, 10, 270);
        add(d, 900, 285);
        add(d, 100, 294);
        add(d, 30, 300);
        Tolerance.Judgement j = Tolerance.between(275, 295).judge(d, 0.5, 2);
        assertEquals(10 / 1040.0, j.below(), 1e-12);
        assertEquals(1000 / 1040.0, j.inside(), 1e-12);
        assertEquals(30 / 1040.0, j.above(), 1e-12);
        assertEquals(900 / 1040.0, j.provenInside(), 1e-12);
        assertEquals(40 / 1040.0, j.provenOutside(), 1e-12);
        assertEquals(PASS, j.mean());
        assertEquals(FAIL, j.field());
        assertEquals(FAIL, j.verdict());
    }

    @Test
    void fieldVerdictFollowsTheRequiredShare() {
        Distribution d = Distribution.over(0, 450);
        add(d, 90, 285);
        add(d, 8, 294);
        add(d, 2, 300);
        Tolerance t = Tolerance.between(275, 295);
        assertEquals(PASS, t.requiring(0.90).judge(d, 0, 2).field());
        assertEquals(UNDECIDED, t.requiring(0.95).judge(d, 0, 2).field());
        assertEquals(UNDECIDED, t.requiring(0.98).judge(d, 0, 2).field());
        assertEquals(FAIL, t.requiring(0.99).judge(d, 0, 2).field());
    }

    @Test
    void aFullyConformingMapPassesEvenWhenAllPixelsAreRequired() {
        Tolerance.Judgement j = Tolerance.between(275, 295).requiring(1).judge(Distribution.of(277, 280, 293), 2, 2);
        assertEquals(PASS, j.field());
        assertEquals(0, j.provenOutside());
    }

    @Test
    void withoutPixelsNothingIsDecided() {
        Tolerance.Judgement j = Tolerance.between(275, 295).judge(Distribution.over(0, 450), 1, 1);
        assertEquals(UNDECIDED, j.verdict());
        assertTrue(Double.isNaN(j.inside()));
    }

    @Test
    void limitsAndGuardBandsThatMakeNoSenseAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> Tolerance.between(295, 275));
        assertThrows(IllegalArgumentException.class, () -> Tolerance.between(Double.NaN, 275));
        assertThrows(IllegalArgumentException.class, () -> Tolerance.atLeast(Double.NEGATIVE_INFINITY));
        assertThrows(IllegalArgumentException.class, () -> Tolerance.atLeast(0).requiring(0));
        assertThrows(IllegalArgumentException.class, () -> Tolerance.atLeast(0).verdict(1, -1));
        assertThrows(IllegalArgumentException.class, () -> Tolerance.atLeast(0).conformance(1, 0));
    }

    private static void add(Distribution d, int pixels, double thickness) {
        for (int i = 0; i < pixels; i++) {
            d.add(thickness);
        }
    }
}
