package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.Signal;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A page of a photo of 24 megapixels, noisy in every layer and with two other candidates everywhere. */
class ReportPageSizeTest {
    private static final int WIDTH = 6000;
    private static final int HEIGHT = 4000;
    private static final int BAND = 100;

    @TempDir
    static Path folder;

    private static Path page;

    /** Repeatable noise of a pixel, about -1 to 1: the sum of four hashed bytes (splitmix64). */
    private static float noise(int x, int y, int kind) {
        long z = (x + 6151L * y + 1_000_003L * kind) * 0x9E3779B97F4A7C15L;
        z = (z ^ z >>> 30) * 0xBF58476D1CE4E5B9L;
        z = (z ^ z >>> 27) * 0x94D049BB133111EBL;
        z ^= z >>> 31;
        return ((z & 255) + (z >> 8 & 255) + (z >> 16 & 255) + (z >> 24 & 255)) / 510f - 1;
    }

    /** A slope of 300 to 900 nm with a standard deviation of about 1 nm. */
    private static float thickness(int x, int y) {
        return 300 + 0.1f * x + 3.5f * noise(x, y, 0);
    }

    @BeforeAll
    static void write() {
        PageMap map = PageMap.of(WIDTH, HEIGHT, 0.325, 2);
        PagePhoto photo = PagePhoto.of(WIDTH, HEIGHT, true);
        int size = WIDTH * BAND;
        for (int top = 0; top < HEIGHT; top += BAND) {
            float[] nm = new float[size];
            float[] sigma = new float[size];
            float[] lower = new float[size];
            float[] upper = new float[size];
            byte[] codes = new byte[size];
            float[] light = new float[3 * size];
            for (int i = 0; i < size; i++) {
                int x = i % WIDTH;
                int y = top + i / WIDTH;
                nm[i] = thickness(x, y);
                sigma[i] = 1 + 0.1f * noise(x, y, 1);
                lower[i] = nm[i] - 190 + 3.5f * noise(x, y, 2);
                upper[i] = nm[i] + 190 + 3.5f * noise(x, y, 3);
                codes[i] = (byte) (noise(x, y, 4) > 0.7 ? StateStyle.OFF_CURVE : StateStyle.ORDER_DOUBTFUL).code();
                for (int c = 0; c < 3; c++) {
                    light[3 * i + c] = (float) (0.2 + 0.1 * Math.sin(x * 0.004 + c) + 0.01 * noise(x, y, 5 + c));
                }
            }
            map.add(top, nm, sigma, codes, lower, upper);
            photo.add(top, new Signal(WIDTH, BAND, 3, light, new float[size], new byte[light.length]));
        }
        page = folder.resolve("large.html");
        PageContent bare = PageFilm.bare();
        ReportPage.write(page, new PageContent("Large", "large.tif", Optional.empty(), List.of(), map, Optional.of(photo),
                bare.histogram(), Optional.empty(), List.of(), List.of(), bare.origin(), List.of(), "Check."));
    }

    @Test
    void pageOfTwentyFourMegapixelsIsBelowEightMegabytes() throws IOException {
        assertTrue(Files.size(page) < 8_000_000, Files.size(page) + " bytes");
    }

    @Test
    void readOutIsOnePixelOfTheMap() throws IOException {
        try (HeadlessBrowser browser = HeadlessBrowser.start()) {
            browser.open(page);
            assertTrue(browser.text("#sampling").contains("6 \u00d7 6"), browser.text("#sampling"));
            for (int[] p : new int[][] {{3, 3}, {2997, 2001}, {5997, 3999}}) {
                browser.run("for (const id of ['from', 'to']) { for (const k of [0, 1]) {"
                        + "document.getElementById(id + '-' + 'xy'[k]).value = arguments[k] } }"
                        + "document.getElementById('to-y').dispatchEvent(new Event('change'))", p[0], p[1]);
                String[] values = browser.element("#profile-values").getDomProperty("value").split("\n");
                assertEquals(2, values.length);
                String[] cells = values[1].split(",");
                assertEquals(Map.of("x", p[0], "y", p[1]), Map.of("x", (int) Double.parseDouble(cells[2]), "y",
                        (int) Double.parseDouble(cells[3])));
                assertEquals(String.format(Locale.ROOT, "%.4f", thickness(p[0], p[1])), cells[4]);
            }
            assertEquals(List.of(), browser.console());
        }
    }
}
