package iridepth.app.cli;

import iridepth.optics.Polarisation;
import iridepth.recipe.Recipe.ViewSpec;
import java.util.Locale;
import picocli.CommandLine.Option;

/** Directions of view on a command line. */
final class ViewOptions {
    @Option(names = "--aperture", paramLabel = "NA", description = "Numerical aperture of the objective (default: 0, straight on).")
    private Double aperture;

    @Option(names = "--incidence", paramLabel = "DEGREES", description = "Angle of incidence, instead of an aperture.")
    private Double incidence;

    @Option(names = "--polarisation", paramLabel = "none|s|p", defaultValue = "none",
            description = "Polarisation at that angle (default: none).")
    private String polarisation;

    /** Whether any option departs from a recipe. */
    boolean given() {
        return aperture != null || incidence != null;
    }

    ViewSpec spec() {
        if (incidence == null) {
            return new ViewSpec(aperture == null ? 0 : aperture, Double.NaN, Polarisation.NONE);
        }
        try {
            return new ViewSpec(Double.NaN, incidence, Polarisation.valueOf(polarisation.toUpperCase(Locale.ROOT)));
        } catch (IllegalArgumentException e) {
            throw new IllegalArgumentException("--polarisation must be none, s or p, not '" + polarisation + "'");
        }
    }
}
