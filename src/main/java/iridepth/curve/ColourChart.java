package iridepth.curve;

import iridepth.colour.Adaptation;
import iridepth.colour.Lab;
import iridepth.colour.Light;
import iridepth.colour.Matrix3;
import iridepth.colour.Observer;
import iridepth.colour.Srgb;
import iridepth.colour.Xyz;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;

/**
 * The colours of a film against its thickness, as an observer sees them.
 *
 * @param stack    the stack
 * @param light    the light
 * @param observer the observer
 * @param white    the adopted white in CIELAB and on the screen
 * @param exposure factor on the brightness of the sRGB colours
 * @param rows     one per thickness, rising
 */
public record ColourChart(Stack stack, Light light, Observer observer, White white, double exposure, List<Row> rows) {
    /** What the eye has adapted to. */
    public enum White {
        /** A perfect diffuse white under the light. */
        PERFECT,
        /** The stack without its film: the eye at the microscope takes the bare wafer for white. */
        BARE
    }

    /**
     * The colour at one thickness.
     *
     * @param thicknessNm  thickness, nm
     * @param xyz          tristimulus values relative to a perfect white of Y = 1
     * @param lab          CIELAB under the adopted white
     * @param srgb         the colour for an sRGB screen, adapted from the adopted white to D65 and multiplied by the exposure
     * @param deltaEPerNm  CIEDE2000 difference per nm of thickness: the sensitivity of the colour
     */
    public record Row(double thicknessNm, Xyz xyz, Lab lab, Srgb srgb, double deltaEPerNm) {
    }

    /** Thickness step over which the sensitivity is taken, nm. */
    private static final double SENSITIVITY_STEP_NM = 0.5;
    private static final double SHOWN_BRIGHTEST = 0.75;

    /**
     * Computes a chart.
     *
     * @param stack    a stack with a film
     * @param view     directions of view
     * @param range    thicknesses
     * @param stepNm   spacing of the rows, nm
     * @param exposure factor on the sRGB brightness, or NaN to have the brightest film at Y = 0.75, which leaves room for vivid colours in the gamut
     * @throws IllegalArgumentException if the step does not fit or the bare stack is too dark to adapt to
     */
    public static ColourChart of(Stack stack, View view, Light light, Observer observer, White white, ThicknessRange range,
                                 double stepNm, double exposure) {
        double count = (range.toNm() - range.fromNm()) / stepNm;
        if (!(stepNm > 0 && count >= 1 && count <= 100_000)) {
            throw new IllegalArgumentException("the step must be above 0 nm and fit into the range, not " + stepNm + " nm");
        }
        range.requireResolved(stack);
        Reflectance reflectance = Reflectance.of(stack, view);
        Xyz perfect = observer.white(light);
        Xyz adopted = white == White.PERFECT ? perfect : xyz(reflectance, 0, light, observer);
        if (adopted.y() < 1e-4) {
            throw new IllegalArgumentException("the stack without its film reflects next to nothing and cannot be the white; "
                    + "use a perfect white");
        }
        int rows = (int) Math.floor(count + 1e-9) + 1;
        List<Xyz> colours = new ArrayList<>();
        double brightest = 0;
        for (int k = 0; k < rows; k++) {
            colours.add(xyz(reflectance, range.fromNm() + k * stepNm, light, observer));
            brightest = Math.max(brightest, colours.get(k).y() / adopted.y());
        }
        double gain = Double.isNaN(exposure) ? SHOWN_BRIGHTEST / brightest : exposure;
        double[][] toScreen = Adaptation.matrix(adopted, Srgb.WHITE);
        List<Row> result = new ArrayList<>();
        for (int k = 0; k < rows; k++) {
            double d = range.fromNm() + k * stepNm;
            Lab lab = Lab.of(colours.get(k), adopted);
            Lab next = Lab.of(xyz(reflectance, d + SENSITIVITY_STEP_NM, light, observer), adopted);
            Xyz shown = Xyz.of(Matrix3.times(toScreen, colours.get(k).times(gain / adopted.y()).toArray()));
            result.add(new Row(d, colours.get(k), lab, Srgb.of(shown), lab.deltaE2000(next) / SENSITIVITY_STEP_NM));
        }
        return new ColourChart(stack, light, observer, white, gain, List.copyOf(result));
    }

    private static Xyz xyz(Reflectance reflectance, double thicknessNm, Light light, Observer observer) {
        return observer.xyz(Spectrum.of(reflectance.spectrum(thicknessNm)), light);
    }
}
