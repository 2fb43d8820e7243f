package iridepth.quality;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;

/** A published table among the test resources: lines of '#' name its source, then comes a line of column names. */
record PublishedTable(List<String> columns, List<String[]> rows) {

    static PublishedTable read(String name) {
        var stream = PublishedTable.class.getResourceAsStream(name);
        try (var reader = new BufferedReader(new InputStreamReader(stream, StandardCharsets.UTF_8))) {
            List<String[]> lines = reader.lines().filter(line -> !line.startsWith("#") && !line.isBlank())
                    .map(line -> line.split(",")).toList();
            return new PublishedTable(List.of(lines.get(0)), lines.subList(1, lines.size()));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    double[] column(String name) {
        int index = columns.indexOf(name);
        return rows.stream().mapToDouble(row -> Double.parseDouble(row[index])).toArray();
    }

    /** A column as whole numbers, such as the index of a part. */
    int[] indices(String name) {
        return Arrays.stream(column(name)).mapToInt(value -> (int) value).toArray();
    }
}
