package iridepth.planning;

/**
 * Two stretches of thickness whose signals a pixel cannot tell apart: along them chi-square stays below the limit.
 *
 * @param thinFromNm  begin of the thinner stretch, nm
 * @param thinToNm    its end, nm
 * @param thickFromNm begin of the thicker stretch, nm
 * @param thickToNm   its end, nm
 * @param thinNm      where they come closest, nm
 * @param thickNm     where they come closest, nm
 * @param chiSquare   chi-square there
 */
public record ConfusablePair(double thinFromNm, double thinToNm, double thickFromNm, double thickToNm, double thinNm,
                             double thickNm, double chiSquare) {
    /** A pair of points. */
    static ConfusablePair of(Rival rival) {
        return new ConfusablePair(rival.filmNm(), rival.filmNm(), rival.rivalNm(), rival.rivalNm(), rival.filmNm(),
                rival.rivalNm(), rival.chiSquare());
    }

    /** This pair with more points. */
    ConfusablePair with(Rival rival) {
        boolean closer = rival.chiSquare() < chiSquare;
        return new ConfusablePair(Math.min(thinFromNm, rival.filmNm()), Math.max(thinToNm, rival.filmNm()),
                Math.min(thickFromNm, rival.rivalNm()), Math.max(thickToNm, rival.rivalNm()),
                closer ? rival.filmNm() : thinNm, closer ? rival.rivalNm() : thickNm, closer ? rival.chiSquare() : chiSquare);
    }
}
