package iridepth.reading;

/**
 * A sweep for curves that do not turn back on themselves: a jump costs V = min(T, jump^2 / (q^2 + 2 u^2)), the
 * {@link JumpPenalty}. An entry carries its thickness. A pixel with one candidate needs no arithmetic.
 */
final class PathSweep extends Sweep {
    private static final float T = JumpPenalty.TRUNCATION;

    private final JumpPenalty penalty;

    PathSweep(JumpPenalty penalty, int width, boolean forward) {
        super(width, 1, forward);
        this.penalty = penalty;
    }

    @Override
    void weigh(PixelRow row, int candidate, int count, int open, int i, float[] message) {
        SweepRow here = here();
        int at = at();
        if (count == 1) {
            here.value[at] = row.thickness()[candidate];
            here.loss[at] = 0;
            return;
        }
        float fromBeside = weightBeside();
        float fromBefore = weightBefore();
        float mean = mean();
        float authority = authority();
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[candidate + k];
            float stiffness = penalty.stiffness(d);
            float said = 0;
            if (fromBeside > 0) {
                said += fromBeside * message(d, stiffness / (1 + here.gap(i - 1)), here, besideAt(), here.count(i - 1));
            }
            if (fromBefore > 0) {
                said += fromBefore * message(d, stiffness / (1 + before().gap(i)), before(), beforeAt(), before().count(i));
            }
            said *= mean;
            message[open + k] = said * authority;
            here.value[at + k] = d;
            here.loss[at + k] = row.cost()[open + k] + said;
        }
        normalise(here.loss, at, count);
    }

    private static float message(float d, float stiffness, SweepRow row, int at, int count) {
        float[] thickness = row.value;
        float[] loss = row.loss;
        float least = T;
        for (int j = at; j < at + count; j++) {
            float jump = d - thickness[j];
            least = Math.min(least, loss[j] + jump * jump * stiffness);
        }
        return least;
    }
}
