package iridepth.simulation;

import org.apache.commons.math3.complex.Complex;

/**
 * Reflectance of a multilayer by Rouard's recursion. From the substrate upwards each layer of thickness d is replaced by
 * one boundary of reflection r = (f + r' e) / (1 + f r' e), with f the Fresnel coefficient of the layer's upper
 * boundary, r' that of all below, e = exp(2 i k q d), q = N cos(angle) and k = 2 pi / wavelength. See M. P. Rouard, Ann.
 * Phys. 11(7), 291 (1937), and O. S. Heavens, Optical Properties of Thin Solid Films (1955), section 4.4.
 */
public final class Rouard {
    private final Complex[] index;
    private final Complex[] q;
    private final boolean parallel;
    private final double wavenumber;
    private double re;
    private double im;

    private Rouard(Complex[] index, double wavelength, double sine, boolean parallel) {
        this.index = index;
        this.parallel = parallel;
        wavenumber = 2 * Math.PI / wavelength;
        q = new Complex[index.length];
        Complex transverse = index[0].multiply(sine);
        for (int j = 0; j < index.length; j++) {
            // the root that decays along the light's path
            Complex root = index[j].multiply(index[j]).subtract(transverse.multiply(transverse)).sqrt();
            q[j] = root.getImaginary() < 0 ? root.negate() : root;
        }
    }

    /** Fresnel's amplitude coefficient of the boundary between part j and part j + 1. */
    private Complex fresnel(int j) {
        Complex here = q[j];
        Complex beyond = q[j + 1];
        if (parallel) {
            here = here.multiply(index[j + 1]).multiply(index[j + 1]);
            beyond = beyond.multiply(index[j]).multiply(index[j]);
        }
        return here.subtract(beyond).divide(here.add(beyond));
    }

    private Complex phase(int j, double thickness) {
        return q[j].multiply(new Complex(0, 2 * wavenumber * thickness)).exp();
    }

    /** Puts the boundary f above the layer of round-trip phase e over what was reached so far. */
    private void climb(double fRe, double fIm, double eRe, double eIm) {
        double pRe = re * eRe - im * eIm;
        double pIm = re * eIm + im * eRe;
        double aRe = fRe + pRe;
        double aIm = fIm + pIm;
        double bRe = 1 + fRe * pRe - fIm * pIm;
        double bIm = fRe * pIm + fIm * pRe;
        double norm = bRe * bRe + bIm * bIm;
        re = (aRe * bRe + aIm * bIm) / norm;
        im = (aIm * bRe - aRe * bIm) / norm;
    }

    /**
     * Reflectance of one thickness of the film.
     *
     * @param stack what reflects
     * @param thickness nm of the film; ignored where the stack has none
     * @param wavelength nm
     * @param sine sine of the angle of incidence in the ambient
     * @param parallel true for p, false for s
     */
    public static double reflectance(FilmStack stack, double thickness, double wavelength, double sine,
            boolean parallel) {
        double[] sum = new double[1];
        sweep(stack, stack.indices(wavelength), thickness, 1, wavelength, sine, parallel, 1, sum);
        return sum[0];
    }

    /**
     * Adds weight times the reflectance of the film thicknesses from, from + step, .. to the sums.
     *
     * @param index the stack's indices at the wavelength
     * @param sum one cell per thickness
     */
    static void sweep(FilmStack stack, Complex[] index, double from, double step, double wavelength, double sine,
            boolean parallel, double weight, double[] sum) {
        Rouard rouard = new Rouard(index, wavelength, sine, parallel);
        int film = stack.film();
        int parts = rouard.q.length;
        Complex[] f = new Complex[parts - 1];
        Complex[] e = new Complex[parts];
        for (int j = 0; j < parts - 1; j++) {
            f[j] = rouard.fresnel(j);
            e[j] = j == 0 ? Complex.ONE : rouard.phase(j, j == film ? from : stack.thickness().get(j));
        }
        Complex below = f[parts - 2];
        rouard.start(below);
        for (int j = parts - 2; j > Math.max(film, 0); j--) {
            rouard.climb(f[j - 1].getReal(), f[j - 1].getImaginary(), e[j].getReal(), e[j].getImaginary());
        }
        if (film < 0) {
            for (int i = 0; i < sum.length; i++) {
                sum[i] += weight * rouard.power();
            }
            return;
        }
        Complex underFilm = new Complex(rouard.re, rouard.im);
        Complex growth = rouard.phase(film, step);
        double eRe = e[film].getReal();
        double eIm = e[film].getImaginary();
        for (int i = 0; i < sum.length; i++) {
            rouard.start(underFilm);
            rouard.climb(f[film - 1].getReal(), f[film - 1].getImaginary(), eRe, eIm);
            for (int j = film - 1; j > 0; j--) {
                rouard.climb(f[j - 1].getReal(), f[j - 1].getImaginary(), e[j].getReal(), e[j].getImaginary());
            }
            sum[i] += weight * rouard.power();
            double next = eRe * growth.getReal() - eIm * growth.getImaginary();
            eIm = eRe * growth.getImaginary() + eIm * growth.getReal();
            eRe = next;
        }
    }

    private void start(Complex reflection) {
        re = reflection.getReal();
        im = reflection.getImaginary();
    }

    private double power() {
        return re * re + im * im;
    }
}
