package iridepth.photo;

import java.io.ByteArrayOutputStream;
import java.io.EOFException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/**
 * The segments of a JPEG file that come before its picture: ITU-T T.81 (frame header), ITU-T T.871 (JFIF density) and
 * ICC.1 annex B.4 (the profile in APP2 segments). The profile is taken out of what the decoder sees, which would
 * otherwise convert the counts by it.
 */
final class JpegPhoto {

    private static final byte[] ICC = "ICC_PROFILE\0".getBytes(StandardCharsets.US_ASCII);
    private static final byte[] JFIF = "JFIF\0".getBytes(StandardCharsets.US_ASCII);
    private static final int SOS = 0xda;
    private static final int DQT = 0xdb;
    private static final int APP0 = 0xe0;
    private static final int APP2 = 0xe2;

    private JpegPhoto() {
    }

    static PhotoReader open(Path path, FileChannel channel) throws IOException {
        if (channel.size() > Integer.MAX_VALUE - 8) {
            throw new PhotoException(path, "is a JPEG of more than 2 GB; give the photo it was cut from");
        }
        ByteBuffer file = TiffDirectory.read(channel, 0, (int) channel.size());
        channel.close();
        ByteArrayOutputStream kept = new ByteArrayOutputStream(file.limit());
        kept.write(file.array(), 0, 2);
        Map<Integer, byte[]> profileParts = new TreeMap<>();
        int profilePartCount = 0;
        ByteBuffer frame = null;
        JpegTables tables = new JpegTables();
        double pitch = Double.NaN;
        int at = 2;
        for (int marker = marker(file, at); marker != SOS; marker = marker(file, at)) {
            if (marker == 0xff) {
                at++; // a fill byte
                continue;
            }
            ByteBuffer segment = segment(file, at);
            if (marker == APP2 && startsWith(segment, ICC) && segment.limit() > 14) {
                byte[] part = new byte[segment.limit() - 14];
                segment.get(14, part);
                profileParts.put(segment.get(12) & 0xff, part);
                profilePartCount = segment.get(13) & 0xff;
            } else {
                kept.write(file.array(), at, segment.limit() + 4);
            }
            if (marker == APP0 && startsWith(segment, JFIF) && segment.limit() >= 12) {
                pitch = pitch(segment);
            }
            if (marker == DQT) {
                tables.add(segment);
            }
            if (marker >= 0xc0 && marker <= 0xcf && marker != 0xc4 && marker != 0xc8 && marker != 0xcc) {
                frame = segment;
            }
            at += segment.limit() + 4;
        }
        kept.write(file.array(), at, file.limit() - at);
        PhotoInfo info = info(path, frame, pitch, profile(path, profileParts, profilePartCount));
        return new DecodedPhoto(info, "jpeg", kept.toByteArray(), Optional.of(tables.quantisation(frame)));
    }

    private static PhotoInfo info(Path path, ByteBuffer frame, double pitch, Optional<IccProfile> profile) {
        if (frame == null || frame.limit() < 6) {
            throw new PhotoException(path, "is damaged (a JPEG without a frame header); export the photo again");
        }
        int depth = frame.get(0);
        int height = frame.getShort(1) & 0xffff;
        int width = frame.getShort(3) & 0xffff;
        int channels = frame.get(5);
        if (width < 1 || height < 1) {
            throw new PhotoException(path, "has a size of " + width + " x " + height + "; export the photo again");
        }
        if (depth != 8) {
            throw new PhotoException(path, "has a bit depth of " + depth + ", which is not supported; save it as 8 or 16 bit");
        }
        if (channels == 4) {
            throw new PhotoException(path, "is a CMYK image, made for print; save the camera's photo as RGB");
        }
        if (channels != 1 && channels != 3) {
            throw new PhotoException(path, "has " + channels + " samples a pixel; save it as grey or RGB");
        }
        return new PhotoInfo(path, width, height, channels, depth, 1, pitch, profile, true);
    }

    private static Optional<IccProfile> profile(Path path, Map<Integer, byte[]> parts, int count) {
        if (parts.isEmpty()) {
            return Optional.empty();
        }
        if (parts.size() != count) {
            throw new PhotoException(path, "has only " + parts.size() + " of the " + count
                    + " parts of its colour profile; export the photo again");
        }
        ByteArrayOutputStream whole = new ByteArrayOutputStream();
        parts.values().forEach(whole::writeBytes);
        return Optional.of(IccProfile.parse(whole.toByteArray(), path.toString()));
    }

    private static double pitch(ByteBuffer jfif) {
        int x = jfif.getShort(8) & 0xffff;
        boolean square = x == (jfif.getShort(10) & 0xffff);
        return switch (jfif.get(7)) {
            case 1 -> square ? PixelPitch.ofDpi(x) : Double.NaN;
            case 2 -> square ? PixelPitch.ofDpi(x * 2.54) : Double.NaN;
            default -> Double.NaN;
        };
    }

    private static int marker(ByteBuffer file, int at) throws IOException {
        if (at > file.limit() - 4) {
            throw new EOFException();
        }
        if (file.get(at) != (byte) 0xff) {
            throw new javax.imageio.IIOException("no JPEG marker at byte " + at);
        }
        return file.get(at + 1) & 0xff;
    }

    private static ByteBuffer segment(ByteBuffer file, int at) throws EOFException {
        int length = file.getShort(at + 2) & 0xffff;
        if (length < 2 || length > file.limit() - at - 2) {
            throw new EOFException();
        }
        return file.slice(at + 4, length - 2);
    }

    private static boolean startsWith(ByteBuffer segment, byte[] name) {
        byte[] start = new byte[Math.min(name.length, segment.limit())];
        segment.get(0, start);
        return Arrays.equals(start, name);
    }
}
