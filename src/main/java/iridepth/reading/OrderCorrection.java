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
    ReadRow correct(int y, ReadRow row, CurveIndex index) {
        PixelRow pixels = row.pixels();
        ReadRow result = row;
        FilmRegion[] of = regions.of(y);
        for (int noted = 0; noted < pixels.noted(); noted++) {
            int x = pixels.column()[noted];
            OrderChain chain = of[x] == null || pixels.count(noted) < 2 ? null : chains.get(of[x]);
            int k = chain == null ? -1 : chain.follow(row.thickness()[x], pixels, noted);
            if (k >= 0) {
                if (result == row) {
                    result = row.copy();
                }
                result.take(noted, k, row.margin()[noted], index);
            }
        }
        return result;
    }
}
