package iridepth.reading;

import iridepth.photo.Region;
import java.util.List;

/**
 * A region of continuous thickness whose order nothing settles: no pixel in it excludes the alternatives, and no known point
 * or edge of the film lies in it. A known point in it, an edge where its film falls to nothing, or another light would.
 *
 * @param box          rectangle around it
 * @param pixels       number of its pixels
 * @param meanNm       mean of the thickness chosen, nm
 * @param alternatives other orders that explain it about as well, the likeliest first
 */
public record DoubtfulRegion(Region box, long pixels, double meanNm, List<Alternative> alternatives) {
    /**
     * Another order for the whole region.
     *
     * @param meanNm   mean thickness, nm
     * @param evidence by how much its -2 ln likelihood exceeds that of the order chosen, below 10
     */
    public record Alternative(double meanNm, double evidence) {
    }

    /** Keeps a copy of the list. */
    public DoubtfulRegion {
        alternatives = List.copyOf(alternatives);
    }
}
