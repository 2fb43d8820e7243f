package iridepth.planning;

import iridepth.calibration.FitInput;
import iridepth.calibration.StepDesign;
import iridepth.colour.Light;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.planning.LightChoice.Option;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * What is planned for a film.
 *
 * @param option the light or lights that it is for, and what to expect
 * @param ranked the lights compared, each alone and in pairs, the best first; empty where there is nothing to compare
 * @param design the films to calibrate with, where the camera needs it
 */
public record Plan(Option option, List<Option> ranked, Optional<StepDesign> design) {
    /** Mean reflectance of a flat below which it is too dark to serve. */
    private static final double DARK = 1e-3;

    /**
     * What is looked at.
     *
     * @param stack the stack with its film
     * @param flat  the surface of the flat; empty for the stack without its film
     * @param view  directions of view
     * @param range thicknesses
     */
    public record Subject(Stack stack, Optional<Stack> flat, View view, ThicknessRange range) {
    }

    /**
     * The films that there are to calibrate with.
     *
     * @param uncertaintyNm standard uncertainty of their thickness by the reference instrument, nm
     * @param atHand        their thicknesses, nm; empty for any
     * @param count         how many to take; 0 for as many as pay
     */
    public record Films(double uncertaintyNm, double[] atHand, int count) {
    }

    /**
     * Compares lights, each alone and in pairs, without regard to calibration; plans for the best of them alone.
     *
     * @param limit chi-square up to which two thicknesses are confusable
     */
    public static Plan compare(Camera camera, Subject subject, List<Light> lights, double limit, Films films) {
        LightChoice choice = LightChoice.of(camera, subject.stack, subject.view, subject.range, lights, limit);
        List<Option> ranked = new ArrayList<>();
        if (lights.size() > 1) {
            ranked.addAll(choice.singles());
            ranked.addAll(choice.pairs());
        }
        return of(camera, subject, choice.singles().get(0), List.copyOf(ranked), limit, films);
    }

    /** Plans for one photo under each light, all read jointly. */
    public static Plan jointly(Camera camera, Subject subject, List<Light> lights, double limit, Films films) {
        Option option = LightChoice.jointly(camera, subject.stack, subject.view, subject.range, lights, limit);
        return of(camera, subject, option, List.of(), limit, films);
    }

    private static Plan of(Camera camera, Subject subject, Option option, List<Option> ranked, double limit, Films films) {
        if (!camera.generic()) {
            return new Plan(option, ranked, Optional.empty());
        }
        StepDesign design = design(camera, subject, option, films);
        return new Plan(Option.of(option.lights(), design.expected(option.curve()), option.noise(), limit), ranked,
                Optional.of(design));
    }

    /** The films to calibrate a generic camera with. */
    public static StepDesign design(Camera camera, Subject subject, Option option, Films films) {
        List<Light> lights = new ArrayList<>();
        List<Spectrum> supposed = new ArrayList<>();
        for (Light light : option.lights()) {
            for (Spectrum sensitivity : camera.sensitivities()) {
                lights.add(light);
                supposed.add(sensitivity);
            }
        }
        Stack flat = subject.flat.orElseGet(() -> subject.stack.bare());
        boolean bright = Arrays.stream(Reflectance.of(flat, subject.view).spectrum(0)).average().orElseThrow() > DARK;
        FitInput input = FitInput.of(option.curve().channelNames().subList(0, lights.size()), lights.get(0), subject.stack,
                bright ? Optional.of(flat) : Optional.empty(), subject.view, subject.range, List.of()).withLights(lights);
        return StepDesign.of(input, supposed, option.noise(), films.uncertaintyNm, films.atHand, films.count);
    }
}
