package iridepth.calibration;

/**
 * The film's index as the steps call for it: n = n_stated + a + b / lambda^2, lambda in um.
 *
 * @param a           dimensionless
 * @param b           um^2
 * @param sigmaA      standard uncertainty of a
 * @param sigmaB      standard uncertainty of b, um^2
 * @param correlation of a and b, -1 to 1
 */
public record IndexEstimate(double a, double b, double sigmaA, double sigmaB, double correlation) {
    /** Standard uncertainty of n at a wavelength in nm. */
    public double sigmaAt(double wavelengthNm) {
        double inverse = 1e6 / (wavelengthNm * wavelengthNm);
        double variance = sigmaA * sigmaA + 2 * correlation * sigmaA * sigmaB * inverse + sigmaB * sigmaB * inverse * inverse;
        return Math.sqrt(Math.max(0, variance));
    }

    /** By how much n differs from the stated index at a wavelength in nm. */
    public double at(double wavelengthNm) {
        return a + b * 1e6 / (wavelengthNm * wavelengthNm);
    }
}
