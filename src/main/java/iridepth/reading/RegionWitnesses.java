package iridepth.reading;

/**
 * Lets the pixels of regions that nothing has settled yet tell of their other candidates: all pixels of small regions and every
 * sixteenth of large ones, and at borders those that would join the region there with another candidate.
 */
final class RegionWitnesses {
    private static final int ALL = 4096;

    private final CurveIndex index;
    private final JumpPenalty penalty;
    private final FilmRegion[] belowRegion;
    private final int[] candidate;
    private final int[] belowCandidate;
    private PixelRow belowPixels;
    private ReadRow below;

    RegionWitnesses(CurveIndex index, JumpPenalty penalty, int width) {
        this.index = index;
        this.penalty = penalty;
        this.belowRegion = new FilmRegion[width];
        this.candidate = new int[width];
        this.belowCandidate = new int[width];
    }

    /** Hears the next row upwards. */
    void add(int y, PixelRow pixels, ReadRow row, FilmRegion[] here) {
        int at = 0;
        int open = 0;
        for (int x = 0; x < here.length; x++) {
            int count = Math.max(0, pixels.kind(x));
            candidate[x] = at;
            if (here[x] != null) {
                if (count > 1) {
                    FilmRegion its = here[x].root();
                    if (!Regions.isSettled(its) && (its.pixels() < ALL || (x & 3) == 0 && (y & 3) == 0)) {
                        its.evidence(index).add(row.thickness()[x], pixels, at, open, count);
                    }
                }
                if (x > 0 && here[x - 1] != here[x]) {
                    meet(pixels, row, here, x, pixels, row, here, x - 1, candidate);
                }
                if (below != null && belowRegion[x] != here[x]) {
                    meet(pixels, row, here, x, belowPixels, below, belowRegion, x, belowCandidate);
                }
            }
            open += count > 1 ? count : 0;
            at += count;
        }
        System.arraycopy(here, 0, belowRegion, 0, here.length);
        System.arraycopy(candidate, 0, belowCandidate, 0, here.length);
        belowPixels = pixels;
        below = row;
    }

    /** Two pixels side by side, perhaps of two regions. */
    private void meet(PixelRow pixels, ReadRow row, FilmRegion[] here, int x, PixelRow otherPixels, ReadRow otherRow,
                      FilmRegion[] there, int other, int[] otherCandidate) {
        if (there[other] == null || there[other].root() == here[x].root()) {
            return;
        }
        join(here[x].root(), row.thickness()[x], pixels, candidate[x], pixels.kind(x), there[other].root(),
                otherRow.thickness()[other]);
        join(there[other].root(), otherRow.thickness()[other], otherPixels, otherCandidate[other], otherPixels.kind(other),
                here[x].root(), row.thickness()[x]);
    }

    /** Notes if a pixel of an open region would join another region with another of its candidates. */
    private void join(FilmRegion its, float chosen, PixelRow pixels, int from, int count, FilmRegion other, float thickness) {
        if (count < 2 || Regions.isSettled(its)) {
            return;
        }
        for (int k = from; k < from + count; k++) {
            if (penalty.links(thickness, pixels.thickness()[k], 1)) {
                its.evidence(index).join(other, chosen, pixels.thickness()[k]);
            }
        }
    }
}
