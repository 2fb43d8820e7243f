package iridepth.reading;

import java.util.Arrays;

/**
 * Lets the pixels of regions that nothing has settled yet tell of their other candidates: all pixels of small regions and every
 * sixteenth of large ones, and at borders those that would join the region there with another candidate.
 */
final class RegionWitnesses {
    private static final int ALL = 4096;

    private final CurveIndex index;
    private final JumpPenalty penalty;

    RegionWitnesses(CurveIndex index, JumpPenalty penalty) {
        this.index = index;
        this.penalty = penalty;
    }

    /** Hears the next row upwards. */
    void add(int y, RegionRow runs, ReadRow row, RegionRow runsBelow, ReadRow rowBelow) {
        for (int i = 0; i < runs.runs(); i++) {
            FilmRegion its = runs.root(i);
            if (its != null && !its.isSettled()) {
                hear(y, its, row, runs.from(i), runs.end()[i]);
            }
            if (i > 0) {
                int x = runs.from(i);
                meet(its, row, x, runs.root(i - 1), row, x - 1);
            }
        }
        if (runsBelow != null) {
            meetBelow(runs, row, runsBelow, rowBelow);
        }
    }

    private void hear(int y, FilmRegion its, ReadRow row, int from, int to) {
        PixelRow pixels = row.pixels();
        for (int noted = firstNoted(pixels, from); noted < pixels.noted() && pixels.column()[noted] < to; noted++) {
            int x = pixels.column()[noted];
            if (pixels.count(noted) > 1 && (its.pixels() < ALL || (x & 3) == 0 && (y & 3) == 0)) {
                its.evidence(index).add(row, noted);
            }
        }
    }

    private static int firstNoted(PixelRow pixels, int column) {
        int found = Arrays.binarySearch(pixels.column(), column);
        return found >= 0 ? found : -found - 1;
    }

    private void meetBelow(RegionRow runs, ReadRow row, RegionRow runsBelow, ReadRow rowBelow) {
        int i = 0;
        int j = 0;
        while (i < runs.runs() && j < runsBelow.runs()) {
            FilmRegion its = runs.root(i);
            FilmRegion below = runsBelow.root(j);
            int to = Math.min(runs.end()[i], runsBelow.end()[j]);
            if (its != null && below != null && its != below && !(its.isSettled() && below.isSettled())) {
                for (int x = Math.max(runs.from(i), runsBelow.from(j)); x < to; x++) {
                    meet(its, row, x, below, rowBelow, x);
                }
            }
            i += runs.end()[i] == to ? 1 : 0;
            j += runsBelow.end()[j] == to ? 1 : 0;
        }
    }

    /** Two pixels side by side, perhaps of two regions. */
    private void meet(FilmRegion its, ReadRow row, int x, FilmRegion other, ReadRow otherRow, int otherX) {
        if (its != null && other != null && its != other) {
            join(its, row, x, other, otherRow.thickness()[otherX]);
            join(other, otherRow, otherX, its, row.thickness()[x]);
        }
    }

    /** Notes if a pixel of an open region would join another region with another of its candidates. */
    private void join(FilmRegion its, ReadRow row, int x, FilmRegion other, float thickness) {
        PixelRow pixels = row.pixels();
        int noted = Arrays.binarySearch(pixels.column(), x);
        if (noted < 0 || pixels.count(noted) < 2 || its.isSettled()) {
            return;
        }
        for (int k = pixels.start()[noted]; k < pixels.start()[noted + 1]; k++) {
            if (penalty.links(thickness, pixels.thickness()[k], 1)) {
                its.evidence(index).join(other, row.thickness()[x], pixels.thickness()[k]);
            }
        }
    }
}
