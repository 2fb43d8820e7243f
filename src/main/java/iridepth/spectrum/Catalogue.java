package iridepth.spectrum;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;

/**
 * A set of published tables that come with the program, each known by a name.
 *
 * <p>The resource {@code index.txt} of the catalogue's folder has a line for each: the name, a blank, the file beside it.
 * Names are matched without regard to case.
 *
 * @param kind   what the tables describe, for messages: "material", "illuminant"
 * @param folder absolute resource folder, such as {@code /iridepth/materials}
 * @param names  the names, in the order of the index
 * @param files  the file of each name, in the same order
 */
public record Catalogue(String kind, String folder, List<String> names, List<String> files) {
    /**
     * Opens a catalogue.
     *
     * @throws IllegalStateException if the program was built without it
     */
    public static Catalogue open(String kind, String folder) {
        try (BufferedReader reader = reader(folder + "/index.txt")) {
            List<String[]> lines = reader.lines().filter(s -> !s.isBlank()).map(s -> s.strip().split(" +")).toList();
            return new Catalogue(kind, folder, lines.stream().map(l -> l[0]).toList(), lines.stream().map(l -> l[1]).toList());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Whether there is a table of that name. */
    public boolean has(String name) {
        return names.stream().anyMatch(n -> n.equalsIgnoreCase(name));
    }

    /**
     * The name as the index writes it.
     *
     * @throws IllegalArgumentException if there is none; the message names the nearest
     */
    public String canonical(String name) {
        return names.stream().filter(n -> n.equalsIgnoreCase(name)).findFirst().orElseThrow(() ->
                new IllegalArgumentException("unknown " + kind + " '" + name + "'; the nearest known is '"
                        + nearest(name, names) + "'"));
    }

    /**
     * The table of a name.
     *
     * @throws IllegalArgumentException if there is none; the message names the nearest
     */
    public SpectralTable table(String name) {
        String known = canonical(name);
        try (BufferedReader reader = reader(folder + "/" + files.get(names.indexOf(known)))) {
            return SpectralTable.read(known, reader);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private static BufferedReader reader(String resource) {
        InputStream stream = Catalogue.class.getResourceAsStream(resource);
        if (stream == null) {
            throw new IllegalStateException("the program lacks its table " + resource);
        }
        return new BufferedReader(new InputStreamReader(stream, StandardCharsets.UTF_8));
    }

    /**
     * The name that takes the fewest edits (Levenshtein distance, case ignored) to reach.
     *
     * @param wanted what was asked for
     * @param names  what there is, not empty; of equals the first wins
     */
    public static String nearest(String wanted, List<String> names) {
        return names.stream().min(Comparator.comparingInt((String n) -> edits(wanted, n))).orElseThrow();
    }

    private static int edits(String from, String to) {
        String a = from.toLowerCase(Locale.ROOT);
        String b = to.toLowerCase(Locale.ROOT);
        int[] row = new int[b.length() + 1];
        Arrays.setAll(row, j -> j);
        for (int i = 1; i <= a.length(); i++) {
            int diagonal = row[0];
            row[0] = i;
            for (int j = 1; j <= b.length(); j++) {
                int replaced = diagonal + (a.charAt(i - 1) == b.charAt(j - 1) ? 0 : 1);
                diagonal = row[j];
                row[j] = Math.min(replaced, Math.min(row[j], row[j - 1]) + 1);
            }
        }
        return row[b.length()];
    }
}
