package iridepth.quality;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import org.junit.jupiter.api.Test;

class SitesTest {

    private static final Position CENTRE = new Position(50, 40);

    @Test
    void everyPlanHasItsCentreFirstAndItsEdgeOnTheRadius() {
        for (int sites : new int[] {5, 9, 13, 25, 49}) {
            List<Position> positions = SitePlan.ofSites(sites).positions(CENTRE, 30);
            assertEquals(sites, positions.size());
            assertEquals(CENTRE, positions.get(0));
            assertEquals(30, CENTRE.distanceTo(positions.get(sites - 1)), 1e-12);
            assertEquals(sites, positions.stream().distinct().count());
        }
        assertThrows(IllegalArgumentException.class, () -> SitePlan.ofSites(10));
    }

    @Test
    void fiveSitesAreTheCentreAndFourOnACross() {
        assertSites(new double[][] {{50, 40}, {80, 40}, {50, 70}, {20, 40}, {50, 10}},
                SitePlan.FIVE.positions(CENTRE, 30));
    }

    @Test
    void nineSitesAreTwoOnEachArmOfACross() {
        assertSites(new double[][] {{50, 40}, {65, 40}, {50, 55}, {35, 40}, {50, 25}, {80, 40}, {50, 70}, {20, 40},
            {50, 10}}, SitePlan.NINE.positions(CENTRE, 30));
    }

    @Test
    void fortyNineSitesStandForEqualAreas() {
        // Ring j of 3 stands for radii j - 1/2 to j + 1/2 (thirds of the radius), the centre for 0 to 1/2.
        List<Position> positions = SitePlan.FORTY_NINE.positions(CENTRE, 3);
        for (int ring = 0; ring <= 3; ring++) {
            int r = ring;
            long sites = positions.stream().filter(p -> Math.round(CENTRE.distanceTo(p)) == r).count();
            double inner = Math.max(0, ring - 0.5);
            double area = Math.PI * ((ring + 0.5) * (ring + 0.5) - inner * inner);
            assertEquals(Math.PI / 4, area / sites, 1e-12);
        }
    }

    @Test
    void aSiteIsTheMeanOverItsDisk() {
        // Pixels at most 1 from (5, 5): five of them; the wedge's mean is that of the centre.
        float[] values = new float[11 * 11];
        for (int i = 0; i < values.length; i++) {
            values[i] = 100 + i % 11;
        }
        MeasuredField f = MeasuredField.of(Field.of(11, 11, values), Field.constant(11, 11, 1),
                Field.constant(11, 11, 0.5));
        Sites sites = Sites.of(f, List.of(new Position(5, 5), new Position(40, 5), new Position(2, 5)), 1);
        Average first = sites.sites().get(0).average();
        assertEquals(5, first.count());
        assertEquals(105, first.thickness(), 1e-9);
        assertEquals(Math.sqrt(0.5), first.spread(), 1e-9);
        assertEquals(Math.sqrt(1 / 5.0 + 0.25), first.standardUncertainty(), 1e-9);
        assertEquals(0, sites.sites().get(1).average().count());
        assertEquals(2, sites.uniformity().count());
        assertEquals(103.5, sites.uniformity().mean(), 1e-9);
    }

    @Test
    void radiiThatAreNoneAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> SitePlan.FIVE.positions(CENTRE, 0));
        assertThrows(IllegalArgumentException.class, () -> new Disk(CENTRE, -1));
    }

    private static void assertSites(double[][] expected, List<Position> actual) {
        assertEquals(expected.length, actual.size());
        for (int i = 0; i < expected.length; i++) {
            assertEquals(0, actual.get(i).distanceTo(new Position(expected[i][0], expected[i][1])), 1e-9);
        }
    }
}
