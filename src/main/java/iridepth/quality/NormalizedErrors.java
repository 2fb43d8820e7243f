package iridepth.quality;

import java.util.Arrays;

/**
 * Normalised errors E_n = (x - X) / sqrt(U_x^2 + U_X^2) of readings x against references X, with U the expanded uncertainties
 * (coverage factor 2) of both (ISO 13528:2015 and ISO/IEC 17043, from memory). |E_n| &lt;= 1 is satisfactory: reading and
 * reference agree within their stated uncertainties. If much less than 95 % do, the uncertainties are stated too small.
 */
public final class NormalizedErrors {

    private final double[] scores;

    private NormalizedErrors(double[] scores) {
        this.scores = scores;
    }

    /**
     * Normalised errors of pairs.
     *
     * @param readings x, nm; NaN gives no score
     * @param expandedOfReadings U_x, nm
     * @param references X, nm; NaN gives no score
     * @param expandedOfReferences U_X, nm
     * @throws IllegalArgumentException if the lengths differ, or a pair with values has a negative or no uncertainty
     */
    public static NormalizedErrors of(double[] readings, double[] expandedOfReadings, double[] references,
            double[] expandedOfReferences) {
        int n = readings.length;
        if (expandedOfReadings.length != n || references.length != n || expandedOfReferences.length != n) {
            throw new IllegalArgumentException("normalised errors of " + n + " readings, " + expandedOfReadings.length
                    + " uncertainties, " + references.length + " references, " + expandedOfReferences.length
                    + " uncertainties: give as many of each");
        }
        double[] scores = new double[n];
        for (int i = 0; i < n; i++) {
            double error = readings[i] - references[i];
            scores[i] = Double.isNaN(error) ? Double.NaN : error / expanded(expandedOfReadings[i], expandedOfReferences[i], i);
        }
        return new NormalizedErrors(scores);
    }

    /** Score of pair i, dimensionless; NaN if the pair lacks a value. */
    public double score(int i) {
        return scores[i];
    }

    /** Number of pairs, with or without a score. */
    public int pairs() {
        return scores.length;
    }

    /** Share of the scores with |E_n| &lt;= 1, 0 to 1; NaN if there is no score. */
    public double satisfactoryShare() {
        double[] present = Arrays.stream(scores).filter(score -> !Double.isNaN(score)).toArray();
        return Arrays.stream(present).filter(score -> Math.abs(score) <= 1).count() / (double) present.length;
    }

    private static double expanded(double ofReading, double ofReference, int i) {
        double both = Math.hypot(ofReading, ofReference);
        if (!(ofReading >= 0 && ofReference >= 0 && both > 0)) {
            throw new IllegalArgumentException("pair " + (i + 1) + " has expanded uncertainties " + ofReading + " and "
                    + ofReference + " nm: neither may be negative or missing, and not both zero");
        }
        return both;
    }
}
