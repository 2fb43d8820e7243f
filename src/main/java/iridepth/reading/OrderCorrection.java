package iridepth.reading;

import java.util.Map;

/**
 * Other orders for regions that were chosen wrongly, found when the whole picture had been seen: to be taken in the next way up.
 *
 * @param regions the regions as they were found
 * @param chains  the order that each is to take
 */
record OrderCorrection(Regions regions, Map<FilmRegion, OrderChain> chains) {
    /** Corrects a row: the same object where nothing changes. */
    ReadRow correct(int y, PixelRow pixels, ReadRow row, CurveIndex index) {
        FilmRegion[] of = regions.of(y);
        ReadRow result = row;
        int candidate = 0;
        int open = 0;
        for (int x = 0; x < of.length; x++) {
            int count = Math.max(0, pixels.kind(x));
            if (count > 1) {
                OrderChain chain = of[x] == null ? null : chains.get(of[x]);
                int k = chain == null ? -1 : chain.follow(row.thickness()[x], pixels, candidate, count);
                if (k >= 0) {
                    if (result == row) {
                        result = row.copy();
                    }
                    result.take(x, pixels, candidate + k, open + k, row.margin()[x], index);
                }
                open += count;
            }
            candidate += count;
        }
        return result;
    }
}
