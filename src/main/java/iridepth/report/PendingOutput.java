package iridepth.report;

import java.io.IOException;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.FileVisitResult;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/**
 * A file or folder under way: it grows under a hidden name beside its target, on the same file system, and takes the
 * target's name in one step. Until then nothing stands under the target's name; if the program ends first, normally or by an
 * interrupt, the hidden part is removed.
 */
final class PendingOutput {
    private static final int NAMES_TRIED = 10_000;
    /** When the program is interrupted, other threads may still add files while these are removed. */
    private static final int REMOVALS_TRIED = 20;
    private static final Set<PendingOutput> UNFINISHED = new HashSet<>();
    private static boolean interrupted;

    static {
        Runtime.getRuntime().addShutdownHook(new Thread(PendingOutput::removeUnfinished, "remove unfinished output"));
    }

    private final Path target;
    private final Path part;
    /** Parents made for this output, innermost first; they go again if it is abandoned. */
    private final Deque<Path> madeParents;
    private boolean ended;

    private PendingOutput(Path target, Path part, Deque<Path> madeParents) {
        this.target = target;
        this.part = part;
        this.madeParents = madeParents;
    }

    /**
     * Starts an output. Missing parent folders are made.
     *
     * @param target absolute path with a name
     * @param folder whether it is a folder
     * @throws OutputException if the parent is no folder or cannot be written
     */
    static PendingOutput start(Path target, boolean folder) {
        Deque<Path> made = new ArrayDeque<>();
        try {
            makeParents(target.getParent(), made);
            PendingOutput output = begun(target, folder, made);
            return output;
        } catch (IOException e) {
            removeEmpty(made);
            throw OutputException.of(target, e);
        }
    }

    /** Makes the part and enters it among the unfinished: both or, where the program is being interrupted, neither. */
    private static PendingOutput begun(Path target, boolean folder, Deque<Path> made) throws IOException {
        synchronized (UNFINISHED) {
            if (interrupted) {
                removeEmpty(made);
                throw new OutputException("cannot write " + target + ": the program is being interrupted; start it again");
            }
            PendingOutput output = new PendingOutput(target, makePart(target, folder), made);
            UNFINISHED.add(output);
            return output;
        }
    }

    private static void makeParents(Path parent, Deque<Path> made) throws IOException {
        Deque<Path> missing = new ArrayDeque<>();
        for (Path p = parent; p != null && !Files.exists(p); p = p.getParent()) {
            missing.push(p);
        }
        for (Path p : missing) {
            Files.createDirectory(p);
            made.push(p);
        }
        if (!Files.isDirectory(parent)) {
            throw new IOException(parent + " is not a folder");
        }
    }

    private static Path makePart(Path target, boolean folder) throws IOException {
        for (int i = 0; i < NAMES_TRIED; i++) {
            Path part = target.resolveSibling("." + target.getFileName() + "." + ProcessHandle.current().pid() + "-" + i + ".part");
            try {
                return folder ? Files.createDirectory(part) : Files.createFile(part);
            } catch (FileAlreadyExistsException e) {
                // left by an earlier run that was killed, or in use: take the next name
            }
        }
        throw new IOException("its folder is full of unfinished outputs");
    }

    /** Absolute path of an output as the user gave it. */
    static Path absolute(Path given) {
        Path target = given.toAbsolutePath().normalize();
        if (target.getFileName() == null) {
            throw new OutputException("cannot write " + given + ": that is the root of the file system; name a file or folder in it");
        }
        return target;
    }

    /** Whether anything stands at a path, a broken link included. */
    static boolean occupied(Path path) {
        return Files.exists(path, LinkOption.NOFOLLOW_LINKS);
    }

    Path part() {
        return part;
    }

    Path target() {
        return target;
    }

    /**
     * Gives the output its name. A folder that is replaced steps aside first and comes back if the new one cannot take its place.
     *
     * @param replace whether something that stands there may go
     * @throws OutputException if it cannot; what stood there still does
     */
    synchronized void publish(boolean replace) {
        if (ended) {
            throw new IllegalStateException("the output " + target + " has already been published or abandoned");
        }
        try {
            if (!occupied(target)) {
                move(part, target);
            } else if (!replace) {
                throw new OutputException("cannot write " + target + ": it has come into being meanwhile; choose another name");
            } else if (Files.isDirectory(target, LinkOption.NOFOLLOW_LINKS)) {
                swap();
            } else {
                Files.move(part, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
            }
        } catch (IOException e) {
            throw OutputException.of(target, e);
        }
        end();
    }

    private void swap() throws IOException {
        Path aside = part.resolveSibling(part.getFileName() + ".old");
        move(target, aside);
        try {
            move(part, target);
        } catch (IOException e) {
            move(aside, target);
            throw e;
        }
        removeTree(aside);
    }

    private static void move(Path from, Path to) throws IOException {
        try {
            Files.move(from, to, StandardCopyOption.ATOMIC_MOVE);
        } catch (AtomicMoveNotSupportedException e) {
            throw new IOException("this file system cannot rename in one step", e);
        }
    }

    /** Removes what has been written, unless it has been published. */
    synchronized void abandon() {
        if (!ended) {
            remove(part);
            end();
        }
    }

    private void end() {
        ended = true;
        synchronized (UNFINISHED) {
            UNFINISHED.remove(this);
        }
    }

    private static void removeUnfinished() {
        List<PendingOutput> outputs;
        synchronized (UNFINISHED) {
            interrupted = true;
            outputs = List.copyOf(UNFINISHED);
        }
        outputs.forEach(PendingOutput::vanish);
    }

    /**
     * Removes what has been written when the program is interrupted. Other threads may still be adding files: under its first name
     * they no longer find the folder.
     */
    private synchronized void vanish() {
        if (!ended) {
            Path gone = part.resolveSibling(part.getFileName() + ".gone");
            try {
                move(part, gone);
                remove(gone);
            } catch (IOException e) {
                remove(part);
            }
        }
    }

    private void remove(Path unfinished) {
        for (int i = 0; i < REMOVALS_TRIED && occupied(unfinished); i++) {
            removeTree(unfinished);
        }
        removeEmpty(madeParents);
    }

    /** Removes as much as can be removed; what stays has a hidden name. */
    private static void removeTree(Path root) {
        try {
            Files.walkFileTree(root, new SimpleFileVisitor<>() {
                @Override
                public FileVisitResult visitFile(Path file, BasicFileAttributes attributes) throws IOException {
                    Files.delete(file);
                    return FileVisitResult.CONTINUE;
                }

                @Override
                public FileVisitResult postVisitDirectory(Path folder, IOException e) throws IOException {
                    Files.delete(folder);
                    return FileVisitResult.CONTINUE;
                }
            });
        } catch (IOException e) {
            // nothing more can be done, and the hidden name says that it is unfinished
        }
    }

    private static void removeEmpty(Deque<Path> folders) {
        for (Path folder : folders) {
            try {
                Files.deleteIfExists(folder);
            } catch (IOException e) {
                return;
            }
        }
    }
}
