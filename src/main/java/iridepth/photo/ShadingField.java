package iridepth.photo;

import java.util.Arrays;
import java.util.Optional;

/**
 * The smooth part of a flat or dark frame: per channel a tensor product of cubic B-splines fitted robustly to the
 * means of small blocks, so that the frame's pixel noise is not printed into the photos that it corrects. How fine the
 * splines are is chosen by Mallows' Cp (C. L. Mallows, Technometrics 15, 1973): the smallest expected squared error, given
 * the scatter of neighbouring block means. Blocks that stand out (dust, hot pixels) hardly count. Immutable.
 */
public final class ShadingField {

    /** A flat with more than this fraction of samples at the top of the scale is overexposed. */
    private static final double CLIPPED = 1e-3;
    /** A flat must stand this many times its own pixel noise above the dark, everywhere. */
    private static final double LEAST_SIGNAL_TO_NOISE = 5;

    private final PhotoInfo info;
    private final SplineFit.Judged[] fits;

    private ShadingField(PhotoInfo info, SplineFit.Judged[] fits) {
        this.info = info;
        this.fits = fits;
    }

    /**
     * The field of a flat frame above the dark, in linear fractions of full scale.
     *
     * @param photo photo of an evenly coated or bare surface
     * @param encoding how its counts stand for light
     * @param dark the dark field, if there is one
     * @return the field
     * @throws PhotoException if it is overexposed, hardly above the dark, or does not match the dark
     */
    public static ShadingField flat(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark) {
        PhotoInfo info = photo.info();
        dark.ifPresent(field -> field.requireFits(info, "dark"));
        BlockMeans means = BlockMeans.of(photo, encoding);
        for (int c = 0; c < info.channels(); c++) {
            if (means.topFraction(c) > CLIPPED) {
                throw new PhotoException(info.path(), String.format(java.util.Locale.ROOT,
                        "is overexposed: %.1f %% of channel %d is at the top of the scale; take the flat with less light",
                        100 * means.topFraction(c), c + 1));
            }
        }
        dark.ifPresent(means::subtract);
        ShadingField field = new ShadingField(info, fits(means));
        for (int c = 0; c < info.channels(); c++) {
            double lowest = field.fits[c].fit().lowest();
            if (!(lowest > LEAST_SIGNAL_TO_NOISE * means.noise(c)) || !(lowest > 0)) {
                throw new PhotoException(info.path(), String.format(java.util.Locale.ROOT,
                        "is hardly brighter than the dark in channel %d (%.2g of full scale at its darkest); take the flat "
                        + "with more light", c + 1, lowest));
            }
        }
        return field;
    }

    /**
     * The field of a dark frame, in linear fractions of full scale.
     *
     * @param photo photo with no light
     * @param encoding how its counts stand for light
     * @return the field
     * @throws PhotoException if much of it is at the top of the scale
     */
    public static ShadingField dark(PhotoFile photo, Encoding encoding) {
        BlockMeans means = BlockMeans.of(photo, encoding);
        for (int c = 0; c < photo.info().channels(); c++) {
            if (means.topFraction(c) > CLIPPED) {
                throw new PhotoException(photo.info().path(), "is no dark frame: part of it is at the top of the scale; "
                        + "take it with the lens covered");
            }
        }
        return new ShadingField(photo.info(), fits(means));
    }

    private static SplineFit.Judged[] fits(BlockMeans means) {
        SplineFit.Judged[] fits = new SplineFit.Judged[means.channels()];
        Arrays.parallelSetAll(fits, c -> SplineFit.of(means, c));
        return fits;
    }

    /**
     * Checks that the field belongs to a photo.
     *
     * @param photo the photo to be corrected
     * @param name what to call this field, 'flat' or 'dark'
     * @throws PhotoException if size, bit depth or number of channels differ
     */
    public void requireFits(PhotoInfo photo, String name) {
        if (info.width() != photo.width() || info.height() != photo.height()) {
            throw mismatch(photo, name, info.width() + " x " + info.height() + " pixels",
                    photo.width() + " x " + photo.height());
        }
        if (info.channels() != photo.channels()) {
            throw mismatch(photo, name, info.channels() + (info.channels() == 1 ? " channel" : " channels"),
                    Integer.toString(photo.channels()));
        }
        if (info.bitDepth() != photo.bitDepth()) {
            throw mismatch(photo, name, info.bitDepth() + " bit", Integer.toString(photo.bitDepth()));
        }
    }

    private PhotoException mismatch(PhotoInfo photo, String name, String own, String other) {
        return new PhotoException(info.path(), "this " + name + " has " + own + ", but " + photo.path() + " has " + other
                + "; take both with the same camera settings");
    }

    /** @return what the header of the flat or dark frame says */
    public PhotoInfo info() {
        return info;
    }

    /**
     * Evaluates the field along a row.
     *
     * @param y row, 0 at the top
     * @param channel 0 and up
     * @param into its first values, as many as the picture is wide, are filled
     */
    public void row(int y, int channel, float[] into) {
        fits[channel].fit().row(y, into);
    }

    /**
     * @param channel 0 and up
     * @return mean of the field over the picture, a linear fraction of full scale
     */
    public double mean(int channel) {
        return fits[channel].fit().mean();
    }

    /**
     * @param channel 0 and up
     * @return standard uncertainty of the field from the frame's noise, root mean square, a linear fraction of full scale
     */
    public double uncertainty(int channel) {
        return fits[channel].uncertainty();
    }

    /**
     * What the smooth field leaves of the block means beyond their noise: structure finer than it can follow.
     *
     * @param channel 0 and up
     * @return root mean square, a linear fraction of full scale; 0 where there is nothing but noise
     */
    public double residual(int channel) {
        return fits[channel].residual();
    }

    /**
     * @param channel 0 and up
     * @return fraction of the picture's blocks left out because they stand out of the field (dust, hot pixels)
     */
    public double outlierFraction(int channel) {
        return fits[channel].outlierFraction();
    }
}
