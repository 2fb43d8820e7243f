package iridepth.reading;

/**
 * The light at a pixel in a few levels, so that what depends on it can be tabulated: level i stands for light from
 * least + i step on. A step is 5 % of the least light, which makes an error of the noise of 2.5 % at most.
 *
 * @param least  least light
 * @param stepOf step from level to level
 * @param count  number of levels
 */
record LightLevels(float least, float stepOf, int count) {
    private static final double STEP = 0.05;

    /** The levels of a picture whose light lies in a range. */
    static LightLevels of(double least, double most) {
        double step = STEP * least;
        return new LightLevels((float) least, (float) step, 1 + (int) ((most - least) / step));
    }

    /** The level of a light. */
    int level(float light) {
        int level = (int) ((light - least) / stepOf);
        return level < 0 ? 0 : Math.min(level, count - 1);
    }

    /** The light that stands for a level: its middle. */
    double light(int level) {
        return count == 1 ? least : least + (level + 0.5) * stepOf;
    }
}
