package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.photo.SignalSource;
import java.util.stream.IntStream;
import org.apache.commons.math3.distribution.ChiSquaredDistribution;

/**
 * Everything about a curve and its noise that can be worked out before the first pixel. Immutable; serves all threads.
 *
 * @param curve      the colour curve
 * @param noise      the expected noise
 * @param levels     levels of light in the picture
 * @param threshold  chi-square of the farthest candidates, which one good pixel in a hundred thousand exceeds
 * @param acceptance chi-square above which a thickness does not explain a pixel, which one good pixel in ten thousand exceeds
 * @param tables     the curve as tangents, one table for each level
 * @param partial    the same for pixels with censored channels
 * @param cells      which parts of it can explain a pixel
 */
record CurveIndex(ColourCurve curve, ExpectedNoise noise, LightLevels levels, double threshold, double acceptance,
                  TangentTable[] tables, PartialTables partial, CurveCells cells) {
    private static final double CANDIDATE_PROBABILITY = 1e-5;
    private static final double OFF_CURVE_PROBABILITY = 1e-4;

    static CurveIndex of(ColourCurve curve, ExpectedNoise noise, LightLevels levels) {
        ChiSquaredDistribution chiSquare = new ChiSquaredDistribution(Math.max(1, curve.channels() - 1));
        double threshold = chiSquare.inverseCumulativeProbability(1 - CANDIDATE_PROBABILITY);
        double acceptance = chiSquare.inverseCumulativeProbability(1 - OFF_CURVE_PROBABILITY);
        CurveSampling sampling = CurveSampling.of(curve, noise, levels.light(levels.count() - 1));
        TangentTable[] tables = new TangentTable[levels.count()];
        IntStream.range(0, tables.length).parallel()
                .forEach(i -> tables[i] = TangentTable.of(curve, noise, levels.light(i), sampling));
        CurveCells cells = CurveCells.of(curve, noise, levels.light(0), tables[0], threshold);
        return new CurveIndex(curve, noise, levels, threshold, acceptance, tables, new PartialTables(curve, noise, levels, sampling), cells);
    }

    /** The index of a photo's signal. */
    static CurveIndex of(ColourCurve curve, SignalSource photo) {
        double[] light = photo.lightRange();
        return of(curve, photo::variance, LightLevels.of(light[0], light[1]));
    }

    /** The table at a middle level of light. */
    TangentTable middle() {
        return tables[tables.length / 2];
    }

    /** Whether the curve turns back on itself, so that only the slope of a film tells how it goes on there. */
    boolean turnsBack() {
        return curve.channels() == 1;
    }

    /**
     * The table for a pixel.
     *
     * @param level    level of light
     * @param censored channels at an end of their scale, bit c for channel c; where that is all of them the table is that of none
     */
    TangentTable table(int level, int censored) {
        return censored == 0 || censored == (1 << curve.channels()) - 1 ? tables[level] : partial.of(censored, level);
    }

    /** Whether a candidate passes the off-curve test. */
    boolean explains(float thicknessNm, float cost, int level, int censored) {
        TangentTable table = table(level, censored);
        return cost - table.logDeterminant(table.nearest(thicknessNm)) <= acceptance;
    }
}
