package iridepth.calibration;

/**
 * The calibration refitted with one input moved by its standard uncertainty: what that moves in the curve is one part of the
 * curve's systematic error. The refit matters: the steps see the same input, so most of an error in it cancels.
 *
 * @param input what was moved, for people
 * @param moved the refitted model
 */
record Variation(String input, ResponseModel moved) {
}
