package iridepth.calibration;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.stream.Collectors;

/** Refuses steps that cannot calibrate, and says what to add. */
final class StepCheck {
    /** Colours that an unknown sensor needs, the flat's included; a known one has only its gain and the glare to find. */
    private static final int UNKNOWN_SENSOR = 4;
    private static final int KNOWN_SENSOR = 2;
    /** Two patches have the same colour when no channel differs by more than this share of it and so many standard deviations. */
    private static final double SAME_SHARE = 0.004;
    private static final double SAME_SIGMAS = 4;

    private StepCheck() {
    }

    /**
     * Checks an input.
     *
     * @throws IllegalArgumentException if there are too few steps of different colour
     */
    static void require(FitInput input) {
        List<String> repeated = new ArrayList<>();
        List<double[]> colours = new ArrayList<>();
        if (input.flatStack().isPresent()) {
            double[] flat = new double[input.channels().size()];
            java.util.Arrays.fill(flat, 1);
            colours.add(flat);
        }
        for (StepSignal step : input.steps()) {
            boolean fresh = colours.stream().noneMatch(c -> same(c, step));
            if (fresh) {
                colours.add(step.signal());
            } else {
                repeated.add(step.label());
            }
        }
        int have = colours.size() + input.patches().size();
        int need = input.sensitivities().isEmpty() ? UNKNOWN_SENSOR : KNOWN_SENSOR;
        if (have < need) {
            int missing = need - have;
            String same = repeated.isEmpty() ? "" : " (" + String.join(", ", repeated) + " only repeats a colour)";
            throw new IllegalArgumentException(String.format(Locale.ROOT,
                    "%d different colour%s%s %s too few to find the responses: at least %d are needed, the flat's included; add %d "
                    + "step%s, best near %s nm", have, have == 1 ? "" : "s", same, have == 1 ? "is" : "are", need, missing,
                    missing == 1 ? "" : "s", gaps(input, missing)));
        }
    }

    private static boolean same(double[] colour, StepSignal step) {
        for (int c = 0; c < colour.length; c++) {
            double limit = SAME_SHARE * Math.abs(colour[c]) + SAME_SIGMAS * Math.sqrt(step.variance()[c]);
            if (Math.abs(colour[c] - step.signal()[c]) > limit) {
                return false;
            }
        }
        return true;
    }

    /** Thicknesses in the middle of the widest gaps between what there is. */
    private static String gaps(FitInput input, int count) {
        List<Double> known = new ArrayList<>(input.steps().stream().map(StepSignal::thicknessNm).sorted().toList());
        double from = input.range().fromNm();
        double to = input.range().toNm();
        List<Double> added = new ArrayList<>();
        for (int k = 0; k < count; k++) {
            double best = from;
            double widest = -1;
            for (int i = 0; i <= 200; i++) {
                double d = from + (to - from) * i / 200;
                double nearest = known.stream().mapToDouble(x -> Math.abs(x - d)).min().orElse(Math.min(d - from, to - d) * 0.999);
                if (nearest > widest) {
                    widest = nearest;
                    best = d;
                }
            }
            known.add(best);
            added.add(best);
        }
        return added.stream().sorted().map(d -> String.valueOf(Math.round(d))).collect(Collectors.joining(" and "));
    }
}
