package iridepth.optics;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.complex.Complex;

/**
 * Bright and dark thicknesses of a film at one wavelength by order, from the half-wave shifts at its two boundaries.
 *
 * <p>The round trip in the film is 2 n d cos(theta'). With no shift or two, light of wavelength lambda is bright at
 * 2 n d cos(theta') = m lambda and dark at (m + 1/2) lambda; with one shift of the two it is the other way round (textbook
 * rule of thin-film interference; the wavelength inside the film is lambda / n). The rule takes the phase on reflection as
 * exactly 0 or pi; at an absorbing medium it is something between, so every thickness is also given as the extremum of the
 * computed reflectance.
 *
 * @param wavelengthNm vacuum wavelength, nm
 * @param filmIndex    real index of the film at that wavelength
 * @param upperShift   whether reflection at the film's upper boundary shifts by half a wave
 * @param lowerShift   whether reflection at its lower boundary does
 * @param extrema      bright and dark thicknesses, rising
 */
public record Fringes(double wavelengthNm, double filmIndex, boolean upperShift, boolean lowerShift,
                      List<Extremum> extrema) {
    /**
     * One bright or dark thickness.
     *
     * @param order      round trip over wavelength: m or m + 1/2, whichever the rule says
     * @param bright     whether it is bright
     * @param ruleNm     thickness by the rule, nm
     * @param computedNm thickness at which the computed reflectance has its extremum, nm; NaN where there is none nearby
     */
    public record Extremum(double order, boolean bright, double ruleNm, double computedNm) {
    }

    /**
     * Half-wave shift on reflection at the boundary from one medium into another: whether the amplitude of reflection
     * (n1 - N2) / (n1 + N2) lies nearer to -1 than to +1. For transparent media that is n2 above n1; for a metal |N2| above n1.
     */
    public static boolean shifts(Complex from, Complex into) {
        return Reflectance.fresnel(from, into).getReal() < 0;
    }

    /**
     * Fringes of a stack's film.
     *
     * @param stack        a stack with a film
     * @param wavelengthNm vacuum wavelength, 380-780 nm
     * @param incidenceDeg angle of incidence in the ambient
     * @param fromNm       thinnest film listed, nm
     * @param toNm         thickest film listed, nm
     */
    public static Fringes of(Stack stack, double wavelengthNm, double incidenceDeg, double fromNm, double toNm) {
        if (!(wavelengthNm >= 380 && wavelengthNm <= 780)) {
            throw new IllegalArgumentException("the wavelength must be 380 to 780 nm, not " + wavelengthNm);
        }
        List<Material> media = stack.media();
        int film = stack.filmIndex() + 1;
        Complex above = media.get(film - 1).indexAt(wavelengthNm);
        Complex inside = media.get(film).indexAt(wavelengthNm);
        Complex below = media.get(film + 1).indexAt(wavelengthNm);
        boolean upper = shifts(above, inside);
        boolean lower = shifts(inside, below);
        double n = inside.getReal();
        double sine = media.get(0).nAt(wavelengthNm) * Math.sin(Math.toRadians(incidenceDeg)) / n;
        if (sine >= 1) {
            throw new IllegalArgumentException("light at " + incidenceDeg + " degrees does not enter the film: total reflection");
        }
        double half = wavelengthNm / (4 * n * Math.sqrt(1 - sine * sine));
        View view = View.incidence(incidenceDeg, Polarisation.NONE);
        Reflectance reflectance = Reflectance.of(stack, view);
        List<Extremum> extrema = new ArrayList<>();
        for (long j = Math.max(0, (long) Math.ceil(fromNm / half - 1e-9)); j * half <= toNm + 1e-9; j++) {
            boolean whole = j % 2 == 0;
            boolean bright = whole == (upper == lower);
            extrema.add(new Extremum(j / 2.0, bright, j * half, extremum(reflectance, wavelengthNm, j * half, half, bright)));
        }
        return new Fringes(wavelengthNm, n, upper, lower, List.copyOf(extrema));
    }

    /** Extremum of the computed reflectance within half a fringe of the rule's thickness, by scan and parabola. */
    private static double extremum(Reflectance reflectance, double wavelengthNm, double nearNm, double half, boolean bright) {
        int samples = 401;
        double from = Math.max(0, nearNm - half);
        double step = (nearNm + half - from) / (samples - 1);
        double[] r = atWavelength(reflectance, wavelengthNm, from, step, samples);
        int best = 0;
        for (int k = 1; k < samples; k++) {
            if (bright ? r[k] > r[best] : r[k] < r[best]) {
                best = k;
            }
        }
        if (best == samples - 1 || best == 0 && from > 0) {
            return Double.NaN;
        }
        if (best == 0) {
            return 0;
        }
        double bend = r[best - 1] - 2 * r[best] + r[best + 1];
        double shift = bend == 0 ? 0 : 0.5 * (r[best - 1] - r[best + 1]) / bend;
        return from + step * (best + shift);
    }

    private static double[] atWavelength(Reflectance reflectance, double nm, double from, double step, int samples) {
        int below = Math.min((int) (nm - 380), 399);
        double t = nm - 380 - below;
        double[] low = new double[samples];
        double[] high = new double[samples];
        reflectance.sweep(below, from, step, low, null);
        reflectance.sweep(below + 1, from, step, high, null);
        for (int k = 0; k < samples; k++) {
            low[k] += t * (high[k] - low[k]);
        }
        return low;
    }

    /** How many of the two boundaries shift by half a wave: 0, 1 or 2. */
    public int shiftCount() {
        return (upperShift ? 1 : 0) + (lowerShift ? 1 : 0);
    }
}
