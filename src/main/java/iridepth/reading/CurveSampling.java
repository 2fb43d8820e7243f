package iridepth.reading;

import iridepth.curve.ColourCurve;

/**
 * The thicknesses at which a curve is tabulated: as far apart as its noise allows.
 *
 * <p>From one sample to the next the curve moves by 1.5 standard deviations of the noise at most, and half way between them
 * it leaves their tangents by 0.1, |s''|_W h^2 / 8, unless that asks for spacings outside a sixteenth to four times that of the
 * curve's own samples. The spacing changes gradually. Place counts samples and runs on between them.
 */
final class CurveSampling {
    private static final double STRAIGHT = 0.1;
    private static final double STEP = 1.5;
    private static final double FINEST = 1.0 / 16;
    private static final double COARSEST = 4;
    /** Most change of the spacing along as much thickness. */
    private static final double GRADUAL = 0.1;

    private final double fromNm;
    private final double perNm;
    /** Place of each sample of the curve. */
    private final double[] place;
    /** Thickness at each whole place. */
    private final double[] thickness;

    private CurveSampling(ColourCurve curve, double[] spacing) {
        this.fromNm = curve.fromNm();
        this.perNm = 1 / curve.stepNm();
        this.place = new double[curve.size()];
        for (int i = 1; i < place.length; i++) {
            place[i] = place[i - 1] + curve.stepNm() * (1 / spacing[i - 1] + 1 / spacing[i]) / 2;
        }
        int last = (int) Math.ceil(place[place.length - 1]);
        double stretch = last / place[place.length - 1];
        for (int i = 0; i < place.length; i++) {
            place[i] *= stretch;
        }
        place[place.length - 1] = last;
        this.thickness = new double[last + 1];
        int i = 0;
        for (int k = 0; k <= last; k++) {
            while (i < place.length - 2 && place[i + 1] < k) {
                i++;
            }
            thickness[k] = fromNm + (i + (k - place[i]) / (place[i + 1] - place[i])) * curve.stepNm();
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
        int low = Math.max(0, k - 1);
        int high = Math.min(thickness.length - 1, k + 1);
        return (thickness[high] - thickness[low]) / (high - low);
    }

    /** The sample nearest to a thickness. */
    int nearest(float thicknessNm) {
        double at = (thicknessNm - fromNm) * perNm;
        int i = Math.max(0, Math.min(place.length - 2, (int) at));
        int k = (int) (place[i] + (at - i) * (place[i + 1] - place[i]) + 0.5);
        return Math.max(0, Math.min(thickness.length - 1, k));
    }
}
