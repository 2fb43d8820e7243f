/**
 * Statistics of thickness: distribution, uniformity and tolerance, agreement with a reference instrument, repeatability,
 * gauge studies, profiles, sites and contours. Plain numbers in nanometres; nothing here reads or writes files.
 */
package iridepth.quality;
