package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.quality.Field;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import iridepth.reading.State;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.openqa.selenium.By;
import org.openqa.selenium.WebElement;

/** The page of a lot whose names try to break it. */
class LotPageTest {
    private static final String NASTY = "<b>50 % #1 \"x\" & 'y' ?.tif";

    @TempDir
    static Path folder;

    private static Path page;
    private static Lot lot;

    private static LotRow row(String photo, String name, double mean, Verdict verdict) {
        Map<State, Long> pixels = new EnumMap<>(State.class);
        for (State state : State.values()) {
            pixels.put(state, state == State.READ ? 900L : 20L);
        }
        return new LotRow(photo, name, pixels, mean, 1.5, mean, mean - 3, mean + 3, 1.4, 0.2, 0.1, Optional.of(verdict), "");
    }

    /** A result folder with as much in it as the page needs. */
    private static void result(String name, double mean) throws IOException {
        Path result = Files.createDirectories(folder.resolve(name));
        for (String file : MapFolder.DATA) {
            Files.createFile(result.resolve(file));
        }
        SummaryJson.write(Map.of("title", name), result.resolve(ResultFolder.SUMMARY));
        try (TiffWriter map = MapTiff.nanometres(result.resolve(MapFolder.THICKNESS), 40, 30, Double.NaN)) {
            float[] nm = new float[1200];
            for (int i = 0; i < nm.length; i++) {
                nm[i] = i < 40 ? Float.NaN : (float) (mean - 3 + 6.0 * (i % 40) / 39);
            }
            map.writeRows(0, nm);
        }
        Files.writeString(result.resolve(MapFolder.REPORT), "<title>report of " + name.length() + "</title>");
    }

    @BeforeAll
    static void write() throws IOException {
        List<LotRow> rows = new ArrayList<>();
        String nasty = NASTY.replace(".tif", "");
        for (String name : List.of("part-1", nasty, "part: 3")) {
            result(name, 100 + rows.size());
            rows.add(row(name + ".tif", name, 100 + rows.size(), Verdict.values()[rows.size()]));
        }
        rows.add(LotRow.unusable("</table><script>alert(1)</script>", "<img src=x onerror=alert(2)>"));
        lot = new Lot("Oxide </title><script>alert(3)</script>", rows, Optional.of(Tolerance.between(95, 105)));
        page = folder.resolve("index.html");
        Path chart = folder.resolve("run-chart.png");
        new LotFigure(lot).write(chart);
        new LotPage(lot, folder, "recipe \"a\" <b>", "Mind & check.").write(page, chart);
    }

    @Test
    void whatComesFromFilesIsEscaped() throws IOException {
        String html = Files.readString(page);
        assertFalse(html.contains("<script"), "a script got in");
        assertFalse(html.contains("<img src=x"), "an element got in");
        assertTrue(html.contains("&lt;/table&gt;&lt;script&gt;alert(1)&lt;/script&gt;"));
        assertTrue(html.contains("&lt;b&gt;50 % #1 &quot;x&quot; &amp; &#39;y&#39; ?.tif"));
    }

    @Test
    void nothingIsAskedOfTheNetwork() throws IOException {
        Matcher source = Pattern.compile("(src|href)=\"([^\"]*)\"").matcher(Files.readString(page));
        while (source.find()) {
            assertTrue(source.group(2).startsWith("data:") || source.group(1).equals("href") && source.group(2).startsWith("./"),
                    source.group(2));
        }
    }

    @Test
    void aBrowserShowsEveryPhotoAndFollowsItsLink() throws IOException {
        try (HeadlessBrowser browser = HeadlessBrowser.start()) {
            for (int i = 0; i < 3; i++) {
                browser.driver().get(page.toUri().toString());
                assertEquals(lot.words(), browser.text("#words"));
                assertEquals(4, browser.driver().findElements(By.cssSelector("tbody tr")).size());
                WebElement link = browser.driver().findElements(By.cssSelector("tbody th a")).get(i);
                assertEquals(lot.rows().get(i).photo(), link.getText());
                assertEquals(112L, browser.run("const i = arguments[0].closest('tr').querySelector('img');"
                        + "return i.complete && i.naturalWidth === 40 && i.naturalHeight === 30 ? i.width : 0", link));
                link.click();
                assertEquals("report of " + lot.rows().get(i).folder().length(), browser.driver().getTitle());
            }
            browser.console();
            browser.requests();
            browser.driver().get(page.toUri().toString());
            assertEquals(List.of(), browser.console());
            assertTrue(browser.requests().stream().allMatch(url -> url.startsWith("file:") || url.startsWith("data:")));
        }
    }

    @Test
    void mapsOfALotShareOneScale() {
        float[] nm = {100, 110, Float.NaN, 105};
        var image = Thumbnail.draw(Field.of(4, 1, nm), 100, 110);
        ColourScale scale = ColourScale.thickness();
        assertEquals(scale.rgb(0) & 0xFFFFFF, image.getRGB(0, 0) & 0xFFFFFF);
        assertEquals(scale.rgb(ColourScale.SIZE - 1) & 0xFFFFFF, image.getRGB(1, 0) & 0xFFFFFF);
        assertEquals(0xD9D9D9, image.getRGB(2, 0) & 0xFFFFFF);
        assertEquals(scale.rgb(ColourScale.index(0.5)) & 0xFFFFFF, image.getRGB(3, 0) & 0xFFFFFF);
        assertEquals(180, Thumbnail.draw(Field.constant(1000, 400, 105), 100, 110).getWidth(), 13);
    }

    @Test
    void aLotWithoutAnyThicknessHasAPageAndAChart() throws IOException {
        Lot none = new Lot("none", List.of(LotRow.unusable("a.tif", "is empty")), Optional.empty());
        Path chart = folder.resolve("none.png");
        new LotFigure(none).write(chart);
        new LotPage(none, folder, "", "").write(folder.resolve("none.html"), chart);
        assertTrue(Files.readString(folder.resolve("none.html")).contains("is empty"));
    }
}
