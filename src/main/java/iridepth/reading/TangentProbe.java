package iridepth.reading;

/** Chi-square of one pixel along the curve, by the tangents of its samples. Serves one thread. */
abstract class TangentProbe {
    private static final int HOPS = 8;

    private TangentTable table;
    /** The samples of the table. */
    protected float[] samples;

    /** Takes a pixel whose values begin at a place. */
    final void load(TangentTable itsTable, float[] values, int at) {
        table = itsTable;
        samples = itsTable.samples();
        load(values, at);
    }

    abstract void load(float[] values, int at);

    final TangentTable table() {
        return table;
    }

    /** How many samples beyond a sample its tangent comes nearest. */
    abstract float distance(int k);

    /** Chi-square t samples beyond a sample along its tangent. */
    abstract float chiSquare(int k, float t);

    /** The sample of a straight run that is nearest, by steps from its middle. */
    final int nearest(int first, int last) {
        int k = (first + last) >>> 1;
        for (int i = 0; i < HOPS; i++) {
            int next = step(k, distance(k), first, last);
            if (next == k) {
                break;
            }
            k = next;
        }
        return k;
    }

    /** The sample nearest to t samples beyond k, inside a run. */
    private static int step(int k, float t, int first, int last) {
        float place = k + t + 0.5f;
        return place < first ? first : place > last ? last : (int) place;
    }
}
