package iridepth.photo;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;

/**
 * Photos that are opened and closed together.
 *
 * @param files the open photos, in the order given
 */
public record OpenPhotos(List<PhotoFile> files) implements AutoCloseable {

    /**
     * @param paths one or more photos
     * @return the open photos
     * @throws PhotoException if one cannot be opened; then none stays open
     */
    public static OpenPhotos of(List<Path> paths) {
        List<PhotoFile> files = new ArrayList<>();
        try {
            paths.forEach(path -> files.add(PhotoFile.open(path)));
        } catch (RuntimeException e) {
            files.forEach(PhotoFile::close);
            throw e;
        }
        return new OpenPhotos(List.copyOf(files));
    }

    /** Closes all. */
    @Override
    public void close() {
        files.forEach(PhotoFile::close);
    }
}
