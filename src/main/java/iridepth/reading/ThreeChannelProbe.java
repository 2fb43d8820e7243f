package iridepth.reading;

/** A probe for three channels, the usual case: the sums of {@link AnyChannelProbe} written out. */
final class ThreeChannelProbe extends TangentProbe {
    private static final int STRIDE = TangentTable.stride(3);

    private float v0;
    private float v1;
    private float v2;

    @Override
    void load(float[] values, int at) {
        v0 = values[at];
        v1 = values[at + 1];
        v2 = values[at + 2];
    }

    @Override
    float distance(int k) {
        float[] s = samples;
        int at = k * STRIDE;
        return (v0 - s[at]) * s[at + 3] + (v1 - s[at + 1]) * s[at + 4] + (v2 - s[at + 2]) * s[at + 5];
    }

    @Override
    float chiSquare(int k) {
        float[] s = samples;
        int at = k * STRIDE;
        float r0 = v0 - s[at];
        float r1 = v1 - s[at + 1];
        float r2 = v2 - s[at + 2];
        float t = r0 * s[at + 3] + r1 * s[at + 4] + r2 * s[at + 5];
        return r0 * (r0 * s[at + 6] + r1 * s[at + 7] + r2 * s[at + 8]) + r1 * (r1 * s[at + 9] + r2 * s[at + 10])
                + r2 * r2 * s[at + 11] + t * t * table().information(k);
    }

    @Override
    float settle(int first, int last, int start) {
        int k = start;
        float t = distance(k);
        int next = step(k, t, first, last);
        // Of two steps the second is taken whether it leads on or not: foretelling which would fail too often.
        t = distance(next);
        k = next;
        next = step(k, t, first, last);
        for (int i = 1; next != k && i < HOPS; i++) {
            k = next;
            t = distance(k);
            next = step(k, t, first, last);
        }
        sample = k;
        offset = t;
        float[] s = samples;
        int at = k * STRIDE;
        float r0 = v0 - s[at];
        float r1 = v1 - s[at + 1];
        float r2 = v2 - s[at + 2];
        return r0 * (r0 * s[at + 6] + r1 * s[at + 7] + r2 * s[at + 8]) + r1 * (r1 * s[at + 9] + r2 * s[at + 10])
                + r2 * r2 * s[at + 11];
    }
}
