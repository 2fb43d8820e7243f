package iridepth.reading;

/** Chi-square of one pixel along the curve, by the tangents of its samples. Serves one thread. */
abstract class TangentProbe {
    /** Most steps along a run. */
    protected static final int HOPS = 8;

    private TangentTable table;
    /** The samples of the table. */
    protected float[] samples;
    /** Where {@link #settle} ended. */
    protected int sample;
    protected float offset;

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

    /** Chi-square at a sample. */
    abstract float chiSquare(int k);

    /**
     * Goes along a straight run to the sample that is nearest, by steps.
     *
     * @param start sample of the run from which to start
     * @return chi-square at the nearest thickness along its tangent
     */
    abstract float settle(int first, int last, int start);

    /** The sample found last by {@link #settle}. */
    final int sample() {
        return sample;
    }

    /** How many samples beyond it its tangent comes nearest. */
    final float offset() {
        return offset;
    }

    /** The sample nearest to t samples beyond k, inside a run. */
    protected static int step(int k, float t, int first, int last) {
        float place = k + t + 0.5f;
        return place < first ? first : place > last ? last : (int) place;
    }
}
