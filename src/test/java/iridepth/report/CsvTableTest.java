package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import java.util.Locale;
import org.junit.jupiter.api.Test;

class CsvTableTest {
    @Test
    void remarksColumnsAndRowsFollowEachOther() {
        assertEquals("# made of glass\nname,value_nm\na,1.5\nb,\n", CsvTable.of(List.of("made of\nglass"),
                List.of("name", "value_nm")).row("a", 1.5).row("b", Double.NaN).toString());
    }

    @Test
    void fieldsWithCommasOrQuotesAreQuoted() {
        assertEquals("a\n\"x, \"\"y\"\"\"\n", CsvTable.of(List.of(), List.of("a")).row("x, \"y\"").toString());
    }

    @Test
    void numbersArePlainInEveryLanguage() {
        Locale before = Locale.getDefault();
        Locale.setDefault(Locale.GERMANY);
        try {
            assertEquals("1234567.5", Numbers.significant(1234567.5, 10));
            assertEquals("0.00000012", Numbers.significant(1.2e-7, 10));
            assertEquals("0.3", Numbers.significant(0.1 + 0.2, 10));
            assertEquals("0", Numbers.significant(-0.0, 10));
            assertEquals("0.00", Numbers.fixed(-0.001, 2));
            assertEquals("2.50", Numbers.fixed(2.5, 2));
            assertEquals("", Numbers.fixed(Double.POSITIVE_INFINITY, 2));
        } finally {
            Locale.setDefault(before);
        }
    }

    @Test
    void rowOfOtherLengthIsRefused() {
        assertThrows(IllegalArgumentException.class, () -> CsvTable.of(List.of(), List.of("a", "b")).row(1));
    }
}
