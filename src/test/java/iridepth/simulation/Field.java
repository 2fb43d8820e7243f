package iridepth.simulation;

import java.util.Arrays;
import java.util.Random;

/**
 * A sample as it lies before the camera: the film's thickness at each pixel, row by row, and what covers it.
 *
 * @param width pixels
 * @param height pixels
 * @param film thickness in nm, also under a cover; NaN where there is no film
 * @param cover what covers each pixel; null where nothing does
 * @param opacity share of the light that comes from the cover, 0 to 1
 */
public record Field(int width, int height, double[] film, Cover[] cover, float[] opacity) {

    /** A thickness at a pixel; x and y count from the upper left. */
    @FunctionalInterface
    public interface Profile {
        /** Thickness in nm, NaN where there is no film. */
        double at(int x, int y);
    }

    /** A film of the given profile, bare of any cover; the dark holder shows where there is no film. */
    public static Field of(int width, int height, Profile profile) {
        double[] film = new double[width * height];
        Cover[] cover = new Cover[film.length];
        float[] opacity = new float[film.length];
        for (int i = 0; i < film.length; i++) {
            film[i] = profile.at(i % width, i / width);
            if (Double.isNaN(film[i])) {
                cover[i] = Cover.HOLDER;
                opacity[i] = 1;
            }
        }
        return new Field(width, height, film, cover, opacity);
    }

    /** The same thickness everywhere. */
    public static Field constant(int width, int height, double thickness) {
        return of(width, height, (x, y) -> thickness);
    }

    /** Thickness linear in x from the left to the right column. */
    public static Field wedge(int width, int height, double left, double right) {
        return of(width, height, (x, y) -> left + (right - left) * x / (width - 1));
    }

    /** An elliptic Gaussian dome in the middle: rim + height * exp(-2.5 r^2), r = 1 at the middle of each side. */
    public static Field dome(int width, int height, double rim, double rise) {
        return of(width, height, (x, y) -> {
            double u = 2.0 * x / (width - 1) - 1;
            double v = 2.0 * y / (height - 1) - 1;
            return rim + rise * Math.exp(-2.5 * (u * u + v * v));
        });
    }

    /**
     * A wafer: a disc that fills 92 % of the height, thickness centre + bowl r^2 + tilt * u, with r the fraction of the
     * disc's radius and u that along x; no film outside.
     */
    public static Field wafer(int width, int height, double centre, double bowl, double tilt) {
        double radius = 0.46 * Math.min(width, height);
        return of(width, height, (x, y) -> {
            double u = (x + 0.5 - width / 2.0) / radius;
            double v = (y + 0.5 - height / 2.0) / radius;
            double r2 = u * u + v * v;
            return r2 <= 1 ? centre + bowl * r2 + tilt * u : Double.NaN;
        });
    }

    /**
     * A vertical soap film that drains: d = bottom * sqrt(y / height) / sqrt(1 + time), after H. Jeffreys, Proc. Camb.
     * Phil. Soc. 26, 204 (1930), with a black film of 10 nm at the top.
     *
     * @param bottom nm at the lower edge at time 0
     * @param time in units of the drainage time
     */
    public static Field soap(int width, int height, double bottom, double time) {
        return of(width, height,
                (x, y) -> Math.max(10, bottom * Math.sqrt((y + 0.5) / height) / Math.sqrt(1 + time)));
    }

    /** The same with every pixel that the mask chooses covered. */
    public Field covered(Cover by, double share, Mask mask) {
        Cover[] newCover = cover.clone();
        float[] newOpacity = opacity.clone();
        for (int i = 0; i < film.length; i++) {
            if (!Double.isNaN(film[i]) && mask.holds(i % width, i / width)) {
                newCover[i] = by;
                newOpacity[i] = (float) share;
            }
        }
        return new Field(width, height, film, newCover, newOpacity);
    }

    /** A choice of pixels. */
    @FunctionalInterface
    public interface Mask {
        /** Whether the pixel belongs to it. */
        boolean holds(int x, int y);
    }

    /** The same with round specks of radius 1 to {@code largest} pixels, by turns dark dust and reddish fibres. */
    public Field specks(int count, double largest, long seed) {
        Random random = new Random(seed);
        Field field = this;
        for (int i = 0; i < count; i++) {
            double cx = random.nextDouble() * width;
            double cy = random.nextDouble() * height;
            double r = 1 + random.nextDouble() * (largest - 1);
            field = field.covered(i % 2 == 0 ? Cover.DUST : Cover.FIBRE, 1,
                    (x, y) -> Math.hypot(x + 0.5 - cx, y + 0.5 - cy) <= r);
        }
        return field;
    }

    /** The same with a straight scratch of the given width between two points, all in pixels. */
    public Field scratch(double x0, double y0, double x1, double y1, double thick) {
        double length = Math.hypot(x1 - x0, y1 - y0);
        return covered(Cover.SCRATCH, 1, (x, y) -> {
            double along = ((x - x0) * (x1 - x0) + (y - y0) * (y1 - y0)) / length;
            double across = ((x - x0) * (y1 - y0) - (y - y0) * (x1 - x0)) / length;
            return along >= 0 && along <= length && Math.abs(across) <= thick / 2;
        });
    }

    /** The same with a half-transparent round stain; sizes in pixels. */
    public Field stain(double cx, double cy, double radius) {
        return covered(Cover.STAIN, 0.6, (x, y) -> Math.hypot(x - cx, y - cy) <= radius);
    }

    /** The thickness that a reading should give, row by row: NaN where there is no film or it is covered. */
    public double[] truth() {
        double[] truth = film.clone();
        for (int i = 0; i < truth.length; i++) {
            if (opacity[i] > 0) {
                truth[i] = Double.NaN;
            }
        }
        return truth;
    }

    /** Smallest and largest thickness of the film, in nm. */
    public double[] range() {
        double[] known = Arrays.stream(film).filter(d -> !Double.isNaN(d)).toArray();
        return new double[] {Arrays.stream(known).min().orElse(0), Arrays.stream(known).max().orElse(0)};
    }
}
