package iridepth.trial;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Scenes like the test images with other cameras, lamps and samples, read by the whole program from files. */
class LikenessesTest {
    @TempDir
    private Path folder;

    private Outcome read(Scene scene, double least) throws IOException {
        return Trial.of(SceneFolder.write(folder, scene)).map(least);
    }

    @Test
    void wedgesAreReadAtTheCramerRaoBound() throws IOException {
        Outcome o = read(Likenesses.wedge(320, 240, 4), 10);
        assertAll(o.toString(), () -> assertTrue(o.read() >= 0.99), () -> assertTrue(o.within40() >= 0.995),
                () -> assertTrue(o.normalized() <= 1.15), () -> assertTrue(o.within1u() >= 0.63 && o.within1u() <= 0.73));
    }

    /** Alumina and nitride, where a sixth of the pixels has a channel that sRGB cannot show: it counts for nothing in the uncertainty. */
    @ParameterizedTest
    @ValueSource(longs = {1, 3})
    void wedgesWithChannelsOffTheScaleAreReadAndTheirUncertaintyHolds(long number) throws IOException {
        Outcome o = read(Likenesses.wedge(320, 240, number), 10);
        assertAll(o.toString(), () -> assertTrue(o.read() >= 0.99), () -> assertTrue(o.within40() >= 0.995),
                () -> assertTrue(o.within1u() >= 0.63 && o.within1u() <= 0.73), () -> assertTrue(o.within2u() >= 0.9 && o.within2u() <= 0.99));
    }

    /** Number 7 hardly varies in thickness, number 10 is thin. */
    @ParameterizedTest
    @ValueSource(longs = {1, 4, 7, 10})
    void wafersAreReadWithACameraThatNobodyCharacterised(long number) throws IOException {
        Outcome o = read(Likenesses.wafer(280, 210, number), 0);
        assertAll(o.toString(), () -> assertTrue(o.within5() == 1), () -> assertTrue(o.rms() <= 0.6),
                () -> assertTrue(Math.abs(o.bias()) <= 0.3), () -> assertTrue(o.within2u() >= 0.9 && o.within2u() <= 0.99));
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 6})
    void domesOfSeveralOrdersAreReadInTheRightOne(long number) throws IOException {
        assertReadInTheRightOrder(read(Likenesses.dome(320, 240, number), 0));
    }

    /** The calibration from the steps alone puts one pixel in thirty in a wrong order; refining it on the photo's films mends that. */
    @Test
    void aDomeUnderALampStatedWrongIsReadInTheRightOrderOnceItsFilmsAreKnown() throws IOException {
        Trial trial = Trial.of(SceneFolder.write(folder, Likenesses.misstatedDome(320, 240, 12)));
        assertTrue(trial.stepsOnly(0).within40() < 0.98);
        assertReadInTheRightOrder(trial.map(0));
    }

    private static void assertReadInTheRightOrder(Outcome o) {
        assertAll(o.toString(), () -> assertTrue(o.read() >= 0.98), () -> assertTrue(o.within40() >= 0.999),
                () -> assertTrue(o.normalized() <= 1.3), () -> assertTrue(o.within2u() >= 0.9 && o.within2u() <= 0.99));
    }
}
