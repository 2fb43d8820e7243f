package iridepth.photo;

import ij.gui.Line;
import ij.gui.PointRoi;
import ij.gui.Roi;
import ij.gui.ShapeRoi;
import ij.io.RoiDecoder;
import ij.process.FloatPolygon;
import ij.process.ImageProcessor;
import java.awt.Rectangle;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;

/**
 * A selection saved by ImageJ: a {@code .roi} file, or one of those in a {@code .zip} as the ROI Manager saves them.
 *
 * @param name its name
 * @param roi  the selection
 */
public record RoiFile(String name, Roi roi) {

    private static final int MOST_BYTES = 1 << 26;

    /**
     * Reads the selections of a file.
     *
     * @return one from a {@code .roi} file, all of a {@code .zip}
     * @throws PhotoException if the file is missing or holds no selection
     */
    public static List<RoiFile> read(Path path) {
        try {
            byte[] bytes = Files.readAllBytes(path);
            List<RoiFile> rois = bytes.length > 1 && bytes[0] == 'P' && bytes[1] == 'K' ? zipped(path, bytes)
                    : List.of(decoded(path, path.getFileName().toString(), bytes));
            if (rois.isEmpty()) {
                throw new PhotoException(path, "holds no .roi file; save the selections again from ImageJ");
            }
            return rois;
        } catch (NoSuchFileException e) {
            throw new PhotoException(path, "there is no such file; check the path");
        } catch (IOException e) {
            throw new PhotoException(path, "cannot be read (" + e.getMessage() + ")");
        }
    }

    private static List<RoiFile> zipped(Path path, byte[] bytes) throws IOException {
        List<RoiFile> rois = new ArrayList<>();
        try (ZipInputStream zip = new ZipInputStream(new ByteArrayInputStream(bytes))) {
            for (ZipEntry entry = zip.getNextEntry(); entry != null; entry = zip.getNextEntry()) {
                if (entry.getName().endsWith(".roi")) {
                    rois.add(decoded(path, entry.getName(), zip.readNBytes(MOST_BYTES)));
                }
            }
        }
        return List.copyOf(rois);
    }

    private static RoiFile decoded(Path path, String file, byte[] bytes) {
        Roi roi;
        try {
            roi = RoiDecoder.openFromByteArray(bytes);
        } catch (RuntimeException e) {
            roi = null;
        }
        if (roi == null) {
            throw new PhotoException(path, "is no selection of ImageJ; save it with File > Save As > Selection");
        }
        String plain = file.substring(file.lastIndexOf('/') + 1).replaceFirst("\\.roi$", "");
        return new RoiFile(roi.getName() == null || roi.getName().isBlank() ? plain : roi.getName(), roi);
    }

    /** @return whether the selection encloses pixels: a rectangle, oval, polygon or the like */
    public boolean isArea() {
        return roi.isArea();
    }

    /** @return whether the selection is a straight line */
    public boolean isLine() {
        return roi instanceof Line && roi.getType() == Roi.LINE;
    }

    /** @return whether the selection is one or more points */
    public boolean isPoints() {
        return roi instanceof PointRoi;
    }

    /** @return the ends of a straight line: x and y of the first, x and y of the second, in pixels, pixel centres at whole numbers */
    public double[] line() {
        Line line = (Line) roi;
        return new double[] {line.x1d, line.y1d, line.x2d, line.y2d};
    }

    /** @return the pixels of a point selection, [point][x, y], by the pixel in which each point lies */
    public double[][] points() {
        FloatPolygon points = roi.getFloatPolygon();
        double[][] pixels = new double[points.npoints][];
        for (int i = 0; i < pixels.length; i++) {
            pixels[i] = new double[] {Math.floor(points.xpoints[i]), Math.floor(points.ypoints[i])};
        }
        return pixels;
    }

    /** @return the smallest rectangle of pixels around an area; parts of it may lie outside the photo */
    public Rectangle bounds() {
        return roi.getBounds();
    }

    /** @return the outline of an area, the first pixel of the photo reaching from 0 to 1 */
    public Shape outline() {
        Rectangle bounds = bounds();
        return AffineTransform.getTranslateInstance(bounds.x, bounds.y).createTransformedShape(new ShapeRoi(roi).getShape());
    }

    /**
     * Which pixels of {@link #bounds} belong to an area.
     *
     * @return [row * bounds.width + column]
     */
    public boolean[] mask() {
        Rectangle bounds = bounds();
        boolean[] mask = new boolean[Math.multiplyExact(bounds.width, bounds.height)];
        ImageProcessor drawn = roi.getMask();
        for (int i = 0; i < mask.length; i++) {
            mask[i] = drawn == null || drawn.get(i) != 0;
        }
        return mask;
    }
}
