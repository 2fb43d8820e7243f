package iridepth.planning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.io.Opener;
import iridepth.curve.ThicknessRange;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.OpenPhotos;
import iridepth.photo.SignalSource;
import iridepth.reading.FilmReader;
import iridepth.reading.ThicknessMap;
import iridepth.recipe.Instrument;
import iridepth.recipe.JointScene;
import iridepth.recipe.MeasuredRig;
import iridepth.recipe.Recipe;
import iridepth.simulation.Detector;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.Sensor;
import iridepth.simulation.View;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What is planned before any photo comes true when photos are read: on the public scenes, and on simulated wedges. */
class PlanAgainstMapTest {
    private static final Path IMAGES = Path.of("test-images");
    private static final double NORMAL_QUARTILE = 0.6745;

    @TempDir
    private Path folder;

    private static ThicknessMap read(Recipe recipe, List<Path> photos, boolean orderChoice) {
        Instrument instrument = Instrument.of(recipe);
        try (OpenPhotos files = OpenPhotos.of(photos)) {
            SignalSource signal = instrument.signal(files.files());
            FilmReader reader = FilmReader.of(instrument.setup(signal).curve(), recipe.excluded());
            return (orderChoice ? reader : reader.withoutOrderChoice()).read(signal, 0, done -> { });
        }
    }

    private static double median(double[] values) {
        double[] sorted = Arrays.stream(values).filter(v -> !Double.isNaN(v)).sorted().toArray();
        return sorted[sorted.length / 2];
    }

    /** Forecast's uncertainty at the true thickness of each pixel. */
    private static double[] expected(Forecast forecast, float[] truth) {
        double step = forecast.thickness(1) - forecast.thickness(0);
        return IntStream.range(0, truth.length).mapToDouble(i -> Float.isNaN(truth[i]) ? Double.NaN : forecast.uncertainty(
                (int) Math.round((truth[i] - forecast.thickness(0)) / step)).combinedNm()).toArray();
    }

    private static void check(String scene, String photo, Forecast forecast) {
        Path dir = IMAGES.resolve(scene);
        ThicknessMap map = read(Recipe.read(dir.resolve("recipe.toml")), List.of(dir.resolve(photo)), true);
        float[] truth = (float[]) new Opener().openImage(dir.resolve("truth.tif").toString()).getProcessor().getPixels();
        double expected = median(expected(forecast, truth));
        double stated = median(IntStream.range(0, truth.length).mapToDouble(i -> Float.isNaN(truth[i]) ? Double.NaN
                : map.uncertainty(i)).toArray());
        double achieved = median(IntStream.range(0, truth.length).mapToDouble(i -> Math.abs(map.thickness()[i] - truth[i]))
                .toArray()) / NORMAL_QUARTILE;
        assertEquals(1, stated / expected, 0.2, scene);
        assertEquals(1, achieved / expected, 0.2, scene);
    }

    @Test
    void medianUncertaintyOfTheOxideWedgeIsAsPlanned() {
        Recipe recipe = Recipe.read(IMAGES.resolve("P1-oxide-wedge/recipe.toml"));
        iridepth.optics.View view = recipe.view().view(recipe.stack(), recipe.range().toNm());
        // The scene's camera holds 20000 electrons and has no read noise.
        Camera camera = Camera.colourManaged(NoiseModel.of(0, 20_000), Encoding.srgb(8), 0.8).withWhite(1);
        check("P1-oxide-wedge", "photo.png", LightChoice.jointly(camera, recipe.stack(), view, recipe.range(), recipe.lights(),
                Forecast.USUAL_LIMIT).forecast());
    }

    @Test
    void medianUncertaintyOfTheCalibratedScenesIsAsPlannedFromFlatAndSteps() {
        check("P2-wafer", "photo.tif", measured("P2-wafer", Optional.empty(), Optional.empty()));
        // This scene's steps are means of four exposures of a camera that holds 20000 electrons; its dome rises from 115 to 1167 nm.
        check("P3-resist-dome", "photo.tif", measured("P3-resist-dome", Optional.of(NoiseModel.of(0, 20_000)),
                Optional.of(new ThicknessRange(115, 1167))));
    }

    private static Forecast measured(String scene, Optional<NoiseModel> noise, Optional<ThicknessRange> shown) {
        MeasuredRig rig = MeasuredRig.of(Recipe.read(IMAGES.resolve(scene + "/recipe.toml")), noise, shown).orElseThrow();
        return Forecast.of(rig.curve(), rig.noise(), Forecast.USUAL_LIMIT);
    }

    /** A wedge of oxide whose columns are one nanometre apart. */
    private static Scene wedge(Sensor sensor, double toNm, int height) {
        Rig rig = Rig.of(sensor, Lamp.planck(3200), View.aperture(0), Detector.linear(10_000));
        return new Scene("wedge", rig, FilmStack.parse("air / SiO2 / Si"), FilmStack.parse("air / SiO2 1.5 nm / Si"),
                new double[] {0, toNm}, null, Field.wedge((int) toNm + 1, height, 0, toNm), rig.lamp(), rig.view(), 77);
    }

    private record Wedge(Forecast forecast, double[] wrong) {
        /** Photographs a wedge under lamps, forecasts from its recipe, and reads each pixel on its own. */
        static Wedge of(Path folder, Scene scene, Lamp... lamps) throws IOException {
            JointScene joint = JointScene.write(folder, scene, List.of(lamps), true);
            Recipe recipe = Recipe.read(joint.recipe());
            Detector detector = scene.rig().detector();
            MeasuredRig rig = MeasuredRig.of(recipe, Optional.of(NoiseModel.of(detector.read(), detector.well())),
                    Optional.empty()).orElseThrow();
            Forecast forecast = Forecast.of(rig.curve(), rig.noise(), Forecast.USUAL_LIMIT);
            ThicknessMap map = read(recipe, joint.photos(), false);
            double[] wrong = new double[map.width()];
            for (int i = 0; i < joint.truth().length; i++) {
                wrong[i % map.width()] += Math.abs(map.thickness()[i] - joint.truth()[i]) > 25 ? 1.0 / map.height() : 0;
            }
            return new Wedge(forecast, wrong);
        }

        /** Share of all pixels that are read in a wrong order. */
        double mean() {
            return Arrays.stream(wrong).average().orElseThrow();
        }

        int at(int column) {
            return (int) Math.round(column / (forecast.thickness(1) - forecast.thickness(0)));
        }
    }

    @Test
    void pixelsOnTheirOwnErrWhereAndAsOftenAsPlanned() throws IOException {
        Wedge wedge = Wedge.of(folder, wedge(Sensor.mixture(), 1500, 60), Lamp.illuminant("LED-B4"));
        assertEquals(1, wedge.mean() / wedge.forecast.meanWrongOrder(), 0.15);
        double apart = 0;
        int clear = 0;
        int clearButWrong = 0;
        for (int x = 0; x < wedge.wrong.length; x++) {
            int i = wedge.at(x);
            apart += Math.abs(wedge.wrong[x] - wedge.forecast.wrongOrder(i)) / wedge.wrong.length;
            clear += wedge.forecast.rivals(i) == 0 ? 1 : 0;
            clearButWrong += wedge.forecast.rivals(i) == 0 && wedge.wrong[x] > 0.1 ? 1 : 0;
        }
        assertTrue(apart < 0.025, "columns differ by " + apart);
        assertTrue(clear > 800 && clearButWrong < 0.01 * clear, clearButWrong + " of " + clear);
    }

    @Test
    void readingStartsToErrWhereTheRangeFreeOfOrderDoubtEnds() throws IOException {
        Scene wide = wedge(Sensor.mixture(), 1500, 8);
        double free = Wedge.of(folder.resolve("wide"), wide, Lamp.illuminant("LED-B4")).forecast.freeToNm();
        Wedge within = Wedge.of(folder.resolve("within"), wedge(Sensor.mixture(), Math.floor(free) - 1, 60),
                Lamp.illuminant("LED-B4"));
        Wedge beyond = Wedge.of(folder.resolve("beyond"), wedge(Sensor.mixture(), Math.floor(free) + 15, 60),
                Lamp.illuminant("LED-B4"));
        assertTrue(Arrays.stream(within.wrong).max().orElseThrow() < 0.05);
        assertTrue(Arrays.stream(beyond.wrong).max().orElseThrow() > 0.1);
    }

    /** Among choices of lights, the one of the plan with the fewest confusable pairs and wrong orders also reads best. */
    private void bearsOut(int best, Sensor sensor, Lamp[]... choices) throws IOException {
        List<Wedge> wedges = new ArrayList<>();
        for (int k = 0; k < choices.length; k++) {
            wedges.add(Wedge.of(folder.resolve("choice-" + k), wedge(sensor, 1500, 33), choices[k]));
        }
        for (int k = 0; k < choices.length; k++) {
            Wedge wedge = wedges.get(k);
            assertTrue(k == best || wedge.mean() > wedges.get(best).mean());
            assertTrue(k == best || wedge.forecast.meanWrongOrder() > wedges.get(best).forecast.meanWrongOrder());
            assertTrue(k == best || wedge.forecast.confusablePairs() > wedges.get(best).forecast.confusablePairs());
        }
    }

    @Test
    void lightThatThePlanNamesForThickOxideReadsBestOfThree() throws IOException {
        bearsOut(1, Sensor.mixture(), new Lamp[] {Lamp.illuminant("A")}, new Lamp[] {Lamp.illuminant("LED-B4")},
                new Lamp[] {Lamp.illuminant("D65")});
    }

    @Test
    void twoBandsThatThePlanNamesForThickOxideReadBestOfThree() throws IOException {
        bearsOut(2, Sensor.monochrome(), new Lamp[] {Lamp.band(450, 10), Lamp.band(546, 10)},
                new Lamp[] {Lamp.band(450, 10), Lamp.band(650, 10)}, new Lamp[] {Lamp.band(546, 10), Lamp.band(650, 10)});
    }
}
