package iridepth.recipe;

import iridepth.calibration.PatchSignal;
import iridepth.calibration.TargetFile;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Region;
import iridepth.photo.RegionStatistics;
import java.io.IOException;
import java.io.Reader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.SingularMatrixException;

/**
 * A reference target that was photographed with the camera, {@code camera.target}: a grid of patches whose reflectances a file
 * states, patch after patch along the rows from the first corner towards the second.
 *
 * @param images  the photos that show it, one under each of the recipe's lights
 * @param patches the file by ANSI CGATS.17
 * @param corners outer corners of the grid, {x, y} in pixels: of the first patch, of the last in its row, of the last of all, of
 *                the first in the last row
 * @param columns patches along a row
 * @param rows    rows of patches
 */
public record TargetSpec(List<Path> images, Path patches, List<double[]> corners, int columns, int rows) {
    /** Edge of the part of a patch that is measured, as a share of the patch: its rim may be a frame, or lie askew. */
    private static final double INNER = 0.5;
    private static final int FEWEST_PIXELS = 4;
    private static final double CLIPPED_SHARE = 0.01;

    static TargetSpec read(Section section, Tables tables, List<Path> images) {
        List<double[]> corners = section.rows("corners", 2);
        if (corners.size() != 4) {
            throw section.error("corners", section.path("corners") + " must be four corners, [[x, y], ...], not " + corners.size());
        }
        double[] grid = section.numbers("grid", 2);
        if (Arrays.stream(grid).anyMatch(n -> n < 1 || n > 100 || n != Math.rint(n))) {
            throw section.error("grid", section.path("grid") + " must be the number of columns and of rows, 1 to 100");
        }
        TargetSpec target = new TargetSpec(images, tables.resolve(section.text("patches")), corners, (int) grid[0], (int) grid[1]);
        if (!target.isConvex()) {
            throw section.error("corners", section.path("corners") + " must go around the grid, corner after corner");
        }
        section.finish();
        return target;
    }

    private boolean isConvex() {
        double[] turns = new double[4];
        for (int i = 0; i < 4; i++) {
            double[] a = corners.get(i);
            double[] b = corners.get((i + 1) % 4);
            double[] c = corners.get((i + 2) % 4);
            turns[i] = (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0]);
        }
        return Arrays.stream(turns).allMatch(t -> t > 0) || Arrays.stream(turns).allMatch(t -> t < 0);
    }

    /**
     * What the camera saw of the patches, the channels under each light one after the other. Patches that are clipped are left out.
     *
     * @param channels channels that every photo must have
     * @throws RecipeException if the file does not fit the grid
     * @throws PhotoException  if a photo or the file cannot be used, or the grid lies outside the photo
     */
    List<PatchSignal> measure(Rig rig, int channels) {
        List<TargetFile.Patch> known = known();
        if (known.size() != columns * rows) {
            throw new RecipeException(rig.recipe().file() + ": camera.target: " + patches + " has " + known.size()
                    + " patches where the grid has " + columns + " x " + rows + "; give the grid of the whole target");
        }
        int lights = images.size();
        RegionStatistics[][] seen = new RegionStatistics[known.size()][lights * channels];
        for (int light = 0; light < lights; light++) {
            try (PhotoFile photo = PhotoFile.open(images.get(light))) {
                if (photo.info().channels() != channels) {
                    throw new PhotoException(photo.info().path() + ": the target has " + photo.info().channels()
                            + " channels where the photo has " + channels + "; take both with the same camera settings");
                }
                for (int i = 0; i < seen.length; i++) {
                    Region region = region(i % columns, i / columns, photo.info());
                    System.arraycopy(rig.patch(photo, light, region), 0, seen[i], light * channels, channels);
                }
            }
        }
        List<PatchSignal> signals = new ArrayList<>();
        for (int i = 0; i < seen.length; i++) {
            if (Arrays.stream(seen[i]).noneMatch(s -> s.topFraction() + s.bottomFraction() > CLIPPED_SHARE)) {
                signals.add(known.get(i).seen(Arrays.stream(seen[i]).mapToDouble(RegionStatistics::mean).toArray(),
                        Arrays.stream(seen[i]).mapToDouble(s -> s.standardError() * s.standardError()).toArray()));
            }
        }
        if (signals.isEmpty()) {
            throw new PhotoException(images.get(0) + ": every patch of the target is clipped; take it with another exposure");
        }
        return signals;
    }

    private List<TargetFile.Patch> known() {
        try (Reader reader = Files.newBufferedReader(patches)) {
            return TargetFile.read(patches.toString(), reader);
        } catch (IOException e) {
            throw new PhotoException(patches + ": cannot be read as a text file of patches; check its name and encoding (UTF-8)");
        } catch (IllegalArgumentException e) {
            throw new PhotoException(e.getMessage());
        }
    }

    /** The inner part of a patch. */
    private Region region(int column, int row, PhotoInfo photo) {
        double[] middle = place((column + 0.5) / columns, (row + 0.5) / rows);
        double halfWidth = Double.POSITIVE_INFINITY;
        double halfHeight = Double.POSITIVE_INFINITY;
        for (int corner = 0; corner < 4; corner++) {
            double[] at = place((column + (corner & 1)) / (double) columns, (row + (corner >> 1)) / (double) rows);
            halfWidth = Math.min(halfWidth, Math.abs(at[0] - middle[0]));
            halfHeight = Math.min(halfHeight, Math.abs(at[1] - middle[1]));
        }
        int width = (int) Math.floor(2 * halfWidth * INNER);
        int height = (int) Math.floor(2 * halfHeight * INNER);
        if (width < FEWEST_PIXELS || height < FEWEST_PIXELS) {
            throw new PhotoException(photo.path(), String.format(Locale.ROOT, "shows patch %d, %d of the target %d x %d pixels large; at least "
                    + "%d x %d of its inner half are needed: take it larger and upright", column + 1, row + 1, width, height, FEWEST_PIXELS,
                    FEWEST_PIXELS));
        }
        int x = (int) Math.round(middle[0] - width / 2.0);
        int y = (int) Math.round(middle[1] - height / 2.0);
        if (x < 0 || y < 0 || x + width > photo.width() || y + height > photo.height()) {
            throw new PhotoException(photo.path(), String.format(Locale.ROOT, "is %d x %d pixels, and patch %d, %d of the target would lie "
                    + "outside it; correct camera.target.corners", photo.width(), photo.height(), column + 1, row + 1));
        }
        return new Region(x, y, width, height);
    }

    /**
     * The place in the photo of a place on the target, both sides of which are 1: the projective map that takes its corners to those
     * given, as a flat target is seen askew.
     */
    private double[] place(double u, double v) {
        double[] h = homography();
        double w = h[6] * u + h[7] * v + 1;
        return new double[] {(h[0] * u + h[1] * v + h[2]) / w, (h[3] * u + h[4] * v + h[5]) / w};
    }

    private double[] homography() {
        double[][] unit = {{0, 0}, {1, 0}, {1, 1}, {0, 1}};
        double[][] a = new double[8][];
        double[] b = new double[8];
        for (int i = 0; i < 4; i++) {
            double u = unit[i][0];
            double v = unit[i][1];
            double x = corners.get(i)[0];
            double y = corners.get(i)[1];
            a[2 * i] = new double[] {u, v, 1, 0, 0, 0, -u * x, -v * x};
            a[2 * i + 1] = new double[] {0, 0, 0, u, v, 1, -u * y, -v * y};
            b[2 * i] = x;
            b[2 * i + 1] = y;
        }
        try {
            return new LUDecomposition(new Array2DRowRealMatrix(a)).getSolver().solve(new ArrayRealVector(b)).toArray();
        } catch (SingularMatrixException e) {
            throw new IllegalStateException("corners that go around a convex grid have a projective map", e);
        }
    }
}
