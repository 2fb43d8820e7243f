package iridepth.calibration;

/**
 * The parts of the misfit that nobody measured.
 *
 * @param residual relative misfit of each signal: what the flat leaves, and what the model cannot follow
 * @param stepNm   standard uncertainty of those steps' thickness for which none was stated, nm
 */
record NoiseLevel(double residual, double stepNm) {
}
