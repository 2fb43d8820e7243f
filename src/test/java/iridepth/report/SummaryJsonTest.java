package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;

/** Texts are read back by Jackson's own reader. */
class SummaryJsonTest {
    private record Budget(String source, double standardNm, List<Integer> orders) {
    }

    private static JsonNode read(Object value) throws IOException {
        return new ObjectMapper().readTree(SummaryJson.text(value));
    }

    @Test
    void nestedValuesSurvive() throws IOException {
        Map<String, Object> map = new LinkedHashMap<>();
        map.put("mean_nm", 285.25);
        map.put("budget", new Budget("noise \"photon\"\n", 0.5, List.of(1, 2)));
        map.put("percentiles", new double[] {1, 2.5});
        map.put("ok", true);
        map.put("none", null);
        JsonNode node = read(map);
        assertEquals(285.25, node.get("mean_nm").asDouble());
        assertEquals("noise \"photon\"\n", node.get("budget").get("source").asText());
        assertEquals(0.5, node.get("budget").get("standard_nm").asDouble());
        assertEquals(2, node.get("budget").get("orders").get(1).asInt());
        assertEquals(2.5, node.get("percentiles").get(1).asDouble());
        assertTrue(node.get("ok").asBoolean() && node.get("none").isNull());
    }

    @Test
    void missingNumbersAreNull() {
        assertEquals("[ null, null, null ]\n", SummaryJson.text(new double[] {Double.NaN, Double.POSITIVE_INFINITY, Float.NaN}));
    }

    @Test
    void numbersAreRoundedToTenDigits() throws IOException {
        assertEquals("[ 0.3, 100, 0, 0.000000123, 9007199254740993 ]\n",
                SummaryJson.text(List.of(0.1 + 0.2, 100.0, -0.0, 1.23e-7, 9007199254740993L)));
        assertEquals(1e300, read(1e300).asDouble());
        assertEquals(1e-300, read(1e-300).asDouble());
    }

    @Test
    void mapsWithoutOrderAreSorted() {
        Map<String, Integer> map = new HashMap<>();
        for (String key : List.of("q", "b", "zeta", "alpha", "m")) {
            map.put(key, 1);
        }
        List<String> keys = SummaryJson.text(map).lines().filter(l -> l.contains(":")).map(l -> l.strip().split("\"")[1]).toList();
        assertEquals(List.of("alpha", "b", "m", "q", "zeta"), keys);
    }

    @Test
    void valuesWithoutAFormAreRefused() {
        assertThrows(IllegalArgumentException.class, () -> SummaryJson.text(new Object()));
    }
}
