package iridepth.report;

import java.nio.file.Files;
import java.nio.file.Path;

/**
 * A single file that appears whole or not at all: written under a hidden name beside its target and renamed on
 * {@link #commit}. Closed without commit, or if the program is interrupted, it vanishes.
 */
public final class OutputFile implements AutoCloseable {
    private final PendingOutput output;
    private final boolean replace;

    private OutputFile(PendingOutput output, boolean replace) {
        this.output = output;
        this.replace = replace;
    }

    /**
     * Starts a file. Missing parents are made, and removed again if it is not committed.
     *
     * @param target  the file's path
     * @param replace whether a file that stands there may be replaced, on commit
     * @throws OutputException if something stands there that may not be replaced, or the parent cannot be written
     */
    public static OutputFile create(Path target, boolean replace) {
        Path path = PendingOutput.absolute(target);
        if (Files.isDirectory(path)) {
            throw new OutputException("cannot write the file " + target + ": a folder of that name exists; name a file in it");
        }
        if (PendingOutput.occupied(path) && !replace) {
            throw new OutputException("the file " + target + " already exists; choose another name, or replace it with --replace");
        }
        return new OutputFile(PendingOutput.start(path, false), replace);
    }

    /** Where to write now. The name has no meaningful ending. */
    public Path path() {
        return output.part();
    }

    /** The file's path once committed. */
    public Path target() {
        return output.target();
    }

    /**
     * Gives the file its name.
     *
     * @throws OutputException if it cannot; what stood there still does
     */
    public void commit() {
        output.publish(replace);
    }

    /** Removes what has been written unless it has been committed. */
    @Override
    public void close() {
        output.abandon();
    }
}
