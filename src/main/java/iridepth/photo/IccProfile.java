package iridepth.photo;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;

/**
 * A colour profile of the matrix and tone-curve kind (ICC.1:2022 section 8.3.3 and, for grey, 8.3.4): per channel
 * linear = curve(count / full scale), then XYZ = matrix x linear, in the profile connection space, whose white is D50
 * and has Y = 1. Profiles that need look-up tables are refused.
 */
public final class IccProfile {

    /** XYZ of the white of the profile connection space, ICC.1:2022 section 7.2.16. */
    private static final double[] D50 = {0.9642, 1.0, 0.8249};

    private static final int HEADER_BYTES = 128;
    private static final int MOST_TAGS = 1000;

    private final DoubleUnaryOperator[] curves;
    private final double[][] toXyz;
    private final Optional<double[][]> adaptation;
    private final String description;

    private IccProfile(DoubleUnaryOperator[] curves, double[][] toXyz,
            Optional<double[][]> adaptation, String description) {
        this.curves = curves;
        this.toXyz = toXyz;
        this.adaptation = adaptation;
        this.description = description;
    }

    /**
     * Reads a profile.
     *
     * @param bytes the profile as embedded in a file
     * @param source name of that file, for messages
     * @return the profile
     * @throws PhotoException if it is damaged or not of the matrix and tone-curve kind
     */
    public static IccProfile parse(byte[] bytes, String source) {
        try {
            return parse(ByteBuffer.wrap(bytes));
        } catch (IllegalArgumentException e) {
            throw new PhotoException(source + ": its embedded colour profile cannot be used (" + e.getMessage()
                    + "); convert the photo to sRGB or save the linear counts without a profile");
        }
    }

    private static IccProfile parse(ByteBuffer profile) {
        Map<String, ByteBuffer> tags = tags(profile);
        String kind = name(profile, 12);
        String space = name(profile, 16);
        String connection = name(profile, 20);
        if (!Arrays.asList("mntr", "scnr", "spac", "prtr").contains(kind)) {
            throw new IllegalArgumentException("it is of class '" + kind.strip() + "', not a device or colour space");
        }
        if (!space.equals("RGB ") && !space.equals("GRAY")) {
            throw new IllegalArgumentException("it is for " + space.strip() + " data, not RGB or grey");
        }
        if (tags.containsKey("A2B0") || tags.containsKey("A2B1") || !connection.equals("XYZ ")) {
            throw new IllegalArgumentException("it works by look-up tables, not by a matrix and tone curves");
        }
        Optional<double[][]> adaptation = tags.containsKey("chad") ? Optional.of(matrix(tag(tags, "chad"), "sf32"))
                : Optional.empty();
        String description = description(tags.get("desc"));
        if (space.equals("GRAY")) {
            double[][] white = {{D50[0]}, {D50[1]}, {D50[2]}};
            return new IccProfile(new DoubleUnaryOperator[] {ToneCurve.parse(tag(tags, "kTRC"))}, white, adaptation,
                    description);
        }
        DoubleUnaryOperator[] curves = new DoubleUnaryOperator[3];
        double[][] toXyz = new double[3][3];
        for (int c = 0; c < 3; c++) {
            String channel = "rgb".substring(c, c + 1);
            curves[c] = ToneCurve.parse(tag(tags, channel + "TRC"));
            double[] xyz = numbers(tag(tags, channel + "XYZ"), "XYZ ", 3);
            for (int i = 0; i < 3; i++) {
                toXyz[i][c] = xyz[i];
            }
        }
        return new IccProfile(curves, toXyz, adaptation, description);
    }

    private static Map<String, ByteBuffer> tags(ByteBuffer profile) {
        if (profile.limit() < HEADER_BYTES + 4 || !name(profile, 36).equals("acsp")) {
            throw new IllegalArgumentException("it is damaged");
        }
        int count = profile.getInt(HEADER_BYTES);
        if (count < 0 || count > MOST_TAGS || profile.limit() < HEADER_BYTES + 4 + 12 * count) {
            throw new IllegalArgumentException("it is damaged");
        }
        Map<String, ByteBuffer> tags = new HashMap<>();
        for (int i = 0; i < count; i++) {
            int at = HEADER_BYTES + 4 + 12 * i;
            int offset = profile.getInt(at + 4);
            int size = profile.getInt(at + 8);
            if (offset < 0 || size < 8 || offset > profile.limit() - size) {
                throw new IllegalArgumentException("it is cut short");
            }
            tags.put(name(profile, at), profile.slice(offset, size));
        }
        return tags;
    }

    private static ByteBuffer tag(Map<String, ByteBuffer> tags, String name) {
        ByteBuffer tag = tags.get(name);
        if (tag == null) {
            throw new IllegalArgumentException("it lacks the tag '" + name + "'");
        }
        return tag;
    }

    private static String name(ByteBuffer buffer, int at) {
        byte[] bytes = new byte[4];
        buffer.get(at, bytes);
        return new String(bytes, StandardCharsets.ISO_8859_1);
    }

    private static double[] numbers(ByteBuffer tag, String type, int count) {
        if (!name(tag, 0).equals(type) || tag.limit() < 8 + 4 * count) {
            throw new IllegalArgumentException("a tag of type '" + type.strip() + "' is damaged");
        }
        double[] numbers = new double[count];
        for (int i = 0; i < count; i++) {
            numbers[i] = tag.getInt(8 + 4 * i) / 65536.0;
        }
        return numbers;
    }

    private static double[][] matrix(ByteBuffer tag, String type) {
        double[] m = numbers(tag, type, 9);
        return new double[][] {{m[0], m[1], m[2]}, {m[3], m[4], m[5]}, {m[6], m[7], m[8]}};
    }

    /** The profile's own name: textDescriptionType (version 2) or multiLocalizedUnicodeType (version 4). */
    private static String description(ByteBuffer tag) {
        if (tag == null || tag.limit() < 13) {
            return "";
        }
        int length = name(tag, 0).equals("desc") ? tag.getInt(8) : 0;
        int at = 12;
        boolean unicode = name(tag, 0).equals("mluc") && tag.limit() >= 28 && tag.getInt(8) > 0;
        if (unicode) {
            length = tag.getInt(20);
            at = tag.getInt(24);
        }
        if (length < 0 || at < 0 || at > tag.limit() - length) {
            return "";
        }
        byte[] text = new byte[length];
        tag.get(at, text);
        return new String(text, unicode ? StandardCharsets.UTF_16BE : StandardCharsets.US_ASCII)
                .replaceAll("\\p{Cntrl}", "").strip();
    }

    /** @return 1 for a grey profile, 3 for RGB */
    public int channels() {
        return curves.length;
    }

    /** @return the profile's own name, empty if it has none */
    public String description() {
        return description;
    }

    /**
     * @param channel 0 up to channels - 1
     * @param fraction count / full scale, clipped to 0..1
     * @return linear light, 0 to 1
     */
    public double linear(int channel, double fraction) {
        return curves[channel].applyAsDouble(fraction);
    }

    /** @return the 3 x channels matrix from linear values to XYZ in the profile connection space (D50 white, Y = 1) */
    public double[][] toXyz() {
        return copy(toXyz);
    }

    /**
     * The tag 'chad': the matrix by which XYZ under the actual white was adapted to D50.
     *
     * @return a 3 x 3 matrix, empty where the profile has none
     */
    public Optional<double[][]> adaptation() {
        return adaptation.map(IccProfile::copy);
    }

    /** XYZ of the white of the profile connection space. */
    static double[] d50() {
        return D50.clone();
    }

    static double[][] copy(double[][] matrix) {
        return Arrays.stream(matrix).map(double[]::clone).toArray(double[][]::new);
    }
}
