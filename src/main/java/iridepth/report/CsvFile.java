package iridepth.report;

import iridepth.photo.PhotoException;
import java.io.IOException;
import java.nio.charset.MalformedInputException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A table read from a CSV file, the counterpart of {@link CsvTable}: remarks on lines that begin with #, the names of the
 * columns, the rows; cells in double quotes may hold commas (RFC 4180), but no line breaks.
 *
 * @param file    where it comes from
 * @param columns names of the columns
 * @param rows    cells as text
 * @param lines   line of each row in the file, 1 for the first
 */
public record CsvFile(Path file, List<String> columns, List<List<String>> rows, List<Integer> lines) {
    /**
     * Reads a file.
     *
     * @throws PhotoException if it is missing or is no such table; the message names file and line
     */
    public static CsvFile read(Path file) {
        List<String> columns = null;
        List<List<String>> rows = new ArrayList<>();
        List<Integer> lines = new ArrayList<>();
        int line = 0;
        for (String text : text(file).lines().toList()) {
            line++;
            if (text.isBlank() || text.startsWith("#")) {
                continue;
            }
            List<String> cells = cells(text);
            if (columns == null) {
                columns = cells;
            } else if (cells.size() != columns.size()) {
                throw new PhotoException(file + ", line " + line + ": " + cells.size() + " cells where the header has "
                        + columns.size());
            } else {
                rows.add(cells);
                lines.add(line);
            }
        }
        if (columns == null) {
            throw new PhotoException(file, "is an empty table; it needs a line with the names of its columns");
        }
        return new CsvFile(file, columns, List.copyOf(rows), List.copyOf(lines));
    }

    private static String text(Path file) {
        try {
            String text = Files.readString(file);
            return text.startsWith("\uFEFF") ? text.substring(1) : text;
        } catch (NoSuchFileException e) {
            throw new PhotoException(file, "there is no such file; check the path");
        } catch (MalformedInputException e) {
            throw new PhotoException(file, "is not a text file; give a CSV table in UTF-8");
        } catch (IOException e) {
            throw new PhotoException(file, "cannot be read (" + e.getMessage() + ")");
        }
    }

    private static List<String> cells(String line) {
        List<String> cells = new ArrayList<>();
        StringBuilder cell = new StringBuilder();
        boolean quoted = false;
        for (int i = 0; i < line.length(); i++) {
            char c = line.charAt(i);
            if (c == '"' && quoted && i + 1 < line.length() && line.charAt(i + 1) == '"') {
                cell.append(line.charAt(++i));
            } else if (c == '"') {
                quoted = !quoted;
            } else if (c == ',' && !quoted) {
                cells.add(cell.toString().strip());
                cell.setLength(0);
            } else {
                cell.append(c);
            }
        }
        cells.add(cell.toString().strip());
        return List.copyOf(cells);
    }

    /** Whether there is a column of that name. */
    public boolean has(String column) {
        return columns.contains(column);
    }

    /**
     * A column as text.
     *
     * @throws PhotoException if there is no such column
     */
    public List<String> texts(String column) {
        int at = columns.indexOf(column);
        if (at < 0) {
            throw new PhotoException(file, "has no column " + column + "; its columns are " + String.join(", ", columns));
        }
        return rows.stream().map(row -> row.get(at)).toList();
    }

    /**
     * A column as numbers; an empty cell is NaN.
     *
     * @throws PhotoException if there is no such column, or a cell is no finite number
     */
    public double[] numbers(String column) {
        List<String> texts = texts(column);
        double[] numbers = new double[texts.size()];
        Arrays.setAll(numbers, i -> number(texts.get(i), lines.get(i)));
        return numbers;
    }

    private double number(String text, int line) {
        try {
            double number = text.isEmpty() ? Double.NaN : Double.parseDouble(text);
            if (text.isEmpty() || Double.isFinite(number)) {
                return number;
            }
        } catch (NumberFormatException e) {
            // told below, with the numbers that are not finite
        }
        throw new PhotoException(file + ", line " + line + ": '" + text + "' is not a finite number");
    }
}
