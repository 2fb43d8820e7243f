package iridepth.recipe;

import iridepth.calibration.StepSignal;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.RegionStatistics;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** Measures the steps of a recipe on their photos. */
final class Steps {
    /** A patch with more than this share of samples at an end of the scale counts as clipped. */
    private static final double CLIPPED_SHARE = 0.01;

    private Steps() {
    }

    /** What one photo shows of a step: which step, and under which of the recipe's lights. */
    private record Sight(int step, int light) {
    }

    /**
     * The signal of every step, in the recipe's order: the channels under each light, one after the other.
     *
     * @param channels channels that every step photo must have
     * @throws PhotoException if a photo cannot be used or a region lies outside it
     */
    static List<StepSignal> measure(Rig rig, int channels) {
        List<CameraSpec.Step> steps = rig.recipe().camera().steps();
        int lights = rig.recipe().lights().size();
        RegionStatistics[][] patches = new RegionStatistics[steps.size()][lights * channels];
        Map<Path, List<Sight>> byImage = new LinkedHashMap<>();
        for (int i = 0; i < patches.length; i++) {
            for (int light = 0; light < lights; light++) {
                byImage.computeIfAbsent(steps.get(i).images().get(light), image -> new ArrayList<>()).add(new Sight(i, light));
            }
        }
        byImage.forEach((image, sights) -> {
            try (PhotoFile photo = PhotoFile.open(image)) {
                if (photo.info().channels() != channels) {
                    throw new PhotoException(image + ": the steps have " + photo.info().channels() + " channels where the photo has "
                            + channels + "; take both with the same camera settings");
                }
                for (Sight sight : sights) {
                    RegionStatistics[] patch = rig.patch(photo, sight.light, steps.get(sight.step).region());
                    System.arraycopy(patch, 0, patches[sight.step], sight.light * channels, channels);
                }
            }
        });
        List<StepSignal> signals = new ArrayList<>();
        for (int i = 0; i < patches.length; i++) {
            signals.add(signal(steps.get(i), patches[i]));
        }
        return List.copyOf(signals);
    }

    private static StepSignal signal(CameraSpec.Step step, RegionStatistics[] patch) {
        double[] signal = Arrays.stream(patch).mapToDouble(RegionStatistics::mean).toArray();
        double[] variance = Arrays.stream(patch).mapToDouble(p -> p.standardError() * p.standardError()).toArray();
        boolean clipped = Arrays.stream(patch).anyMatch(p -> p.topFraction() + p.bottomFraction() > CLIPPED_SHARE);
        String label = "the step of " + step.thicknessNm() + " nm at " + step.region() + " in "
                + step.images().get(0).getFileName();
        return new StepSignal(label, step.thicknessNm(), step.uncertaintyNm(), signal, variance, clipped);
    }
}
