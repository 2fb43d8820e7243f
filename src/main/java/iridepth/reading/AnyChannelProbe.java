package iridepth.reading;

/** A probe for any number of channels. */
final class AnyChannelProbe extends TangentProbe {
    private final int channels;
    private final int stride;
    private final float[] value;
    private final float[] residual;

    AnyChannelProbe(int channels) {
        this.channels = channels;
        this.stride = TangentTable.stride(channels);
        this.value = new float[channels];
        this.residual = new float[channels];
    }

    @Override
    void load(float[] values, int at) {
        System.arraycopy(values, at, value, 0, channels);
    }

    @Override
    float distance(int k) {
        int at = k * stride;
        float t = 0;
        for (int c = 0; c < channels; c++) {
            residual[c] = value[c] - samples[at + c];
            t += residual[c] * samples[at + channels + c];
        }
        return t;
    }

    @Override
    float chiSquare(int k) {
        float t = distance(k);
        return acrossTangent(k) + t * t * table().information(k);
    }

    /** Chi-square where the tangent comes nearest, by the residual that {@link #distance} left. */
    private float acrossTangent(int k) {
        int at = k * stride + 2 * channels;
        float sum = 0;
        for (int i = 0; i < channels; i++) {
            for (int j = i; j < channels; j++) {
                sum += samples[at++] * residual[i] * residual[j];
            }
        }
        return sum;
    }

    @Override
    float settle(int first, int last, int start) {
        int k = start;
        float t = distance(k);
        for (int i = 0; i < HOPS; i++) {
            int next = step(k, t, first, last);
            if (next == k) {
                break;
            }
            k = next;
            t = distance(k);
        }
        sample = k;
        offset = t;
        return acrossTangent(k);
    }
}
