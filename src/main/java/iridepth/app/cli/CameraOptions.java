package iridepth.app.cli;

import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.planning.Camera;
import iridepth.recipe.CameraSpec;
import iridepth.recipe.Sensitivities;
import java.nio.file.Path;
import java.util.Optional;
import picocli.CommandLine.Option;

/** A camera on a command line, or as a recipe tells it. */
final class CameraOptions {
    private static final double USUAL_READ_NOISE_E = 5;
    private static final double USUAL_FULL_WELL_E = 10_000;

    @Option(names = "--camera", paramLabel = "colour|mono|srgb|FILE.csv", description = "The camera: a generic colour or monochrome "
            + "sensor, one that writes sRGB files, or a table of spectral sensitivities (default: the recipe's, or colour).")
    private String camera;

    @Option(names = "--bits", paramLabel = "N", description = "Bit depth of its counts (default: 12; 8 for srgb).")
    private Integer bits;

    @Option(names = "--full-well", paramLabel = "E", description = "Electrons at full scale (default: the recipe's, or 10000).")
    private Double fullWell;

    @Option(names = "--read-noise", paramLabel = "E", description = "Noise without light in electrons (default: the recipe's, or 5).")
    private Double readNoise;

    @Option(names = "--exposure", paramLabel = "FRACTION", description = "Fraction of full scale that the brightest film fills "
            + "(default: by the recipe's white_reflectance where it has one, or 0.8).")
    private Double exposure;

    /** Whether an option departs from the recipe's camera, its noise apart. */
    boolean given() {
        return camera != null || bits != null || exposure != null;
    }

    /** The noise that the options or the recipe tell, if they do. */
    Optional<NoiseModel> known(CameraSpec recipe) {
        boolean told = fullWell != null || readNoise != null || !Double.isNaN(recipe.fullWell());
        return told ? Optional.of(noise(recipe)) : Optional.empty();
    }

    /**
     * The camera.
     *
     * @param recipe the recipe's, or null
     */
    Camera camera(CameraSpec recipe) {
        String kind = camera != null ? camera : recipe == null ? "colour" : recipe.isColourManaged() ? "srgb"
                : recipe.sensitivities() != null ? recipe.sensitivities().toString() : "colour";
        boolean managed = kind.equals("srgb");
        Encoding encoding = managed ? Encoding.srgb(bits == null ? 8 : bits) : Encoding.linear(Math.pow(2, linearBits()) - 1);
        NoiseModel noise = noise(recipe);
        double fill = exposure == null ? 0.8 : exposure;
        Camera result = switch (kind) {
            case "srgb" -> Camera.colourManaged(noise, encoding, fill);
            case "colour" -> Camera.genericColour(noise, encoding, fill);
            case "mono" -> Camera.genericMonochrome(noise, encoding, fill);
            default -> table(kind, Camera.genericColour(noise, encoding, fill));
        };
        boolean byWhite = exposure == null && recipe != null && (managed || recipe.sensitivities() != null && camera == null);
        return byWhite ? result.withWhite(recipe.whiteReflectance()) : result;
    }

    private int linearBits() {
        if (bits != null && (bits < 4 || bits > 16)) {
            throw new IllegalArgumentException("--bits must be 4 to 16, not " + bits);
        }
        return bits == null ? 12 : bits;
    }

    private NoiseModel noise(CameraSpec recipe) {
        boolean known = recipe != null && !Double.isNaN(recipe.fullWell());
        double well = fullWell != null ? fullWell : known ? recipe.fullWell() : USUAL_FULL_WELL_E;
        boolean counts = known && !Double.isNaN(recipe.fullScale());
        double read = readNoise != null ? readNoise
                : known ? recipe.readNoise() / (counts ? recipe.fullScale() : Math.pow(2, linearBits()) - 1) * recipe.fullWell()
                : USUAL_READ_NOISE_E;
        return NoiseModel.of(read, well);
    }

    private static Camera table(String kind, Camera other) {
        if (!kind.endsWith(".csv")) {
            throw new IllegalArgumentException("--camera must be colour, mono, srgb or a CSV file, not '" + kind + "'");
        }
        Sensitivities known = Sensitivities.read(Path.of(kind));
        return other.withSensitivities(Path.of(kind).getFileName().toString(), known.channels(), known.spectra());
    }
}
