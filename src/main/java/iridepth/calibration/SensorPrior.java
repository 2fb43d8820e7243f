package iridepth.calibration;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * What is believed of a sensor before anything is measured: the logarithm of each weight is normal around that of a generic
 * lobe, ln w ~ N(ln(lobe + floor) + ln gain, core + skirt (1 - lobe)), correlated over wavelength by a Gaussian of the given
 * length (the smoothness penalty) and from channel to channel by the coupling, since filters and lamp are common to all.
 *
 * <p>The logarithm keeps every weight above 0 and lets the skirts of a lobe, where nothing is known, vary by factors while
 * its core varies by parts. Gain and glare are log-normal too.
 *
 * @param lobes    generic lobe of each channel at the bumps, 0 to 1
 * @param core     standard deviation of ln w where the lobe is 1
 * @param skirt    what is added to it where the lobe is 0
 * @param lengthNm correlation length, nm
 * @param coupling correlation between channels
 */
record SensorPrior(double[][] lobes, double core, double skirt, double lengthNm, double coupling) {
    /** A sensor's response outside its lobes, as a fraction of the peak. */
    static final double FLOOR = 0.001;
    /** Standard deviation of ln gain around the gain that fits the generic lobe. */
    static final double GAIN = 0.5;
    /** Median and logarithmic standard deviation of glare, as a fraction of the typical signal. */
    static final double GLARE = 0.015;
    static final double GLARE_SPREAD = 1.2;
    /** Part of the deviations that is free from bump to bump, which keeps the matrices well conditioned. */
    static final double LOOSE = 0.01;

    /** A Gaussian lobe on a pedestal at the bumps, with peak 1. */
    static double[] lobe(double centreNm, double widthNm, double pedestal) {
        double[] lobe = new double[Bumps.COUNT];
        for (int k = 0; k < lobe.length; k++) {
            double u = (Bumps.centre(k) - centreNm) / widthNm;
            lobe[k] = (Math.exp(-u * u / 2) + pedestal) / (1 + pedestal);
        }
        return lobe;
    }

    /**
     * Generic lobes to choose from: centres across the visible, narrow and wide, of clean filters and of leaky ones; and one
     * that is level.
     */
    static List<double[]> generic() {
        List<double[]> lobes = new ArrayList<>();
        lobes.add(level());
        for (double centre = 400; centre <= 720; centre += 20) {
            for (double width : new double[] {25, 40}) {
                for (double pedestal : new double[] {0, 0.02}) {
                    lobes.add(lobe(centre, width, pedestal));
                }
            }
        }
        return lobes;
    }

    /** The level lobe: the carrier as it is. */
    static double[] level() {
        double[] lobe = new double[Bumps.COUNT];
        Arrays.fill(lobe, 1);
        return lobe;
    }

    /** The same prior for one channel alone. */
    SensorPrior channel(int c) {
        return new SensorPrior(new double[][] {lobes[c]}, core, skirt, lengthNm, coupling);
    }

    /** This prior with other spreads and length. */
    SensorPrior with(double newCore, double newSkirt, double newLength) {
        return new SensorPrior(lobes, newCore, newSkirt, newLength, coupling);
    }

    /** Standard deviations of ln w. */
    double[] deviations(int c) {
        double[] result = new double[Bumps.COUNT];
        for (int k = 0; k < result.length; k++) {
            result[k] = core + skirt * (1 - lobes[c][k]);
        }
        return result;
    }

    /** Correlations of ln w between bumps, without their loose part. */
    double[][] correlations() {
        double[][] result = new double[Bumps.COUNT][Bumps.COUNT];
        for (int i = 0; i < Bumps.COUNT; i++) {
            for (int j = 0; j < Bumps.COUNT; j++) {
                double u = (i - j) * Bumps.SPACING_NM / lengthNm;
                result[i][j] = Math.exp(-u * u / 2);
            }
        }
        return result;
    }

    /** Mean of the logarithms of the weights and, last, of the glare, with the gain that fits the lobe to the signals. */
    double[] mean(int c, double[][] design, double[] signal) {
        double[] shape = new double[Bumps.COUNT];
        for (int k = 0; k < shape.length; k++) {
            shape[k] = (lobes[c][k] + FLOOR) / (1 + FLOOR);
        }
        double across = 0;
        double own = 0;
        double typical = 0;
        for (int j = 0; j < signal.length; j++) {
            double model = 0;
            for (int k = 0; k < shape.length; k++) {
                model += design[j][k] * shape[k];
            }
            across += model * signal[j];
            own += model * model;
            typical += Math.abs(signal[j]) / signal.length;
        }
        double gain = across > 0 ? across / own : typical / Math.sqrt(own / signal.length);
        double[] mean = new double[Bumps.COUNT + 1];
        for (int k = 0; k < shape.length; k++) {
            mean[k] = Math.log(gain * shape[k]);
        }
        mean[Bumps.COUNT] = Math.log(GLARE * typical);
        return mean;
    }
}
