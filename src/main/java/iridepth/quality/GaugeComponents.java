package iridepth.quality;

/**
 * What the spread of measured parts is made of, as variances in nm^2. A component that comes out negative is taken as 0.
 *
 * @param repeatability one operator repeating one part with this rig ('equipment variation')
 * @param operator different operators, on the average over parts; 0 where one alone measured
 * @param interaction operators who differ from part to part; 0 where pooled into the repeatability, or where one alone measured
 * @param part the parts themselves; NaN where only one was measured
 */
public record GaugeComponents(double repeatability, double operator, double interaction, double part) {

    /** Operators and their interaction with parts ('appraiser variation'), nm^2. */
    public double reproducibility() {
        return operator + interaction;
    }

    /** Repeatability and reproducibility together ('gauge R and R'), nm^2. */
    public double gauge() {
        return repeatability + reproducibility();
    }

    /** Gauge and parts, nm^2; NaN where only one part was measured. */
    public double total() {
        return gauge() + part;
    }

    /** A component's share of the total variance, per cent; shares add up. */
    public double percentContribution(double variance) {
        return 100 * variance / total();
    }

    /**
     * A component's standard deviation as a share of the total one, per cent; these do not add up. Common practice for the
     * gauge: below 10 % good, 10 to 30 % may do, above 30 % not fit for telling parts apart.
     */
    public double percentStudyVariation(double variance) {
        return 100 * Math.sqrt(variance / total());
    }

    /**
     * Precision-to-tolerance ratio: six standard deviations over the width of the tolerance, per cent. For the gauge the
     * same common practice holds as for the share of the study variation.
     *
     * @return per cent; NaN for a one-sided tolerance, which has no width
     */
    public double precisionToTolerance(double variance, Tolerance tolerance) {
        double width = tolerance.upper() - tolerance.lower();
        return Double.isInfinite(width) ? Double.NaN : 100 * 6 * Math.sqrt(variance) / width;
    }

    /**
     * Number of classes of parts that the gauge can tell apart: 1.41 times part over gauge standard deviation, cut to a whole
     * number. Common practice asks for 5.
     *
     * @return NaN where only one part was measured; infinite for a gauge without scatter
     */
    public double distinctCategories() {
        return Math.floor(1.41 * Math.sqrt(part / gauge()));
    }
}
