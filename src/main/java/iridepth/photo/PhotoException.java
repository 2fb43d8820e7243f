package iridepth.photo;

import java.nio.file.Path;

/** A photo (or its flat, dark or colour profile) cannot be used; the message is one line: which, what is wrong, what to do. */
public final class PhotoException extends RuntimeException {

    private static final long serialVersionUID = 1L;

    /** @param message one line that stands on its own */
    public PhotoException(String message) {
        super(message);
    }

    /**
     * @param path the file at fault, named first in the message
     * @param message what is wrong with it and what to do
     */
    public PhotoException(Path path, String message) {
        super(path + ": " + message);
    }
}
