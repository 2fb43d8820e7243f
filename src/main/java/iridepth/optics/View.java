package iridepth.optics;

import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;

/**
 * The directions from which light is gathered, as a quadrature over the sine of the angle of incidence in the ambient.
 *
 * @param text         what it is, for people
 * @param sine         sines of the angles of incidence, 0 to below 1
 * @param weight       their weights, with sum 1
 * @param polarisation the light's polarisation
 */
public record View(String text, double[] sine, double[] weight, Polarisation polarisation) {
    private static final GaussIntegratorFactory GAUSS = new GaussIntegratorFactory();

    /**
     * A single direction.
     *
     * @param incidenceDeg angle of incidence in the ambient, 0 to below 90 degrees
     */
    public static View incidence(double incidenceDeg, Polarisation polarisation) {
        if (!(incidenceDeg >= 0 && incidenceDeg < 90)) {
            throw new IllegalArgumentException("the angle of incidence must be 0 to below 90 degrees, not " + incidenceDeg);
        }
        String kind = polarisation == Polarisation.NONE ? "unpolarised" : polarisation.name().toLowerCase(java.util.Locale.ROOT);
        return new View(String.format("%s degrees, %s", plain(incidenceDeg), kind),
                new double[] {Math.sin(Math.toRadians(incidenceDeg))}, new double[] {1}, polarisation);
    }

    /**
     * An objective of numerical aperture NA = n sin(theta), n the ambient's index, with a filled aperture, unpolarised: weight sin(theta) cos(theta) out to sin(theta) = NA / n of the ambient.
     * With u = sin^2(theta) that weight is constant, so Gauss-Legendre nodes in u serve; {@code nodes} of them.
     *
     * @param numericalAperture NA, from 0 up to below the ambient's index
     * @param ambientIndex      real index of the ambient
     */
    public static View aperture(double numericalAperture, double ambientIndex, int nodes) {
        double edge = numericalAperture / ambientIndex;
        if (!(edge >= 0 && edge < 1)) {
            throw new IllegalArgumentException("the numerical aperture must be 0 to below the ambient's index, not "
                    + numericalAperture);
        }
        String text = edge == 0 ? "straight on" : "numerical aperture " + plain(numericalAperture);
        if (edge == 0) {
            return new View(text, new double[] {0}, new double[] {1}, Polarisation.NONE);
        }
        GaussIntegrator rule = GAUSS.legendre(nodes, 0, edge * edge);
        double[] sine = new double[nodes];
        double[] weight = new double[nodes];
        for (int i = 0; i < nodes; i++) {
            sine[i] = Math.sqrt(rule.getPoint(i));
            weight[i] = rule.getWeight(i) / (edge * edge);
        }
        return new View(text, sine, weight, Polarisation.NONE);
    }

    /**
     * The filled aperture with as many nodes as a stack needs: doubling them changes no reflectance up to the given film
     * thickness by 1e-6 or more (at the thicknesses tried they agree to 1e-7).
     *
     * @param thickestNm the thickest film that will be asked for, nm
     */
    public static View aperture(double numericalAperture, Stack stack, double thickestNm) {
        double ambient = stack.ambient().nAt(550);
        View view = aperture(numericalAperture, ambient, 2);
        for (int nodes = 4; nodes <= 256 && view.sine.length > 1; nodes *= 2) {
            View finer = aperture(numericalAperture, ambient, nodes);
            if (difference(stack, thickestNm, view, finer) < 1e-7) {
                return view;
            }
            view = finer;
        }
        return view;
    }

    private static double difference(Stack stack, double thickestNm, View coarse, View fine) {
        Reflectance a = Reflectance.of(stack, coarse);
        Reflectance b = Reflectance.of(stack, fine);
        double worst = 0;
        for (double share : new double[] {1, 0.97, 0.93, 0.86, 0.77, 0.5}) {
            double[] ra = a.spectrum(share * thickestNm);
            double[] rb = b.spectrum(share * thickestNm);
            for (int i = 0; i < ra.length; i++) {
                worst = Math.max(worst, Math.abs(ra[i] - rb[i]));
            }
        }
        return worst;
    }

    private static String plain(double value) {
        return value == Math.rint(value) ? String.valueOf((long) value) : String.valueOf(value);
    }
}
