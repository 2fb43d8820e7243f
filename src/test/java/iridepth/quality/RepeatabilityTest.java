package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class RepeatabilityTest {

    private static final float NAN = Float.NaN;

    @Test
    void pooledStandardDeviationIsTheOneThatNistCertifies() {
        // NIST StRD, SiRstv: five instruments as five pixels, five readings each as maps; residual standard deviation
        // 0.104076068334656. The maps hold single precision, 8e-6 of 196.
        double[] values = PublishedTable.read("sirstv.csv").column("value");
        Repeatability r = Repeatability.over(5);
        for (int map = 0; map < 5; map++) {
            float[] pixels = new float[5];
            for (int pixel = 0; pixel < 5; pixel++) {
                pixels[pixel] = (float) values[5 * pixel + map];
            }
            r.add(pixels);
        }
        assertEquals(0.104076068334656, r.standardDeviation(), 5e-6);
        assertEquals(2.8 * 0.104076068334656, r.limit(), 2e-5);
    }

    @Test
    void pixelsThatAreMissingInSomeMapsCountWithTheirOwnFreedoms() {
        // Pixel 0: 10, 12, 14, deviations squared 8 with 2 freedoms; pixel 1: 5, 7, squared 2 with 1; pixel 2 once; pixel 3 never.
        Repeatability r = threeMaps();
        assertEquals(Math.sqrt(10 / 3.0), r.standardDeviation(), 1e-6);
        assertEquals(2, r.standardDeviation(i -> i == 0), 1e-6);
        assertEquals(Math.sqrt(2), r.standardDeviation(i -> i > 0), 1e-6);
        assertTrue(Double.isNaN(r.standardDeviation(i -> i > 1)));
        assertArrayEquals(new float[] {2, (float) Math.sqrt(2), NAN, NAN}, r.standardDeviations(), 1e-6f);
        assertArrayEquals(new float[] {12, 6, 30, NAN}, r.means(), 1e-6f);
    }

    @Test
    void shiftsAreFromTheFirstMapOverThePixelsThatBothHave() {
        Repeatability r = threeMaps();
        assertEquals(new Repeatability.Run(2, 7.5, 2, 0), r.runs().get(0));
        assertEquals(new Repeatability.Run(2, 21, 1, 2), r.runs().get(1));
        assertEquals(new Repeatability.Run(2, 10.5, 2, 3), r.runs().get(2));
        assertEquals(1.5, r.drift().value(), 1e-12);
        assertEquals(Math.sqrt(14 / 6.0), r.shiftStandardDeviation(), 1e-12);
    }

    @Test
    void noiseAndShiftsAreToldApart() {
        // 20 maps of 5000 pixels: noise 0.3 nm, whole maps shifted by a drift of 0.1 nm per map, whose standard deviation is
        // 0.1 sqrt((20^2 - 1) / 12 * 20 / 19).
        Random random = new Random(5);
        Repeatability r = Repeatability.over(5000);
        for (int map = 0; map < 20; map++) {
            float[] pixels = new float[5000];
            for (int i = 0; i < pixels.length; i++) {
                pixels[i] = (float) (250 + 0.01 * i + 0.1 * map + 0.3 * random.nextGaussian());
            }
            r.add(pixels);
        }
        double shift = 0.1 * Math.sqrt((20 * 20 - 1) / 12.0 * 20 / 19);
        assertEquals(0.3, r.noise(), 0.003);
        assertEquals(shift, r.shiftStandardDeviation(), 0.01);
        assertEquals(Math.hypot(0.3, shift), r.standardDeviation(), 0.01);
        assertEquals(0.1, r.drift().value(), 0.001);
        assertTrue(!r.drift().covers(0));
    }

    @Test
    void aFirstValueOfTheWrongOrderCostsNoPrecision() {
        // 400 once, then 199 times 200 -+ 0.1 alternately: against two passes in double precision.
        Repeatability r = Repeatability.over(1);
        double[] values = new double[200];
        for (int i = 0; i < 200; i++) {
            float value = i == 0 ? 400 : i % 2 == 0 ? 200.1f : 199.9f;
            values[i] = value;
            r.add(new float[] {value});
        }
        double exact = new Sample(values).standardDeviation();
        assertEquals(exact, r.standardDeviation(), 1e-3 * exact);
    }

    @Test
    void oneMapSaysNothingYet() {
        Repeatability r = Repeatability.over(2).add(new float[] {1, 2});
        assertTrue(Double.isNaN(r.standardDeviation()) && Double.isNaN(r.shiftStandardDeviation())
                && Double.isNaN(r.noise()));
        assertThrows(IllegalArgumentException.class, r::drift);
    }

    @Test
    void mapsOfOtherSizesAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> Repeatability.over(2).add(new float[3]));
        assertThrows(IllegalArgumentException.class, () -> Repeatability.over(0));
    }

    private static Repeatability threeMaps() {
        return Repeatability.over(4).add(new float[] {10, 5, NAN, NAN}).add(new float[] {12, NAN, 30, NAN})
                .add(new float[] {14, 7, NAN, NAN});
    }
}
