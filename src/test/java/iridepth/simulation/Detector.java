package iridepth.simulation;

/**
 * What turns light into counts, by the photon-transfer model of EMVA Standard 1288: variance of the electrons = signal +
 * read noise^2, then rounding. In fractions f of full scale: f / well + (read / well)^2 + step^2 / 12.
 *
 * @param well electrons at full scale
 * @param read read noise in electrons
 * @param bits bit depth of the converter, at most that of the file
 * @param fullScale largest count in the file: 65535 or 255
 * @param black offset that the camera adds, as a fraction of full scale
 * @param encoded true for an 8-bit file encoded by the sRGB curve of IEC 61966-2-1, noise being added before encoding
 */
public record Detector(double well, double read, int bits, int fullScale, double black, boolean encoded) {

    /** A linear 16-bit file with a black level of 1 %. */
    public static Detector linear(double well) {
        return new Detector(well, 0.0008 * well, 16, 65535, 0.01, false);
    }

    /** An sRGB file without black level or read noise. */
    public static Detector srgb(double well) {
        return new Detector(well, 0, 8, 255, 0, true);
    }

    /** The same with another converter. */
    public Detector bits(int newBits) {
        return new Detector(well, read, newBits, newBits == 8 ? 255 : 65535, black, encoded);
    }

    /** The same with read noise in electrons and black level as a fraction of full scale. */
    public Detector read(double electrons, double newBlack) {
        return new Detector(well, electrons, bits, fullScale, newBlack, encoded);
    }

    /** The same with all noise but rounding doubled. */
    public Detector noiseDoubled() {
        return new Detector(well / 4, read / 2, bits, fullScale, black, encoded);
    }

    /** Standard deviation before rounding at a fraction of full scale. */
    public double noise(double fraction) {
        return Math.sqrt(Math.max(fraction, 0) / well + read * read / (well * well));
    }

    /** Standard deviation with rounding, in linear fractions of full scale. */
    public double noiseRounded(double fraction) {
        double step = 1.0 / ((1 << bits) - 1);
        if (encoded) {
            step /= encodingSlope(fraction);
        }
        return Math.hypot(noise(fraction), step / Math.sqrt(12));
    }

    /** The count in the file of a fraction of full scale, black level added, clipped and rounded. */
    public int count(double fraction) {
        double level = Math.min(1, Math.max(0, fraction + black));
        double steps = (1 << bits) - 1;
        return (int) Math.round(Math.rint((encoded ? encode(level) : level) * steps) * fullScale / steps);
    }

    /** The fraction of full scale, black level taken off, that a count stands for. */
    public double fraction(int count) {
        double level = (double) count / fullScale;
        return (encoded ? decode(level) : level) - black;
    }

    /** Encoded value of a linear one, IEC 61966-2-1. */
    public static double encode(double linear) {
        return linear <= 0.0031308 ? 12.92 * linear : 1.055 * Math.pow(linear, 1 / 2.4) - 0.055;
    }

    /** Linear value of an encoded one, IEC 61966-2-1. */
    public static double decode(double encoded) {
        return encoded <= 0.04045 ? encoded / 12.92 : Math.pow((encoded + 0.055) / 1.055, 2.4);
    }

    private static double encodingSlope(double linear) {
        return linear <= 0.0031308 ? 12.92 : 1.055 / 2.4 * Math.pow(linear, 1 / 2.4 - 1);
    }
}
