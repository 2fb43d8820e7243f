package iridepth.photo;

import java.nio.file.Path;
import java.util.Random;

/** A simulated camera: photon and read noise by normal deviates, then encoding and rounding to counts. */
record Camera(double fullWell, double readNoise, double pedestal, int bits, boolean srgb, long seed) {

    /** Linear light of a scene at a pixel. */
    interface Scene {
        double at(int x, int y, int channel);
    }

    static Camera linear(double fullWell, double readNoise, long seed) {
        return new Camera(fullWell, readNoise, 0, 16, false, seed);
    }

    Encoding encoding() {
        return srgb ? Encoding.srgb(bits) : Encoding.linear((1 << bits) - 1);
    }

    /** Standard deviation of a pixel without rounding, a linear fraction. */
    double sigma(double light) {
        return Math.sqrt(light / fullWell + readNoise * readNoise);
    }

    /** Takes a photo into a TIFF file. */
    Path photograph(Path path, int width, int height, int channels, Scene scene) {
        double[] linear = linear(width, height, channels, scene);
        return Pictures.tiff(path, width, height, channels, bits,
                (x, y, c) -> count(linear[(y * width + x) * channels + c]));
    }

    /** Noisy linear light, pedestal included. */
    double[] linear(int width, int height, int channels, Scene scene) {
        Random random = new Random(seed);
        double[] linear = new double[width * height * channels];
        for (int i = 0; i < linear.length; i++) {
            int pixel = i / channels;
            double light = scene.at(pixel % width, pixel / width, i % channels);
            linear[i] = pedestal + light + sigma(light) * random.nextGaussian();
        }
        return linear;
    }

    int count(double linear) {
        double v = Math.min(1, Math.max(0, linear));
        if (srgb) {
            v = v <= 0.0031308 ? 12.92 * v : 1.055 * Math.pow(v, 1 / 2.4) - 0.055; // IEC 61966-2-1
        }
        return (int) Math.round(v * ((1 << bits) - 1));
    }
}
