package iridepth.report;

/**
 * The unit in which times are shown: seconds, minutes or hours.
 *
 * @param name    for axis titles
 * @param seconds its length
 */
record TimeUnit(String name, double seconds) {
    private static final double MOST = 300;

    /** The smallest unit in which a time is not more than a few hundred. */
    static TimeUnit of(double longestSeconds) {
        if (longestSeconds <= MOST) {
            return new TimeUnit("s", 1);
        }
        return longestSeconds <= 60 * MOST ? new TimeUnit("min", 60) : new TimeUnit("h", 3600);
    }
}
