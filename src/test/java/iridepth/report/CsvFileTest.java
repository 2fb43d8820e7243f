package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.PhotoException;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CsvFileTest {
    @TempDir
    private Path folder;

    private CsvFile read(String text) throws IOException {
        return CsvFile.read(Files.writeString(folder.resolve("t.csv"), text));
    }

    private String refusal(String text) {
        return assertThrows(PhotoException.class, () -> read(text).numbers("x")).getMessage();
    }

    @Test
    void whatIsWrittenIsReadBack() {
        CsvTable table = CsvTable.of(List.of("a remark, with a comma"), List.of("x", "name")).row(1.25, "a, \"b\"")
                .row(Double.NaN, "").row(-3e-7, "c");
        Path file = folder.resolve("written.csv");
        table.write(file);
        CsvFile read = CsvFile.read(file);
        assertArrayEquals(new double[] {1.25, Double.NaN, -3e-7}, read.numbers("x"), 1e-16);
        assertEquals(List.of("a, \"b\"", "", "c"), read.texts("name"));
        assertEquals(List.of(3, 4, 5), read.lines());
    }

    @Test
    void blanksByteOrderMarksAndOtherLineEndsAreTaken() throws IOException {
        CsvFile file = read("\uFEFFx , y\r\n\r\n 1, 2 \r\n");
        assertTrue(file.has("y"));
        assertArrayEquals(new double[] {1}, file.numbers("x"));
    }

    @Test
    void faultsAreToldByLine() {
        assertTrue(refusal("x,y\n1,2\n3\n").contains("line 3: 1 cells where the header has 2"));
        assertTrue(refusal("# remark\nx\n1\nabc\n").contains("line 4: 'abc' is not a finite number"));
        assertTrue(refusal("x\nInfinity\n").contains("line 2: 'Infinity'"));
        assertTrue(refusal("y\n1\n").contains("has no column x; its columns are y"));
        assertTrue(refusal("# nothing\n").contains("empty table"));
        assertTrue(assertThrows(PhotoException.class, () -> CsvFile.read(folder.resolve("none.csv"))).getMessage()
                .contains("no such file"));
    }
}
