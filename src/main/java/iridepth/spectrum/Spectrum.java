package iridepth.spectrum;

import java.util.Arrays;
import java.util.function.DoubleBinaryOperator;
import java.util.function.DoubleUnaryOperator;

/**
 * A function of wavelength sampled on the {@link Grid}. Immutable.
 *
 * <p>The unit is that of whatever it describes: relative power of a light, sensitivity of a sensor, reflectance.
 */
public final class Spectrum {
    private final double[] values;

    private Spectrum(double[] values) {
        this.values = values;
    }

    /**
     * A spectrum of given samples.
     *
     * @param values one value per grid wavelength; copied
     * @throws IllegalArgumentException if there are not {@link Grid#SIZE} values or one is not finite
     */
    public static Spectrum of(double[] values) {
        if (values.length != Grid.SIZE) {
            throw new IllegalArgumentException("a spectrum has " + Grid.SIZE + " samples, not " + values.length);
        }
        for (int i = 0; i < values.length; i++) {
            if (!Double.isFinite(values[i])) {
                throw new IllegalArgumentException("the spectrum has no finite value at " + Grid.wavelength(i) + " nm");
            }
        }
        return new Spectrum(values.clone());
    }

    /**
     * A spectrum that samples a function.
     *
     * @param ofWavelength the value at a wavelength in nm
     */
    public static Spectrum sample(DoubleUnaryOperator ofWavelength) {
        double[] values = new double[Grid.SIZE];
        Arrays.setAll(values, i -> ofWavelength.applyAsDouble(Grid.wavelength(i)));
        return of(values);
    }

    /** The sample at a grid index. */
    public double at(int index) {
        return values[index];
    }

    /** A copy of the samples, {@link Grid#SIZE} of them. */
    public double[] toArray() {
        return values.clone();
    }

    /** Sum over the grid, which stands for the integral over wavelength in nm. */
    public double integral() {
        double sum = 0;
        for (double v : values) {
            sum += v;
        }
        return sum;
    }

    /** Sum over the grid of the product with another spectrum. */
    public double dot(Spectrum other) {
        double sum = 0;
        for (int i = 0; i < values.length; i++) {
            sum += values[i] * other.values[i];
        }
        return sum;
    }

    /** The product with another spectrum, sample by sample. */
    public Spectrum times(Spectrum other) {
        return combine(other, (a, b) -> a * b);
    }

    /** The sum with another spectrum, sample by sample. */
    public Spectrum plus(Spectrum other) {
        return combine(other, Double::sum);
    }

    /** This spectrum times a number. */
    public Spectrum times(double factor) {
        double[] result = values.clone();
        for (int i = 0; i < result.length; i++) {
            result[i] *= factor;
        }
        return new Spectrum(result);
    }

    private Spectrum combine(Spectrum other, DoubleBinaryOperator op) {
        double[] result = new double[values.length];
        Arrays.setAll(result, i -> op.applyAsDouble(values[i], other.values[i]));
        return new Spectrum(result);
    }
}
