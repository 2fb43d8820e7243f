package iridepth.simulation;

import java.util.List;

/**
 * Rigs whose sensor nobody has characterised, each with a flat, a dark, five to seven steps and a photograph. Lamp and
 * aperture are stated wrongly by up to 300 K and 0.05. All names, samples and cameras are invented.
 */
public final class Rigs {
    private static final int WIDTH = 300;
    private static final int HEIGHT = 200;
    private static final FilmStack BARE = FilmStack.parse("air / SiO2 1.5 nm / Si");
    private static final Medium RESIST = Medium.constant("resist", 1.60);

    private Rigs() {
    }

    /** All rigs. */
    public static List<Scene> all() {
        return List.of(oxideMixture(), resistSkewed(), nitrideSecondLobes(), pmmaGlass(), titaniaCutOff(),
                oxidePrism(), oxideInfraredLeak(), resistRipple(), pmmaFourChannels(), oxideOneBand(), oxideEightBit());
    }

    /** The rig of a name. */
    public static Scene named(String name) {
        return all().stream().filter(scene -> scene.name().equals(name)).findFirst()
                .orElseThrow(() -> new IllegalArgumentException("no rig " + name));
    }

    private static Steps steps(double... thickness) {
        return new Steps(WIDTH, HEIGHT, thickness, 4);
    }

    /** Oxide wafer under a halogen lamp stated 300 K too cool, through an aperture stated 0.05 too small. */
    public static Scene oxideMixture() {
        Rig rig = Rig.of(Sensor.mixture(), Lamp.planck(3500), View.aperture(0.25), Detector.linear(80_000))
                .glare(0.01).shading(new Shading(0.06, 0.05, 30, 0.1, -0.05, 0.08)).exposure(0.65);
        return new Scene("oxide-mixture", rig, FilmStack.parse("air / SiO2 / Si"), BARE, new double[] {0, 450},
                steps(25, 60, 110, 180, 240, 320, 400), Field.wafer(WIDTH, HEIGHT, 215, 22, 5), Lamp.planck(3200),
                View.aperture(0.20), 101);
    }

    /** Resist slope under a white LED for which the CIE's LED-B3 is stated. */
    public static Scene resistSkewed() {
        Rig rig = Rig.of(Sensor.skewed(), Lamp.led(452, 0.9, 585), View.aperture(0.10), Detector.linear(120_000))
                .glare(0.005).shading(new Shading(0.10, 0.02, 120, -0.1, 0.1, 0)).exposure(0.75);
        return new Scene("resist-skewed", rig, FilmStack.parse("air / resist / Si", RESIST), FilmStack.parse("air / Si"),
                new double[] {0, 700}, steps(0, 80, 150, 230, 330, 450, 600), Field.wedge(WIDTH, HEIGHT, 260, 420),
                Lamp.illuminant("LED-B3"), View.aperture(0.10), 102);
    }

    /** Nitride dome under a halogen lamp stated 300 K too hot, through an aperture stated 0.05 too small. */
    public static Scene nitrideSecondLobes() {
        Rig rig = Rig.of(Sensor.secondLobes(), Lamp.planck(2900), View.aperture(0.35), Detector.linear(100_000))
                .glare(0.02).shading(new Shading(0.08, 0.08, 200, 0, 0, 0.1)).exposure(0.70);
        return new Scene("nitride-second-lobes", rig, FilmStack.parse("air / Si3N4 / Si"), BARE, new double[] {0, 300},
                steps(20, 50, 85, 130, 180, 250), Field.dome(WIDTH, HEIGHT, 95, 70), Lamp.planck(3200),
                View.aperture(0.30), 103);
    }

    /** PMMA on glass: little contrast, hence many frames summed. */
    public static Scene pmmaGlass() {
        Rig rig = Rig.of(Sensor.ripple(), Lamp.planck(3100), View.aperture(0.10),
                Detector.linear(2_000_000).read(500, 0.005)).glare(0.001)
                .shading(new Shading(0.05, 0.03, 80, 0.05, 0.1, 0)).exposure(0.80);
        return new Scene("pmma-glass", rig, FilmStack.parse("air / PMMA / BK7"), FilmStack.parse("air / BK7"),
                new double[] {0, 450}, steps(30, 75, 130, 200, 280, 360, 430), Field.wedge(WIDTH, HEIGHT, 120, 250),
                Lamp.planck(3300), View.aperture(0.10), 104);
    }

    /** Anodised titanium under a lamp stated 300 K too cool; the sensor ends sharply at 415 and 655 nm. */
    public static Scene titaniaCutOff() {
        Rig rig = Rig.of(Sensor.cutOff(), Lamp.planck(4300), View.aperture(0.20), Detector.linear(150_000))
                .glare(0.03).shading(new Shading(0.12, 0.04, 300, 0.1, 0.1, 0.05)).exposure(0.60);
        return new Scene("titania-cut-off", rig, FilmStack.parse("air / TiO2 / Ti"), FilmStack.parse("air / Ti"),
                new double[] {0, 180}, steps(10, 30, 55, 80, 110, 140, 170), Field.wedge(WIDTH, HEIGHT, 20, 130),
                Lamp.planck(4000), View.aperture(0.20), 105);
    }

    /** Oxide of several hundred nanometres before a prism camera with steep edges; lamp stated 300 K too hot. */
    public static Scene oxidePrism() {
        Rig rig = Rig.of(Sensor.prism(), Lamp.planck(3000), View.aperture(0.15), Detector.linear(90_000).bits(12))
                .glare(0.008).shading(new Shading(0.04, 0.06, 10, -0.05, 0, 0)).exposure(0.72);
        return new Scene("oxide-prism", rig, FilmStack.parse("air / SiO2 / Si"), BARE, new double[] {0, 700},
                steps(40, 120, 200, 290, 380, 490, 620), Field.dome(WIDTH, HEIGHT, 310, 120), Lamp.planck(3300),
                View.aperture(0.20), 106);
    }

    /** Oxide under a three-band fluorescent lamp; a sensor without infrared filter, channels not balanced. */
    public static Scene oxideInfraredLeak() {
        Rig rig = Rig.of(Sensor.infraredLeak(), Lamp.illuminant("FL11"), View.aperture(0.40),
                Detector.linear(120_000)).glare(0.015).shading(new Shading(0.09, 0.05, 45, 0, 0.1, 0.04)).unbalanced()
                .exposure(0.78);
        return new Scene("oxide-infrared-leak", rig, FilmStack.parse("air / SiO2 / Si"), BARE, new double[] {0, 400},
                steps(20, 70, 120, 170, 230, 300, 370), Field.wafer(WIDTH, HEIGHT, 150, 35, -10),
                Lamp.illuminant("FL11"), View.aperture(0.45), 107);
    }

    /** Resist before a camera whose cover glass ripples the sensitivities; 14 bits. */
    public static Scene resistRipple() {
        Rig rig = Rig.of(Sensor.ripple(), Lamp.planck(3400), View.aperture(0.05), Detector.linear(70_000).bits(14))
                .glare(0.004).shading(new Shading(0.03, 0.02, 270, 0, 0, 0)).exposure(0.70);
        return new Scene("resist-ripple", rig, FilmStack.parse("air / resist / Si", RESIST), FilmStack.parse("air / Si"),
                new double[] {0, 500}, steps(20, 70, 130, 200, 280, 370, 470), Field.wedge(WIDTH, HEIGHT, 90, 230),
                Lamp.planck(3150), View.aperture(0.10), 108);
    }

    /** PMMA over a fixed oxide before four channels. */
    public static Scene pmmaFourChannels() {
        Rig rig = Rig.of(Sensor.fourChannels(), Lamp.planck(3300), View.aperture(0.20), Detector.linear(120_000))
                .glare(0.01).shading(new Shading(0.07, 0.03, 150, 0.1, 0, 0.02)).exposure(0.68);
        return new Scene("pmma-four-channels", rig, FilmStack.parse("air / PMMA / SiO2 300 nm / Si"), BARE,
                new double[] {0, 400}, steps(15, 60, 115, 170, 240, 310, 380), Field.dome(WIDTH, HEIGHT, 60, 160),
                Lamp.planck(3100), View.aperture(0.15), 109);
    }

    /** Thin oxide in one green band, brighter to darker without a turn: one channel, five steps. */
    public static Scene oxideOneBand() {
        Rig rig = Rig.of(Sensor.filtered(545, 18), Lamp.planck(3200), View.aperture(0.10), Detector.linear(100_000))
                .glare(0.01).shading(new Shading(0.06, 0.04, 60, 0, 0, 0)).exposure(0.80);
        return new Scene("oxide-one-band", rig, FilmStack.parse("air / SiO2 / Si"), BARE, new double[] {10, 88},
                steps(12, 30, 48, 65, 82), Field.wedge(WIDTH, HEIGHT, 30, 75), Lamp.band(546, 15),
                View.aperture(0.10), 110);
    }

    /** Oxide before an ordinary camera: linear file of 8 bits, five steps. */
    public static Scene oxideEightBit() {
        Rig rig = Rig.of(Sensor.cutOff(), Lamp.led(448, 0.7, 570), View.aperture(0.12),
                Detector.linear(60_000).bits(8).read(120, 3.0 / 255))
                .glare(0.02).shading(new Shading(0.08, 0.03, 330, -0.1, 0.05, 0.03)).exposure(0.82);
        return new Scene("oxide-eight-bit", rig, FilmStack.parse("air / SiO2 / Si"), BARE, new double[] {0, 320},
                steps(30, 85, 140, 210, 290), Field.wedge(WIDTH, HEIGHT, 110, 250), Lamp.illuminant("LED-B4"),
                View.aperture(0.15), 111);
    }
}
