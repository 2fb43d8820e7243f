package iridepth.planning;

import iridepth.colour.Light;
import iridepth.colour.Xyz;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/**
 * A camera as far as planning needs it.
 *
 * @param name          what it is, for people
 * @param generic       whether the sensitivities are a guess, so that it wants calibration
 * @param generic       whether the sensitivities are a guess, so that it wants calibration
 * @param channels      names of the channels
 * @param sensitivities spectral sensitivities, one per channel on a common scale; empty for a colour-managed file
 * @param noise         noise in fractions of full scale
 * @param encoding      how counts stand for light
 * @param exposure      fraction of full scale that the brightest film in the brightest channel fills, above 0 and below 1
 * @param white         reflectance that fills the scale of every channel, which then takes the place of the exposure; or NaN
 */
public record Camera(String name, boolean generic, List<String> channels, List<Spectrum> sensitivities, NoiseModel noise, Encoding encoding,
                     double exposure, double white) {
    /** White of the ICC profile connection space (ISO 15076-1). */
    private static final Xyz D50 = new Xyz(0.9642, 1, 0.8249);
    private static final List<String> COLOURS = List.of("red", "green", "blue");

    /** Keeps copies of the lists and checks the exposure. */
    public Camera {
        channels = List.copyOf(channels);
        sensitivities = List.copyOf(sensitivities);
        if (!(exposure > 0 && exposure < 1)) {
            throw new IllegalArgumentException("the exposure is the fraction of full scale that the brightest film fills, above 0 "
                    + "and below 1, not " + exposure);
        }
    }

    /** A camera that writes colour-managed files, red, green and blue. */
    public static Camera colourManaged(NoiseModel noise, Encoding encoding, double exposure) {
        return new Camera("colour-managed camera", false, COLOURS, List.of(), noise, encoding, exposure, Double.NaN);
    }

    /**
     * A colour camera of which nothing is known: smooth lobes at 600, 535 and 455 nm, 80 nm wide at half height, the rough shape
     * of what makers publish (common practice).
     */
    public static Camera genericColour(NoiseModel noise, Encoding encoding, double exposure) {
        return new Camera("generic colour camera", true, COLOURS, List.of(lobe(600), lobe(535), lobe(455)), noise, encoding, exposure,
                Double.NaN);
    }

    /** A monochrome camera of which nothing is known: silicon's broad rise to 560 nm and slow fall (common practice). */
    public static Camera genericMonochrome(NoiseModel noise, Encoding encoding, double exposure) {
        Spectrum silicon = Spectrum.sample(nm -> Math.exp(-Math.pow((nm - 560) / (nm < 560 ? 150 : 200), 2)));
        return new Camera("generic monochrome camera", true, List.of("grey"), List.of(silicon), noise, encoding, exposure,
                Double.NaN);
    }

    private static Spectrum lobe(double centreNm) {
        double width = 80 / Math.sqrt(8 * Math.log(2));
        return Spectrum.sample(nm -> Math.exp(-Math.pow((nm - centreNm) / width, 2) / 2) + 0.003);
    }

    /** What the channels integrate under a light, scaled so that a perfect reflector gives 1. */
    public EffectiveResponses responses(Light light) {
        if (sensitivities.isEmpty()) {
            double[][] toXyz = encoding.toXyz().orElseThrow();
            return EffectiveResponses.colourManaged(EffectiveResponses.fromXyz(toXyz), D50, light);
        }
        return EffectiveResponses.ofSensor(channels, sensitivities, light);
    }

    /**
     * The noise to expect of films under a light, the exposure set for the brightest of them. Channels of a sensor are as bright
     * as light and sensitivity make them, without white balance; those of a colour-managed file share a scale.
     *
     * @param curve the films' signals, a perfect reflector's being 1
     */
    public ChannelNoise noise(ColourCurve curve, Light light) {
        double[] level = new double[curve.channels()];
        Arrays.fill(level, Double.isNaN(white) ? 1 : 1 / white);
        if (!Double.isNaN(white)) {
            return ChannelNoise.of(noise, encoding, level);
        }
        for (int c = 0; c < sensitivities.size(); c++) {
            level[c] = sensitivities.get(c).dot(light.power());
        }
        double brightest = 0;
        for (int k = 0; k < curve.size(); k++) {
            for (int c = 0; c < level.length; c++) {
                brightest = Math.max(brightest, level[c] * curve.signal(k, c));
            }
        }
        double scale = exposure / brightest;
        return ChannelNoise.of(noise, encoding, Arrays.stream(level).map(l -> l * scale).toArray());
    }

    /** What it is, in a line for people. */
    public String text() {
        int counts = encoding.top() + 1;
        String fill = Double.isNaN(white) ? String.format(Locale.ROOT, "brightest film at %.0f %% of full scale", 100 * exposure)
                : String.format(Locale.ROOT, "full scale at a reflectance of %.3g", white);
        return String.format(Locale.ROOT, "%s, %d counts, full well %.0f e, read noise %.3g e, %s", name, counts, 1 / noise.gain(0),
                noise.readNoise(0) / noise.gain(0), fill);
    }

    /** This camera with the scale fixed by the reflectance that fills it. */
    public Camera withWhite(double reflectance) {
        return new Camera(name, generic, channels, sensitivities, noise, encoding, exposure, reflectance);
    }

    /** This camera with other sensitivities, such as those of a table. */
    public Camera withSensitivities(String itsName, List<String> names, List<Spectrum> known) {
        for (int c = 0; c < known.size(); c++) {
            for (int i = 0; i < Grid.SIZE; i++) {
                if (known.get(c).at(i) < 0) {
                    throw new IllegalArgumentException(itsName + ": the sensitivity " + names.get(c) + " is negative at "
                            + Grid.wavelength(i) + " nm");
                }
            }
        }
        return new Camera(itsName, false, names, known, noise, encoding, exposure, white);
    }
}
