package iridepth.trial;

import iridepth.simulation.Detector;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Medium;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.Sensor;
import iridepth.simulation.Shading;
import iridepth.simulation.Steps;
import iridepth.simulation.View;
import java.util.Random;

/** Scenes of the kinds of the test images, drawn at random: other cameras, lamps, samples and noise. All are invented. */
final class Likenesses {
    private static final double[] WAFERS_NM = {90, 130, 190, 240, 285, 330, 400};
    private static final String[] LEDS = {"LED-B1", "LED-B2", "LED-B3", "LED-B4", "LED-B5", "LED-BH1", "LED-V1", "LED-V2"};
    private static final String[] FILMS = {"SiO2", "SiO2", "SiO2", "PMMA", "Al2O3", "Si3N4"};
    private static final Medium RESIST = Medium.constant("resist", 1.60);

    private Likenesses() {
    }

    /** A stream of its own for each scene; the multiplier parts the streams of neighbouring numbers. */
    private static Random random(long seed) {
        return new Random(seed * 0x9E3779B97F4A7C15L);
    }

    private static double between(Random random, double low, double high) {
        return low + (high - low) * random.nextDouble();
    }

    /** A wedge of oxide, polymer, alumina or nitride in an sRGB file under D65. */
    static Scene wedge(int width, int height, long seed) {
        Random random = random(seed);
        Rig rig = Rig.srgb(Lamp.illuminant("D65"), View.aperture(0), between(random, 8_000, 60_000));
        double thick = between(random, 420, 520);
        String film = FILMS[random.nextInt(FILMS.length)];
        return new Scene("wedge-" + seed, rig, FilmStack.parse("air / " + film + " / Si"), null, new double[] {0, 520}, null,
                Field.wedge(width, height, 0, thick), rig.lamp(), rig.view(), 1000 + seed);
    }

    /** An oxidised wafer under a halogen lamp: glare, vignette, flat, dark and seven steps. */
    static Scene wafer(int width, int height, long seed) {
        Random random = random(seed);
        Rig rig = Rig.of(Sensor.drawn(seed), Lamp.planck(3200 + between(random, -200, 200)), View.aperture(0.2 + between(random, -0.03, 0.03)),
                Detector.linear(between(random, 60_000, 120_000)).read(between(random, 0, 30), 0.01)).glare(between(random, 0, 0.015))
                .shading(new Shading(between(random, 0.05, 0.15), between(random, 0, 0.08), between(random, 0, 360),
                        between(random, -0.1, 0.1), between(random, -0.1, 0.1), between(random, -0.05, 0.05)))
                .exposure(between(random, 0.55, 0.75));
        double centre = WAFERS_NM[random.nextInt(WAFERS_NM.length)] + between(random, -15, 15);
        return new Scene("wafer-" + seed, rig, FilmStack.parse("air / SiO2 / Si"), FilmStack.parse("air / SiO2 1.5 nm / Si"),
                new double[] {0, 450}, new Steps(width, height, new double[] {25, 60, 110, 180, 240, 320, 400}, 8),
                Field.wafer(width, height, centre, between(random, -20, 20), between(random, -6, 6)), Lamp.planck(3200), View.aperture(0.2),
                1000 + seed);
    }

    /** A dome of resist under a white LED: flat and six steps, no dark. */
    static Scene dome(int width, int height, long seed) {
        Random random = random(seed);
        Lamp lamp = Lamp.illuminant(LEDS[random.nextInt(LEDS.length)]);
        Rig rig = Rig.of(Sensor.drawn(seed), lamp, View.aperture(0.1), Detector.linear(between(random, 18_000, 80_000)).read(0, 0))
                .exposure(between(random, 0.55, 0.75)).glare(between(random, 0, 0.003));
        double rim = between(random, 60, 200);
        return new Scene("dome-" + seed, rig, FilmStack.parse("air / resist / Si", RESIST), FilmStack.parse("air / Si"),
                new double[] {0, 1500}, new Steps(width, height, new double[] {0, 100, 200, 350, 500, 800}, 8),
                Field.dome(width, height, rim, between(random, 850, 1200) - rim), lamp, View.aperture(0.1), 1000 + seed);
    }
}
