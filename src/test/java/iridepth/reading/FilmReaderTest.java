package iridepth.reading;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.Region;
import iridepth.simulation.CramerRao;
import iridepth.simulation.Field;
import iridepth.simulation.Fields;
import iridepth.simulation.Scene;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.ForkJoinPool;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Orders, states and uncertainties of simulated photographs, with the noise as simulated and doubled. The simulation shares no
 * code with the product; the truth is what was simulated, and the least possible scatter is the Cramer-Rao bound.
 */
class FilmReaderTest {
    private static final double SAME_ORDER_NM = 40;

    @TempDir
    private Path folder;

    private record Result(SimulatedPhoto photo, ThicknessMap map, List<DoubtfulRegion> doubtful) {
        /** Share of the pixels that show film which have a reading. */
        double readShare() {
            int film = 0;
            int read = 0;
            for (int i = 0; i < photo.truth().length; i++) {
                if (!Double.isNaN(photo.truth()[i])) {
                    film++;
                    read += Float.isNaN(map.thickness()[i]) ? 0 : 1;
                }
            }
            return (double) read / film;
        }

        /** Number of readings of the wrong order in a state. */
        int wrong(State state) {
            int wrong = 0;
            for (int i = 0; i < photo.truth().length; i++) {
                boolean far = Math.abs(map.thickness()[i] - photo.truth()[i]) > SAME_ORDER_NM;
                wrong += far && map.state()[i] == state.code() ? 1 : 0;
            }
            return wrong;
        }

        /** Number of readings where there is no film to be seen. */
        int readingsOfDirt() {
            int count = 0;
            for (int i = 0; i < photo.truth().length; i++) {
                count += Double.isNaN(photo.truth()[i]) && !Float.isNaN(map.thickness()[i]) ? 1 : 0;
            }
            return count;
        }

        /** Median of |error| over the bound, over the median of a standard normal deviate. */
        double scatter() {
            double[] bound = CramerRao.bounds(photo.scene().shot(), photo.scene().field());
            double[] ratio = new double[bound.length];
            int n = 0;
            for (int i = 0; i < bound.length; i++) {
                double error = Math.abs(map.thickness()[i] - photo.truth()[i]);
                if (error <= SAME_ORDER_NM) {
                    ratio[n++] = error / bound[i];
                }
            }
            Arrays.sort(ratio, 0, n);
            return ratio[n / 2] / 0.6745;
        }

        /** Share of readings of the right order whose error is within twice the stated uncertainty. */
        double covered() {
            int n = 0;
            int within = 0;
            for (int i = 0; i < photo.truth().length; i++) {
                double error = Math.abs(map.thickness()[i] - photo.truth()[i]);
                if (error <= SAME_ORDER_NM) {
                    n++;
                    within += error <= 2 * map.uncertainty(i) ? 1 : 0;
                }
            }
            return (double) within / n;
        }
    }

    private Result read(Scene scene, Pins pins) throws IOException {
        SimulatedPhoto photo = SimulatedPhoto.take(scene, folder);
        return read(photo, FilmReader.of(photo.curve(), List.of()).with(pins));
    }

    private static Result read(SimulatedPhoto photo, FilmReader reader) {
        ThicknessMap map = ThicknessMap.blank(photo.width(), photo.truth().length / photo.width());
        return new Result(photo, map, reader.read(photo.signal(), 0, map.sink(), done -> { }));
    }

    private static Scene scene(Scene scene, boolean noisy) {
        return noisy ? scene.noiseDoubled() : scene;
    }

    private static Pins zeroAtLeft(Scene scene) {
        return new Pins(List.of(), List.of(new Region(0, 0, 1, scene.field().height())));
    }

    private static void assertRead(Result result) {
        assertTrue(result.readShare() > 0.999, "read " + result.readShare());
        assertEquals(0, result.wrong(State.READ), "wrong order");
        assertEquals(1, result.scatter(), 0.06, "scatter over the bound");
        assertEquals(0.954, result.covered(), 0.015, "share within twice the uncertainty");
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void readsAWedgeThroughFiveOrders(boolean noisy) throws IOException {
        Result result = read(scene(Fields.wedge(), noisy), Pins.none());
        assertRead(result);
        assertEquals(List.of(), result.doubtful());
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void keepsACliffOf400Nanometres(boolean noisy) throws IOException {
        Result result = read(scene(Fields.cliff(), noisy), Pins.none());
        assertRead(result);
        assertEquals(List.of(), result.doubtful());
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void leavesDustScratchesAndStainsOffTheCurve(boolean noisy) throws IOException {
        Result result = read(scene(Fields.dirty(), noisy), Pins.none());
        assertRead(result);
        assertEquals(0, result.readingsOfDirt());
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void followsFringesInOneChannelFromAnEdgeOfNoFilm(boolean noisy) throws IOException {
        Scene scene = scene(Fields.fringes(), noisy);
        Result result = read(scene, zeroAtLeft(scene));
        assertTrue(result.readShare() > 0.999, "read " + result.readShare());
        assertEquals(0, result.wrong(State.READ));
        assertEquals(List.of(), result.doubtful());
    }

    @ParameterizedTest
    @CsvSource({"false, 203", "true, 203", "false, 303", "true, 403"})
    void doubtsAnIslandThatNothingPins(boolean noisy, long seed) throws IOException {
        Scene scene = scene(Fields.island().seed(seed), noisy);
        Result result = read(scene, zeroAtLeft(scene));
        assertEquals(0, result.wrong(State.READ), "wrong and not in doubt");
        assertEquals(1, result.doubtful().size());
        DoubtfulRegion island = result.doubtful().get(0);
        assertEquals(Math.PI * 45 * 45, island.pixels(), 100);
        double period = 546 / (2 * 1.6);
        assertTrue(island.alternatives().stream()
                .anyMatch(a -> Math.abs(Math.abs(a.meanNm() - island.meanNm()) - period) < 10), island.toString());
        for (int i = 0; i < result.photo().truth().length; i++) {
            int x = i % result.photo().width();
            int y = i / result.photo().width();
            if (Fields.onIsland(x, y) && !Double.isNaN(result.photo().truth()[i])) {
                assertEquals(State.ORDER_DOUBTFUL.code(), result.map().state()[i], x + ", " + y);
            }
        }
    }

    @Test
    void aKnownPointSettlesTheIsland() throws IOException {
        Scene scene = Fields.island();
        Pins edge = zeroAtLeft(scene);
        Result result = read(scene, new Pins(List.of(new Pins.Point(180, 100, 530)), edge.zero()));
        assertEquals(List.of(), result.doubtful());
        assertEquals(0, result.wrong(State.READ));
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void readsOrDoubtsAnIslandThatLooksLikeAThinnerFilm(boolean noisy) throws IOException {
        Result result = read(scene(Fields.thickIsland(), noisy), Pins.none());
        assertTrue(result.wrong(State.READ) < 0.005 * result.map().state().length, "wrong " + result.wrong(State.READ));
    }

    @Test
    void twoPixelsOfAnotherOrderDoNotSurvive() throws IOException {
        Field smooth = Fields.cliff().field();
        Field speck = Field.of(smooth.width(), smooth.height(), (x, y) -> {
            boolean isSpeck = y == 100 && (x == 50 || x == 51);
            return isSpeck ? 900 : smooth.film()[y * smooth.width() + x];
        });
        Result result = read(Fields.cliff().field(speck), Pins.none());
        for (int x = 50; x <= 51; x++) {
            float d = result.map().thickness()[100 * result.photo().width() + x];
            assertTrue(Float.isNaN(d) || Math.abs(d - smooth.film()[100 * smooth.width() + x]) < SAME_ORDER_NM, "speck " + d);
        }
    }

    @Test
    void excludedRegionsAreLeftOut() throws IOException {
        SimulatedPhoto photo = SimulatedPhoto.take(Fields.wedge(), folder);
        Result result = read(photo, FilmReader.of(photo.curve(), List.of(new Region(10, 20, 30, 5))));
        assertEquals(150, result.map().counts().get(State.EXCLUDED));
        assertEquals(State.EXCLUDED.code(), result.map().state()[20 * photo.width() + 10]);
        assertTrue(Float.isNaN(result.map().thickness()[24 * photo.width() + 39]));
    }

    private static void assertSame(Result expected, Result actual) {
        assertArrayEquals(expected.map().thickness(), actual.map().thickness());
        assertArrayEquals(expected.map().random(), actual.map().random());
        assertArrayEquals(expected.map().systematic(), actual.map().systematic());
        assertArrayEquals(expected.map().state(), actual.map().state());
        assertEquals(expected.doubtful(), actual.doubtful());
    }

    @Test
    void bandsAndMemoryDoNotChangeTheResult() throws IOException {
        for (Scene scene : List.of(Fields.dirty().noiseDoubled(), Fields.island().noiseDoubled())) {
            SimulatedPhoto photo = SimulatedPhoto.take(scene, folder);
            FilmReader reader = FilmReader.of(photo.curve(), List.of());
            Result whole = read(photo, reader.inBands(200, Long.MAX_VALUE));
            assertSame(whole, read(photo, scene.rig().channels() == 1 ? reader.inBands(16, 0) : reader.inBands(37, 500_000)));
        }
    }

    @Test
    void threadsDoNotChangeTheResult() throws Exception {
        SimulatedPhoto photo = SimulatedPhoto.take(Fields.dirty(), folder);
        FilmReader reader = FilmReader.of(photo.curve(), List.of());
        Result first = new ForkJoinPool(1).submit(() -> read(photo, reader)).get();
        Result second = new ForkJoinPool(5).submit(() -> read(photo, reader)).get();
        assertSame(first, second);
    }
}
