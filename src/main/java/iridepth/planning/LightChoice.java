package iridepth.planning;

import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.photo.ChannelNoise;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Collectors;
import java.util.stream.IntStream;

/**
 * Lights compared: each alone, and two read jointly, ranked by the pixels that would be taken for another order, then by the
 * uncertainty to expect.
 *
 * @param singles each light alone, the best first
 * @param pairs   each two lights, the best first; empty for one light
 */
public record LightChoice(List<Option> singles, List<Option> pairs) {
    /**
     * One light, or several read jointly.
     *
     * @param lights   the lights
     * @param curve    what the channels show under them
     * @param noise    its noise
     * @param forecast what comes of it
     */
    public record Option(List<Light> lights, ColourCurve curve, ChannelNoise noise, Forecast forecast) {
        /** Forecasts for a curve and its noise. */
        public static Option of(List<Light> lights, ColourCurve curve, ChannelNoise noise, double limit) {
            return new Option(List.copyOf(lights), curve, noise, Forecast.of(curve, noise, limit));
        }

        /** The lights' names. */
        public String name() {
            return lights.stream().map(Light::name).collect(Collectors.joining(" + "));
        }
    }

    private static final Comparator<Option> BEST_FIRST = Comparator.comparingDouble((Option o) -> o.forecast.meanWrongOrder())
            .thenComparingDouble(o -> o.forecast.medianUncertaintyNm());

    /**
     * Compares lights.
     *
     * @param lights one or more
     * @param limit  chi-square up to which two thicknesses are confusable
     */
    public static LightChoice of(Camera camera, Stack stack, View view, ThicknessRange range, List<Light> lights, double limit) {
        Rig rig = Rig.of(camera, stack, view, range, lights);
        List<Option> singles = new ArrayList<>();
        List<Option> pairs = new ArrayList<>();
        for (int i = 0; i < lights.size(); i++) {
            singles.add(rig.option(limit, i));
            for (int j = i + 1; j < lights.size(); j++) {
                pairs.add(rig.option(limit, i, j));
            }
        }
        singles.sort(BEST_FIRST);
        pairs.sort(BEST_FIRST);
        return new LightChoice(List.copyOf(singles), List.copyOf(pairs));
    }

    /** All lights read jointly. */
    public static Option jointly(Camera camera, Stack stack, View view, ThicknessRange range, List<Light> lights, double limit) {
        return Rig.of(camera, stack, view, range, lights).option(limit, IntStream.range(0, lights.size()).toArray());
    }

    /** The channels under every light in one curve: the stack's reflectance is computed once. */
    private record Rig(Camera camera, List<Light> lights, ColourCurve curve) {
        static Rig of(Camera camera, Stack stack, View view, ThicknessRange range, List<Light> lights) {
            List<EffectiveResponses> responses = lights.stream().map(camera::responses).toList();
            EffectiveResponses all = EffectiveResponses.jointly(responses, lights.stream().map(Light::name).toList());
            return new Rig(camera, lights, ColourCurve.of(lights.size() == 1 ? responses.get(0) : all, Reflectance.of(stack, view), range, range.step(stack)));
        }

        Option option(double limit, int... chosen) {
            int count = curve.channels() / lights.size();
            ChannelNoise noise = null;
            for (int k = chosen.length - 1; k >= 0; k--) {
                ChannelNoise own = camera.noise(curve.select(channels(count, chosen[k])), lights.get(chosen[k]));
                noise = noise == null ? own : own.and(count, noise);
            }
            ColourCurve part = curve.select(channels(count, chosen));
            return Option.of(Arrays.stream(chosen).mapToObj(lights::get).toList(), part, noise, limit);
        }

        private static int[] channels(int count, int... chosen) {
            return Arrays.stream(chosen).flatMap(l -> IntStream.range(l * count, (l + 1) * count)).toArray();
        }
    }
}
