package iridepth.planning;

/**
 * Another thickness whose signal lies close to that of a film.
 *
 * @param filmNm    the film, nm
 * @param rivalNm   the other thickness, where chi-square is least, nm
 * @param chiSquare chi-square of the film's signal there
 */
record Rival(double filmNm, double rivalNm, double chiSquare) {
}
