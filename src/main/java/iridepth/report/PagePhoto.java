package iridepth.report;

import iridepth.colour.Srgb;
import iridepth.photo.Frame;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Signal;
import iridepth.photo.SignalSource;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Arrays;
import java.util.Base64;
import java.util.stream.IntStream;
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
    /** Points up to which the picture is kept without loss. */
    private static final int MOST_PNG = 350_000;
    private static final float JPEG_QUALITY = 0.85f;
    private static final int BAND = 64;
    private static final int MOST_SORTED = 100_000;
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
     * The picture of a frame of a photo. Converts only the rows that are shown.
     *
     * @param brightened as above
     * @throws PhotoException if the photo is damaged
     */
    public static PagePhoto of(SignalSource source, int frame, boolean brightened) {
        PhotoInfo info = source.info();
        PagePhoto picture = of(info.width(), info.height(), brightened);
        PageGrid grid = picture.grid;
        IntStream.range(0, (info.height() + BAND - 1) / BAND).parallel().forEach(band -> {
            int top = band * BAND;
            Frame counts = source.counts(frame, top, Math.min(BAND, info.height() - top));
            Signal line = Signal.row(info);
            for (int row = 0; row < counts.height(); row++) {
                if (grid.shows(top + row)) {
                    source.convert(counts, row, top + row, line);
                    picture.add(top + row, line);
                }
            }
        });
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
        int stride = light.length / MOST_SORTED + 1;
        float[] sorted = new float[(light.length + stride - 1) / stride];
        for (int i = 0; i < sorted.length; i++) {
            sorted[i] = light[i * stride];
        }
        Arrays.sort(sorted);
        float lightest = sorted[(int) (LIGHTEST_SHARE * (sorted.length - 1))];
        return lightest > 0 ? LIGHTEST / lightest : 1;
    }

    /** The picture as a data URI (RFC 2397): PNG where it has few points, else JPEG. */
    String dataUri() {
        try {
            BufferedImage image = picture();
            return grid.points() <= MOST_PNG ? uri("image/png", PngWriter.encode(image)) : uri("image/jpeg", jpeg(image));
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
