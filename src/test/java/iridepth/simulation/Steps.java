package iridepth.simulation;

/**
 * A strip of patches of known thickness.
 *
 * @param width pixels of the strip's picture
 * @param height pixels of the strip's picture
 * @param thickness nm of each patch, from left to right
 * @param gap pixels between patches
 */
public record Steps(int width, int height, double[] thickness, int gap) {
    private static final int INSET = 8;

    private int pitch() {
        return width / thickness.length;
    }

    /** The patch in a column of pixels, or -1 in a gap. */
    int patchAt(int x) {
        int patch = Math.min(x / pitch(), thickness.length - 1);
        boolean inGap = patch < thickness.length - 1 && x - patch * pitch() >= pitch() - gap;
        return inGap ? -1 : patch;
    }

    /** The region well inside a patch: x, y, width, height in pixels. */
    public int[] region(int patch) {
        return new int[] {patch * pitch() + INSET, height / 4, pitch() - 2 * INSET, height / 2};
    }
}
