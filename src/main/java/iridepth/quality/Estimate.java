package iridepth.quality;

import org.apache.commons.math3.distribution.TDistribution;

/**
 * An estimated number with its standard error and its 95 % confidence interval, value +- t(0.975, degrees of freedom) times
 * standard error by Student's distribution.
 *
 * @param value the estimate
 * @param standardError its standard error; NaN where the data are too few to give one
 * @param lower lower end of the 95 % confidence interval; NaN likewise
 * @param upper upper end of the 95 % confidence interval; NaN likewise
 */
public record Estimate(double value, double standardError, double lower, double upper) {

    /**
     * An estimate whose standard error rests on a number of degrees of freedom; with none, it has no error and no interval.
     */
    static Estimate of(double value, double standardError, int degreesOfFreedom) {
        if (degreesOfFreedom < 1) {
            return new Estimate(value, Double.NaN, Double.NaN, Double.NaN);
        }
        double reach = new TDistribution(null, degreesOfFreedom).inverseCumulativeProbability(0.975) * standardError;
        return new Estimate(value, standardError, value - reach, value + reach);
    }

    /** Whether the 95 % confidence interval holds a number; false where there is no interval. */
    public boolean covers(double number) {
        return lower <= number && number <= upper;
    }
}
