package iridepth.report;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.core.util.DefaultIndenter;
import com.fasterxml.jackson.core.util.DefaultPrettyPrinter;
import java.io.IOException;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.lang.reflect.Array;
import java.lang.reflect.RecordComponent;
import java.math.BigDecimal;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.Locale;
import java.util.Map;
import java.util.SortedMap;
import java.util.TreeMap;

/**
 * Nested maps, lists, arrays and records as JSON (RFC 8259), the same bytes for the same values: numbers are rounded to ten
 * significant digits, NaN and infinities become null, maps that have no order of their own are sorted by key, and a record's
 * component such as {@code thicknessNm} becomes the key {@code thickness_nm}. Only Jackson's generator is used, since its data
 * binding takes longer to start than a small map takes to read.
 */
public final class SummaryJson {
    private static final int DIGITS = 10;
    /** Beyond these powers of ten a number is written with an exponent. */
    private static final int PLAIN_POWER = 15;

    private SummaryJson() {
    }

    /**
     * The JSON text of a value, indented, with a line feed at its end.
     *
     * @param value a map, list, array, record, number, boolean, enum constant (written as its text), text or null
     * @throws IllegalArgumentException if it holds anything else
     */
    public static String text(Object value) {
        StringWriter text = new StringWriter();
        DefaultIndenter indent = new DefaultIndenter("  ", "\n");
        DefaultPrettyPrinter printer = new DefaultPrettyPrinter().withObjectIndenter(indent);
        try (JsonGenerator json = new JsonFactory().createGenerator(text).setPrettyPrinter(printer)) {
            write(json, value);
        } catch (IOException e) {
            throw new UncheckedIOException("writing to memory cannot fail", e);
        }
        return text.append('\n').toString();
    }

    /**
     * Writes the file; one that stands there is overwritten.
     *
     * @throws OutputException if it cannot be written
     */
    public static void write(Object value, Path file) {
        try {
            Files.writeString(file, text(value));
        } catch (IOException e) {
            throw OutputException.of(file, e);
        }
    }

    private static void write(JsonGenerator json, Object value) throws IOException {
        if (value == null) {
            json.writeNull();
        } else if (value instanceof Map<?, ?> map) {
            writeMap(json, map);
        } else if (value instanceof Iterable<?> list && !(value instanceof Path)) {
            json.writeStartArray();
            for (Object item : list) {
                write(json, item);
            }
            json.writeEndArray();
        } else if (value.getClass().isArray()) {
            json.writeStartArray();
            for (int i = 0; i < Array.getLength(value); i++) {
                write(json, Array.get(value, i));
            }
            json.writeEndArray();
        } else if (value instanceof Record record) {
            writeMap(json, components(record));
        } else {
            writeScalar(json, value);
        }
    }

    private static void writeMap(JsonGenerator json, Map<?, ?> map) throws IOException {
        Map<String, Object> entries = map instanceof LinkedHashMap || map instanceof SortedMap ? new LinkedHashMap<>()
                : new TreeMap<>();
        map.forEach((key, value) -> entries.put(key.toString(), value));
        json.writeStartObject();
        for (Map.Entry<String, Object> entry : entries.entrySet()) {
            json.writeFieldName(entry.getKey());
            write(json, entry.getValue());
        }
        json.writeEndObject();
    }

    private static Map<String, Object> components(Record record) {
        Map<String, Object> entries = new LinkedHashMap<>();
        for (RecordComponent component : record.getClass().getRecordComponents()) {
            String key = component.getName().replaceAll("([A-Z])", "_$1").toLowerCase(Locale.ROOT);
            try {
                component.getAccessor().setAccessible(true);
                entries.put(key, component.getAccessor().invoke(record));
            } catch (ReflectiveOperationException e) {
                throw new IllegalArgumentException("cannot read " + component.getName() + " of " + record.getClass().getName(), e);
            }
        }
        return entries;
    }

    private static void writeScalar(JsonGenerator json, Object value) throws IOException {
        if (value instanceof Double || value instanceof Float) {
            double number = ((Number) value).doubleValue();
            if (Double.isFinite(number)) {
                json.writeNumber(number(number));
            } else {
                json.writeNull();
            }
        } else if (value instanceof Integer || value instanceof Long || value instanceof Short || value instanceof Byte) {
            json.writeNumber(((Number) value).longValue());
        } else if (value instanceof Boolean truth) {
            json.writeBoolean(truth);
        } else if (value instanceof CharSequence || value instanceof Enum<?> || value instanceof Path) {
            json.writeString(value.toString());
        } else {
            throw new IllegalArgumentException("a value of " + value.getClass().getName() + " has no form in JSON");
        }
    }

    private static String number(double value) {
        BigDecimal rounded = Numbers.rounded(value, DIGITS);
        boolean plain = value == 0 || Math.abs(Math.log10(Math.abs(value))) < PLAIN_POWER;
        return plain ? rounded.toPlainString() : rounded.toString();
    }
}
