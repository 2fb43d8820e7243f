package iridepth.simulation;

/**
 * A camera, its lamp and its optics.
 *
 * <p>Signal of channel c at a film of thickness d, as a fraction of full scale:
 * gain * shading_c(x, y) * (s_c(d) + glare * w_c), with s_c the sum over wavelength of E_c R(d), E_c the effective
 * response, and w_c the sum of E_c, the signal of a perfect reflector. Glare is light from the instrument's own
 * surfaces: the same for every sample, shaded like it.
 *
 * @param sensor spectral sensitivities
 * @param lamp light
 * @param view directions of the light
 * @param detector noise, bit depth, encoding
 * @param shading unevenness of the light
 * @param glare veiling glare as a fraction of a perfect reflector's signal
 * @param exposure fraction of full scale that the flat reaches in its brightest channel; NaN where a perfect reflector
 *     fills the scale
 * @param balanced true where the channels are amplified to equal signals of a perfect reflector
 */
public record Rig(Sensor sensor, Lamp lamp, View view, Detector detector, Shading shading, double glare,
        double exposure, boolean balanced) {

    /** A rig with even light, no glare, and a flat at 70 % of full scale. */
    public static Rig of(Sensor sensor, Lamp lamp, View view, Detector detector) {
        return new Rig(sensor, lamp, view, detector, Shading.none(), 0, 0.7, true);
    }

    /**
     * A colour-managed camera: linear sRGB of the film under the lamp as the CIE 1931 observer sees it, where a perfect
     * reflector has Y = 1, no adaptation; encoded to 8 bits.
     */
    public static Rig srgb(Lamp lamp, View view, double well) {
        return new Rig(Sensor.cie1931(), lamp, view, Detector.srgb(well), Shading.none(), 0, Double.NaN, false);
    }

    /** The same with glare. */
    public Rig glare(double fraction) {
        return new Rig(sensor, lamp, view, detector, shading, fraction, exposure, balanced);
    }

    /** The same with uneven light. */
    public Rig shading(Shading other) {
        return new Rig(sensor, lamp, view, detector, other, glare, exposure, balanced);
    }

    /** The same with another detector. */
    public Rig detector(Detector other) {
        return new Rig(sensor, lamp, view, other, shading, glare, exposure, balanced);
    }

    /** The same with another view. */
    public Rig view(View other) {
        return new Rig(sensor, lamp, other, detector, shading, glare, exposure, balanced);
    }

    /** The same with another lamp. */
    public Rig lamp(Lamp other) {
        return new Rig(sensor, other, view, detector, shading, glare, exposure, balanced);
    }

    /** The same with the flat at another fraction of full scale. */
    public Rig exposure(double fraction) {
        return new Rig(sensor, lamp, view, detector, shading, glare, fraction, balanced);
    }

    /** The same with all channels at one gain, so that those of little light stay dim. */
    public Rig unbalanced() {
        return new Rig(sensor, lamp, view, detector, shading, glare, exposure, false);
    }

    /** Number of channels. */
    public int channels() {
        return sensor.channels();
    }

    /**
     * The effective responses E_c, one row per channel, at 380, 381 .. 780 nm. They sum to 1 in every channel, or in the
     * brightest where channels are not balanced; those of an sRGB file mix X, Y and Z by the matrix of IEC 61966-2-1.
     */
    public double[][] responses() {
        double[][] e = new double[channels()][Spectrum.COUNT];
        double[] white = new double[channels()];
        double brightest = 0;
        for (int c = 0; c < e.length; c++) {
            for (int i = 0; i < Spectrum.COUNT; i++) {
                e[c][i] = lamp.power()[i] * sensor.curves()[c][i];
                white[c] += e[c][i];
            }
            brightest = Math.max(brightest, white[c]);
        }
        for (int c = 0; c < e.length; c++) {
            double scale = detector.encoded() ? white[1] : balanced ? white[c] : brightest;
            for (int i = 0; i < Spectrum.COUNT; i++) {
                e[c][i] /= scale;
            }
        }
        return detector.encoded() ? toLinearSrgb(e) : e;
    }

    private static double[][] toLinearSrgb(double[][] xyz) {
        double[][] matrix = {{3.2406, -1.5372, -0.4986}, {-0.9689, 1.8758, 0.0415}, {0.0557, -0.2040, 1.0570}};
        double[][] rgb = new double[3][Spectrum.COUNT];
        for (int c = 0; c < 3; c++) {
            for (int i = 0; i < Spectrum.COUNT; i++) {
                rgb[c][i] = matrix[c][0] * xyz[0][i] + matrix[c][1] * xyz[1][i] + matrix[c][2] * xyz[2][i];
            }
        }
        return rgb;
    }
}
