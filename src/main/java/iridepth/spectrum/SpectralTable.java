package iridepth.spectrum;

import java.io.BufferedReader;
import java.io.IOException;
import java.nio.charset.MalformedInputException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A published table of one or more quantities against wavelength, as read from CSV.
 *
 * <p>Form: lines that open with {@code #} are remarks ({@code # source: ...} and {@code # material: ...} are kept), then a
 * header whose first column is {@code wavelength_nm}, then rows of numbers with rising wavelength. Between rows values are
 * interpolated linearly. Outside its range the table holds its end value, provided that it covers 400-700 nm; a table whose
 * ends stop short of that by no more than its own sampling step (and 10 nm) still counts as covering.
 *
 * @param name       where it comes from, for messages
 * @param remarks    the remark lines without their {@code #}
 * @param columns    names of the quantities, without the wavelength
 * @param wavelength wavelengths in nm, rising
 * @param values     {@code values[column][row]}
 */
public record SpectralTable(String name, List<String> remarks, List<String> columns, double[] wavelength,
                            double[][] values) {
    private static final double MUST_FROM_NM = 400;
    private static final double MUST_TO_NM = 700;
    private static final double LARGEST_SHORTFALL_NM = 10;

    /**
     * Reads a table from a file.
     *
     * @throws IOException              if the file cannot be read
     * @throws IllegalArgumentException if it is not such a table; the message names file and line
     */
    public static SpectralTable read(Path file) throws IOException {
        try (BufferedReader reader = Files.newBufferedReader(file, StandardCharsets.UTF_8)) {
            return read(file.toString(), reader);
        } catch (MalformedInputException e) {
            throw new IllegalArgumentException(file + ": not a text file; give a CSV table with a wavelength_nm column");
        }
    }

    /** Reads a table from text; {@code name} stands for it in messages. */
    public static SpectralTable read(String name, BufferedReader reader) throws IOException {
        List<String> remarks = new ArrayList<>();
        List<double[]> rows = new ArrayList<>();
        List<String> columns = null;
        int lineNumber = 0;
        for (String line = reader.readLine(); line != null; line = reader.readLine()) {
            lineNumber++;
            String text = line.strip();
            if (text.startsWith("\uFEFF")) {
                text = text.substring(1);
            }
            if (text.startsWith("#")) {
                remarks.add(text.substring(1).strip());
            } else if (!text.isEmpty() && columns == null) {
                columns = header(name, lineNumber, text);
            } else if (!text.isEmpty()) {
                rows.add(row(name, lineNumber, text, columns.size(), rows));
            }
        }
        if (columns == null || rows.size() < 2) {
            throw new IllegalArgumentException(name + ": a table needs a header line and at least two rows");
        }
        return transpose(name, remarks, columns.subList(1, columns.size()), rows);
    }

    private static List<String> header(String name, int line, String text) {
        List<String> columns = new ArrayList<>();
        for (String cell : text.split(",", -1)) {
            columns.add(cell.strip());
        }
        if (!columns.get(0).equals("wavelength_nm") || columns.size() < 2) {
            throw new IllegalArgumentException(name + ", line " + line
                    + ": the header must be wavelength_nm and at least one more column, not '" + text + "'");
        }
        return columns;
    }

    private static double[] row(String name, int line, String text, int width, List<double[]> before) {
        String[] cells = text.split(",", -1);
        if (cells.length != width) {
            throw new IllegalArgumentException(name + ", line " + line + ": " + cells.length + " cells where the header has "
                    + width);
        }
        double[] row = new double[width];
        for (int c = 0; c < width; c++) {
            try {
                row[c] = Double.parseDouble(cells[c].strip());
            } catch (NumberFormatException e) {
                throw new IllegalArgumentException(name + ", line " + line + ": '" + cells[c].strip() + "' is not a number");
            }
            if (!Double.isFinite(row[c])) {
                throw new IllegalArgumentException(name + ", line " + line + ": '" + cells[c].strip()
                        + "' is not a finite number; leave the row out");
            }
        }
        if (!before.isEmpty() && row[0] <= before.get(before.size() - 1)[0]) {
            throw new IllegalArgumentException(name + ", line " + line + ": wavelengths must rise from row to row");
        }
        return row;
    }

    private static SpectralTable transpose(String name, List<String> remarks, List<String> columns, List<double[]> rows) {
        double[] wavelength = new double[rows.size()];
        double[][] values = new double[columns.size()][rows.size()];
        for (int r = 0; r < wavelength.length; r++) {
            wavelength[r] = rows.get(r)[0];
            for (int c = 0; c < values.length; c++) {
                values[c][r] = rows.get(r)[c + 1];
            }
        }
        SpectralTable table = new SpectralTable(name, List.copyOf(remarks), List.copyOf(columns), wavelength, values);
        double from = table.firstNm() - table.slack();
        double to = table.lastNm() + table.slack();
        if (from > MUST_FROM_NM || to < MUST_TO_NM) {
            throw new IllegalArgumentException(String.format("%s: the table covers %.4g-%.4g nm; it must cover 400-700 nm%s",
                    name, table.firstNm(), table.lastNm(), table.lastNm() < 10 ? ", with wavelengths in nm and not in um" : ""));
        }
        return table;
    }

    private double slack() {
        return Math.min(LARGEST_SHORTFALL_NM, (lastNm() - firstNm()) / (wavelength.length - 1));
    }

    /** Shortest wavelength in the table, nm. */
    public double firstNm() {
        return wavelength[0];
    }

    /** Longest wavelength in the table, nm. */
    public double lastNm() {
        return wavelength[wavelength.length - 1];
    }

    /** Whether the end values are held for part of the grid. */
    public boolean isHeld() {
        return firstNm() > Grid.FIRST_NM || lastNm() < Grid.LAST_NM;
    }

    /** The text of the first remark that opens with {@code key:}, or an empty text. */
    public String remark(String key) {
        return remarks.stream().filter(r -> r.startsWith(key + ":")).map(r -> r.substring(key.length() + 1).strip())
                .findFirst().orElse("");
    }

    /** Whether there is a column of that name. */
    public boolean has(String column) {
        return columns.contains(column);
    }

    /**
     * A column on the grid: linear between rows, the end value outside.
     *
     * @throws IllegalArgumentException if there is no such column
     */
    public Spectrum spectrum(String column) {
        int c = columns.indexOf(column);
        if (c < 0) {
            throw new IllegalArgumentException(name + ": no column '" + column + "'; it has " + String.join(", ", columns));
        }
        return Spectrum.sample(nm -> interpolate(values[c], nm));
    }

    private double interpolate(double[] column, double nm) {
        int last = wavelength.length - 1;
        if (nm <= wavelength[0]) {
            return column[0];
        }
        if (nm >= wavelength[last]) {
            return column[last];
        }
        int below = Arrays.binarySearch(wavelength, nm);
        if (below >= 0) {
            return column[below];
        }
        below = -below - 2;
        double t = (nm - wavelength[below]) / (wavelength[below + 1] - wavelength[below]);
        return column[below] + t * (column[below + 1] - column[below]);
    }
}
