package iridepth.simulation;

import static iridepth.simulation.Spectrum.edge;
import static iridepth.simulation.Spectrum.gaussian;
import static iridepth.simulation.Spectrum.lobe;

import java.util.Arrays;
import java.util.Random;

/**
 * The spectral sensitivities of a camera, one curve per channel. The cameras are invented, of the shapes that makers
 * publish: dye lobes with shoulders, skirts and second lobes, interference filters with steep edges, cut-off filters, and
 * the ripple of a cover glass.
 *
 * @param name what the sensor is like
 * @param curves one row per channel, relative sensitivity at 380, 381 .. 780 nm
 */
public record Sensor(String name, double[][] curves) {

    private static Sensor of(String name, Spectrum... channels) {
        return new Sensor(name, Arrays.stream(channels).map(Spectrum::samples).toArray(double[][]::new));
    }

    /** Number of channels. */
    public int channels() {
        return curves.length;
    }

    /** The CIE 1931 observer: X, Y and Z. */
    public static Sensor cie1931() {
        Table table = Table.resource("/iridepth/colour/cie1931-2deg-1nm.csv");
        return of("CIE 1931", table.spectrum("x_bar"), table.spectrum("y_bar"), table.spectrum("z_bar"));
    }

    /** Each channel a mixture of two or three Gaussians. */
    public static Sensor mixture() {
        return of("mixture",
                gaussian(1, 610, 26).plus(gaussian(0.45, 660, 30)).plus(gaussian(0.06, 535, 20)),
                gaussian(1, 528, 30).plus(gaussian(0.35, 575, 26)),
                gaussian(1, 452, 22).plus(gaussian(0.4, 490, 20)).plus(gaussian(0.04, 560, 30)));
    }

    /** Lobes with one steep and one gentle side. */
    public static Sensor skewed() {
        return of("skewed", lobe(1, 592, 14, 55), lobe(1, 522, 42, 24), lobe(1, 440, 16, 40));
    }

    /** Dyes that pass light again far from their main lobe. */
    public static Sensor secondLobes() {
        return of("second lobes",
                lobe(1, 605, 20, 42).plus(gaussian(0.16, 425, 20)).plus(gaussian(0.08, 520, 18)),
                gaussian(1, 535, 32).plus(gaussian(0.14, 690, 32)).plus(gaussian(0.05, 430, 14)),
                gaussian(1, 462, 25).plus(gaussian(0.12, 705, 30)).plus(gaussian(0.07, 545, 20)));
    }

    /** Three sensors behind a dichroic prism: flat tops, steep edges, hardly any overlap. */
    public static Sensor prism() {
        return of("prism",
                edge(588, 3).times(edge(685, -4)).times(w -> 1 - 0.001 * (w - 590)),
                edge(494, 3).times(edge(582, -3)).times(w -> 0.9 + 0.001 * (w - 500)),
                edge(412, 3).times(edge(489, -3)).times(w -> 0.7 + 0.003 * (w - 420)));
    }

    /** Broad, strongly overlapping dyes between a UV edge at 415 nm and an IR edge at 655 nm. */
    public static Sensor cutOff() {
        Spectrum window = edge(415, 2.5).times(edge(655, -3));
        return of("cut-off",
                window.times(lobe(1, 600, 34, 60).plus(w -> 0.05)),
                window.times(gaussian(1, 540, 44).plus(w -> 0.06)),
                window.times(lobe(1, 455, 30, 36).plus(w -> 0.04)));
    }

    /** No IR filter: all dyes open again towards the infrared. */
    public static Sensor infraredLeak() {
        Spectrum leak = edge(715, 9).times(gaussian(1, 760, 60));
        return of("infrared leak",
                edge(582, 6).times(lobe(1, 610, 40, 75)).plus(leak.map(v -> 0.35 * v)),
                gaussian(1, 532, 36).plus(leak.map(v -> 0.28 * v)),
                gaussian(1, 455, 27).plus(leak.map(v -> 0.24 * v)));
    }

    /** Dye lobes with the interference ripple of a thin cover layer: 7 % at 400 nm, finer than any smooth basis. */
    public static Sensor ripple() {
        Spectrum fringes = w -> 1 + 0.07 * Math.cos(2 * Math.PI * 6500 / w);
        return of("ripple", fringes.times(lobe(1, 600, 22, 38)), fringes.times(gaussian(1, 532, 33)),
                fringes.times(lobe(1, 450, 20, 30)));
    }

    /** Four channels: red, green, blue and deep red. */
    public static Sensor fourChannels() {
        return of("four channels", gaussian(1, 615, 24), lobe(1, 540, 30, 24), lobe(1, 460, 22, 28),
                edge(668, 4).times(edge(735, -6)));
    }

    /**
     * A colour camera drawn at random: red, green and blue lobes with sides of different steepness, a shoulder on each, some light
     * let through far from it, and common cut-offs towards the ultraviolet and the infrared.
     */
    public static Sensor drawn(long seed) {
        Random random = new Random(seed * 0x9E3779B97F4A7C15L);
        Spectrum window = edge(between(random, 395, 420), between(random, 2, 6)).times(edge(between(random, 655, 705),
                -between(random, 3, 12)));
        double[] centre = {between(random, 590, 615), between(random, 522, 545), between(random, 448, 468)};
        Spectrum[] channels = new Spectrum[centre.length];
        for (int c = 0; c < channels.length; c++) {
            Spectrum main = lobe(1, centre[c], between(random, 18, 42), between(random, 18, 42));
            double side = random.nextBoolean() ? 1 : -1;
            Spectrum shoulder = gaussian(between(random, 0.1, 0.45), centre[c] + side * between(random, 35, 55), between(random, 18, 30));
            Spectrum far = gaussian(between(random, 0, 0.1), between(random, 420, 680), between(random, 15, 40));
            channels[c] = window.times(main.plus(shoulder).plus(far));
        }
        return of("drawn " + seed, channels);
    }

    private static double between(Random random, double low, double high) {
        return low + (high - low) * random.nextDouble();
    }

    /** One channel: bare silicon with its quantum efficiency rising to 560 nm and falling slowly. */
    public static Sensor monochrome() {
        return of("monochrome", lobe(1, 560, 110, 160));
    }

    /** One channel behind a narrow interference filter with nearly flat top. */
    public static Sensor filtered(double centre, double width) {
        return of("filtered", w -> Math.exp(-Math.log(2) * Math.pow(2 * (w - centre) / width, 4)));
    }
}
