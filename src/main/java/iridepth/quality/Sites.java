package iridepth.quality;

import java.util.List;

/**
 * Thickness at chosen sites of a map, each the mean over a small disk.
 *
 * @param sites in the order given
 */
public record Sites(List<Site> sites) {

    /**
     * A site.
     *
     * @param position where
     * @param average over the disk about it; empty where nothing is read
     */
    public record Site(Position position, Average average) {
    }

    public Sites {
        sites = List.copyOf(sites);
    }

    /**
     * Measures a map at sites.
     *
     * @param positions for instance of a {@link SitePlan}
     * @param radius of the disk about each site, pixels, positive; at least 0.71, or a disk may fall between pixels
     */
    public static Sites of(MeasuredField field, List<Position> positions, double radius) {
        return new Sites(positions.stream()
                .map(position -> new Site(position, new Disk(position, radius).average(field))).toList());
    }

    /** Uniformity over the sites, each counting once; sites where nothing is read are left out. */
    public Uniformity uniformity() {
        return Uniformity.of(sites.stream().mapToDouble(site -> site.average().thickness()).toArray());
    }
}
