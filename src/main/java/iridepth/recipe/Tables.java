package iridepth.recipe;

import iridepth.photo.PhotoException;
import iridepth.spectrum.SpectralTable;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashSet;
import java.util.Set;

/**
 * Files that a recipe names, by paths relative to it.
 *
 * @param recipe the recipe file
 * @param read   tables that have been read, in that order
 */
record Tables(Path recipe, Set<Path> read) {
    Tables(Path recipe) {
        this(recipe, new LinkedHashSet<>());
    }

    /** A path that the recipe gives. */
    Path resolve(String path) {
        return recipe.toAbsolutePath().getParent().resolve(path).normalize();
    }

    /**
     * Reads a table.
     *
     * @throws PhotoException if the file is missing or is no such table
     */
    SpectralTable read(String path) {
        Path file = resolve(path);
        if (!Files.isRegularFile(file)) {
            throw new PhotoException(file + ": there is no such file; " + recipe + " names it");
        }
        try {
            SpectralTable table = SpectralTable.read(file);
            read.add(file);
            return table;
        } catch (IllegalArgumentException e) {
            throw new PhotoException(e.getMessage());
        } catch (IOException e) {
            throw new PhotoException(file + ": cannot be read (" + e.getMessage() + ")");
        }
    }
}
