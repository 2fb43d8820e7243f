package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class PhotoListTest {
    @TempDir
    private Path folder;

    private static List<String> names(List<Path> files) {
        return files.stream().map(file -> file.getFileName().toString()).toList();
    }

    private void touch(String... names) throws IOException {
        for (String name : names) {
            Files.createFile(folder.resolve(name));
        }
    }

    @Test
    void aFolderStandsForItsPhotosByNumber() throws IOException {
        touch("frame-10.tif", "frame-9.TIF", "frame-1.png", "frame-010.tif", "Part.jpeg", "recipe.toml", ".hidden.tif", "notes.txt");
        Files.createDirectory(folder.resolve("more.tif"));
        assertEquals(List.of("frame-1.png", "frame-9.TIF", "frame-010.tif", "frame-10.tif", "Part.jpeg"),
                names(PhotoList.of(List.of(folder), file -> true)));
    }

    @Test
    void unwantedFilesOfAFolderAreLeftOut() throws IOException {
        touch("flat.tif", "a.tif");
        assertEquals(List.of("a.tif"), names(PhotoList.of(List.of(folder), file -> !file.endsWith("flat.tif"))));
    }

    @Test
    void givenFilesKeepTheirOrderAndCountOnce() {
        Path b = folder.resolve("b.raw");
        Path a = folder.resolve("a.tif");
        assertEquals(List.of("b.raw", "a.tif"), names(PhotoList.of(List.of(b, a, folder.resolve("x/../b.raw")), file -> false)));
    }

    @Test
    void aFolderWithoutPhotosIsRefused() {
        String message = assertThrows(PhotoException.class, () -> PhotoList.of(List.of(folder), file -> true)).getMessage();
        assertTrue(message.contains("holds no photo"), message);
    }

    @Test
    void numbersOfAnyLengthAreCompared() {
        List<String> sorted = Stream.of("t99999999999999999999.tif", "t100000000000000000000.tif", "t2.tif", "t", "t2b.tif", "T1.tif")
                .sorted(PhotoList.BY_NAME).toList();
        assertEquals(List.of("t", "T1.tif", "t2.tif", "t2b.tif", "t99999999999999999999.tif", "t100000000000000000000.tif"), sorted);
    }
}
