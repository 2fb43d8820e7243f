package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class LotFolderTest {
    @TempDir
    private Path folder;

    private static List<String> names(String... photos) {
        return LotFolder.names(Stream.of(photos).map(Path::of).toList());
    }

    @Test
    void resultsGoByTheNameOfTheirPhoto() {
        assertEquals(List.of("part-1", "part.2", ".hidden"), names("a/part-1.tif", "a/part.2.png", ".hidden"));
    }

    @Test
    void photosThatShareANameKeepTheirEnding() {
        assertEquals(List.of("a.tif", "A.png", "b"), names("x/a.tif", "x/A.png", "x/b.tif"));
        assertEquals(List.of("a.tif", "a.tif-2"), names("x/a.tif", "y/a.tif"));
    }

    @Test
    void theLotsOwnFilesKeepTheirNames() {
        assertEquals(List.of("index.html.png", "LOT.csv.tif"), names("index.html.png", "LOT.csv.tif"));
    }

    @Test
    void onlyANewFolderOrALotsOwnIsWrittenInto() throws IOException {
        Path lot = folder.resolve("new/lot");
        LotFolder.open(lot, Map.of("title", "a"));
        assertTrue(Files.readString(lot.resolve("lot.json")).contains("\"finished\" : false"));
        Files.createDirectory(lot.resolve("part-1"));
        LotFolder.open(lot, Map.of("title", "b"));
        LotFolder.open(Files.createDirectory(folder.resolve("empty")), Map.of());
        Path other = Files.createDirectory(folder.resolve("other"));
        Files.writeString(other.resolve("lot.json"), "[1]");
        assertThrows(OutputException.class, () -> LotFolder.open(other, Map.of()));
        Files.writeString(other.resolve("lot.json"), "broken");
        assertThrows(OutputException.class, () -> LotFolder.open(other, Map.of()));
        assertThrows(OutputException.class, () -> LotFolder.open(other.resolve("lot.json"), Map.of()));
    }
}
