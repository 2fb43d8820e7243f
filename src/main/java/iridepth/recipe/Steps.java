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

    /**
     * The signal of every step, in the recipe's order.
     *
     * @param channels channels that every step photo must have
     * @throws PhotoException if a photo cannot be used or a region lies outside it
     */
    static List<StepSignal> measure(Rig rig, int channels) {
        List<CameraSpec.Step> steps = rig.recipe().camera().steps();
        StepSignal[] signals = new StepSignal[steps.size()];
        Map<Path, List<Integer>> byImage = new LinkedHashMap<>();
        for (int i = 0; i < signals.length; i++) {
            byImage.computeIfAbsent(steps.get(i).image(), image -> new ArrayList<>()).add(i);
        }
        byImage.forEach((image, indices) -> {
            try (PhotoFile photo = PhotoFile.open(image)) {
                if (photo.info().channels() != channels) {
                    throw new PhotoException(image + ": the steps have " + photo.info().channels() + " channels where the photo has "
                            + channels + "; take both with the same camera settings");
                }
                for (int i : indices) {
                    signals[i] = measure(rig, photo, steps.get(i));
                }
            }
        });
        return List.of(signals);
    }

    private static StepSignal measure(Rig rig, PhotoFile photo, CameraSpec.Step step) {
        RegionStatistics[] patch = rig.patch(photo, step.region());
        double[] signal = Arrays.stream(patch).mapToDouble(RegionStatistics::mean).toArray();
        double[] variance = Arrays.stream(patch).mapToDouble(p -> p.standardError() * p.standardError()).toArray();
        boolean clipped = Arrays.stream(patch).anyMatch(p -> p.topFraction() + p.bottomFraction() > CLIPPED_SHARE);
        String label = "the step of " + step.thicknessNm() + " nm at " + step.region() + " in " + step.image().getFileName();
        return new StepSignal(label, step.thicknessNm(), step.uncertaintyNm(), signal, variance, clipped);
    }
}
