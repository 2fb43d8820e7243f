package iridepth.reading;

import java.util.Arrays;
import java.util.List;
import java.util.function.LongConsumer;

/**
 * The way up the picture: decides the order of every pixel, looks at it again, gathers the regions and hands the readings on.
 * Rows go through these stages one after another, and all stages work at the same time, each
 * on rows that those it needs have left behind.
 */
final class UpwardPass {
    private static final int ROWS_A_JOB = 8;
    private static final int LOOKS = 3;

    private final int width;
    private final int height;
    private final OrderDecision decision;
    private final Consensus consensus;
    private final Regions regions;
    private final RowOutput output;
    private final PixelRow[] pixels;
    /** [stage][y]: readings after the decision and after each look. */
    private final ReadRow[][] readings;
    /** The topmost row that has been brought back, decided and looked at, gathered and handed on. */
    private int swept;
    private final int[] read;
    private int gathered;
    private int done;

    UpwardPass(CurveIndex index, JumpPenalty penalty, int width, int height, ReadingSink sink) {
        this.width = width;
        this.height = height;
        this.decision = new OrderDecision(index, penalty, width);
        this.consensus = new Consensus(index, penalty);
        this.regions = new Regions(index, penalty, width, height);
        this.output = new RowOutput(sink, width);
        this.pixels = new PixelRow[height];
        this.readings = new ReadRow[LOOKS + 1][height];
        this.read = new int[LOOKS + 1];
        this.swept = height;
        Arrays.fill(read, height);
        this.gathered = height;
        this.done = height;
    }

    /**
     * Goes up the picture.
     *
     * @param bands    the bands from the top down, emptied on the way
     * @param down     brings back the candidates of a band
     * @param progress told the number of pixels done
     * @return the regions in doubt, largest first
     */
    List<DoubtfulRegion> run(List<Band> bands, DownwardPass down, LongConsumer progress) {
        int next = bands.size() - 1;
        while (done > 0) {
            Band band = next >= 0 ? bands.get(next--) : null;
            if (band != null) {
                if (band.isDropped()) {
                    down.restore(band);
                }
                System.arraycopy(band.rows(), 0, pixels, band.top(), band.height());
                swept = band.top();
                band.drop();
            }
            Crew crew = new Crew();
            int rowsDone = handOn(crew);
            int rowsGathered = gather(crew);
            int[] rowsRead = read(crew);
            crew.work();
            done = rowsDone;
            gathered = rowsGathered;
            System.arraycopy(rowsRead, 0, read, 0, read.length);
            progress.accept((long) (height - swept) * width);
        }
        List<DoubtfulRegion> doubtful = regions.judge();
        output.states(regions, height);
        return doubtful;
    }

    /** Decides the order in rows that have been swept, and looks again at rows whose neighbours have been read. */
    private int[] read(Crew crew) {
        int[] top = new int[read.length];
        top[0] = swept;
        int bottom = read[0];
        crew.add(() -> {
            for (int y = bottom - 1; y >= top[0]; y--) {
                readings[0][y] = decision.decide(y, pixels[y]);
            }
        });
        for (int i = 1; i < top.length; i++) {
            ReadRow[] before = readings[i - 1];
            ReadRow[] after = readings[i];
            top[i] = Math.min(read[i], ahead(read[i - 1], Consensus.RADIUS));
            crew.add(top[i], read[i], ROWS_A_JOB, y -> after[y] = consensus.look(pixels[y], window(before, y)));
        }
        return top;
    }

    /** The topmost row that a stage may work on which looks some rows ahead, where another has come so far. */
    private static int ahead(int front, int rows) {
        return front == 0 ? 0 : front + rows;
    }

    private ReadRow[] window(ReadRow[] rows, int y) {
        ReadRow[] window = new ReadRow[2 * Consensus.RADIUS + 1];
        for (int i = 0; i < window.length; i++) {
            int at = y - Consensus.RADIUS + i;
            window[i] = at < 0 || at >= height ? null : rows[at];
        }
        return window;
    }

    private int gather(Crew crew) {
        int top = read[LOOKS];
        int bottom = gathered;
        crew.add(() -> {
            for (int y = bottom - 1; y >= top; y--) {
                regions.add(y, pixels[y], readings[LOOKS][y]);
            }
        });
        return top;
    }

    private int handOn(Crew crew) {
        int top = Math.min(done, ahead(gathered, Regions.SPECK_ROWS));
        int bottom = done;
        crew.add(() -> {
            for (int y = bottom - 1; y >= top; y--) {
                output.add(y, regions.clean(y, readings[LOOKS][y]));
            }
            output.flush();
            for (int y = top; y < bottom; y++) {
                pixels[y] = null;
                for (ReadRow[] stage : readings) {
                    stage[y] = null;
                }
            }
        });
        return top;
    }
}
