package iridepth.simulation;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A table of text cells with named columns, read from a CSV resource whose comment lines start with {@code #}. Cells may
 * not hold commas.
 */
public final class Table {
    private final String name;
    private final List<String> columns;
    private final List<String[]> rows;

    private Table(String name, List<String> columns, List<String[]> rows) {
        this.name = name;
        this.columns = columns;
        this.rows = rows;
    }

    /**
     * Reads a table from the class path.
     *
     * @param resource absolute resource name, such as {@code /iridepth/materials/Si.csv}
     * @throws IllegalArgumentException where there is no such resource
     */
    public static Table resource(String resource) {
        try (InputStream in = Table.class.getResourceAsStream(resource)) {
            if (in == null) {
                throw new IllegalArgumentException("no table " + resource + " on the class path");
            }
            BufferedReader lines = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8));
            List<String[]> cells = new ArrayList<>();
            for (String line = lines.readLine(); line != null; line = lines.readLine()) {
                if (!line.isBlank() && !line.startsWith("#")) {
                    cells.add(line.trim().split(",", -1));
                }
            }
            return new Table(resource, Arrays.asList(cells.get(0)), cells.subList(1, cells.size()));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Number of rows below the heading. */
    public int size() {
        return rows.size();
    }

    /** The cell of a row in the named column. */
    public String text(int row, String column) {
        int at = columns.indexOf(column);
        if (at < 0) {
            throw new IllegalArgumentException(name + " has no column " + column + "; it has " + columns);
        }
        return rows.get(row)[at];
    }

    /** The cell of a row in the named column as a number. */
    public double number(int row, String column) {
        return Double.parseDouble(text(row, column));
    }

    /** All numbers of the named column, from the first row down. */
    public double[] numbers(String column) {
        double[] values = new double[size()];
        for (int row = 0; row < values.length; row++) {
            values[row] = number(row, column);
        }
        return values;
    }

    /**
     * Linear interpolation in the column {@code wavelength_nm}, the end values held outside the table.
     *
     * @param column column to read
     */
    public Spectrum spectrum(String column) {
        double[] x = numbers("wavelength_nm");
        double[] y = numbers(column);
        return wavelength -> {
            int found = Arrays.binarySearch(x, wavelength);
            if (found >= 0) {
                return y[found];
            }
            int above = -found - 1;
            if (above == 0) {
                return y[0];
            }
            if (above == x.length) {
                return y[x.length - 1];
            }
            double part = (wavelength - x[above - 1]) / (x[above] - x[above - 1]);
            return y[above - 1] + part * (y[above] - y[above - 1]);
        };
    }
}
