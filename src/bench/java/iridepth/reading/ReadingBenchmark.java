package iridepth.reading;

import iridepth.photo.Frame;
import iridepth.photo.PhotoFile;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OperationsPerInvocation;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.TearDown;
import org.openjdk.jmh.annotations.Warmup;

/** Time a pixel of the test image {@value #SCENE}, several orders thick, that each part of a reading takes. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 2)
@Measurement(iterations = 5, time = 2)
public class ReadingBenchmark {
    static final String SCENE = "test-images/P3-resist-dome";
    private static final int WIDTH = 400;
    private static final int HEIGHT = 300;
    private static final int PIXELS = WIDTH * HEIGHT;
    private static final int FEW_ROWS = 3;

    private PhotoFile file;
    private SignalSource photo;
    private FilmReader reader;
    private CurveIndex index;
    private Frame counts;
    private Signal line;
    private Signal[] lines;
    private PixelRow[] rows;

    /** Opens the photo, calibrates on its steps and finds all candidates. */
    @Setup
    public void open() {
        Instrument instrument = Instrument.of(Recipe.read(Path.of(SCENE, "recipe.toml")));
        file = PhotoFile.open(Path.of(SCENE, "photo.tif"));
        photo = instrument.signal(file);
        iridepth.recipe.Setup setup = instrument.setup(file.info());
        reader = FilmReader.of(setup.curve(), List.of());
        index = CurveIndex.of(setup.curve(), photo);
        counts = photo.counts(0, 0, HEIGHT);
        line = Signal.row(photo.info());
        lines = new Signal[HEIGHT];
        rows = new PixelRow[HEIGHT];
        RowReader rowReader = new RowReader(photo, List.of(), Pins.none(), index, true);
        for (int y = 0; y < HEIGHT; y++) {
            lines[y] = Signal.row(photo.info());
            photo.convert(counts, y, y, lines[y]);
            rows[y] = rowReader.read(counts, y, y);
        }
    }

    @TearDown
    public void close() {
        file.close();
    }

    /** Counts to linear signal over the flat. */
    @Benchmark
    @OperationsPerInvocation(PIXELS)
    public Signal conversion() {
        for (int y = 0; y < HEIGHT; y++) {
            photo.convert(counts, y, y, line);
        }
        return line;
    }

    /** All candidates by the grid. */
    @Benchmark
    @OperationsPerInvocation(PIXELS)
    public int candidatesByTheGrid() {
        return candidates(new GridSearch(index), HEIGHT);
    }

    /** The same by the exhaustive search, in a few rows. */
    @Benchmark
    @OperationsPerInvocation(WIDTH * FEW_ROWS)
    public int candidatesByTheExhaustiveSearch() {
        return candidates(new ExhaustiveSearch(index), FEW_ROWS);
    }

    private int candidates(CandidateSearch search, int count) {
        CandidateRow found = new CandidateRow(WIDTH);
        int sum = 0;
        for (int y = 0; y < count; y++) {
            Signal row = lines[y * (HEIGHT / count)];
            found.clear();
            for (int x = 0; x < WIDTH; x++) {
                search.find(row.value(), row.limit(), x, index.levels().level(row.light()[x]), found);
                found.close();
            }
            sum += found.size();
        }
        return sum;
    }

    /** One of the two sweeps of the order choice. */
    @Benchmark
    @OperationsPerInvocation(PIXELS)
    public SweepRow sweep() {
        Sweep sweep = new PathSweep(JumpPenalty.of(index), true);
        for (PixelRow row : rows) {
            sweep.advance(row, row.message()[0]);
        }
        return sweep.here();
    }

    /** The whole reading, candidates, order and uncertainty, on all processors. */
    @Benchmark
    @OperationsPerInvocation(PIXELS)
    public ThicknessMap reading() {
        return reader.read(photo, 0, done -> { });
    }
}
