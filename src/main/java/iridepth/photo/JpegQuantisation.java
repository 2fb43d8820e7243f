package iridepth.photo;

import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.distribution.NormalDistribution;

/**
 * The steps to which a JPEG file rounds its cosine coefficients (ITU-T T.81 annex A.3.4), and the error of the counts that
 * follows from them. The error hides from any look at neighbouring pixels, since it is spread over a block of 8 x 8, and
 * since coefficients rounded to zero leave the picture smooth.
 *
 * @param components luminance, and for colour the two chrominances
 */
record JpegQuantisation(List<Component> components) {

    /**
     * @param steps rounding steps by row and column of the coefficient, 64 of them
     * @param across pixels of the photo a sample spans across
     * @param down the same down
     */
    record Component(int[] steps, int across, int down) {
    }

    private static final int SIDE = 8;
    private static final int BLOCK = SIDE * SIDE;
    /** Errors of coefficients of larger row plus column show in the differences of neighbours, and are counted there. */
    private static final int SLOWEST = 4;
    /** Coefficients that are other than zero less often carry nothing. */
    private static final double IDLE = 1e-3;
    private static final double[][] COSINES = cosines();
    /** Squared weights of Y, Cb and Cr in red, green and blue, ITU-T T.871 section 7. */
    private static final double[][] WEIGHTS = {
        {1, 0, 1.402 * 1.402}, {1, 0.344136 * 0.344136, 0.714136 * 0.714136}, {1, 1.772 * 1.772, 0}};

    private static double[][] cosines() {
        double[][] cosines = new double[SIDE][SIDE];
        for (int k = 0; k < SIDE; k++) {
            for (int x = 0; x < SIDE; x++) {
                cosines[k][x] = Math.sqrt(k == 0 ? 0.125 : 0.25) * Math.cos((2 * x + 1) * k * Math.PI / 16);
            }
        }
        return cosines;
    }

    /**
     * Variance of the counts by the rounding of coefficients. Of each coefficient, how often it is not zero tells its
     * scatter, taken as normal; the error is that scatter squared where it is small, else step^2 / 12. Only the slow
     * coefficients count here.
     *
     * @param bands rows of the decoded photo that begin at a multiple of 16
     * @return per channel, in squared counts
     */
    double[] variance(List<Frame> bands) {
        double[] ofComponent = new double[components.size()];
        Arrays.setAll(ofComponent, i -> variance(bands, i));
        if (ofComponent.length == 1) {
            return ofComponent;
        }
        double[] ofChannel = new double[WEIGHTS.length];
        Arrays.setAll(ofChannel, c -> WEIGHTS[c][0] * ofComponent[0] + WEIGHTS[c][1] * ofComponent[1]
                + WEIGHTS[c][2] * ofComponent[2]);
        return ofChannel;
    }

    private double variance(List<Frame> bands, int index) {
        Component component = components.get(index);
        int[] busy = new int[BLOCK];
        int blocks = 0;
        double[] samples = new double[BLOCK];
        for (Frame band : bands) {
            for (int y = 0; y + SIDE * component.down <= band.height(); y += SIDE * component.down) {
                for (int x = 0; x + SIDE * component.across <= band.width(); x += SIDE * component.across) {
                    sample(band, x, y, index, samples);
                    countBusy(transform(samples), component.steps, busy);
                    blocks++;
                }
            }
        }
        double sum = 0;
        NormalDistribution normal = new NormalDistribution(null, 0, 1);
        for (int k = 0; k < BLOCK && blocks > 0; k++) {
            double fraction = Math.min(1 - 1e-9, (double) busy[k] / blocks);
            double step = component.steps[k];
            if (k / SIDE + k % SIDE <= SLOWEST && fraction > IDLE) {
                double scatter = step / 2 / normal.inverseCumulativeProbability(1 - fraction / 2);
                sum += Math.min(scatter * scatter, step * step / 12);
            }
        }
        return sum / BLOCK;
    }

    private static void countBusy(double[] coefficients, int[] steps, int[] busy) {
        for (int k = 0; k < BLOCK; k++) {
            if (Math.abs(coefficients[k]) > 0.5 * steps[k]) {
                busy[k]++;
            }
        }
    }

    /** Samples of a component in a block, about mid-scale: means over the pixels that each spans. */
    private void sample(Frame band, int left, int top, int index, double[] samples) {
        Component component = components.get(index);
        for (int i = 0; i < BLOCK; i++) {
            double sum = 0;
            for (int v = 0; v < component.down; v++) {
                for (int u = 0; u < component.across; u++) {
                    sum += value(band, left + i % SIDE * component.across + u, top + i / SIDE * component.down + v, index);
                }
            }
            samples[i] = sum / (component.across * component.down);
        }
    }

    /** Y, Cb or Cr of a pixel about mid-scale, ITU-T T.871 section 7. */
    private double value(Frame band, int x, int y, int index) {
        if (components.size() == 1) {
            return band.count(x, y, 0) - 128;
        }
        double r = band.count(x, y, 0);
        double g = band.count(x, y, 1);
        double b = band.count(x, y, 2);
        double luminance = 0.299 * r + 0.587 * g + 0.114 * b;
        return index == 0 ? luminance - 128 : index == 1 ? (b - luminance) / 1.772 : (r - luminance) / 1.402;
    }

    private static double[] transform(double[] samples) {
        double[] rows = new double[BLOCK];
        double[] both = new double[BLOCK];
        for (int i = 0; i < BLOCK; i++) {
            for (int x = 0; x < SIDE; x++) {
                rows[i] += COSINES[i % SIDE][x] * samples[i / SIDE * SIDE + x];
            }
        }
        for (int i = 0; i < BLOCK; i++) {
            for (int y = 0; y < SIDE; y++) {
                both[i] += COSINES[i / SIDE][y] * rows[y * SIDE + i % SIDE];
            }
        }
        return both;
    }
}
