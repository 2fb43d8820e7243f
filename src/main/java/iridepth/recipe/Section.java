package iridepth.recipe;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import iridepth.spectrum.Catalogue;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/**
 * One table of a recipe, read key by key. Whoever reads it asks for every key that he knows and then calls {@link #finish},
 * which refuses what nobody asked for.
 */
final class Section {
    private final RecipeText text;
    private final String name;
    private final JsonNode node;
    private final Set<String> known = new LinkedHashSet<>();

    private Section(RecipeText text, String name, JsonNode node) {
        this.text = text;
        this.name = name;
        this.node = node;
    }

    static Section top(RecipeText text) {
        return new Section(text, "", text.tree());
    }

    RecipeException error(String key, String message) {
        return text.error(name, key, message);
    }

    private RecipeException wrongType(String key, String wanted) {
        return error(key, path(key) + " must be " + wanted + ", not " + node.get(key));
    }

    /** Dotted name of a key. */
    String path(String key) {
        return name.isEmpty() ? key : name + "." + key;
    }

    boolean has(String key) {
        known.add(key);
        return node.has(key);
    }

    private void require(String key) {
        if (!has(key)) {
            throw error("", path(key) + " is missing");
        }
    }

    String text(String key) {
        require(key);
        if (!node.get(key).isTextual()) {
            throw wrongType(key, "a text in quotes");
        }
        return node.get(key).textValue();
    }

    /** A text, or a list of texts. */
    List<String> texts(String key) {
        require(key);
        if (node.get(key).isTextual()) {
            return List.of(text(key));
        }
        List<String> texts = new ArrayList<>();
        node.get(key).forEach(item -> {
            if (!item.isTextual()) {
                throw wrongType(key, "a text in quotes or a list of such");
            }
            texts.add(item.textValue());
        });
        if (texts.isEmpty()) {
            throw wrongType(key, "a text in quotes or a list of such");
        }
        return texts;
    }

    String text(String key, String otherwise) {
        return has(key) ? text(key) : otherwise;
    }

    /** One of a few words. */
    String choice(String key, String otherwise, List<String> words) {
        String word = text(key, otherwise);
        if (!words.contains(word)) {
            throw error(key, path(key) + " must be one of " + String.join(", ", words) + ", not '" + word + "'");
        }
        return word;
    }

    boolean flag(String key, boolean otherwise) {
        if (has(key) && !node.get(key).isBoolean()) {
            throw wrongType(key, "true or false");
        }
        return has(key) ? node.get(key).booleanValue() : otherwise;
    }

    double number(String key) {
        require(key);
        JsonNode value = node.get(key);
        if (!value.isNumber() || !Double.isFinite(value.doubleValue())) {
            throw wrongType(key, "a finite number");
        }
        return value.doubleValue();
    }

    double number(String key, double otherwise) {
        return has(key) ? number(key) : otherwise;
    }

    /** A number within bounds, both included. */
    double number(String key, double otherwise, double least, double most) {
        double value = number(key, otherwise);
        if (has(key) && !(value >= least && value <= most)) {
            throw error(key, path(key) + " must be " + plain(least) + " to " + plain(most) + ", not " + plain(value));
        }
        return value;
    }

    private static String plain(double value) {
        return value == Math.rint(value) && Math.abs(value) < 1e9 ? String.valueOf((long) value) : String.valueOf(value);
    }

    /** A list of numbers; {@code count} of them unless that is 0. */
    double[] numbers(String key, int count) {
        require(key);
        return numbers(key, node.get(key), count);
    }

    private double[] numbers(String key, JsonNode list, int count) {
        boolean fits = list.isArray() && (count == 0 || list.size() == count);
        for (int i = 0; fits && i < list.size(); i++) {
            fits = list.get(i).isNumber() && Double.isFinite(list.get(i).doubleValue());
        }
        if (!fits) {
            throw error(key, path(key) + " must be a list of " + (count == 0 ? "" : count + " ") + "numbers, not " + list);
        }
        double[] result = new double[list.size()];
        for (int i = 0; i < result.length; i++) {
            result[i] = list.get(i).doubleValue();
        }
        return result;
    }

    /** A list of lists of {@code count} numbers; empty where the key is missing. */
    List<double[]> rows(String key, int count) {
        List<double[]> result = new ArrayList<>();
        if (has(key)) {
            if (!node.get(key).isArray()) {
                throw wrongType(key, "a list of lists of " + count + " numbers");
            }
            node.get(key).forEach(row -> result.add(numbers(key, row, count)));
        }
        return result;
    }

    /** A table; an empty one where the key is missing. */
    Section section(String key) {
        if (!has(key)) {
            return new Section(text, path(key), JsonNodeFactory.instance.objectNode());
        }
        if (!node.get(key).isObject()) {
            throw wrongType(key, "a table, [" + path(key) + "]");
        }
        return new Section(text, path(key), node.get(key));
    }

    /** A list of tables, or a single one; empty where the key is missing. */
    List<Section> sections(String key) {
        List<Section> result = new ArrayList<>();
        if (has(key) && node.get(key).isObject()) {
            result.add(section(key));
        } else if (has(key)) {
            if (!node.get(key).isArray()) {
                throw wrongType(key, "a table or a list of tables");
            }
            for (JsonNode item : node.get(key)) {
                if (!item.isObject()) {
                    throw wrongType(key, "a list of tables");
                }
                result.add(new Section(text, path(key), item));
            }
        }
        return result;
    }

    /** The keys that stand here. */
    List<String> keys() {
        List<String> keys = new ArrayList<>();
        node.fieldNames().forEachRemaining(keys::add);
        return keys;
    }

    /** Marks a key as known without reading it. */
    Section knows(String... keys) {
        known.addAll(List.of(keys));
        return this;
    }

    /** Refuses keys that nobody asked for. */
    void finish() {
        for (String key : keys()) {
            if (!known.contains(key)) {
                throw error(key, "unknown key " + path(key) + "; the nearest known is "
                        + path(Catalogue.nearest(key, List.copyOf(known))));
            }
        }
    }
}
