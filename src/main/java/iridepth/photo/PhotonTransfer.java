package iridepth.photo;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * The photon-transfer curve of a camera as measured: for each channel, variance of the noise against signal, from blocks
 * of one photo (where a cubic surface leaves nothing but noise) or of the difference of two photos of the same thing
 * (EMVA Standard 1288 release 4.0, section 6). Curves of several photos by the same camera and settings may be joined:
 * dark, flat and photo together span the scale.
 *
 * <p>Blocks are grouped by level; in each group the mean is taken over those blocks whose variance is no larger than
 * chance explains, beginning with the quietest, so that edges and texture do not count. Noise that is correlated between
 * neighbours is recognised from the products of residuals, and the variance corrected for what the surface took of it.
 */
public final class PhotonTransfer {

    /**
     * A group of blocks.
     *
     * @param level mean linear signal above the dark
     * @param variance variance of a pixel, with rounding
     * @param rounding the part of it that rounding to counts gives, slope^2 / 12
     * @param freedom degrees of freedom behind the variance
     */
    public record Point(double level, double variance, double rounding, double freedom) {
    }

    private static final int GROUP_BLOCKS = 25;
    private static final int MOST_GROUPS = 48;
    private static final int FEWEST_BLOCKS = 4;
    /** Correlation at the end of the short reach from which the long reach is needed. */
    private static final double STILL_CORRELATED = 0.08;
    private static final int FEWEST_LARGE_BLOCKS = 30;

    private final List<List<Point>> points;
    private final double[] correlation;
    private final double[] countVariance;

    private PhotonTransfer(List<List<Point>> points, double[] correlation, double[] countVariance) {
        this.points = points;
        this.correlation = correlation;
        this.countVariance = countVariance;
    }

    /**
     * The curve from one photo: a flat, a dark, or any photo with some quiet parts.
     *
     * @param photo the open photo; of a large one some bands of rows are read
     * @param encoding how its counts stand for light
     * @param dark dark field, if there is one
     * @return the curve
     * @throws PhotoException if it has too few blocks of 6 x 6 pixels that are clipped nowhere
     */
    public static PhotonTransfer of(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark) {
        return of(photo, Optional.empty(), encoding, dark);
    }

    /**
     * The curve from two photos of the same thing, which need be neither even nor smooth.
     *
     * @param first the one
     * @param second the other, of the same size and kind
     * @param encoding how their counts stand for light
     * @param dark dark field, if there is one
     * @return the curve
     * @throws PhotoException if the photos differ in kind or have too few blocks that are clipped nowhere
     */
    public static PhotonTransfer ofDifference(PhotoFile first, PhotoFile second, Encoding encoding,
            Optional<ShadingField> dark) {
        PhotoInfo a = first.info();
        PhotoInfo b = second.info();
        if (a.width() != b.width() || a.height() != b.height() || a.channels() != b.channels()
                || a.bitDepth() != b.bitDepth()) {
            throw new PhotoException(b.path(), "differs from " + a.path() + " in size, channels or bit depth; give two "
                    + "photos with the same camera settings");
        }
        return of(first, Optional.of(second), encoding, dark);
    }

    private static PhotonTransfer of(PhotoFile photo, Optional<PhotoFile> second, Encoding encoding,
            Optional<ShadingField> dark) {
        encoding.requireFits(photo.info());
        int[] top = Saturation.of(photo, encoding);
        List<Bands.Band> bands = Bands.sample(photo);
        List<Optional<Frame>> others = bands.stream()
                .map(band -> second.map(other -> other.rows(band.y(), band.frame().height()))).toList();
        List<Optional<float[][]>> darks = bands.stream().map(band -> dark.map(field -> rows(field, band))).toList();
        BlockResidual small = new BlockResidual(6, 2);
        int channels = photo.info().channels();
        QuietBlocks[] quiet = new QuietBlocks[channels];
        IntStream.range(0, channels).parallel().forEach(c -> {
            quiet[c] = quiet(small, bands, others, darks, c, encoding, top[c]);
            if (quiet[c] != null && quiet[c].farthestCorrelation() > STILL_CORRELATED) {
                QuietBlocks large = quiet(new BlockResidual(16, 5), bands, others, darks, c, encoding, top[c]);
                quiet[c] = large != null && large.blocks() >= FEWEST_LARGE_BLOCKS ? large : quiet[c];
            }
        });
        for (int c = 0; c < channels; c++) {
            if (quiet[c] == null) {
                throw new PhotoException(photo.info().path(), "has too few parts that are clipped nowhere in channel "
                        + (c + 1) + " to tell its noise; give the camera's read noise and full well");
            }
        }
        return new PhotonTransfer(Arrays.stream(quiet).map(QuietBlocks::points).toList(),
                Arrays.stream(quiet).mapToDouble(QuietBlocks::neighbourCorrelation).toArray(), rounding(photo, bands));
    }

    /** Variance in squared counts of the rounding to counts, and of the rounding of a JPEG. */
    private static double[] rounding(PhotoFile photo, List<Bands.Band> bands) {
        double[] variance = photo.quantisation()
                .map(jpeg -> jpeg.variance(bands.stream().map(Bands.Band::frame).toList()))
                .orElse(new double[photo.info().channels()]);
        return Arrays.stream(variance).map(v -> v + NoiseModel.ROUNDING).toArray();
    }

    private static QuietBlocks quiet(BlockResidual residual, List<Bands.Band> bands, List<Optional<Frame>> others,
            List<Optional<float[][]>> darks, int channel, Encoding encoding, int top) {
        NoiseBlocks blocks = new NoiseBlocks(residual);
        for (int i = 0; i < bands.size(); i++) {
            blocks.add(bands.get(i).frame(), others.get(i).orElse(null), channel, encoding, top,
                    darks.get(i).orElse(null));
        }
        if (blocks.count() < FEWEST_BLOCKS) {
            return null;
        }
        return QuietBlocks.of(blocks, Math.max(1, Math.min(MOST_GROUPS, blocks.count() / GROUP_BLOCKS)));
    }

    /** The dark field of a band, channel after channel, row after row. */
    private static float[][] rows(ShadingField field, Bands.Band band) {
        Frame frame = band.frame();
        float[][] all = new float[frame.channels() * frame.height()][frame.width()];
        for (int i = 0; i < all.length; i++) {
            field.row(band.y() + i % frame.height(), i / frame.height(), all[i]);
        }
        return all;
    }

    /**
     * Joins the curves of two photos taken by the same camera with the same settings. Means of several exposures have
     * less noise than single ones and must not be joined with them.
     *
     * @param other curve with the same number of channels
     * @return all points of both
     */
    public PhotonTransfer and(PhotonTransfer other) {
        if (other.channels() != channels()) {
            throw new IllegalArgumentException("curves of " + channels() + " and " + other.channels()
                    + " channels cannot be joined; use photos of one camera");
        }
        List<List<Point>> joined = new ArrayList<>();
        double[] mean = new double[channels()];
        double[] rounding = new double[channels()];
        for (int c = 0; c < channels(); c++) {
            List<Point> both = new ArrayList<>(points.get(c));
            both.addAll(other.points.get(c));
            joined.add(List.copyOf(both));
            rounding[c] = Math.max(countVariance[c], other.countVariance[c]);
            double own = freedom(points.get(c));
            double others = freedom(other.points.get(c));
            mean[c] = (own * correlation[c] + others * other.correlation[c]) / (own + others);
        }
        return new PhotonTransfer(List.copyOf(joined), mean, rounding);
    }

    private static double freedom(List<Point> points) {
        return points.stream().mapToDouble(Point::freedom).sum();
    }

    /** @return number of channels */
    public int channels() {
        return points.size();
    }

    /**
     * @param channel 0 and up
     * @return its points, at least one, in no particular order
     */
    public List<Point> points(int channel) {
        return points.get(channel);
    }

    /**
     * @param channel 0 and up
     * @return correlation of the noise of neighbouring pixels, mean of across and down
     */
    public double correlation(int channel) {
        return correlation[channel];
    }

    /**
     * @param channel 0 and up
     * @return variance of the counts by rounding, squared counts: 1/12, and for a JPEG the error of its coefficients
     */
    public double countVariance(int channel) {
        return countVariance[channel];
    }
}
