package iridepth.reading;

import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Materials;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;

/** Colour curves of oxide on silicon in invented bands. */
final class FilmCurves {
    private FilmCurves() {
    }

    /**
     * The curve from 0 nm on in Gaussian bands.
     *
     * @param toNm  thickest film
     * @param bands centre and standard deviation of each band, nm, pair after pair
     */
    static ColourCurve inBands(double toNm, double... bands) {
        Stack stack = Stack.parse("air / SiO2 / Si", Materials.bundled());
        List<String> names = new ArrayList<>();
        List<Spectrum> responses = new ArrayList<>();
        for (int i = 0; i < bands.length; i += 2) {
            double centre = bands[i];
            double width = bands[i + 1];
            names.add("band " + (int) centre);
            responses.add(Spectrum.sample(w -> Math.exp(-Math.pow((w - centre) / width, 2) / 2)));
        }
        EffectiveResponses e = EffectiveResponses.ofSensor(names, responses, Light.blackbody(3200));
        ThicknessRange range = new ThicknessRange(0, toNm);
        return ColourCurve.of(e, Reflectance.of(stack, View.aperture(0.1, stack, toNm)), range, range.step(stack));
    }

    /** The curve with responses uncertain by a share that differs from channel to channel but is common in part. */
    static ColourCurve uncertain(ColourCurve curve, double share) {
        int n = curve.channels();
        double[] covariance = new double[curve.size() * n * n];
        for (int k = 0; k < curve.size(); k++) {
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    double correlation = i == j ? 1 : 0.4;
                    covariance[(k * n + i) * n + j] = correlation * share * share * curve.signal(k, i) * curve.signal(k, j);
                }
            }
        }
        return curve.withCovariance(covariance);
    }
}
