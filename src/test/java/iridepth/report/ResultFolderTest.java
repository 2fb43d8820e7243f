package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ResultFolderTest {
    @TempDir
    Path home;

    private List<String> names() throws IOException {
        try (Stream<Path> list = Files.list(home)) {
            return list.map(p -> p.getFileName().toString()).sorted().toList();
        }
    }

    private static void fill(ResultFolder folder, String summary) throws IOException {
        Files.writeString(folder.file("summary.json"), summary);
        Files.writeString(folder.file("histogram.csv"), "1,2\n");
    }

    @Test
    void nothingStandsUnderItsNameBeforeCommit() throws IOException {
        Path target = home.resolve("run");
        try (ResultFolder folder = ResultFolder.create(target, false)) {
            fill(folder, "{}");
            assertFalse(Files.exists(target));
            assertTrue(names().get(0).startsWith(".run."), "the unfinished folder is hidden");
            folder.commit();
            assertTrue(Files.exists(target.resolve("histogram.csv")));
        }
        assertEquals(List.of("run"), names());
    }

    @Test
    void closingWithoutCommitLeavesNothing() throws IOException {
        try (ResultFolder folder = ResultFolder.create(home.resolve("a/b/run"), false)) {
            fill(folder, "{}");
            Files.createDirectory(folder.file("pictures"));
            Files.writeString(folder.file("pictures").resolve("x"), "x");
        }
        assertEquals(List.of(), names(), "parents made for it vanish too");
    }

    @Test
    void missingParentsAreMade() throws IOException {
        try (ResultFolder folder = ResultFolder.create(home.resolve("a/b/run"), false)) {
            fill(folder, "{}");
            folder.commit();
        }
        assertEquals("{}", Files.readString(home.resolve("a/b/run/summary.json")));
    }

    @Test
    void existingFolderIsRefusedUnlessReplaced() throws IOException {
        Path target = Files.createDirectory(home.resolve("run"));
        Files.writeString(target.resolve("summary.json"), "old");
        Files.writeString(target.resolve("old.txt"), "old");
        OutputException e = assertThrows(OutputException.class, () -> ResultFolder.create(target, false));
        assertTrue(e.getMessage().contains("already exists") && e.getMessage().contains("--replace"), e.getMessage());
        try (ResultFolder folder = ResultFolder.create(target, true)) {
            fill(folder, "new");
            assertEquals("old", Files.readString(target.resolve("summary.json")), "the old one stands until commit");
            folder.commit();
        }
        assertEquals("new", Files.readString(target.resolve("summary.json")));
        assertFalse(Files.exists(target.resolve("old.txt")), "replaced, not merged");
        assertEquals(List.of("run"), names());
    }

    @Test
    void oldFolderSurvivesAFailure() throws IOException {
        Path target = Files.createDirectory(home.resolve("run"));
        Files.writeString(target.resolve("summary.json"), "old");
        try (ResultFolder folder = ResultFolder.create(target, true)) {
            Files.delete(folder.file(""));
            OutputException e = assertThrows(OutputException.class, folder::commit);
            assertFalse(e.getMessage().contains("\n"));
        }
        assertEquals("old", Files.readString(target.resolve("summary.json")));
        assertEquals(List.of("run"), names());
    }

    @Test
    void folderThatIsNoResultIsNeverReplaced() throws IOException {
        Path target = Files.createDirectory(home.resolve("photos"));
        Files.writeString(target.resolve("precious.tif"), "x");
        OutputException e = assertThrows(OutputException.class, () -> ResultFolder.create(target, true));
        assertTrue(e.getMessage().contains("no result folder"), e.getMessage());
        assertEquals("x", Files.readString(target.resolve("precious.tif")));
    }

    @Test
    void folderThatComesIntoBeingMeanwhileIsKept() throws IOException {
        Path target = home.resolve("run");
        try (ResultFolder folder = ResultFolder.create(target, false)) {
            fill(folder, "mine");
            Files.createDirectory(target);
            assertThrows(OutputException.class, folder::commit);
        }
        assertEquals(List.of("run"), names());
    }

    @Test
    void targetThatIsAFileIsRefused() throws IOException {
        Path target = Files.writeString(home.resolve("run"), "x");
        OutputException e = assertThrows(OutputException.class, () -> ResultFolder.create(target, true));
        assertTrue(e.getMessage().contains("a file"), e.getMessage());
    }

    @Test
    void parentThatIsAFileIsOneLine() throws IOException {
        Path file = Files.writeString(home.resolve("file"), "x");
        OutputException e = assertThrows(OutputException.class, () -> ResultFolder.create(file.resolve("run"), false));
        assertTrue(e.getMessage().contains("not a folder") && e.getMessage().contains("run"), e.getMessage());
        assertFalse(e.getMessage().contains("\n"));
    }

    @Test
    void rootOfTheFileSystemIsRefused() {
        assertThrows(OutputException.class, () -> ResultFolder.create(Path.of("/"), true));
    }

    @Test
    void interruptedProgramLeavesNothing() throws Exception {
        Path target = home.resolve("run");
        Process process = new ProcessBuilder(ProcessHandle.current().info().command().orElseThrow(), "-cp",
                System.getProperty("java.class.path"), Writer.class.getName(), target.toString())
                .redirectError(ProcessBuilder.Redirect.INHERIT).start();
        assertEquals('w', process.getInputStream().read(), "the child is writing");
        assertEquals(1, names().size());
        process.destroy();
        assertTrue(process.waitFor(20, TimeUnit.SECONDS));
        assertEquals(List.of(), names());
    }

    /** A program that writes into a result folder until it is stopped. */
    static final class Writer {
        private Writer() {
        }

        public static void main(String[] args) throws Exception {
            ResultFolder folder = ResultFolder.create(Path.of(args[0]), false);
            fill(folder, "{}");
            System.out.write('w');
            System.out.flush();
            Thread.sleep(60_000);
        }
    }
}
