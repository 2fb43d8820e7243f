package iridepth.reading;

import iridepth.curve.ColourCurve;
import java.util.stream.IntStream;

/**
 * Everything about a curve and its noise that can be worked out before the first pixel. Immutable; serves all threads.
 *
 * @param curve     the colour curve
 * @param noise     the expected noise
 * @param levels    levels of light in the picture
 * @param threshold chi-square of the farthest candidates
 * @param tables    the curve as tangents, one table for each level
 * @param cells     which parts of it can explain a pixel
 */
record CurveIndex(ColourCurve curve, ExpectedNoise noise, LightLevels levels, double threshold, TangentTable[] tables,
                  CurveCells cells) {
    static CurveIndex of(ColourCurve curve, ExpectedNoise noise, LightLevels levels, double threshold) {
        int brightest = levels.count() - 1;
        int finer = TangentTable.division(curve, noise, levels.light(brightest));
        TangentTable[] tables = new TangentTable[levels.count()];
        IntStream.range(0, tables.length).parallel()
                .forEach(i -> tables[i] = TangentTable.of(curve, noise, levels.light(i), finer));
        CurveCells cells = CurveCells.of(curve, noise, levels.light(0), tables[0], threshold);
        return new CurveIndex(curve, noise, levels, threshold, tables, cells);
    }
}
