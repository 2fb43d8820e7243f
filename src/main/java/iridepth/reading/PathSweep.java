package iridepth.reading;

/**
 * A sweep for curves that do not turn back on themselves: a jump costs V = min(T, jump^2 / (q^2 + 2 u^2)), the
 * {@link JumpPenalty}. An entry carries its thickness. A pixel with one candidate needs no arithmetic.
 */
final class PathSweep extends Sweep {
    private static final float T = JumpPenalty.TRUNCATION;

    private final JumpPenalty penalty;

    PathSweep(JumpPenalty penalty, boolean forward) {
        super(1, forward);
        this.penalty = penalty;
    }

    @Override
    void weigh(PixelRow row, int noted, float[] message) {
        SweepRow here = here();
        int at = here.next();
        int from = row.start()[noted];
        int count = row.count(noted);
        float mean = mean();
        float authority = authority();
        for (int k = 0; k < count; k++) {
            float d = row.thickness()[from + k];
            float stiffness = penalty.stiffness(d);
            float said = mean * (beside().weight() * message(d, stiffness, beside())
                    + previous().weight() * message(d, stiffness, previous()));
            message[from + k] = said * authority;
            here.value[at + k] = d;
            here.loss[at + k] = row.cost()[from + k] + said;
        }
        normalise(here.loss, at, count);
    }

    private static float message(float d, float stiffness, Neighbour neighbour) {
        if (neighbour.weight() == 0) {
            return 0;
        }
        if (neighbour.isSingle()) {
            float jump = d - neighbour.thickness();
            return Math.min(T, jump * jump * stiffness);
        }
        float[] thickness = neighbour.row().value;
        float[] loss = neighbour.row().loss;
        float perSquare = stiffness / neighbour.steps();
        int end = neighbour.start() + neighbour.count();
        float least = T;
        for (int j = neighbour.start(); j < end; j++) {
            float jump = d - thickness[j];
            float sum = loss[j] + jump * jump * perSquare;
            least = sum < least ? sum : least;
        }
        return least;
    }
}
