package iridepth.recipe;

import iridepth.photo.PhotoException;
import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.Map;
import java.util.Set;

/** What is needed to repeat a run: the SHA-256 (FIPS 180-4) of every file that went into it. */
public final class Provenance {
    private static final int BUFFER = 1 << 20;

    private Provenance() {
    }

    /**
     * Hashes of a recipe and the files that it names, by their path from the recipe's folder, the recipe first.
     *
     * @throws PhotoException if a file cannot be read
     */
    public static Map<String, String> of(Recipe recipe) {
        Map<String, String> hashes = new LinkedHashMap<>();
        files(recipe).forEach(file -> add(hashes, recipe, file));
        return hashes;
    }

    /** The recipe and the files that it names, each once, the recipe first. */
    static Set<Path> files(Recipe recipe) {
        Set<Path> files = new LinkedHashSet<>();
        files.add(recipe.file());
        files.addAll(recipe.tables());
        CameraSpec camera = recipe.camera();
        files.addAll(camera.darks());
        files.addAll(camera.flats());
        if (camera.sensitivities() != null) {
            files.add(camera.sensitivities());
        }
        camera.steps().forEach(step -> files.addAll(step.images()));
        files.addAll(camera.noiseFlats());
        if (camera.target() != null) {
            files.addAll(camera.target().images());
            files.add(camera.target().patches());
        }
        return files;
    }

    /**
     * Adds the hash of another file. Outside the recipe's folder it goes by its plain name, or by its whole path where that name
     * is taken.
     */
    static void add(Map<String, String> hashes, Recipe recipe, Path file) {
        Path absolute = file.toAbsolutePath().normalize();
        Path folder = recipe.file().toAbsolutePath().normalize().getParent();
        String name = (absolute.startsWith(folder) ? folder.relativize(absolute) : absolute.getFileName()).toString();
        hashes.put((hashes.containsKey(name) ? absolute.toString() : name).replace('\\', '/'), sha256(file));
    }

    private static String sha256(Path file) {
        try (InputStream in = Files.newInputStream(file)) {
            MessageDigest digest = MessageDigest.getInstance("SHA-256");
            byte[] buffer = new byte[BUFFER];
            for (int n = in.read(buffer); n >= 0; n = in.read(buffer)) {
                digest.update(buffer, 0, n);
            }
            return HexFormat.of().formatHex(digest.digest());
        } catch (IOException e) {
            throw new PhotoException(file + ": cannot be read (" + e.getMessage() + ")");
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException(e);
        }
    }
}
