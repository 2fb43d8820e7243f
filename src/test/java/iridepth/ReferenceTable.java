package iridepth;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** Rows of a published table in the test resources: CSV with remarks, a header, and cells by column name. */
public final class ReferenceTable {
    private ReferenceTable() {
    }

    /** Reads {@code /iridepth/reference/NAME}. */
    public static List<Map<String, String>> read(String name) {
        String resource = "/iridepth/reference/" + name;
        try (BufferedReader reader = new BufferedReader(new InputStreamReader(
                ReferenceTable.class.getResourceAsStream(resource), StandardCharsets.UTF_8))) {
            List<String> lines = reader.lines().filter(l -> !l.startsWith("#") && !l.isBlank()).toList();
            String[] header = lines.get(0).split(",", -1);
            List<Map<String, String>> rows = new ArrayList<>();
            for (String line : lines.subList(1, lines.size())) {
                String[] cells = line.split(",", header.length);
                Map<String, String> row = new LinkedHashMap<>();
                for (int c = 0; c < header.length; c++) {
                    row.put(header[c], cells[c]);
                }
                rows.add(row);
            }
            return rows;
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
