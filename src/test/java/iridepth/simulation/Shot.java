package iridepth.simulation;

import java.util.Arrays;
import java.util.Random;

/**
 * A rig set up before a film: takes its photographs. The gain is set once, on the flat, and kept for photo, flat and
 * steps. Equal seeds give equal pictures.
 */
public final class Shot {
    private static final int FRAMES = 4;
    private final Rig rig;
    private final SignalCurve film;
    private final double[] flat;
    private final double[] white;
    private final double[][] covers;
    private final double gain;

    private Shot(Rig rig, SignalCurve film, FilmStack flatStack) {
        this.rig = rig;
        this.film = film;
        double[][] e = rig.responses();
        double[] r = FilmReflectance.of(flatStack, rig.view(), 0, 1, 1).spectrum(0);
        flat = sums(e, r);
        white = sums(e, ones());
        covers = new double[Cover.values().length][];
        for (Cover cover : Cover.values()) {
            covers[cover.ordinal()] = sums(e, scaled(cover, r));
        }
        double brightest = 0;
        for (int c = 0; c < flat.length; c++) {
            brightest = Math.max(brightest, flat[c] + rig.glare() * white[c]);
        }
        gain = Double.isNaN(rig.exposure()) ? 1 : rig.exposure() / brightest;
    }

    /**
     * Sets a rig up.
     *
     * @param rig camera, lamp and optics
     * @param stack the film to photograph
     * @param flatStack the surface of the flat, all its layers of fixed thickness
     * @param from smallest thickness to come before the camera, nm
     * @param to largest thickness, nm
     */
    public static Shot of(Rig rig, FilmStack stack, FilmStack flatStack, double from, double to) {
        return new Shot(rig, SignalCurve.of(stack, rig.view(), rig.responses(), from, to), flatStack);
    }

    private static double[] sums(double[][] e, double[] r) {
        double[] sums = new double[e.length];
        for (int c = 0; c < e.length; c++) {
            for (int i = 0; i < r.length; i++) {
                sums[c] += e[c][i] * r[i];
            }
        }
        return sums;
    }

    private static double[] ones() {
        double[] ones = new double[Spectrum.COUNT];
        Arrays.fill(ones, 1);
        return ones;
    }

    private static double[] scaled(Cover cover, double[] r) {
        double[] scaled = new double[r.length];
        for (int i = 0; i < r.length; i++) {
            scaled[i] = cover.at(Spectrum.FIRST + i) * r[i];
        }
        return scaled;
    }

    /** The rig. */
    public Rig rig() {
        return rig;
    }

    /** The true colour curve, before gain, glare and shading. */
    public SignalCurve curve() {
        return film;
    }

    /** The true signal of the flat's surface per channel, before gain, glare and shading. */
    public double[] flatSignal() {
        return flat.clone();
    }

    /** Reflectance that fills the scale at the centre of the shading, in the channels of unit response. */
    public double whiteReflectance() {
        return 1 / gain;
    }

    /**
     * The signals s_c of a photograph as an ideal correction would give them: black level, gain, shading and glare taken
     * off exactly; noise, rounding and clipping stay. Row by row, the channels of a pixel side by side.
     */
    public double[] signals(Photograph photo) {
        double[] signals = new double[photo.counts().length];
        int channels = photo.channels();
        for (int i = 0; i < signals.length; i++) {
            int c = i % channels;
            int x = i / channels % photo.width();
            int y = i / channels / photo.width();
            double f = rig.detector().fraction(Short.toUnsignedInt(photo.counts()[i]));
            signals[i] = f / fractionSlope(c, x, y, photo.width(), photo.height()) - rig.glare() * white[c];
        }
        return signals;
    }

    /** Standard deviation of a signal s_c at the centre of the shading, rounding included. */
    public double signalNoise(int channel, double signal) {
        return rig.detector().noiseRounded(gain * (signal + rig.glare() * white[channel])) / gain;
    }

    /** Fraction of full scale, without black level, of a signal at a pixel of the picture. */
    double fraction(double signal, int c, int x, int y, int width, int height) {
        return gain * rig.shading().at(x, y, width, height, c) * (signal + rig.glare() * white[c]);
    }

    /** Change of that fraction per unit of signal. */
    public double fractionSlope(int c, int x, int y, int width, int height) {
        return gain * rig.shading().at(x, y, width, height, c);
    }

    /** A photograph of a field. */
    public Photograph photo(Field field, long seed) {
        return render(field.width(), field.height(), 1, seed, (c, x, y) -> signal(field, c, y * field.width() + x));
    }

    private double signal(Field field, int c, int i) {
        double share = field.opacity()[i];
        double hidden = share > 0 ? share * covers[field.cover()[i].ordinal()][c] : 0;
        return share < 1 ? hidden + (1 - share) * film.signal(c, field.film()[i]) : hidden;
    }

    /** The flat: the mean of four frames of its surface. */
    public Photograph flat(int width, int height, long seed) {
        return render(width, height, FRAMES, seed, (c, x, y) -> flat[c]);
    }

    /** The same surface in one frame, as two of which tell the noise. */
    public Photograph flatFrame(int width, int height, long seed) {
        return render(width, height, 1, seed, (c, x, y) -> flat[c]);
    }

    /** The dark: the mean of four frames without light. */
    public Photograph dark(int width, int height, long seed) {
        return render(width, height, FRAMES, seed, null);
    }

    /** Patches of the film side by side from left to right, the dark holder in gaps between. */
    public Photograph steps(Steps steps, long seed) {
        double[] holder = covers[Cover.HOLDER.ordinal()];
        return render(steps.width(), steps.height(), 1, seed, (c, x, y) -> {
            int patch = steps.patchAt(x);
            return patch < 0 ? holder[c] : film.signal(c, steps.thickness()[patch]);
        });
    }

    /** Tells which patch of a target lies at a pixel, -1 for its dark frame. */
    @FunctionalInterface
    public interface PatchAt {
        int patch(int x, int y);
    }

    /** A reference target whose patches have known reflectances. */
    public Photograph target(int width, int height, PatchAt at, double[][] reflectance, long seed) {
        double[][] e = rig.responses();
        double[][] signal = new double[reflectance.length][];
        Arrays.setAll(signal, k -> sums(e, reflectance[k]));
        double[] holder = covers[Cover.HOLDER.ordinal()];
        return render(width, height, 1, seed, (c, x, y) -> at.patch(x, y) < 0 ? holder[c] : signal[at.patch(x, y)][c]);
    }

    @FunctionalInterface
    private interface Scene {
        double signal(int channel, int x, int y);
    }

    private Photograph render(int width, int height, int frames, long seed, Scene scene) {
        Detector detector = rig.detector();
        Random random = new Random(seed);
        int channels = rig.channels();
        short[] counts = new short[width * height * channels];
        for (int i = 0; i < counts.length; i++) {
            int c = i % channels;
            int x = i / channels % width;
            int y = i / channels / width;
            double f = scene == null ? 0 : fraction(scene.signal(c, x, y), c, x, y, width, height);
            double mean = 0;
            for (int k = 0; k < frames; k++) {
                mean += detector.count(f + detector.noise(f) * random.nextGaussian());
            }
            counts[i] = (short) Math.round(mean / frames);
        }
        return new Photograph(width, height, channels, detector.fullScale(), counts);
    }
}
