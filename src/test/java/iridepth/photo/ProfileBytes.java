package iridepth.photo;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.util.LinkedHashMap;
import java.util.Map;

/** Writes ICC profiles byte by byte, ICC.1:2022 section 7. */
final class ProfileBytes {

    private final Map<String, byte[]> tags = new LinkedHashMap<>();
    private final String kind;
    private final String space;
    private final String connection;

    ProfileBytes(String kind, String space, String connection) {
        this.kind = kind;
        this.space = space;
        this.connection = connection;
    }

    /** An RGB display profile with the colorants of sRGB in D50, as in the widely used sRGB profiles. */
    static ProfileBytes rgb(byte[] curve) {
        return new ProfileBytes("mntr", "RGB ", "XYZ ").tag("rXYZ", xyz(0.43607, 0.22249, 0.01392))
                .tag("gXYZ", xyz(0.38515, 0.71687, 0.09708)).tag("bXYZ", xyz(0.14307, 0.06061, 0.71410))
                .tag("wtpt", xyz(0.9642, 1, 0.8249)).tag("rTRC", curve).tag("gTRC", curve).tag("bTRC", curve);
    }

    static ProfileBytes grey(byte[] curve) {
        return new ProfileBytes("mntr", "GRAY", "XYZ ").tag("wtpt", xyz(0.9642, 1, 0.8249)).tag("kTRC", curve);
    }

    ProfileBytes tag(String name, byte[] content) {
        tags.put(name, content);
        return this;
    }

    ProfileBytes without(String name) {
        tags.remove(name);
        return this;
    }

    static byte[] xyz(double x, double y, double z) {
        return fixed("XYZ ", x, y, z);
    }

    /** A tag of s15Fixed16 numbers. */
    static byte[] fixed(String type, double... values) {
        ByteBuffer buffer = ByteBuffer.allocate(8 + 4 * values.length).put(type.getBytes(StandardCharsets.US_ASCII)).putInt(0);
        for (double value : values) {
            buffer.putInt((int) Math.round(value * 65536));
        }
        return buffer.array();
    }

    static byte[] sampled(int... values) {
        ByteBuffer buffer = ByteBuffer.allocate(12 + Math.max(2, 2 * values.length))
                .put("curv".getBytes(StandardCharsets.US_ASCII)).putInt(0).putInt(values.length);
        for (int value : values) {
            buffer.putShort((short) value);
        }
        return buffer.array();
    }

    static byte[] parametric(int type, double... values) {
        ByteBuffer buffer = ByteBuffer.allocate(12 + 4 * values.length).put("para".getBytes(StandardCharsets.US_ASCII))
                .putInt(0).putShort((short) type).putShort((short) 0);
        for (double value : values) {
            buffer.putInt((int) Math.round(value * 65536));
        }
        return buffer.array();
    }

    byte[] build() {
        int size = 132 + 12 * tags.size() + tags.values().stream().mapToInt(tag -> tag.length + 3 & ~3).sum();
        ByteBuffer profile = ByteBuffer.allocate(size);
        profile.putInt(0, size).putInt(8, 0x04300000);
        name(profile, 12, kind);
        name(profile, 16, space);
        name(profile, 20, connection);
        name(profile, 36, "acsp");
        profile.putInt(68, 63190).putInt(72, 65536).putInt(76, 54061);
        profile.putInt(128, tags.size());
        int entry = 132;
        int at = 132 + 12 * tags.size();
        for (Map.Entry<String, byte[]> tag : tags.entrySet()) {
            name(profile, entry, tag.getKey());
            profile.putInt(entry + 4, at).putInt(entry + 8, tag.getValue().length);
            profile.put(at, tag.getValue());
            entry += 12;
            at += tag.getValue().length + 3 & ~3;
        }
        return profile.array();
    }

    private static void name(ByteBuffer profile, int at, String name) {
        profile.put(at, name.getBytes(StandardCharsets.US_ASCII));
    }
}
