package iridepth.report;

import iridepth.quality.Distribution;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The uncertainty of a map's readings by cause, as root mean squares over the pixels read (JCGM 100, 5.1: variances of
 * independent causes add up).
 *
 * @param lines the causes, the largest last of all the totals: random, each systematic cause, combined, expanded
 */
public record UncertaintyBudget(List<Line> lines) {
    /** Coverage factor of the expanded uncertainty. */
    public static final double COVERAGE = 2;

    /**
     * One line.
     *
     * @param cause what the uncertainty comes from
     * @param kind  how it was evaluated: "A" from the scatter of observations, "B" otherwise (JCGM 100, 4.1), or "" for totals
     * @param nm    standard uncertainty, nm
     */
    public record Line(String cause, String kind, double nm) {
    }

    /** Keeps a copy. */
    public UncertaintyBudget {
        lines = List.copyOf(lines);
    }

    /**
     * The budget of a map.
     *
     * @param randomNm     root mean square of the random part, nm
     * @param systematicNm root mean square of the systematic part, nm
     * @param causes       root mean square of each cause of the systematic part, nm, by name; may be empty
     */
    public static UncertaintyBudget of(double randomNm, double systematicNm, Map<String, Double> causes) {
        List<Line> lines = new ArrayList<>();
        lines.add(new Line("noise of one pixel", "A", randomNm));
        causes.forEach((cause, nm) -> lines.add(new Line(cause, "B", nm)));
        lines.add(new Line("systematic, all causes", "", systematicNm));
        double combined = Math.hypot(randomNm, systematicNm);
        lines.add(new Line("combined, one pixel", "", combined));
        lines.add(new Line("expanded, one pixel (k = 2)", "", COVERAGE * combined));
        return new UncertaintyBudget(lines);
    }

    /**
     * Root mean square over the pixels read of causes that are known against thickness.
     *
     * @param causes       standard uncertainty at each sample, nm, by cause
     * @param fromNm       thickness of the first sample
     * @param stepNm       spacing of the samples
     * @param distribution the thicknesses read
     */
    public static Map<String, Double> average(Map<String, double[]> causes, double fromNm, double stepNm,
                                              Distribution distribution) {
        Map<String, Double> result = new LinkedHashMap<>();
        int size = causes.values().stream().mapToInt(u -> u.length).max().orElse(0);
        double[] shares = new double[size];
        Arrays.setAll(shares, k -> distribution.shareWithin(fromNm + (k - 0.5) * stepNm, fromNm + (k + 0.5) * stepNm));
        causes.forEach((cause, u) -> {
            double squares = 0;
            double all = 0;
            for (int k = 0; k < u.length; k++) {
                if (shares[k] > 0 && Double.isFinite(u[k])) {
                    squares += shares[k] * u[k] * u[k];
                    all += shares[k];
                }
            }
            result.put(cause, Math.sqrt(squares / all));
        });
        return result;
    }
}
