package iridepth.simulation;

/**
 * The directions from which the light comes: a filled aperture of unpolarised light, or one angle of incidence.
 *
 * @param sine sines of the angles in the ambient
 * @param weight weight of each angle; they sum to 1
 * @param s share of the light polarised across the plane of incidence; the rest is polarised in it
 * @param statement the lines that say this in a recipe
 */
public record View(double[] sine, double[] weight, double s, String statement) {
    private static final int ANGLES = 96;

    /**
     * A filled aperture: midpoint rule in the angle with weight sin(angle) cos(angle). With the 96 angles of this method
     * the signals of {@link Rigs} are within 2e-6 of those with many more.
     *
     * @param numericalAperture sine of the largest angle in the ambient, as the reference tables have it also for
     *     water; 0 for normal incidence
     */
    public static View aperture(double numericalAperture) {
        return aperture(numericalAperture, ANGLES);
    }

    /** The same with a stated number of angles. */
    public static View aperture(double numericalAperture, int angles) {
        String statement = "numerical_aperture = " + numericalAperture;
        if (numericalAperture == 0) {
            return new View(new double[] {0}, new double[] {1}, 0.5, statement);
        }
        double last = Math.asin(numericalAperture);
        double[] sine = new double[angles];
        double[] weight = new double[angles];
        double total = 0;
        for (int i = 0; i < angles; i++) {
            double angle = (i + 0.5) * last / angles;
            sine[i] = Math.sin(angle);
            weight[i] = sine[i] * Math.cos(angle);
            total += weight[i];
        }
        for (int i = 0; i < angles; i++) {
            weight[i] /= total;
        }
        return new View(sine, weight, 0.5, statement);
    }

    /**
     * One angle of incidence.
     *
     * @param degrees in the ambient
     * @param polarisation {@code none}, {@code s} or {@code p}
     */
    public static View incidence(double degrees, String polarisation) {
        double s = switch (polarisation) {
            case "none" -> 0.5;
            case "s" -> 1;
            case "p" -> 0;
            default -> throw new IllegalArgumentException("polarisation is none, s or p, not " + polarisation);
        };
        String statement = "incidence_deg = " + degrees + "\npolarisation = \"" + polarisation + "\"";
        return new View(new double[] {Math.sin(Math.toRadians(degrees))}, new double[] {1}, s, statement);
    }
}
