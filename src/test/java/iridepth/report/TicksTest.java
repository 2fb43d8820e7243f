package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import org.junit.jupiter.api.Test;

class TicksTest {
    private static List<String> labels(double from, double to, int most) {
        Ticks ticks = Ticks.of(from, to, most);
        return ticks.at().stream().map(ticks::label).toList();
    }

    @Test
    void ticksAreRoundNumbersWithinTheAxis() {
        assertEquals(List.of("0", "50", "100", "150"), labels(0, 155, 5));
        assertEquals(List.of("0.2", "0.4", "0.6"), labels(0.15, 0.62, 4));
        assertEquals(List.of("\u22121", "0", "1"), labels(-1, 1, 3));
        assertEquals(List.of("275", "280", "285", "290", "295"), labels(275, 295, 5));
    }

    @Test
    void endsCountDespiteRounding() {
        assertEquals(List.of("0.0", "0.1", "0.2", "0.3"), labels(0, 0.1 + 0.2, 4));
    }

    @Test
    void axisWithoutLengthIsRefused() {
        assertThrows(IllegalArgumentException.class, () -> Ticks.of(1, 1, 5));
    }
}
