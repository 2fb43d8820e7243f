package iridepth.quality;

/** What a measured value with its uncertainty says about a tolerance. */
public enum Verdict {

    /** Conformity is proven: the value lies inside the limits by at least the guard band. */
    PASS("in tolerance"),

    /** Non-conformity is proven: the value lies outside the limits by more than the guard band. */
    FAIL("out of tolerance"),

    /** Neither is proven: the value lies within the guard band of a limit, or there is no value. */
    UNDECIDED("too close to call");

    private final String words;

    Verdict(String words) {
        this.words = words;
    }

    /** The verdict in words. */
    public String words() {
        return words;
    }

    /** Both together: passes if both pass, fails if either fails. */
    public Verdict and(Verdict other) {
        if (this == FAIL || other == FAIL) {
            return FAIL;
        }
        return this == PASS && other == PASS ? PASS : UNDECIDED;
    }
}
