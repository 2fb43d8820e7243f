package iridepth.calibration;

/**
 * The covariance of a {@link SensorPrior} as an operator on vectors of all channels' parameters, [channel][bump, then glare].
 * Its blocks are products of standard deviations with one common matrix of correlations, so it is never formed as a whole.
 */
final class PriorCovariance {
    private final double[][] deviation;
    private final double[][] correlation;
    private final double coupling;

    private PriorCovariance(double[][] deviation, double[][] correlation, double coupling) {
        this.deviation = deviation;
        this.correlation = correlation;
        this.coupling = coupling;
    }

    static PriorCovariance of(SensorPrior prior) {
        double[][] deviation = new double[prior.lobes().length][];
        for (int c = 0; c < deviation.length; c++) {
            deviation[c] = prior.deviations(c);
        }
        return new PriorCovariance(deviation, prior.correlations(), prior.coupling());
    }

    /** The product with a vector. */
    double[][] times(double[][] v) {
        int channels = deviation.length;
        double[][] smooth = new double[channels][];
        for (int c = 0; c < channels; c++) {
            smooth[c] = correlate(scaled(v[c], c));
        }
        double[][] result = new double[channels][Bumps.COUNT + 1];
        for (int c = 0; c < channels; c++) {
            double total = 0;
            for (int k = 0; k < Bumps.COUNT; k++) {
                total += v[c][k];
            }
            for (int k = 0; k < Bumps.COUNT; k++) {
                double sum = 0;
                for (int other = 0; other < channels; other++) {
                    sum += (other == c ? 1 : coupling) * smooth[other][k];
                }
                double loose = SensorPrior.LOOSE * deviation[c][k];
                result[c][k] = deviation[c][k] * sum + loose * loose * v[c][k]
                        + SensorPrior.GAIN * SensorPrior.GAIN * total;
            }
            result[c][Bumps.COUNT] = SensorPrior.GLARE_SPREAD * SensorPrior.GLARE_SPREAD * v[c][Bumps.COUNT];
        }
        return result;
    }

    /**
     * The matrix J P J^T for rows of derivatives that each touch one channel.
     *
     * @param rows [channel][observation][parameter]
     * @return matrix over (channel, observation), channel by channel
     */
    double[][] sandwich(double[][][] rows) {
        int channels = rows.length;
        int count = rows[0].length;
        double[][] scaled = new double[channels * count][];
        double[][] smooth = new double[channels * count][];
        double[] total = new double[channels * count];
        for (int c = 0; c < channels; c++) {
            for (int j = 0; j < count; j++) {
                int at = c * count + j;
                scaled[at] = scaled(rows[c][j], c);
                smooth[at] = correlate(scaled[at]);
                for (int k = 0; k < Bumps.COUNT; k++) {
                    total[at] += rows[c][j][k];
                }
            }
        }
        double[][] result = new double[channels * count][channels * count];
        for (int a = 0; a < result.length; a++) {
            for (int b = 0; b <= a; b++) {
                double sum = dot(scaled[a], smooth[b]);
                if (a / count == b / count) {
                    double glare = SensorPrior.GLARE_SPREAD * SensorPrior.GLARE_SPREAD
                            * rows[a / count][a % count][Bumps.COUNT] * rows[b / count][b % count][Bumps.COUNT];
                    sum += SensorPrior.LOOSE * SensorPrior.LOOSE * dot(scaled[a], scaled[b])
                            + SensorPrior.GAIN * SensorPrior.GAIN * total[a] * total[b] + glare;
                } else {
                    sum *= coupling;
                }
                result[a][b] = sum;
                result[b][a] = sum;
            }
        }
        return result;
    }

    private double[] scaled(double[] v, int c) {
        double[] result = new double[Bumps.COUNT];
        for (int k = 0; k < result.length; k++) {
            result[k] = deviation[c][k] * v[k];
        }
        return result;
    }

    private double[] correlate(double[] v) {
        double[] result = new double[Bumps.COUNT];
        for (int i = 0; i < result.length; i++) {
            result[i] = dot(correlation[i], v);
        }
        return result;
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int k = 0; k < Bumps.COUNT; k++) {
            sum += a[k] * b[k];
        }
        return sum;
    }
}
