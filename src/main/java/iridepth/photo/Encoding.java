package iridepth.photo;

import iridepth.colour.Adaptation;
import iridepth.colour.Matrix3;
import iridepth.colour.Srgb;
import iridepth.colour.Xyz;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;

/**
 * How counts stand for light: linear = f(count), a fraction of full scale. Immutable; safe for several threads.
 *
 * <p>Colour-managed encodings (sRGB, or by an ICC profile) also know the matrix from linear values to CIE XYZ in the ICC
 * profile connection space: white is D50 with Y = 1, and XYZ under the actual white has been carried there by a
 * chromatic adaptation matrix.
 */
public final class Encoding {

    private final DoubleUnaryOperator[] curves;
    private final double fullScale;
    private final float[][] tables;
    private final float[][] slopes;
    private final Optional<double[][]> toXyz;
    private final Optional<double[][]> adaptation;

    private Encoding(DoubleUnaryOperator[] curves, double fullScale, int length, Optional<double[][]> toXyz,
            Optional<double[][]> adaptation) {
        this.curves = curves;
        this.fullScale = fullScale;
        this.toXyz = toXyz;
        this.adaptation = adaptation;
        this.tables = new float[curves.length][];
        this.slopes = new float[curves.length][];
        for (int c = 0; c < curves.length; c++) {
            boolean repeated = c > 0 && curves[c] == curves[0];
            tables[c] = repeated ? tables[0] : table(c, length);
            slopes[c] = repeated ? slopes[0] : slopes(c, length);
        }
    }

    private float[] table(int channel, int length) {
        float[] table = new float[length];
        for (int count = 0; count < length; count++) {
            table[count] = (float) linear(channel, count);
        }
        return table;
    }

    private float[] slopes(int channel, int length) {
        float[] slopes = new float[length];
        for (int count = 0; count < length; count++) {
            slopes[count] = (float) slopeAt(channel, count);
        }
        return slopes;
    }

    /**
     * Counts proportional to light: linear = count / fullScale. Serves any number of channels.
     *
     * @param fullScale the count that is full scale, above 0; counts above it are not expected
     * @return the encoding
     */
    public static Encoding linear(double fullScale) {
        if (!(fullScale > 0 && fullScale <= 65535)) {
            throw new IllegalArgumentException("a full scale of " + fullScale + " counts is out of range: give 1 to 65535");
        }
        return new Encoding(new DoubleUnaryOperator[] {x -> x}, fullScale, 1 << 16, Optional.empty(), Optional.empty());
    }

    /**
     * The sRGB encoding of IEC 61966-2-1:1999: linear = v / 12.92 up to v = 0.04045, else ((v + 0.055) / 1.055)^2.4.
     * Its primaries are adapted from D65 to D50 by the Bradford transform (ICC.1:2022 annex E).
     *
     * @param bitDepth 8 or 16
     * @return the encoding, of any number of channels; {@link #toXyz} has three columns
     */
    public static Encoding srgb(int bitDepth) {
        int top = top(bitDepth);
        double[][] adaptation = Adaptation.matrix(Srgb.WHITE, Xyz.of(IccProfile.d50()));
        DoubleUnaryOperator curve = Srgb::decode;
        return new Encoding(new DoubleUnaryOperator[] {curve}, top, top + 1,
                Optional.of(Matrix3.times(adaptation, Srgb.TO_XYZ)), Optional.of(adaptation));
    }

    /** @return the encoding of a colour-managed photo: by its embedded profile, or sRGB if it has none */
    public static Encoding managed(PhotoInfo photo) {
        return photo.profile().map(profile -> of(profile, photo.bitDepth())).orElseGet(() -> srgb(photo.bitDepth()));
    }

    /**
     * The encoding that an ICC profile describes.
     *
     * @param profile the profile
     * @param bitDepth 8 or 16
     * @return the encoding
     */
    public static Encoding of(IccProfile profile, int bitDepth) {
        int top = top(bitDepth);
        DoubleUnaryOperator[] curves = new DoubleUnaryOperator[profile.channels()];
        for (int c = 0; c < curves.length; c++) {
            int channel = c;
            curves[c] = x -> profile.linear(channel, x);
        }
        return new Encoding(curves, top, top + 1, Optional.of(profile.toXyz()), profile.adaptation());
    }

    private static int top(int bitDepth) {
        if (bitDepth != 8 && bitDepth != 16) {
            throw new IllegalArgumentException("a bit depth of " + bitDepth + " is not supported: give 8 or 16");
        }
        return (1 << bitDepth) - 1;
    }

    /**
     * Whether the encoding fits a photo.
     *
     * @throws PhotoException if it was made for another bit depth or number of channels
     */
    void requireFits(PhotoInfo photo) {
        if (tables[0].length <= photo.maxCount()) {
            throw new PhotoException(photo.path(), "has 16 bit, but its encoding is one for 8 bit; give the encoding of this photo");
        }
        if (curves.length > 1 && curves.length != photo.channels()) {
            throw new PhotoException(photo.path(), "its colour profile is for " + curves.length
                    + " channels, but it has " + photo.channels() + "; export the photo again");
        }
    }

    /**
     * Linear values of all counts.
     *
     * @param channel 0 and up; channels of photos read jointly begin again after the last of one
     * @return linear[count]; not copied: do not change it
     */
    public float[] table(int channel) {
        return tables[channel % curves.length];
    }

    /**
     * Slopes of all counts, d(linear) / d(count): what turns a rounding error of counts into one of linear values.
     *
     * @param channel 0 and up
     * @return slope[count]; not copied: do not change it
     */
    public float[] slopes(int channel) {
        return slopes[channel % curves.length];
    }

    /**
     * @param channel 0 and up
     * @param count the count, may be fractional
     * @return fraction of full scale; beyond 1 for counts above the full scale of a linear encoding
     */
    public double linear(int channel, double count) {
        return curves[channel % curves.length].applyAsDouble(count / fullScale);
    }

    /**
     * The slope d(linear) / d(count) at a linear value, by the counts on either side of it.
     *
     * @param channel 0 and up
     * @param linear fraction of full scale; beyond the scale the slope at its end
     * @return linear fraction a count, above 0
     */
    public double slope(int channel, double linear) {
        float[] table = table(channel);
        int low = 0;
        int high = top();
        while (low < high) {
            int middle = (low + high) >>> 1;
            if (table[middle] < linear) {
                low = middle + 1;
            } else {
                high = middle;
            }
        }
        return slopes(channel)[low];
    }

    private double slopeAt(int channel, int count) {
        double low = Math.max(0, count - 0.5);
        double high = count < fullScale ? Math.min(fullScale, count + 0.5) : count + 0.5;
        return (linear(channel, high) - linear(channel, low)) / (high - low);
    }

    /** @return the lowest count, 0: light at or below it cannot be told apart */
    public int bottom() {
        return 0;
    }

    /** @return the count of full scale: light at or above it cannot be told apart */
    public int top() {
        return (int) Math.round(fullScale);
    }

    /** @return the 3 x channels matrix from linear values to XYZ (D50 white, Y = 1), empty for a linear encoding */
    public Optional<double[][]> toXyz() {
        return toXyz.map(IccProfile::copy);
    }

    /** @return the 3 x 3 matrix by which XYZ under the encoding's own white were adapted to D50, empty if not known */
    public Optional<double[][]> adaptation() {
        return adaptation.map(IccProfile::copy);
    }
}
