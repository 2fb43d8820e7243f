package iridepth.photo;

/**
 * A few strips of rows of a photo, evenly spread from top to bottom, as a photo of their own: enough of a large photo to learn
 * from, at the cost of a small one. Pixels keep their neighbours along a row, and within a strip also across.
 */
public final class StripSignal implements SignalSource {
    private static final int STRIP = 8;
    private static final int FEWEST_STRIPS = 8;

    private final SignalSource whole;
    private final PhotoInfo info;
    /** Row of the photo of each row of the strips. */
    private final int[] row;

    private StripSignal(SignalSource whole, PhotoInfo info, int[] row) {
        this.whole = whole;
        this.info = info;
        this.row = row;
    }

    /**
     * Strips of a photo.
     *
     * @param whole  the photo
     * @param pixels about how many pixels to take; a photo of fewer is taken whole, and never less than eight strips of eight rows
     * @return the strips
     */
    public static StripSignal of(SignalSource whole, int pixels) {
        PhotoInfo all = whole.info();
        int strips = Math.max(FEWEST_STRIPS, pixels / all.width() / STRIP);
        int[] row = new int[Math.min(all.height(), strips * STRIP)];
        for (int y = 0; y < row.length; y++) {
            long gaps = row.length == all.height() ? 0 : (long) (y / STRIP) * (all.height() - row.length) / (strips - 1);
            row[y] = y + (int) gaps;
        }
        PhotoInfo own = new PhotoInfo(all.path(), all.width(), row.length, all.channels(), all.bitDepth(), all.frames(), all.pixelUm(),
                all.profile(), all.lossy());
        return new StripSignal(whole, own, row);
    }

    /** @return the row of the photo that row {@code y} of the strips is */
    public int row(int y) {
        return row[y];
    }

    @Override
    public PhotoInfo info() {
        return info;
    }

    @Override
    public NoiseModel noise() {
        return whole.noise();
    }

    @Override
    public int saturation(int channel) {
        return whole.saturation(channel);
    }

    @Override
    public Frame counts(int frame, int y, int count) {
        short[] counts = new short[info.width() * info.channels() * count];
        int at = 0;
        for (int done = 0; done < count; ) {
            int run = 1;
            while (done + run < count && row[y + done + run] == row[y + done] + run) {
                run++;
            }
            short[] rows = whole.counts(frame, row[y + done], run).counts();
            System.arraycopy(rows, 0, counts, at, rows.length);
            at += rows.length;
            done += run;
        }
        return new Frame(info.width(), count, info.channels(), info.bitDepth(), counts);
    }

    @Override
    public void convert(Frame rows, int which, int y, Signal line) {
        whole.convert(rows, which, row[y], line);
    }

    @Override
    public double variance(int channel, double value, double light) {
        return whole.variance(channel, value, light);
    }

    @Override
    public double[] lightRange() {
        return whole.lightRange();
    }
}
