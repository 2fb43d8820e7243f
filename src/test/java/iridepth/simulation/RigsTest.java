package iridepth.simulation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.stream.Collectors;
import java.util.stream.DoubleStream;
import org.junit.jupiter.api.Test;

/** The catalogues: their scenes can be photographed, and physics allows what is asked of a reading of them. */
class RigsTest {

    @Test
    void namesAreDistinctAndFound() {
        assertEquals(Rigs.all().size(), Rigs.all().stream().map(Scene::name).collect(Collectors.toSet()).size());
        assertEquals("oxide-prism", Rigs.named("oxide-prism").name());
        assertTrue(Rigs.all().size() >= 8);
    }

    @Test
    void noRigClipsAndEachFlatIsWellExposed() {
        for (Scene scene : Rigs.all()) {
            Scene.Pictures pictures = scene.shoot();
            for (Photograph photo : new Photograph[] {pictures.photo(), pictures.flat(), pictures.steps()}) {
                for (short count : photo.counts()) {
                    assertTrue(Short.toUnsignedInt(count) < photo.fullScale(), scene.name() + " clips");
                }
            }
            double brightest = 0;
            for (int c = 0; c < pictures.flat().channels(); c++) {
                brightest = Math.max(brightest, pictures.flat().mean(c, 95, 70, 10, 10) / pictures.flat().fullScale());
            }
            assertTrue(brightest > 0.55 && brightest < 0.86, scene.name() + " " + brightest);
        }
    }

    /** An rms error of 0.6 nm is asked of single pixels; the bound leaves room for it in every rig. */
    @Test
    void theBoundOfEachRigStaysBelowHalfANanometre() {
        for (Scene scene : Rigs.all()) {
            double rms = Math.sqrt(DoubleStream.of(CramerRao.bounds(scene.shot(), scene.field()))
                    .filter(v -> !Double.isNaN(v)).map(v -> v * v).average().orElseThrow());
            assertTrue(rms < 0.5 && rms > 0.05, scene.name() + " " + rms);
        }
    }

    /** n d of the film is the same again 546 nm / 2 on; the line is not perfectly sharp. */
    @Test
    void theIslandLooksTheSameOneOrderFurther() {
        Scene scene = Fields.island();
        SignalCurve curve = Shot.of(scene.rig(), scene.stack(), scene.flatStack(), 0, 1500).curve();
        double period = 546 / (2 * 1.6);
        double noise = Shot.of(scene.rig(), scene.stack(), scene.flatStack(), 0, 1).signalNoise(0, 0.3);
        for (double d = 500; d < 560; d += 5) {
            assertEquals(curve.signal(0, d), curve.signal(0, d + period), noise, "at " + d);
            assertNotEquals(curve.signal(0, d), curve.signal(0, d + period / 3), noise, "at " + d);
        }
    }

    @Test
    void theThickIslandHasADouble() {
        Scene scene = Fields.thickIsland();
        Shot shot = Shot.of(scene.rig(), scene.stack(), scene.flatStack(), 0, 1500);
        double distance = 0;
        for (int c = 0; c < 3; c++) {
            double s = shot.curve().signal(c, 1420);
            distance += Math.pow((s - shot.curve().signal(c, 1107)) / shot.signalNoise(c, s), 2);
        }
        assertTrue(Math.sqrt(distance) < 0.5, "distance " + Math.sqrt(distance));
    }

    @Test
    void truthIsMissingExactlyUnderCoversAndOffTheFilm() {
        Field dirty = Fields.dirty().field();
        double[] truth = dirty.truth();
        int covered = 0;
        for (int i = 0; i < truth.length; i++) {
            assertEquals(dirty.cover()[i] != null, Double.isNaN(truth[i]));
            covered += Double.isNaN(truth[i]) ? 1 : 0;
        }
        assertTrue(covered > 0.03 * truth.length && covered < 0.15 * truth.length, "covered " + covered);
    }

    /** Chi-square of three channels exceeds 16.3 by chance once in a thousand; every cover lies much further off. */
    @Test
    void noCoverOfTheDirtyFieldLooksLikeAFilm() {
        Scene scene = Fields.dirty();
        Shot shot = Shot.of(scene.rig(), scene.stack(), scene.flatStack(), 0, 1500);
        double[] signals = shot.signals(shot.photo(scene.field(), scene.seed()));
        for (int i = 0; i < scene.field().film().length; i++) {
            if (scene.field().cover()[i] == null) {
                continue;
            }
            double nearest = Double.MAX_VALUE;
            for (int d = 0; d <= 1500; d++) {
                double chiSquare = 0;
                for (int c = 0; c < 3; c++) {
                    double s = shot.curve().signal(c, d);
                    chiSquare += Math.pow((signals[3 * i + c] - s) / shot.signalNoise(c, s), 2);
                }
                nearest = Math.min(nearest, chiSquare);
            }
            assertTrue(nearest > 50, scene.field().cover()[i] + " at pixel " + i + ": " + nearest);
        }
    }

    @Test
    void allOrderScenesCanBePhotographedWithoutClipping() {
        for (Scene scene : Fields.all()) {
            Scene.Pictures pictures = scene.noiseDoubled().shoot();
            int clipped = 0;
            for (short count : pictures.photo().counts()) {
                clipped += Short.toUnsignedInt(count) == 65535 ? 1 : 0;
            }
            assertEquals(0, clipped, scene.name());
        }
    }

    @Test
    void theSoapFilmThinsFromFrameToFrameAndStaysOnScale() {
        double last = Double.MAX_VALUE;
        for (Scene scene : Fields.drainingSoap(4)) {
            double bottom = scene.field().range()[1];
            assertTrue(bottom < last);
            last = bottom;
            for (short count : scene.shoot().photo().counts()) {
                assertTrue(Short.toUnsignedInt(count) < 65535);
            }
        }
        assertEquals(600 / 3.0, last, 1);
    }
}
