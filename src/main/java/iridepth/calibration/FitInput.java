package iridepth.calibration;

import iridepth.colour.Light;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;

/**
 * All that a calibration is made from.
 *
 * @param channels      names of the channels, one or more
 * @param lights        the light of each channel, as far as it is known
 * @param sensitivities spectral sensitivity of each channel in any unit, or empty where the sensor is unknown
 * @param stack         the stack with the film
 * @param flatStack     the surface of the flat, or empty where the signals are not relative to one
 * @param view          directions of view, as far as they are known
 * @param range         thicknesses that the calibration is to serve
 * @param steps         films of known thickness
 * @param patches       patches of known reflectance
 * @param inputs        how well the inputs are known
 * @param indexPrior    how far the film's index may lie from the stated one, where it is to be fitted; else empty
 */
public record FitInput(List<String> channels, List<Light> lights, List<Spectrum> sensitivities, Stack stack,
                       Optional<Stack> flatStack, View view, ThicknessRange range, List<StepSignal> steps,
                       List<PatchSignal> patches, InputUncertainty inputs, Optional<IndexPrior> indexPrior) {
    /**
     * Keeps copies of the lists and checks that they fit together.
     *
     * @throws IllegalArgumentException if a count does not match, a stack with a film is missing, or a step is clipped
     */
    public FitInput {
        channels = List.copyOf(channels);
        lights = List.copyOf(lights);
        sensitivities = List.copyOf(sensitivities);
        steps = List.copyOf(steps);
        patches = List.copyOf(patches);
        if (channels.isEmpty() || lights.size() != channels.size()) {
            throw new IllegalArgumentException("as many lights as channels are needed, at least one, not " + lights.size()
                    + " and " + channels.size());
        }
        if (!sensitivities.isEmpty() && sensitivities.size() != channels.size()) {
            throw new IllegalArgumentException("there are sensitivities for " + sensitivities.size() + " channels where the photo "
                    + "has " + channels.size());
        }
        stack.filmIndex();
        if (flatStack.isPresent() && flatStack.get().hasFilm()) {
            throw new IllegalArgumentException("the flat's stack " + flatStack.get() + " has a layer without a thickness; give "
                    + "it, as in 'air / SiO2 1.5 nm / Si'");
        }
        range.requireResolved(stack);
        for (StepSignal step : steps) {
            requireChannels(step.label(), step.signal().length, channels.size());
            if (step.clipped()) {
                throw new IllegalArgumentException(step.label() + ": the patch is clipped; take it with less exposure, together "
                        + "with flat and photo");
            }
            new ThicknessRange(0, Math.max(1, step.thicknessNm())).requireResolved(stack);
        }
        for (PatchSignal patch : patches) {
            requireChannels(patch.label(), patch.signal().length, channels.size());
        }
    }

    private static void requireChannels(String label, int given, int wanted) {
        if (given != wanted) {
            throw new IllegalArgumentException(label + ": it has " + given + " channels where the calibration has " + wanted);
        }
    }

    /** An input of one light and an unknown sensor, with default uncertainties. */
    public static FitInput of(List<String> channels, Light light, Stack stack, Optional<Stack> flatStack, View view,
                              ThicknessRange range, List<StepSignal> steps) {
        return new FitInput(channels, new ArrayList<>(Collections.nCopies(channels.size(), light)), List.of(), stack, flatStack,
                view, range, steps, List.of(), InputUncertainty.DEFAULT, Optional.empty());
    }

    /** This input with known sensitivities, one per channel. */
    public FitInput withSensitivities(List<Spectrum> known) {
        return new FitInput(channels, lights, known, stack, flatStack, view, range, steps, patches, inputs, indexPrior);
    }

    /** This input with other lights, one per channel. */
    public FitInput withLights(List<Light> others) {
        return new FitInput(channels, others, sensitivities, stack, flatStack, view, range, steps, patches, inputs, indexPrior);
    }

    /** This input with patches of known reflectance. */
    public FitInput withPatches(List<PatchSignal> known) {
        return new FitInput(channels, lights, sensitivities, stack, flatStack, view, range, steps, known, inputs, indexPrior);
    }

    /** This input with other uncertainties. */
    public FitInput withInputs(InputUncertainty others) {
        return new FitInput(channels, lights, sensitivities, stack, flatStack, view, range, steps, patches, others, indexPrior);
    }

    /** This input with another stack, such as one whose film has another index. */
    public FitInput withStack(Stack other) {
        return new FitInput(channels, lights, sensitivities, other, flatStack, view, range, steps, patches, inputs, indexPrior);
    }

    /** This input seen from other directions. */
    public FitInput withView(View other) {
        return new FitInput(channels, lights, sensitivities, stack, flatStack, other, range, steps, patches, inputs, indexPrior);
    }

    /** This input with the film's index to be fitted. */
    public FitInput withIndexFitted(IndexPrior spread) {
        return new FitInput(channels, lights, sensitivities, stack, flatStack, view, range, steps, patches, inputs,
                Optional.of(spread));
    }

    /** This input with films beside its steps. */
    FitInput withMore(List<StepSignal> films) {
        List<StepSignal> all = new ArrayList<>(steps);
        all.addAll(films);
        return new FitInput(channels, lights, sensitivities, stack, flatStack, view, range, all, patches, inputs, indexPrior);
    }

    /** This input without one of its steps. */
    public FitInput without(int step) {
        List<StepSignal> fewer = new ArrayList<>(steps);
        fewer.remove(step);
        return new FitInput(channels, lights, sensitivities, stack, flatStack, view, range, fewer, patches, inputs, indexPrior);
    }

    /** What the bumps of each channel multiply: the light, times the sensitivity where it is known, with largest magnitude 1. */
    List<Spectrum> carriers() {
        List<Spectrum> result = new ArrayList<>();
        for (int c = 0; c < channels.size(); c++) {
            Spectrum carrier = lights.get(c).power();
            if (!sensitivities.isEmpty()) {
                carrier = carrier.times(sensitivities.get(c));
            }
            double largest = 0;
            for (double v : carrier.toArray()) {
                largest = Math.max(largest, Math.abs(v));
            }
            if (!(largest > 0)) {
                throw new IllegalArgumentException("channel " + channels.get(c) + " sees nothing of its light");
            }
            result.add(carrier.times(1 / largest));
        }
        return List.copyOf(result);
    }
}
