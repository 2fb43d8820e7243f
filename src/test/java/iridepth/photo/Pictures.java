package iridepth.photo;

import java.awt.Transparency;
import java.awt.color.ColorSpace;
import java.awt.image.BufferedImage;
import java.awt.image.ComponentColorModel;
import java.awt.image.DataBuffer;
import java.awt.image.Raster;
import java.awt.image.WritableRaster;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteOrder;
import java.nio.file.Path;
import java.util.function.IntUnaryOperator;
import javax.imageio.ImageIO;

/** Pictures made for tests. */
final class Pictures {

    /** Counts of a pixel by channel: (x, y, channel) to count. */
    interface Counts {
        int at(int x, int y, int channel);
    }

    private Pictures() {
    }

    /** An image that holds exactly these counts. */
    static BufferedImage image(int width, int height, int channels, int bits, Counts counts) {
        ColorSpace space = ColorSpace.getInstance(channels >= 3 ? ColorSpace.CS_sRGB : ColorSpace.CS_GRAY);
        int type = bits == 8 ? DataBuffer.TYPE_BYTE : DataBuffer.TYPE_USHORT;
        boolean alpha = channels == 4 || channels == 2;
        ComponentColorModel model = new ComponentColorModel(space, alpha, false,
                alpha ? Transparency.TRANSLUCENT : Transparency.OPAQUE, type);
        WritableRaster raster = Raster.createInterleavedRaster(type, width, height, channels, null);
        for (int y = 0; y < height; y++) {
            for (int x = 0; x < width; x++) {
                for (int c = 0; c < channels; c++) {
                    raster.setSample(x, y, c, counts.at(x, y, c));
                }
            }
        }
        return new BufferedImage(model, raster, false, null);
    }

    static Path png(Path path, int width, int height, int channels, int bits, Counts counts) {
        try {
            ImageIO.write(image(width, height, channels, bits, counts), "png", path.toFile());
            return path;
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** A plain little-endian TIFF of one strip. */
    static Path tiff(Path path, int width, int height, int channels, int bits, Counts counts) {
        try {
            return new TiffBytes(ByteOrder.LITTLE_ENDIAN, false).page(width, height, channels, bits,
                    TiffBytes.bytes(ByteOrder.LITTLE_ENDIAN, bits, counts(width, height, channels, counts))).write(path);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** All counts, interleaved. */
    static int[] counts(int width, int height, int channels, Counts counts) {
        int[] all = new int[width * height * channels];
        for (int i = 0; i < all.length; i++) {
            int pixel = i / channels;
            all[i] = counts.at(pixel % width, pixel / width, i % channels);
        }
        return all;
    }

    /** Counts that differ everywhere and use the whole scale. */
    static Counts scrambled(int bits) {
        IntUnaryOperator hash = i -> (i * 0x9e3779b1 ^ i >>> 7) >>> 32 - bits;
        return (x, y, c) -> hash.applyAsInt(x * 7919 + y * 104729 + c * 1299709 + 1);
    }

    static boolean holds(Frame frame, int firstRow, Counts counts) {
        for (int y = 0; y < frame.height(); y++) {
            for (int x = 0; x < frame.width(); x++) {
                for (int c = 0; c < frame.channels(); c++) {
                    if (frame.count(x, y, c) != counts.at(x, firstRow + y, c)) {
                        return false;
                    }
                }
            }
        }
        return true;
    }
}
