package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.quality.Field;
import iridepth.quality.MeasuredField;
import iridepth.quality.Position;
import iridepth.quality.Profile;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.apache.commons.math3.stat.descriptive.DescriptiveStatistics;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.openqa.selenium.By;
import org.openqa.selenium.Keys;
import org.openqa.selenium.WebElement;
import org.openqa.selenium.interactions.Actions;

/** What a reader can do with a page in a real browser. */
class ReportPageBrowserTest {
    @TempDir
    static Path folder;

    private static final MeasuredField FIELD = MeasuredField.of(
            Field.view(PageFilm.WIDTH, PageFilm.HEIGHT, (x, y) -> PageFilm.state(x, y).hasThickness() ? PageFilm.thickness(x, y)
                    : Double.NaN),
            Field.view(PageFilm.WIDTH, PageFilm.HEIGHT, PageFilm::uncertainty), Field.constant(PageFilm.WIDTH, PageFilm.HEIGHT, 0));

    private static HeadlessBrowser browser;
    private static Path page;

    @BeforeAll
    static void write() throws IOException {
        browser = HeadlessBrowser.start();
        page = folder.resolve("report.html");
        ReportPage.write(page, PageFilm.full());
    }

    @AfterAll
    static void close() throws IOException {
        if (browser != null) {
            browser.close();
        }
    }

    @BeforeEach
    void open() {
        browser.open(page);
    }

    private static Actions at(Actions actions, int x, int y) {
        WebElement stage = browser.element("#stage");
        double width = stage.getSize().width;
        double height = stage.getSize().height;
        return actions.moveToElement(stage, (int) Math.round((x + 0.5) / PageFilm.WIDTH * width - width / 2),
                (int) Math.round((y + 0.5) / PageFilm.HEIGHT * height - height / 2));
    }

    private static void point(int x, int y) {
        at(new Actions(browser.driver()), x, y).perform();
    }

    private static void drag(int x0, int y0, int x1, int y1) {
        Actions actions = at(new Actions(browser.driver()), x0, y0).clickAndHold();
        at(at(actions, (x0 + x1) / 2, (y0 + y1) / 2), x1, y1).release().perform();
    }

    private static String nm(double value, int decimals) {
        return String.format(Locale.ROOT, "%." + decimals + "f nm", value);
    }

    @Test
    void readOutEqualsTheMapAtThreePixels() {
        for (int[] p : new int[][] {{3, 5}, {30, 45}, {90, 60}}) {
            point(p[0], p[1]);
            assertEquals(nm(PageFilm.thickness(p[0], p[1]), 2), browser.text("#at-thickness"));
            assertEquals(nm(PageFilm.uncertainty(p[0], p[1]), 2), browser.text("#at-uncertainty"));
            assertEquals(PageFilm.state(p[0], p[1]).label(), browser.text("#at-state"));
            float other = PageFilm.alternative(p[0], p[1]);
            assertEquals(Float.isNaN(other) ? "none" : nm(other, 1), browser.text("#at-others"));
            assertEquals(String.format(Locale.ROOT, "x %d, y %d px\n%.1f, %.1f \u00b5m", p[0], p[1], p[0] * PageFilm.PIXEL_UM,
                    p[1] * PageFilm.PIXEL_UM), browser.text("#at-position"));
        }
        point(65, 15);
        assertEquals("\u2013", browser.text("#at-thickness"));
        assertEquals("off-curve", browser.text("#at-state"));
    }

    @Test
    @SuppressWarnings("unchecked")
    void everyLayerShowsItsColours() {
        ColourScale scale = ColourScale.thickness();
        int[] ranges = new int[2];
        for (String layer : List.of("photo", "thickness", "uncertainty", "state")) {
            browser.element("#layer-" + layer).click();
            assertEquals(layer, browser.element("#map").getDomAttribute("data-layer"));
            List<Long> read = (List<Long>) browser.run("const c = document.getElementById('canvas'); const k = c.width / arguments[0];"
                    + "return Array.from(c.getContext('2d').getImageData(arguments[1] * k, arguments[2] * k, 1, 1).data)",
                    PageFilm.WIDTH, 10, 30);
            List<Long> hole = (List<Long>) browser.run("const c = document.getElementById('canvas'); const k = c.width / arguments[0];"
                    + "return Array.from(c.getContext('2d').getImageData(arguments[1] * k, arguments[2] * k, 1, 1).data)",
                    PageFilm.WIDTH, 65, 15);
            int rgb = rgb(read);
            switch (layer) {
                case "photo" -> assertEquals(PageFilm.photo().picture().getRGB(10, 30) & 0xFFFFFF, rgb);
                case "state" -> assertEquals(StateStyle.READ.rgb(), rgb);
                default -> ranges[layer.equals("thickness") ? 0 : 1] = place(scale, rgb);
            }
            if (!layer.equals("photo")) {
                assertEquals(StateStyle.OFF_CURVE.rgb(), rgb(hole));
            }
        }
        // Thickness spans 100 to 242.4 nm and is 123.75 here; uncertainty spans 0 to 1.24 nm and is 0.578 here.
        assertEquals(0.17, ranges[0] / 255.0, 0.03);
        assertEquals(0.46, ranges[1] / 255.0, 0.03);
    }

    private static int rgb(List<Long> rgba) {
        return (int) (rgba.get(0) << 16 | rgba.get(1) << 8 | rgba.get(2));
    }

    private static int place(ColourScale scale, int rgb) {
        for (int i = 0; i < ColourScale.SIZE; i++) {
            if (scale.rgb(i) == rgb) {
                return i;
            }
        }
        throw new AssertionError(Integer.toHexString(rgb) + " is no colour of the scale");
    }

    /** Numbers of the profile's table, NaN where empty. */
    private static List<double[]> profile() {
        List<double[]> rows = new ArrayList<>();
        for (String line : browser.element("#profile-values").getDomProperty("value").split("\n")) {
            if (!line.startsWith("distance")) {
                String[] cells = line.split(",", -1);
                double[] row = new double[cells.length];
                for (int i = 0; i < row.length; i++) {
                    row[i] = cells[i].isEmpty() ? Double.NaN : Double.parseDouble(cells[i]);
                }
                rows.add(row);
            }
        }
        return rows;
    }

    /** Bilinear interpolation of a plane gives the plane, so that every sample is known beforehand; the command agrees. */
    private static void assertProfile(int x0, int y0, int x1, int y1) {
        List<double[]> rows = profile();
        double length = Math.hypot(x1 - x0, y1 - y0);
        assertEquals((int) Math.floor(length) + (length == Math.floor(length) ? 1 : 2), rows.size());
        List<Profile.Point> points = Profile.along(FIELD, new Position(x0, y0), new Position(x1, y1), 1).points();
        assertEquals(points.size(), rows.size());
        for (int k = 0; k < rows.size(); k++) {
            double distance = Math.min(k, length);
            double x = x0 + (x1 - x0) * distance / length;
            double y = y0 + (y1 - y0) * distance / length;
            double[] row = rows.get(k);
            assertEquals(distance, row[0], 1e-3);
            assertEquals(distance * PageFilm.PIXEL_UM, row[1], 1e-4);
            assertEquals(x, row[2], 1e-3);
            assertEquals(y, row[3], 1e-3);
            boolean hole = x > 59 && x < 70 && y > 9 && y < 20;
            assertEquals(hole ? Double.NaN : 100 + 1.25 * x + 0.375 * y, row[4], 1e-4);
            assertEquals(hole ? Double.NaN : 0.5 + 0.0078125 * x, row[5], 1.5e-4);
            assertEquals(points.get(k).average().thickness(), row[4], 1e-4);
            assertEquals(points.get(k).average().standardUncertainty(), row[5], 1.5e-4);
        }
    }

    @Test
    void dragDrawsALineWithItsProfile() {
        drag(5, 50, 80, 10);
        assertProfile(5, 50, 80, 10);
        assertEquals("5", browser.element("#from-x").getDomProperty("value"));
        assertEquals("10", browser.element("#to-y").getDomProperty("value"));
        String band = browser.element("#profile-chart .band").getDomAttribute("d");
        assertFalse(band.contains("NaN"));
        assertEquals(2, browser.driver().findElements(By.cssSelector("#profile-chart .band")).size(), "the hole parts the band");
        assertTrue(browser.text("#profile-text").contains(" of 86 samples read"), browser.text("#profile-text"));
    }

    @Test
    void pageBeginsWithALineAcrossTheMiddle() {
        assertProfile(0, 32, 95, 32);
    }

    @Test
    void lineThroughNothingSaysSo() {
        drag(62, 12, 66, 16);
        assertTrue(browser.text("#profile-text").contains("no thickness is read"));
    }

    @Test
    void rectangleGivesItsStatistics() {
        browser.element("#tool-rectangle").click();
        drag(72, 25, 55, 8);
        DescriptiveStatistics expected = new DescriptiveStatistics();
        for (int y = 8; y <= 25; y++) {
            for (int x = 55; x <= 72; x++) {
                if (PageFilm.state(x, y).hasThickness()) {
                    expected.addValue(PageFilm.thickness(x, y));
                }
            }
        }
        assertEquals(expected.getN() + " of 324 pixels", browser.text("#in-count"));
        assertEquals(nm(expected.getMean(), 2), browser.text("#in-mean"));
        assertEquals(nm(expected.getStandardDeviation(), 2), browser.text("#in-deviation"));
        assertEquals(nm(expected.getMin(), 2), browser.text("#in-least"));
        assertEquals(nm(expected.getPercentile(50), 2), browser.text("#in-median"));
        assertEquals(nm(expected.getMax(), 2), browser.text("#in-greatest"));
        assertProfile(0, 32, 95, 32);
    }

    @Test
    void keyboardAloneReadsAndDraws() {
        WebElement skip = browser.element(".skip");
        skip.sendKeys(Keys.ENTER);
        WebElement stage = browser.element("#stage");
        assertEquals(stage, browser.driver().switchTo().activeElement());
        stage.sendKeys(Keys.ARROW_RIGHT, Keys.ARROW_RIGHT, Keys.ARROW_UP);
        assertEquals(nm(PageFilm.thickness(50, 31), 2), browser.text("#at-thickness"));
        String spoken = browser.changed("#live", "");
        assertTrue(spoken.contains(nm(PageFilm.thickness(50, 31), 2)) && spoken.contains("x 50, y 31 px"), spoken);
        stage.sendKeys(Keys.ENTER);
        stage.sendKeys(Keys.chord(Keys.SHIFT, Keys.ARROW_LEFT), Keys.chord(Keys.SHIFT, Keys.ARROW_LEFT));
        stage.sendKeys(Keys.ARROW_DOWN, Keys.ENTER);
        assertProfile(50, 31, 30, 32);
        stage.sendKeys("r", Keys.SPACE);
        stage.sendKeys(Keys.ARROW_RIGHT, Keys.SPACE);
        assertEquals("2 of 2 pixels", browser.text("#in-count"));
        stage.sendKeys("4");
        assertEquals("state", browser.element("#map").getDomAttribute("data-layer"));
        assertTrue(browser.element("#layer-state").isSelected());
    }

    @Test
    void escapeDropsAnUnfinishedLine() {
        WebElement stage = browser.element("#stage");
        stage.sendKeys(Keys.ENTER, Keys.ESCAPE, Keys.ARROW_UP, Keys.ARROW_UP);
        assertProfile(0, 32, 95, 32);
    }

    @Test
    void endsMayBeTyped() {
        browser.run("for (const [id, v] of [['from-x', 7], ['from-y', 3], ['to-x', 7], ['to-y', 60]]) {"
                + "document.getElementById(id).value = v }");
        browser.element("#to-y").sendKeys(Keys.ENTER);
        browser.run("document.getElementById('to-y').dispatchEvent(new Event('change'))");
        assertProfile(7, 3, 7, 60);
    }

    @Test
    void doubtfulRegionIsShownOnTheMap() {
        browser.element("[data-doubt]").click();
        assertEquals("order-doubtful", browser.text("#at-state"));
        assertEquals(nm(PageFilm.alternative(29, 44), 1), browser.text("#at-others"));
        assertEquals(1, browser.driver().findElements(By.cssSelector("#overlay .region:not(.halo)")).size());
        assertEquals("stage", browser.driver().switchTo().activeElement().getDomAttribute("id"));
    }

    @Test
    void nothingLeavesThePageAndTheConsoleStaysEmpty() {
        drag(5, 50, 80, 10);
        browser.element("#layer-photo").click();
        browser.element("#theme").click();
        assertEquals(List.of(), browser.console());
        List<String> requests = browser.requests().stream().filter(url -> !url.startsWith("data:")).toList();
        assertEquals(List.of(page.toUri().toString()), requests);
    }

    @Test
    void textFromFilesStaysText() {
        assertNull(browser.run("return window.broken"));
        String shown = PageFilm.HOSTILE.replace('\u0000', '\uFFFD').replace('\ud800', '\uFFFD');
        assertEquals("Film " + shown, browser.text("h1"));
        assertTrue(browser.text("pre").contains(shown));
        assertTrue(browser.text("#section-1 td").equals("0.4"));
        assertEquals(shown, browser.text("#section-1 tbody th"));
        assertEquals(shown, browser.text("#notes li"));
        assertEquals(1, browser.driver().findElements(By.tagName("img")).size());
    }

    @Test
    void everyControlHasANameAndEveryPartALandmark() {
        List<WebElement> controls = browser.driver().findElements(By.cssSelector("input, button, textarea, #stage, svg[role=img]"));
        assertTrue(controls.size() > 12);
        for (WebElement control : controls) {
            if (control.isDisplayed()) {
                assertFalse(control.getAccessibleName().isBlank(), control.getDomAttribute("id") + " has no name");
            }
        }
        assertEquals(1, browser.driver().findElements(By.tagName("h1")).size());
        for (String landmark : List.of("header", "nav", "main")) {
            assertEquals(1, browser.driver().findElements(By.tagName(landmark)).size());
        }
        for (WebElement section : browser.driver().findElements(By.cssSelector("main section"))) {
            assertFalse(section.getAccessibleName().isBlank());
        }
        assertEquals("status", browser.element("#live").getAriaRole());
        for (WebElement table : browser.driver().findElements(By.cssSelector("main table"))) {
            assertFalse(table.findElements(By.cssSelector("th[scope]")).isEmpty());
        }
    }

    /** WCAG 2.1, success criterion 1.4.3: at least 4.5 : 1 for text; relative luminance as defined there. */
    @Test
    void textStandsOutFromItsGroundInLightAndDark() {
        for (String scheme : List.of("light", "dark")) {
            browser.driver().executeCdpCommand("Emulation.setEmulatedMedia",
                    Map.of("features", List.of(Map.of("name", "prefers-color-scheme", "value", scheme))));
            double paper = luminance("body", "backgroundColor");
            assertEquals(scheme.equals("dark"), paper < 0.1);
            assertEquals(scheme.equals("dark") ? "true" : "false", browser.element("#theme").getDomAttribute("aria-pressed"));
            double panel = luminance("pre", "backgroundColor");
            for (String selector : List.of("h1", ".source", "#caution", "nav a", "#verdict strong", "#at-thickness", "thead th")) {
                assertTrue(contrast(luminance(selector, "color"), paper) >= 4.5, scheme + " " + selector);
            }
            assertTrue(contrast(luminance("pre", "color"), panel) >= 4.5);
        }
        browser.element("#theme").click();
        assertTrue(luminance("body", "backgroundColor") > 0.9, "the button overrides the system");
        browser.driver().executeCdpCommand("Emulation.setEmulatedMedia", Map.of("features", List.of()));
    }

    private static double contrast(double a, double b) {
        return (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
    }

    @SuppressWarnings("unchecked")
    private static double luminance(String selector, String property) {
        List<Object> rgb = (List<Object>) browser.run("return getComputedStyle(document.querySelector(arguments[0]))[arguments[1]]"
                + ".match(/[\\d.]+/g).map(Number)", selector, property);
        double[] weights = {0.2126, 0.7152, 0.0722};
        double sum = 0;
        for (int c = 0; c < 3; c++) {
            double v = ((Number) rgb.get(c)).doubleValue() / 255;
            sum += weights[c] * (v <= 0.03928 ? v / 12.92 : Math.pow((v + 0.055) / 1.055, 2.4));
        }
        return sum;
    }

    @Test
    void pageFitsANarrowWindow() {
        browser.driver().executeCdpCommand("Emulation.setDeviceMetricsOverride",
                Map.of("width", 420, "height", 900, "deviceScaleFactor", 1, "mobile", false));
        try {
            browser.open(page);
            assertEquals(420L, browser.run("return document.documentElement.scrollWidth"));
        } finally {
            browser.driver().executeCdpCommand("Emulation.clearDeviceMetricsOverride", Map.of());
        }
    }

    @Test
    void pageWithNothingOptionalWorks() {
        Path bare = folder.resolve("bare.html");
        ReportPage.write(bare, PageFilm.bare());
        browser.open(bare);
        assertEquals(List.of(), browser.console());
        assertEquals("\u2013", browser.text("#at-thickness"));
        assertEquals("dark", browser.text("#at-state"));
        assertTrue(browser.driver().findElements(By.cssSelector("#layer-photo, #verdict, #notes, #histogram-chart, [data-doubt]"))
                .isEmpty());
        browser.element("#layer-uncertainty").click();
        browser.element("#stage").sendKeys(Keys.ARROW_LEFT);
        assertEquals("x 0, y 1 px", browser.text("#at-position"));
        assertEquals(List.of(), browser.console());
    }
}
