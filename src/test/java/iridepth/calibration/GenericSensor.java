package iridepth.calibration;

import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.optics.Reflectance;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.SingularValueDecomposition;

/**
 * What a user would do otherwise: take any camera for a generic one, and at best correct its signals by a matrix fitted to the
 * steps, as colour profiles do.
 */
final class GenericSensor {
    /** Centre and standard deviation of the lobes of blue, green, red and deep red filters, nm. */
    private static final double[][] LOBES = {{455, 28}, {535, 35}, {605, 32}, {690, 30}};

    private final FitInput input;
    private final EffectiveResponses responses;

    GenericSensor(FitInput input) {
        this.input = input;
        Light light = input.lights().get(0);
        List<Spectrum> lobes = new ArrayList<>();
        int channels = input.channels().size();
        for (int c = 0; c < channels; c++) {
            int which = channels == 1 ? -1 : c < 3 ? 2 - c : 3;
            lobes.add(which < 0 ? Spectrum.sample(nm -> 1) : Spectrum.sample(nm -> {
                double u = (nm - LOBES[which][0]) / LOBES[which][1];
                return Math.exp(-u * u / 2);
            }));
        }
        this.responses = EffectiveResponses.ofSensor(input.channels(), lobes, light)
                .relativeTo(Reflectance.of(input.flatStack().orElseThrow(), input.view()).spectrum(0));
    }

    /** The curve of the generic sensor as it is. */
    ColourCurve uncalibrated() {
        return curve(responses);
    }

    private ColourCurve curve(EffectiveResponses of) {
        return ColourCurve.of(of, Reflectance.of(input.stack(), input.view()), input.range(), input.range().step(input.stack()));
    }

    /** The curve after the matrix from generic to measured signals that fits flat and steps best, in the sense of least squares. */
    ColourCurve matrix() {
        int n = responses.count();
        Reflectance film = Reflectance.of(input.stack(), input.view());
        RealMatrix generic = new Array2DRowRealMatrix(input.steps().size() + 1, n);
        RealMatrix measured = new Array2DRowRealMatrix(input.steps().size() + 1, n);
        for (int c = 0; c < n; c++) {
            generic.setEntry(0, c, 1);
            measured.setEntry(0, c, 1);
        }
        for (int j = 0; j < input.steps().size(); j++) {
            generic.setRow(j + 1, responses.signal(film.spectrum(input.steps().get(j).thicknessNm())));
            measured.setRow(j + 1, input.steps().get(j).signal());
        }
        RealMatrix matrix = new SingularValueDecomposition(generic).getSolver().solve(measured);
        List<Spectrum> mixed = new ArrayList<>();
        for (int c = 0; c < n; c++) {
            Spectrum sum = responses.response().get(0).times(matrix.getEntry(0, c));
            for (int k = 1; k < n; k++) {
                sum = sum.plus(responses.response().get(k).times(matrix.getEntry(k, c)));
            }
            mixed.add(sum);
        }
        return curve(new EffectiveResponses(input.channels(), mixed));
    }
}
