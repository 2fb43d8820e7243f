package iridepth.report;

import iridepth.quality.NonUniformity;
import iridepth.quality.Verdict;
import iridepth.reading.State;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/**
 * What became of one photo of a lot.
 *
 * @param photo         name of the photo's file
 * @param folder        name of its result folder in the lot's; empty if the photo could not be used
 * @param pixels        how many pixels are in each state; empty likewise
 * @param mean          mean thickness, nm; NaN if nothing was read, as are the following
 * @param deviation     standard deviation over the pixels, nm
 * @param median        median, nm
 * @param low           thickness below which 1 % of the pixels lie, nm
 * @param high          thickness above which 1 % lie, nm
 * @param nonUniformity standard deviation over mean, per cent
 * @param random        random standard uncertainty of a pixel, root mean square, nm
 * @param systematic    systematic standard uncertainty, nm
 * @param verdict       against the recipe's limits; empty if there are none
 * @param message       why the photo could not be used; else empty
 */
public record LotRow(String photo, String folder, Map<State, Long> pixels, double mean, double deviation, double median, double low,
                     double high, double nonUniformity, double random, double systematic, Optional<Verdict> verdict,
                     String message) {
    /** The row of a photo that has been read. */
    public static LotRow of(String photo, SavedResult result) {
        Map<State, Long> pixels = new LinkedHashMap<>();
        for (State state : State.values()) {
            double count = result.number("pixels", state.label());
            pixels.put(state, Double.isNaN(count) ? 0 : (long) count);
        }
        String words = result.text("tolerance", "verdict");
        return new LotRow(photo, result.folder().getFileName().toString(), pixels, result.number("thickness", "mean"),
                result.number("thickness", "standard_deviation"), result.number("thickness", "median"), result.percentile(1),
                result.percentile(99), result.number("non_uniformity_percent", NonUniformity.SIGMA.formula()),
                result.number("standard_uncertainty_rms", "random_nm"), result.number("standard_uncertainty_rms", "systematic_nm"),
                Arrays.stream(Verdict.values()).filter(v -> v.words().equals(words)).findFirst(), "");
    }

    /** The row of a photo that could not be used. */
    public static LotRow unusable(String photo, String message) {
        double none = Double.NaN;
        return new LotRow(photo, "", Map.of(), none, none, none, none, none, none, none, none, Optional.empty(), message);
    }

    /** Whether the photo has been read. */
    public boolean isUsable() {
        return message.isEmpty();
    }

    /** Share of the pixels that have a thickness, NaN if the photo could not be used. */
    public double share() {
        long all = pixels.values().stream().mapToLong(Long::longValue).sum();
        long read = pixels.entrySet().stream().filter(e -> e.getKey().hasThickness()).mapToLong(Map.Entry::getValue).sum();
        return all == 0 ? Double.NaN : (double) read / all;
    }
}
