package iridepth.report;

import iridepth.colour.Srgb;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Arrays;
import java.util.Base64;
import java.util.Optional;
import javax.imageio.IIOImage;
import javax.imageio.ImageIO;
import javax.imageio.ImageWriteParam;
import javax.imageio.ImageWriter;
import javax.imageio.stream.MemoryCacheImageOutputStream;

/**
 * The photo that a page shows beside its map, at the same points. A picture to find one's way by: primaries are taken for
 * those of sRGB, and the signal of a linear file is brightened until the lightest pixels are nearly white.
 */
public final class PagePhoto {
    /** Bytes up to which the picture is kept without loss. */
    private static final int MOST_PNG = 1_000_000;
    private static final float JPEG_QUALITY = 0.9f;
    private static final int BAND = 64;
    private static final double LIGHTEST_SHARE = 0.998;
    private static final double LIGHTEST = 0.95;

    private final PageGrid grid;
    private final boolean brightened;
    /** [3 * point + channel], linear. */
    private final float[] light;

    private PagePhoto(PageGrid grid, boolean brightened) {
        this.grid = grid;
        this.brightened = brightened;
        this.light = new float[3 * grid.points()];
    }

    /**
     * An empty picture to be filled.
     *
     * @param width      pixels per row
     * @param height     rows
     * @param brightened whether to brighten it, as befits linear files; a colour-managed file is shown as it is
     */
    public static PagePhoto of(int width, int height, boolean brightened) {
        return new PagePhoto(PageGrid.of(width, height), brightened);
    }

    /**
     * The picture of a whole photo, without flat and dark.
     *
     * @param photo      the open photo; stays the caller's to close
     * @param encoding   how its counts stand for light
     * @param brightened as for {@link #of(int, int, boolean)}
     */
    public static PagePhoto of(PhotoFile photo, Encoding encoding, boolean brightened) {
        PhotoInfo info = photo.info();
        SignalSource signal = SignalSource.of(photo, encoding, Optional.empty(), Optional.empty(), NoiseModel.of(0, 1));
        PagePhoto picture = of(info.width(), info.height(), brightened);
        for (int y = 0; y < info.height(); y += BAND) {
            picture.add(y, signal.rows(0, y, Math.min(BAND, info.height() - y)));
        }
        return picture;
    }

    /**
     * Adds whole rows, in any order and from any thread. Of three or more channels the first three are taken for red, green and
     * blue; else the first is shown in grey.
     *
     * @param firstRow row of the photo with which the signal begins
     * @throws IllegalArgumentException if the signal is no whole rows of the photo
     */
    public void add(int firstRow, Signal signal) {
        int channels = signal.channels();
        int lines = grid.lines(firstRow, signal.value().length, channels);
        grid.visit(firstRow, lines, (point, pixel) -> {
            for (int c = 0; c < 3; c++) {
                light[3 * point + c] = signal.value()[pixel * channels + (channels < 3 ? 0 : c)];
            }
        });
    }

    PageGrid grid() {
        return grid;
    }

    /** The picture, encoded as sRGB. */
    BufferedImage picture() {
        double gain = brightened ? gain() : 1;
        BufferedImage image = new BufferedImage(grid.columns(), grid.rows(), BufferedImage.TYPE_INT_RGB);
        for (int y = 0; y < grid.rows(); y++) {
            for (int x = 0; x < grid.columns(); x++) {
                int rgb = 0;
                for (int c = 0; c < 3; c++) {
                    double v = gain * light[3 * (y * grid.columns() + x) + c];
                    rgb = rgb << 8 | (int) Math.round(255 * Srgb.encode(Double.isNaN(v) ? 0 : v));
                }
                image.setRGB(x, y, rgb);
            }
        }
        return image;
    }

    private double gain() {
        float[] sorted = light.clone();
        Arrays.sort(sorted);
        float lightest = sorted[(int) (LIGHTEST_SHARE * (sorted.length - 1))];
        return lightest > 0 ? LIGHTEST / lightest : 1;
    }

    /** The picture as a data URI (RFC 2397): PNG where that is small, else JPEG. */
    String dataUri() {
        try {
            BufferedImage image = picture();
            byte[] png = PngWriter.encode(image);
            return png.length <= MOST_PNG ? uri("image/png", png) : uri("image/jpeg", jpeg(image));
        } catch (IOException e) {
            throw new UncheckedIOException("writing to memory cannot fail", e);
        }
    }

    private static String uri(String type, byte[] bytes) {
        return "data:" + type + ";base64," + Base64.getEncoder().encodeToString(bytes);
    }

    private static byte[] jpeg(BufferedImage image) throws IOException {
        ImageWriter writer = ImageIO.getImageWritersByFormatName("jpeg").next();
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (MemoryCacheImageOutputStream out = new MemoryCacheImageOutputStream(bytes)) {
            ImageWriteParam quality = writer.getDefaultWriteParam();
            quality.setCompressionMode(ImageWriteParam.MODE_EXPLICIT);
            quality.setCompressionQuality(JPEG_QUALITY);
            writer.setOutput(out);
            writer.write(null, new IIOImage(image, null, null), quality);
        } finally {
            writer.dispose();
        }
        return bytes.toByteArray();
    }
}
