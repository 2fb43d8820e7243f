package iridepth.report;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.util.stream.Stream;

/**
 * A result folder that appears whole or not at all. Files are written under a hidden name beside the target; {@link #commit}
 * gives the folder its name in one step. Closed without commit, or if the program is interrupted, it vanishes.
 *
 * <pre>{@code
 * try (ResultFolder folder = ResultFolder.create(target, false)) {
 *     write(folder.file("summary.json"));
 *     folder.commit();
 * }
 * }</pre>
 */
public final class ResultFolder implements AutoCloseable {
    /** The file that every result folder holds; by it a folder is known as one that may be replaced. */
    public static final String SUMMARY = "summary.json";

    private final PendingOutput output;
    private final boolean replace;

    private ResultFolder(PendingOutput output, boolean replace) {
        this.output = output;
        this.replace = replace;
    }

    /**
     * Starts a result folder. Missing parents are made, and removed again if it is not committed.
     *
     * @param target  the folder's path
     * @param replace whether a result folder that stands there may be replaced, on commit; a folder that is not empty and
     *                holds no {@link #SUMMARY} is never replaced, since it is no result
     * @throws OutputException if something stands there that may not be replaced, or the parent cannot be written
     */
    public static ResultFolder create(Path target, boolean replace) {
        Path path = PendingOutput.absolute(target);
        if (PendingOutput.occupied(path)) {
            check(target, path, replace);
        }
        return new ResultFolder(PendingOutput.start(path, true), replace);
    }

    private static void check(Path given, Path path, boolean replace) {
        if (!Files.isDirectory(path, LinkOption.NOFOLLOW_LINKS)) {
            throw new OutputException("cannot write the result folder " + given + ": a file or link of that name exists; choose "
                    + "another name");
        }
        if (!replace) {
            throw new OutputException("the result folder " + given + " already exists; choose another name, or replace it with "
                    + "--replace");
        }
        if (!Files.exists(path.resolve(SUMMARY)) && !isEmpty(path)) {
            throw new OutputException("will not replace the folder " + given + ": it holds no " + SUMMARY + " and so is no result "
                    + "folder; choose another name");
        }
    }

    private static boolean isEmpty(Path folder) {
        try (Stream<Path> list = Files.list(folder)) {
            return list.findAny().isEmpty();
        } catch (IOException e) {
            throw OutputException.of(folder, e);
        }
    }

    /** Where to write a file of that name now; on commit it moves with the folder. */
    public Path file(String name) {
        return output.part().resolve(name);
    }

    /** The folder's path once committed. */
    public Path target() {
        return output.target();
    }

    /**
     * Gives the folder its name. One that is replaced steps aside first, comes back if the new one cannot take its place, and
     * is removed last.
     *
     * @throws OutputException if it cannot; what stood there still does
     */
    public void commit() {
        output.publish(replace);
    }

    /** Removes everything written unless it has been committed. */
    @Override
    public void close() {
        output.abandon();
    }
}
