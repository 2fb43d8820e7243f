package iridepth.curve;

import iridepth.colour.Adaptation;
import iridepth.colour.Light;
import iridepth.colour.Matrix3;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.spectrum.Grid;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;

/**
 * What each channel of a photograph integrates: E_c(lambda) = light x optics x sensor, so that a surface of reflectance R gives
 * the signal s_c = sum over wavelength of E_c R. Negative lobes are allowed: a colour-managed file has them.
 *
 * @param channels names of the channels, one or more
 * @param response E_c, one spectrum per channel
 */
public record EffectiveResponses(List<String> channels, List<Spectrum> response) {
    /** Keeps copies of the lists; there must be as many names as responses. */
    public EffectiveResponses {
        channels = List.copyOf(channels);
        response = List.copyOf(response);
        if (channels.isEmpty() || channels.size() != response.size()) {
            throw new IllegalArgumentException("as many channel names as responses are needed, at least one, not "
                    + channels.size() + " and " + response.size());
        }
    }

    /**
     * Responses of a sensor of known spectral sensitivities under a light, scaled so that a perfect reflector gives 1.
     *
     * @param channels      names of the channels
     * @param sensitivities spectral sensitivity of each channel, any unit
     * @param light         the light
     */
    public static EffectiveResponses ofSensor(List<String> channels, List<Spectrum> sensitivities, Light light) {
        List<Spectrum> response = new ArrayList<>();
        for (int c = 0; c < sensitivities.size(); c++) {
            Spectrum product = sensitivities.get(c).times(light.power());
            if (!(product.integral() > 0)) {
                throw new IllegalArgumentException("channel " + channels.get(c) + " sees nothing of the light " + light.name());
            }
            response.add(product.times(1 / product.integral()));
        }
        return new EffectiveResponses(channels, response);
    }

    /**
     * Responses of the linear values in a colour-managed file: the CIE 1931 observer under the light, carried from the light's
     * white to the file's white by the Bradford transform (the camera was balanced to the light), then to the file's primaries.
     *
     * @param fromXyz   matrix from XYZ (white at Y = 1) to the file's linear values; 1 x 3 for a grey file
     * @param fileWhite the white that the matrix supposes
     * @param light     the light that the scene was under
     */
    public static EffectiveResponses colourManaged(double[][] fromXyz, Xyz fileWhite, Light light) {
        Observer observer = Observer.CIE_1931;
        double scale = 1 / light.power().dot(observer.y());
        double[][] adaptation = Adaptation.matrix(observer.white(light), fileWhite);
        List<Spectrum> matching = List.of(observer.x(), observer.y(), observer.z());
        List<Spectrum> response = new ArrayList<>();
        for (double[] primary : fromXyz) {
            double[] row = new double[3];
            for (int j = 0; j < 3; j++) {
                for (int i = 0; i < 3; i++) {
                    row[j] += primary[i] * adaptation[i][j];
                }
            }
            Spectrum mixed = matching.get(0).times(row[0]).plus(matching.get(1).times(row[1])).plus(matching.get(2).times(row[2]));
            response.add(mixed.times(light.power()).times(scale));
        }
        return new EffectiveResponses(fromXyz.length == 1 ? List.of("grey") : List.of("red", "green", "blue"), response);
    }

    /** Inverse of a matrix from linear values to XYZ, for {@link #colourManaged}. */
    public static double[][] fromXyz(double[][] toXyz) {
        return Matrix3.inverse(toXyz);
    }

    /**
     * The channels of several photos of one field, each under its own light, as the channels of one.
     *
     * @param parts  responses under each light
     * @param lights what to call the lights; a channel becomes, say, "green, 546 nm"
     */
    public static EffectiveResponses jointly(List<EffectiveResponses> parts, List<String> lights) {
        List<String> names = new ArrayList<>();
        List<Spectrum> all = new ArrayList<>();
        for (int l = 0; l < parts.size(); l++) {
            for (String channel : parts.get(l).channels) {
                names.add(channel + ", " + lights.get(l));
            }
            all.addAll(parts.get(l).response);
        }
        return new EffectiveResponses(names, all);
    }

    /** Number of channels. */
    public int count() {
        return channels.size();
    }

    /**
     * Signal of every channel for a reflectance spectrum.
     *
     * @param reflectance {@link Grid#SIZE} values
     */
    public double[] signal(double[] reflectance) {
        double[] signal = new double[count()];
        for (int c = 0; c < signal.length; c++) {
            for (int i = 0; i < Grid.SIZE; i++) {
                signal[c] += response.get(c).at(i) * reflectance[i];
            }
        }
        return signal;
    }

    /** These responses with each channel multiplied by its factor. */
    public EffectiveResponses scaled(double[] factor) {
        List<Spectrum> result = new ArrayList<>();
        for (int c = 0; c < count(); c++) {
            result.add(response.get(c).times(factor[c]));
        }
        return new EffectiveResponses(channels, result);
    }

    /** These responses scaled so that a surface of the given reflectance spectrum gives 1 in every channel. */
    public EffectiveResponses relativeTo(double[] reflectance) {
        double[] factor = signal(reflectance);
        for (int c = 0; c < factor.length; c++) {
            if (!(Math.abs(factor[c]) > 1e-9)) {
                throw new IllegalArgumentException("channel " + channels.get(c) + " sees no light from the reference surface");
            }
            factor[c] = 1 / factor[c];
        }
        return scaled(factor);
    }
}
