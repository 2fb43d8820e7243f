package iridepth.simulation;

import java.util.Arrays;

/**
 * A photograph to take and all that a user would know, or believe, of it.
 *
 * @param name one word for files and messages
 * @param rig the true rig
 * @param stack the film
 * @param flatStack the surface of the flat; null where the rig is colour-managed and has none
 * @param rangeNm smallest and largest thickness to consider
 * @param steps the patches of known thickness; null where there are none
 * @param field the sample
 * @param believedLamp the lamp that the recipe states
 * @param believedView the view that the recipe states
 * @param seed of all noise
 */
public record Scene(String name, Rig rig, FilmStack stack, FilmStack flatStack, double[] rangeNm, Steps steps,
        Field field, Lamp believedLamp, View believedView, long seed) {

    /** What was photographed; flat, dark and steps are null where the scene has none. */
    public record Pictures(Photograph photo, Photograph flat, Photograph dark, Photograph steps) {
    }

    /** The rig set up before the film. */
    public Shot shot() {
        FilmStack reference = flatStack == null ? FilmStack.parse("air / Si") : flatStack;
        double[] known = steps == null ? new double[0] : steps.thickness();
        double[] seen = field.range();
        double from = Math.min(seen[0], Arrays.stream(known).min().orElse(seen[0]));
        double to = Math.max(seen[1], Arrays.stream(known).max().orElse(seen[1]));
        return Shot.of(rig, stack, reference, Math.floor(from), Math.ceil(to) + 1);
    }

    /** Whether a dark is taken: where a flat is, and the camera adds a black level. */
    boolean hasDark() {
        return flatStack != null && rig.detector().black() > 0;
    }

    /** Takes all photographs. */
    public Pictures shoot() {
        return shoot(shot());
    }

    /** Takes all photographs with a rig already set up. */
    public Pictures shoot(Shot shot) {
        int width = field.width();
        int height = field.height();
        boolean hasFlat = flatStack != null;
        return new Pictures(shot.photo(field, seed),
                hasFlat ? shot.flat(width, height, seed + 1) : null,
                hasDark() ? shot.dark(width, height, seed + 2) : null,
                steps == null ? null : shot.steps(steps, seed + 3));
    }

    /** The same scene with all noise but rounding doubled. */
    public Scene noiseDoubled() {
        return new Scene(name + "-noisy", rig.detector(rig.detector().noiseDoubled()), stack, flatStack, rangeNm, steps,
                field, believedLamp, believedView, seed);
    }

    /** The same scene with another sample. */
    public Scene field(Field other) {
        return new Scene(name, rig, stack, flatStack, rangeNm, steps, other, believedLamp, believedView, seed);
    }

    /** The same scene with other noise. */
    public Scene seed(long other) {
        return new Scene(name, rig, stack, flatStack, rangeNm, steps, field, believedLamp, believedView, other);
    }
}
