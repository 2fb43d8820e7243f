package iridepth.curve;

import iridepth.optics.Material;
import iridepth.optics.Stack;
import iridepth.spectrum.Grid;

/**
 * The film thicknesses to consider.
 *
 * @param fromNm thinnest, nm, 0 or more
 * @param toNm   thickest, nm
 */
public record ThicknessRange(double fromNm, double toNm) {
    /** Samples of a colour curve per finest fringe: cubic interpolation between them is then good to about 1e-6. */
    private static final int SAMPLES_PER_FRINGE = 64;

    /**
     * Checks the range.
     *
     * @throws IllegalArgumentException if it is negative, reversed or empty
     */
    public ThicknessRange {
        if (!(fromNm >= 0 && toNm > fromNm) || Double.isInfinite(toNm)) {
            throw new IllegalArgumentException("the thickness range must rise from 0 nm or more, not run from " + fromNm
                    + " to " + toNm + " nm");
        }
    }

    /**
     * Reads {@code FROM:TO} in nm.
     *
     * @throws IllegalArgumentException if it is no such range
     */
    public static ThicknessRange parse(String text) {
        String[] ends = text.split(":", -1);
        try {
            if (ends.length == 2) {
                return new ThicknessRange(Double.parseDouble(ends[0].strip()), Double.parseDouble(ends[1].strip()));
            }
        } catch (NumberFormatException e) {
            // falls through to the message below
        }
        throw new IllegalArgumentException("range '" + text + "': write it in nm as FROM:TO, such as 0:500");
    }

    /**
     * Checks that the wavelength grid resolves the fringes of the thickest film: from one grid wavelength to the next the
     * round trip may change by a quarter of a wave at most at 400 nm.
     *
     * @throws IllegalArgumentException if the film is too thick for that; the message says how thick it may be
     */
    public void requireResolved(Stack stack) {
        double limit = 0.25 * 400 * 400 / (2 * largestIndex(stack.film()));
        if (toNm > limit) {
            throw new IllegalArgumentException(String.format("a film of %s up to %.0f nm has fringes finer than the 1 nm "
                    + "wavelength grid; keep the range below %.0f nm", stack.film().name(), toNm, Math.floor(limit)));
        }
    }

    /** Spacing of a colour curve's samples in nm: 1/64 of the finest fringe, shortest wavelength over twice the index. */
    public double step(Stack stack) {
        double finest = Grid.FIRST_NM / (2 * largestIndex(stack.film()) * SAMPLES_PER_FRINGE);
        return (toNm - fromNm) / Math.ceil((toNm - fromNm) / finest);
    }

    private static double largestIndex(Material film) {
        double largest = 0;
        for (int i = 0; i < Grid.SIZE; i++) {
            largest = Math.max(largest, film.n().at(i));
        }
        return largest;
    }
}
