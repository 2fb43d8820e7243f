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
    float chiSquare(int k, float t) {
        float[] s = samples;
        int at = k * STRIDE;
        float r0 = v0 - s[at];
        float r1 = v1 - s[at + 1];
        float r2 = v2 - s[at + 2];
        float beside = r0 * s[at + 3] + r1 * s[at + 4] + r2 * s[at + 5] - t;
        return r0 * (r0 * s[at + 6] + r1 * s[at + 7] + r2 * s[at + 8]) + r1 * (r1 * s[at + 9] + r2 * s[at + 10])
                + r2 * r2 * s[at + 11] + beside * beside * s[at + 12];
    }

    @Override
    float settle(int first, int last, int start) {
        float[] s = samples;
        int k = start;
        for (int i = 0; ; i++) {
            int at = k * STRIDE;
            float r0 = v0 - s[at];
            float r1 = v1 - s[at + 1];
            float r2 = v2 - s[at + 2];
            float t = r0 * s[at + 3] + r1 * s[at + 4] + r2 * s[at + 5];
            int next = step(k, t, first, last);
            if (next == k || i == HOPS) {
                sample = k;
                offset = t;
                return r0 * (r0 * s[at + 6] + r1 * s[at + 7] + r2 * s[at + 8]) + r1 * (r1 * s[at + 9] + r2 * s[at + 10])
                        + r2 * r2 * s[at + 11];
            }
            k = next;
        }
    }
}
