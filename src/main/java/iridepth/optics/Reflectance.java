package iridepth.optics;

import iridepth.spectrum.Grid;
import java.util.List;
import java.util.stream.IntStream;
import org.apache.commons.math3.complex.Complex;

/**
 * Reflectance of a stack as a function of its film's thickness, at every grid wavelength, over a {@link View}.
 *
 * <p>Characteristic matrices link the forward and backward waves on both sides of a boundary, M = [[1, r], [r, 1]] with
 * Fresnel's r from tilted admittances (N cos(theta) for s, N / cos(theta) for p), and on both sides of a layer,
 * [[1, 0], [0, z]] with z = exp(2 i beta), beta = 2 pi N d cos(theta) / lambda, the common factor exp(-i beta) left out because
 * only ratios count, which keeps thick absorbing layers finite. All but the film's z is fixed, so the amplitude is a Moebius
 * function of it, r(d) = (a + b z) / (1 + e z): three complex numbers per wavelength, direction and polarisation.
 * See H. A. Macleod, Thin-Film Optical Filters, chapter 2.
 */
public final class Reflectance {
    /** For each node: re and im of a, b, e, of the film's 2 pi N cos(theta) / lambda times 2i, and the weight. */
    private static final int FIELDS = 9;
    private final double[][] nodes;

    private Reflectance(double[][] nodes) {
        this.nodes = nodes;
    }

    /**
     * Prepares a stack. A stack without a film is the same at every thickness.
     *
     * @param stack what reflects
     * @param view  the directions
     */
    public static Reflectance of(Stack stack, View view) {
        double[][] nodes = new double[Grid.SIZE][];
        List<Polarisation> both = view.polarisation() == Polarisation.NONE ? List.of(Polarisation.S, Polarisation.P)
                : List.of(view.polarisation());
        boolean normalOnly = view.sine().length == 1 && view.sine()[0] == 0;
        List<Polarisation> kinds = normalOnly ? List.of(Polarisation.S) : both;
        Complex[][] index = indices(stack);
        IntStream.range(0, Grid.SIZE).parallel().forEach(i -> {
            double[] row = new double[FIELDS * view.sine().length * kinds.size()];
            int at = 0;
            for (int q = 0; q < view.sine().length; q++) {
                for (Polarisation kind : kinds) {
                    prepare(stack, index[i], i, view.sine()[q], kind, view.weight()[q] / kinds.size(), row, at);
                    at += FIELDS;
                }
            }
            nodes[i] = row;
        });
        return new Reflectance(nodes);
    }

    private static Complex[][] indices(Stack stack) {
        List<Material> media = stack.media();
        Complex[][] index = new Complex[Grid.SIZE][media.size()];
        for (int i = 0; i < Grid.SIZE; i++) {
            for (int m = 0; m < media.size(); m++) {
                index[i][m] = m == 0 ? new Complex(media.get(0).n().at(i)) : media.get(m).index(i);
            }
        }
        return index;
    }

    private static void prepare(Stack stack, Complex[] index, int i, double sine, Polarisation kind, double weight,
                                double[] row, int at) {
        int last = index.length - 1;
        Complex[] cosine = new Complex[index.length];
        Complex[] admittance = new Complex[index.length];
        for (int m = 0; m <= last; m++) {
            cosine[m] = cosine(index[m], index[0].getReal() * sine);
            admittance[m] = kind == Polarisation.S ? index[m].multiply(cosine[m]) : index[m].divide(cosine[m]);
        }
        int film = stack.hasFilm() ? stack.filmIndex() + 1 : last;
        double wave = 2 * Math.PI / Grid.wavelength(i);
        // Amplitude seen from the film's lower boundary downwards, layer by layer from the substrate.
        Complex below = Complex.ZERO;
        for (int m = last; m > film; m--) {
            Complex r = fresnel(admittance[m - 1], admittance[m]);
            Complex seen = m == last ? Complex.ZERO : below.multiply(phase(wave, index[m], cosine[m],
                    stack.layers().get(m - 1).thicknessNm()));
            below = r.add(seen).divide(Complex.ONE.add(r.multiply(seen)));
        }
        // Matrix from the ambient to the top of the film.
        Complex t11 = Complex.ONE;
        Complex t12 = Complex.ZERO;
        Complex t21 = Complex.ZERO;
        Complex t22 = Complex.ONE;
        for (int m = 1; m <= film; m++) {
            Complex r = fresnel(admittance[m - 1], admittance[m]);
            Complex z = m == film ? Complex.ONE : phase(wave, index[m], cosine[m], stack.layers().get(m - 1).thicknessNm());
            Complex n12 = t11.multiply(r).add(t12).multiply(z);
            Complex n22 = t21.multiply(r).add(t22).multiply(z);
            t11 = t11.add(t12.multiply(r));
            t21 = t21.add(t22.multiply(r));
            t12 = n12;
            t22 = n22;
        }
        put(row, at, t21.divide(t11));
        put(row, at + 2, t22.multiply(below).divide(t11));
        put(row, at + 4, t12.multiply(below).divide(t11));
        put(row, at + 6, index[film].multiply(cosine[film]).multiply(new Complex(0, 2 * wave)));
        row[at + 8] = weight;
    }

    private static void put(double[] row, int at, Complex value) {
        row[at] = value.getReal();
        row[at + 1] = value.getImaginary();
    }

    /** Cosine of the refracted angle, on the branch whose wave decays or travels away from the light. */
    private static Complex cosine(Complex index, double tangential) {
        Complex s = new Complex(tangential).divide(index);
        Complex c = Complex.ONE.subtract(s.multiply(s)).sqrt();
        Complex normal = index.multiply(c);
        boolean backward = normal.getImaginary() < 0 || normal.getImaginary() == 0 && normal.getReal() < 0;
        return backward ? c.negate() : c;
    }

    /**
     * Fresnel's amplitude of reflection between two media given by their admittances.
     *
     * @param from admittance of the medium that the light comes from
     * @param into admittance of the medium that it meets
     * @return amplitude, (from - into) / (from + into)
     */
    static Complex fresnel(Complex from, Complex into) {
        return from.subtract(into).divide(from.add(into));
    }

    private static Complex phase(double wave, Complex index, Complex cosine, double thicknessNm) {
        return index.multiply(cosine).multiply(new Complex(0, 2 * wave * thicknessNm)).exp();
    }

    /**
     * Reflectance at one grid wavelength for films of evenly spaced thickness.
     *
     * @param i          grid index of the wavelength
     * @param fromNm     first thickness, nm
     * @param stepNm     spacing, nm
     * @param r          receives the reflectance, one value per thickness
     * @param derivative receives dR/dd in 1/nm, as long as {@code r}; may be null
     */
    public void sweep(int i, double fromNm, double stepNm, double[] r, double[] derivative) {
        java.util.Arrays.fill(r, 0);
        if (derivative != null) {
            java.util.Arrays.fill(derivative, 0);
        }
        double[] node = nodes[i];
        for (int at = 0; at < node.length; at += FIELDS) {
            double gr = node[at + 6];
            double gi = node[at + 7];
            double growth = Math.exp(gr * stepNm);
            double sr = growth * Math.cos(gi * stepNm);
            double si = growth * Math.sin(gi * stepNm);
            double start = Math.exp(gr * fromNm);
            double zr = start * Math.cos(gi * fromNm);
            double zi = start * Math.sin(gi * fromNm);
            for (int k = 0; k < r.length; k++) {
                add(node, at, zr, zi, k, r, derivative);
                double next = zr * sr - zi * si;
                zi = zr * si + zi * sr;
                zr = next;
            }
        }
    }

    private static void add(double[] node, int at, double zr, double zi, int k, double[] r, double[] derivative) {
        double ur = node[at] + node[at + 2] * zr - node[at + 3] * zi;
        double ui = node[at + 1] + node[at + 2] * zi + node[at + 3] * zr;
        double vr = 1 + node[at + 4] * zr - node[at + 5] * zi;
        double vi = node[at + 4] * zi + node[at + 5] * zr;
        double scale = 1 / (vr * vr + vi * vi);
        double weight = node[at + 8];
        double power = (ur * ur + ui * ui) * scale;
        r[k] += weight * power;
        if (derivative == null) {
            return;
        }
        // d|u/v|^2 = 2 (Re(conj(u) du) - |u/v|^2 Re(conj(v) dv)) / |v|^2 with dz/dd = g z.
        double hr = node[at + 6] * zr - node[at + 7] * zi;
        double hi = node[at + 6] * zi + node[at + 7] * zr;
        double dur = node[at + 2] * hr - node[at + 3] * hi;
        double dui = node[at + 2] * hi + node[at + 3] * hr;
        double dvr = node[at + 4] * hr - node[at + 5] * hi;
        double dvi = node[at + 4] * hi + node[at + 5] * hr;
        derivative[k] += 2 * weight * scale * (ur * dur + ui * dui - power * (vr * dvr + vi * dvi));
    }

    /**
     * Reflectance spectrum at one thickness.
     *
     * @param thicknessNm film thickness in nm; of no effect for a stack without a film
     * @return {@link Grid#SIZE} values, 0 to 1
     */
    public double[] spectrum(double thicknessNm) {
        double[] result = new double[Grid.SIZE];
        double[] one = new double[1];
        for (int i = 0; i < Grid.SIZE; i++) {
            sweep(i, thicknessNm, 1, one, null);
            result[i] = one[0];
        }
        return result;
    }
}
