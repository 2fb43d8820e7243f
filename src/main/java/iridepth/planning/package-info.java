/**
 * What a rig can do, before any photo: the uncertainty to expect at each thickness, the thicknesses that it confuses, which light
 * does better, and the steps to calibrate with.
 */
package iridepth.planning;
