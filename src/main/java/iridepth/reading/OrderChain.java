package iridepth.reading;

import java.util.Map;
import java.util.TreeMap;

/**
 * Another order for a whole region: for each bin of the thickness chosen there, the bin of the thickness in its place.
 *
 * @param evidence by how much its -2 ln likelihood exceeds that of the order chosen
 * @param meanNm   its mean thickness, nm
 * @param binNm    width of a bin, nm
 * @param bins     bin in the place of each chosen bin
 */
record OrderChain(double evidence, double meanNm, double binNm, TreeMap<Integer, Integer> bins) {
    /** Bins by which a thickness may miss its place. */
    private static final int NEAR = 2;

    /** Whether it would lead a pixel from one bin to about another. */
    boolean leads(int from, int to) {
        Integer there = bins.get(from);
        return there != null && Math.abs(there - to) <= 1;
    }

    /**
     * Finds the candidate of a noted pixel that the chain leads to.
     *
     * @param chosenNm the thickness chosen so far
     * @return its place among the row's candidates, or -1 where there is none
     */
    int follow(float chosenNm, PixelRow row, int noted) {
        int bin = (int) (chosenNm / binNm);
        Map.Entry<Integer, Integer> below = bins.floorEntry(bin);
        Map.Entry<Integer, Integer> above = bins.ceilingEntry(bin);
        Map.Entry<Integer, Integer> nearest = below == null || above != null && above.getKey() - bin < bin - below.getKey()
                ? above : below;
        int away = Math.abs(nearest.getKey() - bin);
        double wanted = (nearest.getValue() + 0.5) * binNm;
        int best = -1;
        double least = (NEAR + away) * binNm;
        for (int k = row.start()[noted]; k < row.start()[noted + 1]; k++) {
            double difference = Math.abs(row.thickness()[k] - wanted);
            if (difference < least) {
                least = difference;
                best = k;
            }
        }
        return best;
    }
}
