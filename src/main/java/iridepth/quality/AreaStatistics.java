package iridepth.quality;

/**
 * The readings of an area.
 *
 * @param pixels pixels of the area that lie on the map, read or not
 * @param average mean thickness with its uncertainty
 * @param uniformity location and spread of the thickness
 */
public record AreaStatistics(long pixels, Average average, Uniformity uniformity) {

    /** Statistics of an area; in memory that does not grow with it. */
    public static AreaStatistics of(MeasuredField field, Area area) {
        Average.Sum sum = new Average.Sum(field);
        long[] pixels = new long[1];
        double[] ends = {Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY};
        area.forEachPixel(field.thickness(), (x, y) -> {
            pixels[0]++;
            sum.addPixel(x, y);
            double nm = field.thickness().at(x, y);
            ends[0] = nm < ends[0] ? nm : ends[0];
            ends[1] = nm > ends[1] ? nm : ends[1];
        });
        Distribution distribution = ends[0] <= ends[1] ? Distribution.over(ends[0], ends[1]) : Distribution.over(0, 0);
        area.forEachPixel(field.thickness(), (x, y) -> distribution.add(field.thickness().at(x, y)));
        return new AreaStatistics(pixels[0], sum.average(), Uniformity.of(distribution));
    }
}
