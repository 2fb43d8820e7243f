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
     * Hashes of a recipe, the files that it names, and a photo, by path as given, the recipe first.
     *
     * @throws PhotoException if a file cannot be read
     */
    public static Map<String, String> of(Recipe recipe, Path... photos) {
        Set<Path> files = new LinkedHashSet<>();
        files.add(recipe.file());
        files.addAll(java.util.List.of(photos));
        CameraSpec camera = recipe.camera();
        for (Path named : new Path[] {camera.dark(), camera.flat(), camera.sensitivities()}) {
            if (named != null) {
                files.add(named);
            }
        }
        camera.steps().forEach(step -> files.add(step.image()));
        Map<String, String> hashes = new LinkedHashMap<>();
        Path folder = recipe.file().toAbsolutePath().getParent();
        for (Path file : files) {
            Path absolute = file.toAbsolutePath().normalize();
            String name = absolute.startsWith(folder) ? folder.relativize(absolute).toString() : file.getFileName().toString();
            hashes.put(name.replace('\\', '/'), sha256(file));
        }
        return hashes;
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
