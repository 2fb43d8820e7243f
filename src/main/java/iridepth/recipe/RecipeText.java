package iridepth.recipe;

import com.fasterxml.jackson.core.JacksonException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.dataformat.toml.TomlMapper;
import java.io.IOException;
import java.nio.charset.MalformedInputException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The text of a recipe and the tree that TOML makes of it, so that what is wrong in the tree can be shown in the text.
 *
 * @param file  the recipe file
 * @param lines its lines
 * @param tree  its content
 */
record RecipeText(Path file, List<String> lines, JsonNode tree) {
    private static final Pattern HEADER = Pattern.compile("\\s*\\[{1,2}\\s*([^\\]]+?)\\s*\\]{1,2}.*");

    static RecipeText read(Path file) {
        try {
            String text = Files.readString(file);
            return new RecipeText(file, text.lines().toList(), new TomlMapper().readTree(text));
        } catch (NoSuchFileException e) {
            throw new RecipeException(file + ": there is no such recipe; check the path");
        } catch (MalformedInputException e) {
            throw new RecipeException(file + ": not a text file; a recipe is TOML in UTF-8");
        } catch (JacksonException e) {
            int line = e.getLocation() == null ? 0 : e.getLocation().getLineNr();
            throw new RecipeException(file + (line > 0 ? ", line " + line : "") + ": not valid TOML: "
                    + e.getOriginalMessage().lines().findFirst().orElse("cannot be read"));
        } catch (IOException e) {
            throw new RecipeException(file + ": cannot be read (" + e.getMessage() + "); check that it is a readable file");
        }
    }

    /**
     * The error for a key, with its file and line.
     *
     * @param table dotted name of the table, empty for the top
     * @param key   the key in it, or empty for the table itself
     */
    RecipeException error(String table, String key, String message) {
        int line = line(table, key);
        return new RecipeException(file + (line > 0 ? ", line " + line : "") + ": " + message);
    }

    /** Line of a key, 1 for the first; 0 where it cannot be told. */
    private int line(String table, String key) {
        Pattern assignment = Pattern.compile("(^|.*[{,\\s])[\"']?" + Pattern.quote(key) + "[\"']?\\s*=.*");
        Pattern dotted = Pattern.compile("\\s*([\\w.-]+\\.)?" + Pattern.quote(key) + "\\..*=.*");
        String current = "";
        int tableLine = 0;
        for (int i = 0; i < lines.size(); i++) {
            String text = lines.get(i);
            Matcher header = HEADER.matcher(text);
            if (!text.strip().startsWith("#") && header.matches() && !text.contains("=")) {
                current = header.group(1);
                tableLine = current.equals(table) || tableLine == 0 && current.startsWith(table + ".") ? i + 1 : tableLine;
                if (!key.isEmpty() && (table.isEmpty() ? current : current).equals(table.isEmpty() ? key : table + "." + key)) {
                    return i + 1;
                }
            } else if (!key.isEmpty() && (current.equals(table) || table.startsWith(current + ".") || current.isEmpty())
                    && (assignment.matcher(text).matches() || dotted.matcher(text).matches())) {
                return i + 1;
            }
        }
        return tableLine;
    }
}
