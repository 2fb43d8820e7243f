package iridepth.quality;

/**
 * Thickness on pixels with the two parts of its standard uncertainty, which behave differently in a mean: the random part
 * shrinks as more pixels are averaged, the systematic part (calibration, index, lamp) does not.
 *
 * @param thickness nm; NaN where not read
 * @param random random part of the standard uncertainty of a pixel, nm; where NaN, a mean over the pixel has NaN too
 * @param systematic systematic part, nm, likewise
 * @param correlatedPixels how many neighbouring pixels share one random error, 1 or more: 1 if every pixel errs on its own,
 *     more after denoising, demosaicing or JPEG compression; a mean over n pixels counts as one over n / correlatedPixels
 */
public record MeasuredField(Field thickness, Field random, Field systematic, double correlatedPixels) {

    public MeasuredField {
        if (differ(thickness, random) || differ(thickness, systematic)) {
            throw new IllegalArgumentException("thickness of " + size(thickness) + ", random part of " + size(random)
                    + ", systematic part of " + size(systematic) + " pixels: give fields of one size");
        }
        if (!(correlatedPixels >= 1 && correlatedPixels < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(
                    correlatedPixels + " pixels that share one random error: give 1 or more");
        }
    }

    /** A field whose pixels err independently in their random part. */
    public static MeasuredField of(Field thickness, Field random, Field systematic) {
        return new MeasuredField(thickness, random, systematic, 1);
    }

    private static boolean differ(Field a, Field b) {
        return a.width() != b.width() || a.height() != b.height();
    }

    private static String size(Field field) {
        return field.width() + " x " + field.height();
    }
}
