package iridepth.reading;

import iridepth.curve.ColourCurve;
import java.util.Arrays;

/**
 * The thicknesses at which a curve is tabulated: as far apart as its noise allows.
 *
 * <p>From one sample to the next the curve moves by 1.5 standard deviations of the noise at most, and half way between them
 * it leaves their tangents by 0.1, |s''|_W h^2 / 8, unless that asks for spacings outside a sixteenth to four times that of the
 * curve's own samples. The spacing changes gradually.
 */
final class CurveSampling {
    private static final double STRAIGHT = 0.1;
    private static final double STEP = 1.5;
    private static final double FINEST = 1.0 / 16;
    private static final double COARSEST = 4;
    /** Most change of the spacing along as much thickness. */
    private static final double GRADUAL = 0.1;
    private static final int PER_SPACING = 3;

    private final double[] thickness;
    private final double[] spacing;
    private final float fromNm;
    private final float perNm;
    /** The sample nearest to each of many thicknesses, even and finer than the samples. */
    private final int[] nearest;

    private CurveSampling(ColourCurve curve, double[] wanted) {
        double[] place = new double[curve.size()];
        for (int i = 1; i < place.length; i++) {
            place[i] = place[i - 1] + curve.stepNm() * (1 / wanted[i - 1] + 1 / wanted[i]) / 2;
        }
        int last = (int) Math.ceil(place[place.length - 1]);
        double stretch = last / place[place.length - 1];
        for (int i = 0; i < place.length; i++) {
            place[i] *= stretch;
        }
        place[place.length - 1] = last;
        this.thickness = new double[last + 1];
        int i = 0;
        for (int n = 0; n <= last; n++) {
            while (i < place.length - 2 && place[i + 1] < n) {
                i++;
            }
            thickness[n] = curve.fromNm() + (i + (n - place[i]) / (place[i + 1] - place[i])) * curve.stepNm();
        }
        this.spacing = new double[last + 1];
        for (int n = 0; n <= last; n++) {
            int low = Math.max(0, n - 1);
            int high = Math.min(last, n + 1);
            spacing[n] = (thickness[high] - thickness[low]) / (high - low);
        }
        double pitch = Arrays.stream(wanted).min().orElseThrow() / PER_SPACING;
        this.fromNm = (float) curve.fromNm();
        this.perNm = (float) (1 / pitch);
        this.nearest = new int[(int) ((curve.toNm() - curve.fromNm()) / pitch) + 1];
        int k = 0;
        for (int j = 0; j < nearest.length; j++) {
            double d = curve.fromNm() + (j + 0.5) * pitch;
            while (k < last && thickness[k + 1] - d < d - thickness[k]) {
                k++;
            }
            nearest[j] = k;
        }
    }

    /** The sampling of a curve at the light where its noise is least. */
    static CurveSampling of(ColourCurve curve, ExpectedNoise noise, double light) {
        double[] spacing = new double[curve.size()];
        CurvePoint point = new CurvePoint(curve, noise, light);
        double step = curve.stepNm();
        for (int i = 0; i < spacing.length; i++) {
            point.moveTo(curve.thickness(i));
            double wanted = Math.min(STEP / Math.sqrt(point.information()), Math.sqrt(8 * STRAIGHT / Math.sqrt(point.bend())));
            spacing[i] = Math.max(FINEST * step, Math.min(COARSEST * step, wanted));
        }
        for (int i = 1; i < spacing.length; i++) {
            spacing[i] = Math.min(spacing[i], spacing[i - 1] + GRADUAL * step);
        }
        for (int i = spacing.length - 2; i >= 0; i--) {
            spacing[i] = Math.min(spacing[i], spacing[i + 1] + GRADUAL * step);
        }
        return new CurveSampling(curve, spacing);
    }

    /** Number of samples. */
    int size() {
        return thickness.length;
    }

    /** Thickness at a sample, nm. */
    double thickness(int k) {
        return thickness[k];
    }

    /** Spacing at a sample, nm. */
    double spacing(int k) {
        return spacing[k];
    }

    /** The sample nearest to a thickness; between two samples either. */
    int nearest(float thicknessNm) {
        int j = (int) ((thicknessNm - fromNm) * perNm);
        return nearest[j < 0 ? 0 : Math.min(j, nearest.length - 1)];
    }
}
