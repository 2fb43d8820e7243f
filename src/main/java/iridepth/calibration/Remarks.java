package iridepth.calibration;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;

/** What a user should look into after a fit. */
final class Remarks {
    private static final double UNLIKELY = 0.01;
    /** How many times the stated residual a misfit is remarkable. */
    private static final double LARGE_MISFIT = 2.5;
    private static final double FAR_SIGMAS = 1;
    private static final double OUTLIER_SIGMAS = 4;
    private static final double OUTLIER_NM = 1;

    private Remarks() {
    }

    static List<String> of(FitInput input, FitFigures f) {
        List<String> remarks = new ArrayList<>();
        if (f.pValue() < UNLIKELY) {
            StepResidual worst = f.residuals().stream().max(Comparator.comparingDouble(r -> Math.abs(r.inSigmas()))).orElseThrow();
            remarks.add(say("the steps contradict each other or the recipe (chi-square %.1f with %.1f degrees of freedom, p = %.2g), most "
                    + "at %s in channel %s; check the steps' thicknesses and regions, then the lamp, the aperture, the film's index, the "
                    + "flat's stack and stray light", f.chiSquare(), f.degreesOfFreedom(), f.pValue(), worst.label(), worst.channel()));
        } else if (f.misfit() > LARGE_MISFIT * input.inputs().flatResidual()) {
            remarks.add(say("the signals fit to no better than %.2f %%; check the flat, the aperture and the lamp", 100 * f.misfit()));
        }
        for (LeaveOneOut l : f.leaveOneOut()) {
            if (!l.extrapolated() && Math.abs(l.errorNm()) > OUTLIER_NM && Math.abs(l.errorNm()) > OUTLIER_SIGMAS * l.uncertaintyNm()) {
                remarks.add(say("%s does not go with the others, which read it as %.1f nm: check its thickness and region, or add a step "
                        + "near it", l.label(), l.readNm()));
            }
        }
        double far = f.aperture() - f.apertureStated();
        if (Math.abs(far) > FAR_SIGMAS * input.inputs().numericalAperture() && f.apertureStated() > 0) {
            remarks.add(say("the steps call for a numerical aperture of %.3f rather than the stated %.3f", f.aperture(),
                    f.apertureStated()));
        }
        if (f.index() != null && Math.abs(f.index().at(550)) > 2 * f.index().sigmaAt(550)) {
            remarks.add(say("the steps call for an index that differs from the stated one by %+.4f +- %.4f at 550 nm", f.index().at(550),
                    f.index().sigmaAt(550)));
        }
        return remarks;
    }

    private static String say(String format, Object... values) {
        return String.format(Locale.ROOT, format, values);
    }
}
