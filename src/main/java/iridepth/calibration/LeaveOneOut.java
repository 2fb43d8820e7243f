package iridepth.calibration;

/**
 * What the calibration would read of a step if it had not been calibrated with it.
 *
 * @param label         the step
 * @param thicknessNm   its stated thickness, nm
 * @param readNm        the thickness read from its signal by a calibration without it, nm
 * @param uncertaintyNm standard uncertainty of that reading, the step's own thickness included, nm
 * @param extrapolated  whether the step lies at an end, so that the others must be extrapolated
 */
public record LeaveOneOut(String label, double thicknessNm, double readNm, double uncertaintyNm, boolean extrapolated) {
    /** Read minus stated, nm. */
    public double errorNm() {
        return readNm - thicknessNm;
    }
}
