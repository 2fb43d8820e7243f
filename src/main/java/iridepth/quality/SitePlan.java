package iridepth.quality;

import java.util.ArrayList;
import java.util.List;

/**
 * Where a round part is sampled: a site at the centre and rings of evenly spaced sites about it, the rings at equal steps of
 * the radius. These plans are common practice for wafers; the outermost ring lies on the radius given, so give the radius of
 * the part less its edge exclusion.
 *
 * <p>Sites are numbered from 1, at the centre, ring by ring outwards, each ring from the right (+x) on through down (+y).
 */
public enum SitePlan {

    /** Centre and four at the edge. */
    FIVE(4),

    /** Centre, four at half the radius, four at the edge: a cross. */
    NINE(4, 4),

    /** Centre, four at half the radius, eight at the edge. */
    THIRTEEN(4, 8),

    /** Centre, eight at half the radius, sixteen at the edge. */
    TWENTY_FIVE(8, 16),

    /** Centre, eight, sixteen and twenty-four at thirds of the radius: every site stands for about the same area. */
    FORTY_NINE(8, 16, 24);

    private final int[] rings;

    SitePlan(int... rings) {
        this.rings = rings;
    }

    /**
     * The plan with a number of sites.
     *
     * @param sites 5, 9, 13, 25 or 49
     * @throws IllegalArgumentException for any other number
     */
    public static SitePlan ofSites(int sites) {
        for (SitePlan plan : values()) {
            if (plan.sites() == sites) {
                return plan;
            }
        }
        throw new IllegalArgumentException("no plan has " + sites + " sites: choose 5, 9, 13, 25 or 49");
    }

    /** Number of sites. */
    public int sites() {
        int sites = 1;
        for (int ring : rings) {
            sites += ring;
        }
        return sites;
    }

    /**
     * The sites on a map.
     *
     * @param centre of the part
     * @param radius of the outermost ring, pixels, positive
     */
    public List<Position> positions(Position centre, double radius) {
        if (!(radius > 0 && radius < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("sites on a radius of " + radius + " pixels: give a positive finite radius");
        }
        List<Position> positions = new ArrayList<>();
        positions.add(centre);
        for (int ring = 0; ring < rings.length; ring++) {
            double distance = radius * (ring + 1) / rings.length;
            for (int i = 0; i < rings[ring]; i++) {
                double angle = 2 * Math.PI * i / rings[ring];
                positions.add(new Position(centre.x() + distance * Math.cos(angle),
                        centre.y() + distance * Math.sin(angle)));
            }
        }
        return List.copyOf(positions);
    }
}
