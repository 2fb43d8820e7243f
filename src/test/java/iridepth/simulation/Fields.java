package iridepth.simulation;

import java.util.List;
import java.util.stream.IntStream;

/**
 * Samples that put the choice of the interference order to the test, before rigs that are stated as they are. For each
 * with its noise doubled see {@link Scene#noiseDoubled()}. All samples are invented.
 */
public final class Fields {
    private static final int WIDTH = 300;
    private static final int HEIGHT = 200;
    private static final Medium RESIST = Medium.constant("resist", 1.60);
    private static final Medium SOAP = Medium.constant("soap", 1.33);
    /** Half-width of the moat around an island, in pixels. */
    private static final int MOAT = 5;

    private Fields() {
    }

    /** The scenes of this class but the soap films. */
    public static List<Scene> all() {
        return List.of(wedge(), cliff(), island(), thickIsland(), dirty(), fringes());
    }

    private static Scene inColour(String name, Field field, long seed) {
        Rig rig = Rig.of(Sensor.mixture(), Lamp.planck(3200), View.aperture(0.1), Detector.linear(80_000));
        Steps steps = new Steps(WIDTH, HEIGHT, new double[] {20, 90, 170, 270, 400, 580, 800}, 4);
        return scene(name, rig, steps, field, seed);
    }

    private static Scene inOneBand(String name, double width, Field field, long seed) {
        Rig rig = Rig.of(Sensor.monochrome(), Lamp.band(546, width), View.aperture(0.05), Detector.linear(80_000));
        Steps steps = new Steps(WIDTH, HEIGHT, new double[] {0, 25, 50, 85, 110, 140}, 4);
        return scene(name, rig, steps, field, seed);
    }

    private static Scene scene(String name, Rig rig, Steps steps, Field field, long seed) {
        return new Scene(name, rig, FilmStack.parse("air / resist / Si", RESIST), FilmStack.parse("air / Si"),
                new double[] {0, 1500}, steps, field, rig.lamp(), rig.view(), seed);
    }

    /** Resist from nothing at the left to 1000 nm at the right: 2 n d passes five wavelengths of 600 nm. */
    public static Scene wedge() {
        return inColour("wedge", Field.wedge(WIDTH, HEIGHT, 0, 1000), 201);
    }

    /** A gentle slope of resist that steps up by 400 nm along a bent line through the picture. */
    public static Scene cliff() {
        return inColour("cliff", Field.of(WIDTH, HEIGHT, (x, y) -> {
            double slope = 230 + 0.15 * x + 0.2 * y;
            return onCliff(x, y) ? slope + 400 : slope;
        }), 202);
    }

    /** Whether a pixel of {@link #cliff()} lies on the high side. */
    public static boolean onCliff(int x, int y) {
        return x > WIDTH / 2.0 + 25 * Math.sin(y / 30.0);
    }

    /**
     * Fringes of one spectral line, in which thicknesses 546 / (2 n) = 170.6 nm apart look alike. The film around rises
     * from nothing at the left edge; an opaque moat cuts off an island of 500 to 560 nm, whose order nothing tells.
     */
    public static Scene island() {
        Field field = Field.of(WIDTH, HEIGHT, (x, y) -> onIsland(x, y, 0) ? 500 + y * 0.3
                : 600.0 * Math.max(0, x - 10) / (WIDTH - 11));
        return inOneBand("island", 1, field.covered(Cover.DUST, 1, Fields::inMoat), 203);
    }

    /** In colour: a moat around an island of 1420 nm, which looks like 1107 nm within a third of the noise. */
    public static Scene thickIsland() {
        Field field = Field.of(WIDTH, HEIGHT, (x, y) -> onIsland(x, y, 0) ? 1420 : 150 + 0.5 * x);
        return inColour("thick-island", field.covered(Cover.DUST, 1, Fields::inMoat), 204);
    }

    /** Whether a pixel of an island scene lies inside the moat's ring. */
    public static boolean onIsland(int x, int y) {
        return onIsland(x, y, -MOAT);
    }

    private static boolean onIsland(int x, int y, double margin) {
        return Math.hypot(x - 0.6 * WIDTH, y - 0.5 * HEIGHT) <= 50 + margin;
    }

    private static boolean inMoat(int x, int y) {
        return onIsland(x, y, MOAT) && !onIsland(x, y);
    }

    /** A smooth film of 250 to 650 nm with dust, fibres, two scratches across the picture and a stain. */
    public static Scene dirty() {
        Field film = Field.of(WIDTH, HEIGHT, (x, y) -> 250 + 1.1 * x + 30 * Math.sin(y / 40.0));
        return inColour("dirty", film.stain(220, 60, 22).specks(60, 4, 7).scratch(0, 150, 300, 120, 2.5)
                .scratch(90, 0, 130, 200, 1.5), 205);
    }

    /** Fringes in one band of 10 nm: bare for ten columns at the left edge, then rising to 1400 nm over eight fringes. */
    public static Scene fringes() {
        return inOneBand("fringes", 10, Field.of(WIDTH, HEIGHT, (x, y) -> {
            double u = Math.max(0, x - 10) / (WIDTH - 11.0);
            return 1400 * u * (1 - 0.3 * Math.pow(y / (double) HEIGHT - 0.5, 2));
        }), 206);
    }

    /**
     * A draining soap film, one scene per frame, time running from 0 to 8 drainage times; the flat is bare glass.
     *
     * @param frames number of frames, 2 or more
     */
    public static List<Scene> drainingSoap(int frames) {
        Rig rig = Rig.of(Sensor.skewed(), Lamp.illuminant("LED-B4"), View.aperture(0.05), Detector.linear(120_000))
                .exposure(0.35);
        Steps steps = new Steps(210, 120, new double[] {20, 60, 110, 160, 230, 310, 420}, 4);
        return IntStream.range(0, frames).mapToObj(i -> new Scene(String.format("soap-%03d", i), rig,
                FilmStack.parse("air / soap / air", SOAP), FilmStack.parse("air / BK7"), new double[] {0, 800}, steps,
                Field.soap(210, 120, 600, 8.0 * i / (frames - 1)), rig.lamp(), rig.view(), 300 + 4L * i)).toList();
    }
}
