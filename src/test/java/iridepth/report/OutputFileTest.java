package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class OutputFileTest {
    @TempDir
    Path home;

    private long entries() throws IOException {
        try (Stream<Path> list = Files.list(home)) {
            return list.count();
        }
    }

    @Test
    void appearsOnCommit() throws IOException {
        Path target = home.resolve("chart.png");
        try (OutputFile file = OutputFile.create(target, false)) {
            Files.writeString(file.path(), "picture");
            assertFalse(Files.exists(target));
            file.commit();
        }
        assertEquals("picture", Files.readString(target));
        assertEquals(1, entries());
    }

    @Test
    void vanishesWithoutCommit() throws IOException {
        try (OutputFile file = OutputFile.create(home.resolve("chart.png"), false)) {
            Files.writeString(file.path(), "half");
        }
        assertEquals(0, entries());
    }

    @Test
    void existingFileIsRefusedUnlessReplaced() throws IOException {
        Path target = Files.writeString(home.resolve("chart.png"), "old");
        OutputException e = assertThrows(OutputException.class, () -> OutputFile.create(target, false));
        assertTrue(e.getMessage().contains("already exists"), e.getMessage());
        try (OutputFile file = OutputFile.create(target, true)) {
            Files.writeString(file.path(), "new");
            assertEquals("old", Files.readString(target));
            file.commit();
        }
        assertEquals("new", Files.readString(target));
        assertEquals(1, entries());
    }

    @Test
    void targetThatIsAFolderIsRefused() {
        OutputException e = assertThrows(OutputException.class, () -> OutputFile.create(home, true));
        assertTrue(e.getMessage().contains("a folder of that name"), e.getMessage());
    }
}
