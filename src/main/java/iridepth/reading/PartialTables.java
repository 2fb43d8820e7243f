package iridepth.reading;

import iridepth.curve.ColourCurve;
import java.util.concurrent.ConcurrentHashMap;
import java.util.stream.IntStream;

/**
 * The curve as tangents for pixels with censored channels: by the others alone, since a channel at the end of its scale tells on
 * which side of it a film lies, but next to nothing of where. Tables are made when first asked for. Safe for several threads.
 */
final class PartialTables {
    private final ColourCurve curve;
    private final ExpectedNoise noise;
    private final LightLevels levels;
    private final CurveSampling sampling;
    private final ConcurrentHashMap<Integer, TangentTable> tables = new ConcurrentHashMap<>();

    PartialTables(ColourCurve curve, ExpectedNoise noise, LightLevels levels, CurveSampling sampling) {
        this.curve = curve;
        this.noise = noise;
        this.levels = levels;
        this.sampling = sampling;
    }

    /** The channels that are not censored, in order; bit c of the mask stands for channel c. */
    int[] measured(int censored) {
        return IntStream.range(0, curve.channels()).filter(c -> (censored >> c & 1) == 0).toArray();
    }

    /** The table by the channels that are not censored, of which there must be one, at a level of light. */
    TangentTable of(int censored, int level) {
        return tables.computeIfAbsent(censored * levels.count() + level, key -> {
            int[] measured = measured(censored);
            return TangentTable.of(curve.select(measured), (c, value, light) -> noise.variance(measured[c], value, light),
                    levels.light(level), sampling);
        });
    }
}
