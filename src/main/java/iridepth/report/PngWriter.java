package iridepth.report;

import java.awt.image.BufferedImage;
import java.awt.image.DataBufferInt;
import java.io.ByteArrayOutputStream;
import java.io.DataOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.zip.CRC32;
import java.util.zip.Deflater;
import java.util.zip.DeflaterOutputStream;

/**
 * Writes a picture as PNG (ISO/IEC 15948:2004), 8-bit truecolour, declared as sRGB, without a time stamp: the same picture
 * gives the same bytes. Each row is filtered by whichever of None, Sub and Up has the least sum of absolute differences, the
 * heuristic that the standard recommends.
 */
final class PngWriter {
    private static final byte[] SIGNATURE = {(byte) 0x89, 'P', 'N', 'G', '\r', '\n', 0x1A, '\n'};
    /** Levels above gain a few per cent in size for several times the time. */
    private static final int LEVEL = 4;

    private PngWriter() {
    }

    /**
     * Writes a file; one that stands there is overwritten.
     *
     * @param image a picture of type INT_RGB
     * @throws OutputException if the file cannot be written
     */
    static void write(BufferedImage image, Path file) {
        try (OutputStream out = Files.newOutputStream(file)) {
            out.write(encode(image));
        } catch (IOException e) {
            throw OutputException.of(file, e);
        }
    }

    /** The bytes of the file. */
    static byte[] encode(BufferedImage image) throws IOException {
        int width = image.getWidth();
        int height = image.getHeight();
        ByteArrayOutputStream bytes = new ByteArrayOutputStream(width * height / 2 + 1024);
        DataOutputStream out = new DataOutputStream(bytes);
        out.write(SIGNATURE);
        ByteArrayOutputStream header = new ByteArrayOutputStream();
        DataOutputStream fields = new DataOutputStream(header);
        fields.writeInt(width);
        fields.writeInt(height);
        fields.write(new byte[] {8, 2, 0, 0, 0});
        chunk(out, "IHDR", header.toByteArray());
        chunk(out, "sRGB", new byte[] {0});
        chunk(out, "IDAT", data(((DataBufferInt) image.getRaster().getDataBuffer()).getData(), width, height));
        chunk(out, "IEND", new byte[0]);
        return bytes.toByteArray();
    }

    private static void chunk(DataOutputStream out, String type, byte[] data) throws IOException {
        byte[] name = type.getBytes(StandardCharsets.US_ASCII);
        CRC32 crc = new CRC32();
        crc.update(name);
        crc.update(data);
        out.writeInt(data.length);
        out.write(name);
        out.write(data);
        out.writeInt((int) crc.getValue());
    }

    private static byte[] data(int[] rgb, int width, int height) throws IOException {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream(width * height / 2);
        Deflater deflater = new Deflater(LEVEL);
        try (OutputStream out = new DeflaterOutputStream(bytes, deflater, 1 << 16)) {
            byte[] row = new byte[3 * width];
            byte[] above = new byte[3 * width];
            byte[][] filtered = new byte[3][3 * width + 1];
            for (int y = 0; y < height; y++) {
                for (int x = 0; x < width; x++) {
                    int v = rgb[y * width + x];
                    row[3 * x] = (byte) (v >> 16);
                    row[3 * x + 1] = (byte) (v >> 8);
                    row[3 * x + 2] = (byte) v;
                }
                out.write(filtered[filter(row, above, filtered)]);
                byte[] spare = above;
                above = row;
                row = spare;
            }
        } finally {
            deflater.end();
        }
        return bytes.toByteArray();
    }

    /** Filters a row in every way and tells the best. */
    private static int filter(byte[] row, byte[] above, byte[][] filtered) {
        long[] cost = new long[3];
        for (int i = 0; i < row.length; i++) {
            byte none = row[i];
            byte sub = (byte) (none - (i < 3 ? 0 : row[i - 3]));
            byte up = (byte) (none - above[i]);
            filtered[0][i + 1] = none;
            filtered[1][i + 1] = sub;
            filtered[2][i + 1] = up;
            cost[0] += Math.abs(none);
            cost[1] += Math.abs(sub);
            cost[2] += Math.abs(up);
        }
        int best = cost[1] <= cost[2] ? 1 : 2;
        best = cost[0] < cost[best] ? 0 : best;
        filtered[best][0] = (byte) best;
        return best;
    }
}
