package iridepth.calibration;

import iridepth.optics.Material;
import iridepth.optics.Stack;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;

/**
 * How the film's index differs from the stated one: n(lambda) = factor n_stated(lambda) + a + b / lambda^2, lambda in um. A film
 * by Cauchy's formula stays one.
 *
 * @param factor dimensionless
 * @param a      dimensionless
 * @param b      um^2
 */
public record IndexChange(double factor, double a, double b) {
    /** No change. */
    public static final IndexChange NONE = new IndexChange(1, 0, 0);
    private static final double NM_PER_UM = 1000;

    /** A stack whose film has the changed index. */
    public Stack apply(Stack stack) {
        if (equals(NONE)) {
            return stack;
        }
        Material film = stack.film();
        double[] n = film.n().toArray();
        for (int i = 0; i < n.length; i++) {
            double um = Grid.wavelength(i) / NM_PER_UM;
            n[i] = factor * n[i] + a + b / (um * um);
        }
        return stack.withFilm(new Material(film.name(), film.description(), film.source(), Spectrum.of(n), film.k(), film.firstNm(),
                film.lastNm()));
    }

    /** This change with another factor on top. */
    IndexChange times(double more) {
        return new IndexChange(factor * more, a, b);
    }

    /** This change and some more of a and b. */
    IndexChange plus(double moreA, double moreB) {
        return new IndexChange(factor, a + moreA, b + moreB);
    }
}
