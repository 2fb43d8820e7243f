package iridepth.photo;

import java.io.EOFException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Optional;
import java.util.zip.DataFormatException;
import java.util.zip.Inflater;
import java.util.zip.ZipException;

/** The chunks of a PNG file, all there to the last. ISO/IEC 15948 (W3C Portable Network Graphics, third edition). */
final class PngPhoto {

    /** The eight bytes that open every PNG file. */
    static final long SIGNATURE = 0x89504e470d0a1a0aL;

    private static final int IHDR = 0x49484452;
    private static final int ICCP = 0x69434350;
    private static final int PHYS = 0x70485973;
    private static final int TRNS = 0x74524e53;
    private static final int IEND = 0x49454e44;
    private static final int LONGEST_PROFILE = 1 << 26;

    private PngPhoto() {
    }

    static PhotoReader open(Path path, FileChannel channel) throws IOException {
        if (channel.size() > Integer.MAX_VALUE - 8) {
            throw new PhotoException(path, "is a PNG of more than 2 GB; save it as TIFF");
        }
        ByteBuffer file = TiffDirectory.read(channel, 0, (int) channel.size());
        channel.close();
        ByteBuffer header = chunk(file, 8);
        if (file.getInt(12) != IHDR || header.limit() < 13) {
            throw new PhotoException(path, "is damaged (a PNG without a header); export the photo again");
        }
        int width = header.getInt(0);
        int height = header.getInt(4);
        int depth = header.get(8);
        int kind = header.get(9);
        if (width < 1 || height < 1) {
            throw new PhotoException(path, "has a size of " + width + " x " + height + "; export the photo again");
        }
        if (kind == 3) {
            throw new PhotoException(path, "is a palette image, whose counts are no measure of light; save the camera's "
                    + "photo as grey or RGB");
        }
        if (depth != 8 && depth != 16) {
            throw new PhotoException(path, "has a bit depth of " + depth + ", which is not supported; save it as 8 or 16 bit");
        }
        double pitch = Double.NaN;
        Optional<IccProfile> profile = Optional.empty();
        int type = IHDR;
        for (int at = 8; type != IEND; at += 12 + file.getInt(at)) {
            ByteBuffer content = chunk(file, at);
            type = file.getInt(at + 4);
            switch (type) {
                case PHYS -> pitch = pitch(content);
                case ICCP -> profile = Optional.of(IccProfile.parse(profile(content), path.toString()));
                case TRNS -> throw new PhotoException(path, "has a transparent colour; save it without transparency");
                default -> { }
            }
        }
        int channels = (kind & 2) != 0 ? 3 : 1;
        if ((long) width * height * channels > Integer.MAX_VALUE - 8) {
            throw new PhotoException(path, "is too large for a PNG that is decoded whole; save it as TIFF");
        }
        PhotoInfo info = new PhotoInfo(path, width, height, channels, depth, 1, pitch, profile, false);
        return new DecodedPhoto(info, "png", file.array(), Optional.empty());
    }

    /** The content of the chunk that starts at a position. */
    private static ByteBuffer chunk(ByteBuffer file, int at) throws EOFException {
        if (at > file.limit() - 12) {
            throw new EOFException();
        }
        int length = file.getInt(at);
        if (length < 0 || length > file.limit() - at - 12) {
            throw new EOFException();
        }
        return file.slice(at + 8, length);
    }

    private static double pitch(ByteBuffer phys) {
        boolean metres = phys.limit() == 9 && phys.get(8) == 1 && phys.getInt(0) == phys.getInt(4);
        return metres ? PixelPitch.ofDpi((phys.getInt(0) & 0xffffffffL) * 0.0254) : Double.NaN;
    }

    /** The profile of an iCCP chunk: a name, a zero, the method 0 and a zlib stream. */
    private static byte[] profile(ByteBuffer content) throws IOException {
        int start = 0;
        while (start < content.limit() && content.get(start) != 0) {
            start++;
        }
        if (start + 2 > content.limit()) {
            throw new ZipException("its colour profile is cut short");
        }
        byte[] packed = new byte[content.limit() - start - 2];
        content.get(start + 2, packed);
        Inflater inflater = new Inflater();
        try {
            inflater.setInput(packed);
            byte[] profile = new byte[4 * packed.length + 1024];
            int length = 0;
            while (!inflater.finished()) {
                if (length == profile.length) {
                    profile = Arrays.copyOf(profile, 2 * length);
                }
                int more = inflater.inflate(profile, length, profile.length - length);
                if (more == 0 && !inflater.finished() || length > LONGEST_PROFILE) {
                    throw new ZipException("its colour profile is cut short");
                }
                length += more;
            }
            return Arrays.copyOf(profile, length);
        } catch (DataFormatException e) {
            throw new ZipException("its colour profile: " + e.getMessage());
        } finally {
            inflater.end();
        }
    }
}
