package iridepth.report;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;

/**
 * A table as a CSV file (RFC 4180, but with line feeds, UTF-8): remarks on lines that begin with #, the names of the columns,
 * the rows. Numbers have a point and at most ten significant digits; a missing value is an empty field.
 */
public final class CsvTable {
    private static final int DIGITS = 10;

    private final StringBuilder text = new StringBuilder();
    private final int columns;

    private CsvTable(int columns) {
        this.columns = columns;
    }

    /**
     * Starts a table.
     *
     * @param remarks lines that say what the table holds; line breaks in them become blanks
     * @param columns names of the columns, with units
     */
    public static CsvTable of(List<String> remarks, List<String> columns) {
        CsvTable table = new CsvTable(columns.size());
        remarks.forEach(r -> table.text.append("# ").append(r.replaceAll("\\s+", " ").strip()).append('\n'));
        return table.row(columns.toArray());
    }

    /**
     * Adds a row.
     *
     * @param values one per column; NaN and null are missing values
     * @throws IllegalArgumentException if there are not as many values as columns
     */
    public CsvTable row(Object... values) {
        if (values.length != columns) {
            throw new IllegalArgumentException("a row of " + values.length + " values in a table of " + columns + " columns");
        }
        for (int i = 0; i < values.length; i++) {
            text.append(i == 0 ? "" : ",").append(field(values[i]));
        }
        text.append('\n');
        return this;
    }

    private static String field(Object value) {
        if (value instanceof Double || value instanceof Float) {
            return Numbers.significant(((Number) value).doubleValue(), DIGITS);
        }
        String plain = value == null ? "" : value.toString();
        boolean quoted = plain.contains(",") || plain.contains("\"") || plain.contains("\n") || plain.contains("\r");
        return quoted ? '"' + plain.replace("\"", "\"\"") + '"' : plain;
    }

    /** The table as it stands in the file. */
    @Override
    public String toString() {
        return text.toString();
    }

    /**
     * Writes the file; one that stands there is overwritten.
     *
     * @throws OutputException if it cannot be written
     */
    public void write(Path file) {
        try {
            Files.writeString(file, text, StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw OutputException.of(file, e);
        }
    }
}
