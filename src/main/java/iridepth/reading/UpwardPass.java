package iridepth.reading;

import java.util.ArrayList;
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
    private static final int LOOKS_AFTER_CORRECTION = 2;

    private final CurveIndex index;
    private final int width;
    private final int height;
    private final OrderDecision decision;
    private final Consensus consensus;
    private final Regions regions;
    private final RowOutput[] outputs;
    private final List<Stage> stages = new ArrayList<>();
    private final PixelRow[] pixels;
    /** The topmost row that has been brought back, gathered and handed on. */
    private int present;
    private int gathered;
    private int done;

    /** What becomes of each row, given the rows of the stage before. */
    private static final class Stage {
        private final int reach;
        private final RowWork work;
        private final ReadRow[] rows;
        private int top;

        /** @param reach rows above and below that it looks at */
        Stage(int height, int reach, RowWork work) {
            this.reach = reach;
            this.work = work;
            this.rows = new ReadRow[height];
            this.top = height;
        }
    }

    @FunctionalInterface
    private interface RowWork {
        ReadRow row(int y, ReadRow[] before);
    }

    /**
     * @param specks      whether the readings of specks are taken out
     * @param corrections other orders to take, in the order in which they were found
     */
    UpwardPass(CurveIndex index, JumpPenalty penalty, int width, int height, boolean specks, List<OrderCorrection> corrections,
               ReadingSink sink) {
        this.index = index;
        this.width = width;
        this.height = height;
        this.decision = new OrderDecision(index, penalty, width);
        this.consensus = new Consensus(index, penalty);
        this.regions = new Regions(index, penalty, width, height, specks);
        this.outputs = new RowOutput[] {new RowOutput(sink, index, width), new RowOutput(sink, index, width)};
        this.pixels = new PixelRow[height];
        this.present = height;
        this.gathered = height;
        this.done = height;
        stages.add(new Stage(height, 0, (y, none) -> decision.decide(y, pixels[y])));
        addLooks(LOOKS);
        for (OrderCorrection correction : corrections) {
            stages.add(new Stage(height, 0, (y, before) -> correction.correct(y, before[y], this.index)));
            addLooks(LOOKS_AFTER_CORRECTION);
        }
    }

    private void addLooks(int count) {
        for (int i = 0; i < count; i++) {
            stages.add(new Stage(height, Consensus.RADIUS, (y, before) -> consensus.look(window(before, y))));
        }
    }

    private ReadRow[] window(ReadRow[] rows, int y) {
        ReadRow[] window = new ReadRow[2 * Consensus.RADIUS + 1];
        for (int i = 0; i < window.length; i++) {
            int at = y - Consensus.RADIUS + i;
            window[i] = at < 0 || at >= height ? null : rows[at];
        }
        return window;
    }

    /**
     * Goes up the picture.
     *
     * @param bands    the bands from the top down
     * @param down     brings back the candidates of a band that was dropped
     * @param progress told the number of pixels done
     */
    void run(List<Band> bands, DownwardPass down, LongConsumer progress) {
        int next = bands.size() - 1;
        while (done > 0) {
            if (next >= 0) {
                Band band = bands.get(next--);
                PixelRow[] rows = band.isDropped() ? down.restored(band) : band.rows();
                System.arraycopy(rows, 0, pixels, band.top(), band.height());
                present = band.top();
            }
            Crew crew = new Crew();
            int rowsDone = handOn(crew);
            int rowsGathered = gather(crew);
            int[] rowsRead = read(crew);
            crew.work();
            done = rowsDone;
            gathered = rowsGathered;
            for (int i = 0; i < rowsRead.length; i++) {
                stages.get(i).top = rowsRead[i];
            }
            progress.accept((long) (height - present) * width);
        }
        outputs[0].flush();
    }

    /** The regions that have been gathered. */
    Regions regions() {
        return regions;
    }

    /** Judges the regions and hands on the states of all pixels. */
    List<DoubtfulRegion> judge() {
        List<DoubtfulRegion> doubtful = regions.judge();
        outputs[0].states(regions, height);
        return doubtful;
    }

    /** Takes rows through the stages; the decision row after row, all others at once. */
    private int[] read(Crew crew) {
        int[] top = new int[stages.size()];
        for (int i = 0; i < top.length; i++) {
            Stage stage = stages.get(i);
            int bottom = stage.top;
            if (i == 0) {
                top[0] = present;
                crew.add(() -> {
                    for (int y = bottom - 1; y >= top[0]; y--) {
                        stage.rows[y] = stage.work.row(y, null);
                    }
                });
            } else {
                Stage before = stages.get(i - 1);
                top[i] = Math.min(bottom, ahead(before.top, stage.reach));
                crew.add(top[i], bottom, ROWS_A_JOB, y -> stage.rows[y] = stage.work.row(y, before.rows));
            }
        }
        return top;
    }

    /** The topmost row that a stage may work on which looks some rows ahead, where another has come so far. */
    private static int ahead(int front, int rows) {
        return front == 0 ? 0 : front + rows;
    }

    private Stage last() {
        return stages.get(stages.size() - 1);
    }

    private int gather(Crew crew) {
        int top = last().top;
        int bottom = gathered;
        crew.add(() -> {
            for (int y = bottom - 1; y >= top; y--) {
                regions.add(y, last().rows[y]);
            }
        });
        return top;
    }

    /** Hands on the rows that were put in place the last time, and puts the next in place. */
    private int handOn(Crew crew) {
        int top = Math.min(done, ahead(gathered, Regions.SPECK_ROWS));
        int bottom = done;
        RowOutput full = outputs[0];
        RowOutput next = outputs[1];
        outputs[0] = next;
        outputs[1] = full;
        crew.add(full::flush);
        if (top < bottom) {
            next.begin(top, bottom - top);
            crew.add(top, bottom, ROWS_A_JOB, y -> {
                next.put(y, regions.clean(y, last().rows[y]));
                pixels[y] = null;
                for (Stage stage : stages) {
                    stage.rows[y] = null;
                }
            });
        }
        return top;
    }
}
