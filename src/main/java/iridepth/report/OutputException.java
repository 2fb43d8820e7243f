package iridepth.report;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileSystemException;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;

/** A result cannot be written. The message is one line: what is wrong, where, and what to do. */
public final class OutputException extends RuntimeException {
    private static final long serialVersionUID = 1;

    /** An output that cannot be written for a reason that the message states. */
    public OutputException(String message) {
        super(message);
    }

    private OutputException(String message, IOException cause) {
        super(message, cause);
    }

    /**
     * What became of an attempt to write, in one line.
     *
     * @param path  the file or folder that was to be written
     * @param cause what the system said
     */
    public static OutputException of(Path path, IOException cause) {
        return new OutputException("cannot write " + path + " (" + reason(cause) + "); check that its folder can be written "
                + "and that the disk has room, or choose another place", cause);
    }

    private static String reason(IOException cause) {
        if (cause instanceof AccessDeniedException) {
            return "permission denied";
        }
        if (cause instanceof NoSuchFileException) {
            return "no such folder";
        }
        String text = cause instanceof FileSystemException f && f.getReason() != null ? f.getReason() : cause.getMessage();
        return text == null ? cause.getClass().getSimpleName() : text.replaceAll("\\s+", " ").strip();
    }
}
