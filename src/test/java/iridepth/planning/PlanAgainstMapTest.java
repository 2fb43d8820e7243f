package iridepth.planning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.io.Opener;
import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.optics.Reflectance;
import iridepth.optics.View;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.reading.FilmReader;
import iridepth.reading.ThicknessMap;
import iridepth.recipe.Instrument;
import iridepth.recipe.MeasuredRig;
import iridepth.recipe.Recipe;
import iridepth.simulation.Detector;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import iridepth.simulation.Sensor;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
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

    private static ThicknessMap read(Recipe recipe, Path photo, boolean orderChoice) {
        Instrument instrument = Instrument.of(recipe);
        try (PhotoFile file = PhotoFile.open(photo)) {
            FilmReader reader = instrument.reader(file.info());
            return (orderChoice ? reader : reader.withoutOrderChoice()).read(instrument.signal(file), 0, done -> { });
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
        ThicknessMap map = read(Recipe.read(dir.resolve("recipe.toml")), dir.resolve(photo), true);
        float[] truth = (float[]) new Opener().openImage(dir.resolve("truth.tif").toString()).getProcessor().getPixels();
        double expected = median(expected(forecast, truth));
        double stated = median(IntStream.range(0, truth.length).mapToDouble(i -> Float.isNaN(truth[i]) ? Double.NaN
                : map.uncertainty(i)).toArray());
        double achieved = median(IntStream.range(0, truth.length).mapToDouble(i -> Math.abs(map.thickness()[i] - truth[i]))
                .toArray()) / NORMAL_QUARTILE;
        System.out.printf("%s: expected %.3f nm, stated %.3f nm, achieved %.3f nm%n", scene, expected, stated, achieved);
        assertEquals(1, stated / expected, 0.2, scene);
        assertEquals(1, achieved / expected, 0.2, scene);
    }

    @Test
    void medianUncertaintyOfTheOxideWedgeIsAsPlanned() {
        Recipe recipe = Recipe.read(IMAGES.resolve("P1-oxide-wedge/recipe.toml"));
        View view = recipe.view().view(recipe.stack(), recipe.range().toNm());
        // The scene's camera holds 20000 electrons and has no read noise.
        Camera camera = Camera.colourManaged(NoiseModel.of(0, 20_000), Encoding.srgb(8), 0.8).withWhite(1);
        check("P1-oxide-wedge", "photo.png", LightChoice.jointly(camera, recipe.stack(), view, recipe.range(), recipe.lights(),
                Forecast.USUAL_LIMIT).forecast());
    }

    @Test
    void medianUncertaintyOfTheCalibratedScenesIsAsPlannedFromFlatAndSteps() {
        check("P2-wafer", "photo.tif", measured("P2-wafer", Optional.empty()));
        // This scene's steps are means of four exposures of a camera that holds 20000 electrons.
        check("P3-resist-dome", "photo.tif", measured("P3-resist-dome", Optional.of(NoiseModel.of(0, 20_000))));
    }

    private static Forecast measured(String scene, Optional<NoiseModel> noise) {
        MeasuredRig rig = MeasuredRig.of(Recipe.read(IMAGES.resolve(scene + "/recipe.toml")), noise).orElseThrow();
        return Forecast.of(rig.curve(), rig.noise(), Forecast.USUAL_LIMIT);
    }

    private static Scene wedge(Rig rig, double toNm, double rangeNm, int height) {
        return new Scene("wedge", rig, FilmStack.parse("air / SiO2 / Si"), FilmStack.parse("air / SiO2 1.5 nm / Si"),
                new double[] {0, rangeNm}, null, Field.wedge((int) toNm + 1, height, 0, toNm), rig.lamp(), rig.view(), 77);
    }

    private static Rig rig(Lamp lamp) {
        return Rig.of(Sensor.mixture(), lamp, iridepth.simulation.View.aperture(0.1), Detector.linear(10_000));
    }

    /** Share of the pixels of each column that are read more than 40 nm off. */
    private static double[] wrong(ThicknessMap map, double[] truth) {
        double[] wrong = new double[map.width()];
        for (int i = 0; i < truth.length; i++) {
            wrong[i % map.width()] += Math.abs(map.thickness()[i] - truth[i]) > 40 ? 1.0 / map.height() : 0;
        }
        return wrong;
    }

    @Test
    void pixelsOnTheirOwnErrWhereAndAsOftenAsPlanned() throws IOException {
        int height = 100;
        SceneFolder scene = SceneFolder.write(folder, wedge(rig(Lamp.illuminant("LED-B4")), 1500, 1500, height), true);
        Recipe recipe = Recipe.read(scene.recipe());
        MeasuredRig rig = MeasuredRig.of(recipe, Optional.of(NoiseModel.of(8, 10_000))).orElseThrow();
        Forecast forecast = Forecast.of(rig.curve(), rig.noise(), Forecast.USUAL_LIMIT);
        double[] wrong = wrong(read(recipe, scene.photo(), false), scene.truth());
        double step = forecast.thickness(1) - forecast.thickness(0);
        double mean = Arrays.stream(wrong).average().orElseThrow();
        int clear = 0;
        int clearWrong = 0;
        for (int x = 0; x < wrong.length; x++) {
            int i = (int) Math.round(x / step);
            if (forecast.rivals(i) == 0) {
                clear++;
                clearWrong += wrong[x] > 0.05 ? 1 : 0;
            }
            if (wrong[x]>0.02 || forecast.wrongOrder(i)>0.02) System.out.printf("%d %.2f %.2f%n", x, wrong[x], forecast.wrongOrder(i));
        }
        System.out.println(mean + " " + forecast.meanWrongOrder() + " clear " + clear + " " + clearWrong + " free " + forecast.freeToNm());
    }
}
