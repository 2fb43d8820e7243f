package iridepth.calibration;

import java.util.List;

/**
 * The figures by which a fit is judged.
 *
 * @param residuals         every observation and channel
 * @param leaveOneOut       one per step
 * @param chiSquare         of the residuals under the noise and flat residual stated
 * @param degreesOfFreedom  observations less parameters that they determine, not always a whole number
 * @param pValue            probability of a chi-square that large or larger by chance
 * @param logEvidence       ln of the marginal likelihood, up to a constant: compares fits of the same steps
 * @param determined        number of parameters that the steps determine
 * @param condition         ratio of the largest to the smallest singular value of the whitened problem: large where steps say
 *                          nearly the same
 * @param misfit            relative misfit of the signals that the steps call for, above noise
 * @param stepNm            standard uncertainty of the steps' thicknesses for which none was stated, as estimated, nm
 * @param aperture          estimate of the numerical aperture, 0 for a single direction
 * @param apertureStated    the stated one
 * @param apertureSigma     standard uncertainty of the estimate
 * @param index             the film's index as fitted, null where it was not
 * @param expectedErrorNm   systematic error that readings between the outermost steps are expected to have, root mean square over
 *                          the best 90 % of thicknesses: the stated uncertainty times what the leave-one-out errors say of it
 * @param remarks           what a user should look into, in sentences; empty where nothing is amiss
 */
public record FitFigures(List<StepResidual> residuals, List<LeaveOneOut> leaveOneOut, double chiSquare,
                         double degreesOfFreedom, double pValue, double logEvidence, double determined, double condition,
                         double misfit, double stepNm, double aperture, double apertureStated, double apertureSigma,
                         IndexEstimate index, double expectedErrorNm, List<String> remarks) {
    /** Median absolute deviation to standard deviation of a normal distribution. */
    private static final double MEDIAN_TO_SIGMA = 1.4826;

    /** Keeps copies of the lists. */
    public FitFigures {
        residuals = List.copyOf(residuals);
        leaveOneOut = List.copyOf(leaveOneOut);
        remarks = List.copyOf(remarks);
    }

    /** These figures with remarks. */
    FitFigures with(List<String> other) {
        return new FitFigures(residuals, leaveOneOut, chiSquare, degreesOfFreedom, pValue, logEvidence, determined, condition, misfit,
                stepNm, aperture, apertureStated, apertureSigma, index, expectedErrorNm, other);
    }

    /**
     * Root mean square of the leave-one-out errors, nm.
     *
     * @param extrapolated whether the steps at the ends count
     */
    public double leaveOneOutRms(boolean extrapolated) {
        return Math.sqrt(leaveOneOut.stream().filter(l -> extrapolated || !l.extrapolated())
                .mapToDouble(l -> l.errorNm() * l.errorNm()).average().orElse(Double.NaN));
    }

    /**
     * Typical leave-one-out error, nm: 1.4826 times the median of their sizes, which is the standard deviation where they are normal,
     * and which a single step that the others cannot predict does not move.
     */
    public double leaveOneOutTypical() {
        double[] sizes = leaveOneOut.stream().mapToDouble(l -> Math.abs(l.errorNm())).sorted().toArray();
        int n = sizes.length;
        return n == 0 ? Double.NaN : MEDIAN_TO_SIGMA * (sizes[(n - 1) / 2] + sizes[n / 2]) / 2;
    }
}
