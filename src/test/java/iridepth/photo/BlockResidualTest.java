package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Random;
import org.junit.jupiter.api.Test;

class BlockResidualTest {

    @Test
    void cubicSurfacesLeaveNothing() {
        BlockResidual residual = new BlockResidual(6, 2);
        double[] block = new double[36];
        for (int i = 0; i < 36; i++) {
            double x = i % 6;
            double y = i / 6;
            block[i] = 3 - x + 0.2 * y + 0.7 * x * x - 0.1 * x * y + y * y + 0.3 * x * x * x - 0.2 * x * y * y;
        }
        residual.apply(block);
        for (double left : block) {
            assertEquals(0, left, 1e-11);
        }
    }

    @Test
    void whiteNoiseKeepsItsVarianceByDegreesOfFreedom() {
        BlockResidual residual = new BlockResidual(6, 2);
        assertEquals(26, residual.freedom());
        Random random = new Random(1);
        double squares = 0;
        int blocks = 4000;
        for (int b = 0; b < blocks; b++) {
            double[] block = random.doubles(36).map(u -> random.nextGaussian()).toArray();
            residual.apply(block);
            for (double left : block) {
                squares += left * left / residual.freedom() / blocks;
            }
        }
        assertEquals(1, squares, 4 * Math.sqrt(2.0 / (26 * blocks)));
    }

    /** A moving mean of 2 x 1 pixels has covariances 1/2 at distance 0 and 1/4 at distance 1 along x, and none else. */
    @Test
    void covarianceOfMixedNeighboursIsRecovered() {
        BlockResidual residual = new BlockResidual(6, 2);
        Random random = new Random(2);
        int blocks = 20000;
        float[] sums = new float[residual.distances()];
        double[] mean = new double[sums.length];
        for (int b = 0; b < blocks; b++) {
            double[] block = new double[36];
            for (int y = 0; y < 6; y++) {
                double last = random.nextGaussian();
                for (int x = 0; x < 6; x++) {
                    double next = random.nextGaussian();
                    block[6 * y + x] = 0.5 * (last + next);
                    last = next;
                }
            }
            residual.apply(block);
            java.util.Arrays.fill(sums, 0);
            residual.addProducts(block, sums, 0);
            for (int k = 0; k < sums.length; k++) {
                mean[k] += sums[k] / blocks;
            }
        }
        double[] covariances = residual.covariances(mean);
        double[] expected = {0.5, 0.25, 0, 0, 0, 0, 0, 0, 0};
        for (int k = 0; k < expected.length; k++) {
            assertEquals(expected[k], covariances[k], 0.015, "distance " + k % 3 + ", " + k / 3);
        }
    }
}
