package iridepth.reading;

import iridepth.photo.Frame;
import iridepth.photo.SignalSource;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.function.IntFunction;
import java.util.function.LongConsumer;
import java.util.function.Supplier;

/** The way down the picture: finds the candidates of every pixel and takes the first two sweeps along. */
final class DownwardPass {
    private static final int ROWS_A_JOB = 8;

    private final SignalSource photo;
    private final int frame;
    private final int height;
    private final int bandHeight;
    private final Supplier<RowReader> newReader;
    private final ConcurrentLinkedQueue<RowReader> idle = new ConcurrentLinkedQueue<>();
    private final Sweep[] sweeps;

    /**
     * @param newReader makes a reader of rows for one more thread
     * @param newSweep  makes a sweep by its number
     */
    DownwardPass(SignalSource photo, int frame, int bandHeight, Supplier<RowReader> newReader, IntFunction<Sweep> newSweep) {
        this.photo = photo;
        this.frame = frame;
        this.height = photo.info().height();
        this.bandHeight = bandHeight;
        this.newReader = newReader;
        this.sweeps = new Sweep[] {newSweep.apply(0), newSweep.apply(1)};
    }

    /**
     * Goes down the picture.
     *
     * @param most     bytes of candidates to keep; the last bands are kept
     * @param progress told the number of pixels done
     * @return the bands from the top down
     */
    List<Band> run(long most, LongConsumer progress) {
        List<Band> bands = new ArrayList<>();
        long kept = 0;
        int oldest = 0;
        Frame[] counts = {null, read(0)};
        Band previous = null;
        for (int top = 0; top < height || previous != null; top += bandHeight) {
            Crew crew = new Crew();
            Band swept = previous;
            if (swept != null) {
                sweep(crew, swept);
            }
            Band band = null;
            if (top < height) {
                counts[0] = counts[1];
                int next = top + bandHeight;
                crew.add(() -> counts[1] = next < height ? read(next) : null);
                band = new Band(top, new PixelRow[Math.min(bandHeight, height - top)], new SweepRow[sweeps.length]);
                find(crew, counts[0], band);
                bands.add(band);
            }
            crew.work();
            if (swept != null) {
                kept += swept.bytes();
                while (kept > most && oldest < bands.size() - 1 && bands.get(oldest) != swept) {
                    kept -= bands.get(oldest).bytes();
                    bands.get(oldest++).drop();
                }
                progress.accept((long) (swept.top() + swept.height()) * photo.info().width());
            }
            previous = band;
        }
        return bands;
    }

    /** Finds the candidates of a band again that had to be dropped, and what the downward sweeps say of them. */
    PixelRow[] restored(Band band) {
        Band again = new Band(band.top(), new PixelRow[band.height()], band.carried().clone());
        Crew crew = new Crew();
        find(crew, read(band.top()), again);
        crew.work();
        for (int i = 0; i < sweeps.length; i++) {
            sweeps[i].resume(band.carried()[i]);
        }
        sweep(crew, again);
        crew.work();
        return again.rows();
    }

    private Frame read(int top) {
        return photo.counts(frame, top, Math.min(bandHeight, height - top));
    }

    private void find(Crew crew, Frame counts, Band band) {
        crew.add(0, band.height(), ROWS_A_JOB, row -> {
            RowReader reader = idle.poll();
            if (reader == null) {
                reader = newReader.get();
            }
            band.rows()[row] = reader.read(counts, row, band.top() + row);
            idle.add(reader);
        });
    }

    private void sweep(Crew crew, Band band) {
        for (int i = 0; i < sweeps.length; i++) {
            int number = i;
            crew.add(() -> {
                band.carried()[number] = sweeps[number].state();
                for (PixelRow row : band.rows()) {
                    sweeps[number].advance(row, row.message()[number]);
                }
            });
        }
    }
}
