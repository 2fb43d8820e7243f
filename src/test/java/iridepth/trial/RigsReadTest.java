package iridepth.trial;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.simulation.Rigs;
import iridepth.simulation.SceneFolder;
import java.io.IOException;
import java.nio.file.Path;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Rigs of an independent simulation whose sensors nobody has characterised, read by the whole program from files. Lamps are stated
 * up to 300 K and apertures up to 0.05 wrong.
 */
class RigsReadTest {
    @TempDir
    private Path folder;

    @ParameterizedTest
    @ValueSource(strings = {"oxide-mixture", "resist-skewed", "nitride-second-lobes", "titania-cut-off", "oxide-prism",
        "oxide-infrared-leak", "resist-ripple", "oxide-one-band", "oxide-eight-bit"})
    void everyPixelIsReadNearTheTruthAndTheStatedUncertaintyHolds(String rig) throws IOException {
        Outcome o = Trial.of(SceneFolder.write(folder, Rigs.named(rig))).map(0);
        assertAll(o.toString(),
                () -> assertTrue(o.read() >= 0.99),
                () -> assertTrue(o.within5() == 1),
                () -> assertTrue(o.rms() <= 0.6),
                () -> assertTrue(o.rms() <= 1.1 * o.bound()),
                () -> assertTrue(Math.abs(o.bias()) <= 0.3),
                () -> assertTrue(o.within2u() >= 0.9 && o.within2u() <= 0.99));
    }
}
