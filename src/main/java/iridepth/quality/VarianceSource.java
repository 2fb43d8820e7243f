package iridepth.quality;

import org.apache.commons.math3.special.Beta;

/**
 * A row of an analysis of variance.
 *
 * @param name what varies
 * @param degreesOfFreedom number of independent deviations
 * @param sumOfSquares nm^2
 * @param meanSquare sum of squares over degrees of freedom, nm^2; NaN without degrees of freedom
 * @param f mean square over that of the row it is tested against; NaN where it is tested against none
 * @param p probability of an F at least as large if this source did not vary; NaN likewise
 */
public record VarianceSource(String name, int degreesOfFreedom, double sumOfSquares, double meanSquare, double f,
        double p) {

    static VarianceSource untested(String name, int degreesOfFreedom, double sumOfSquares) {
        return new VarianceSource(name, degreesOfFreedom, sumOfSquares, sumOfSquares / degreesOfFreedom, Double.NaN,
                Double.NaN);
    }

    VarianceSource named(String other) {
        return new VarianceSource(other, degreesOfFreedom, sumOfSquares, meanSquare, f, p);
    }

    /** The same row, tested by its ratio to the mean square of another. */
    VarianceSource against(VarianceSource error) {
        double ratio = meanSquare / error.meanSquare;
        double half = degreesOfFreedom / 2.0;
        double halfOfError = error.degreesOfFreedom / 2.0;
        // The upper tail of F as an incomplete beta function: no digits are lost where it is tiny.
        double tail = Double.isInfinite(ratio) ? 0
                : Beta.regularizedBeta(halfOfError / (halfOfError + half * ratio), halfOfError, half);
        return new VarianceSource(name, degreesOfFreedom, sumOfSquares, meanSquare, ratio, tail);
    }
}
