package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.process.ImageProcessor;
import iridepth.report.HeadlessBrowser;
import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.openqa.selenium.Dimension;
import org.openqa.selenium.WebElement;
import org.openqa.selenium.interactions.Actions;

/** The report pages of the test images in a real browser, against the result's own files. */
class SceneReportsTest {
    @TempDir
    static Path folder;

    private static HeadlessBrowser browser;

    @BeforeAll
    static void start() throws IOException {
        browser = HeadlessBrowser.start();
        // The whole stage must be in view, since the pointer is moved from the middle of what is.
        browser.driver().manage().window().setSize(new Dimension(1400, 2000));
    }

    @AfterAll
    static void close() throws IOException {
        if (browser != null) {
            browser.close();
        }
    }

    private static void run(Object... args) {
        StringWriter err = new StringWriter();
        int code = Iridepth.run(new PrintWriter(new StringWriter()), new PrintWriter(err),
                Arrays.stream(args).map(Object::toString).toArray(String[]::new));
        assertEquals(0, code, err.toString());
    }

    /** A column of a CSV text by its name; empty cells are NaN. */
    private static List<Double> column(List<String> lines, String name) {
        List<String> table = lines.stream().filter(l -> !l.startsWith("#") && !l.isBlank()).toList();
        int at = Arrays.asList(table.get(0).split(",")).indexOf(name);
        assertTrue(at >= 0, name + " in " + table.get(0));
        List<Double> values = new ArrayList<>();
        for (String line : table.subList(1, table.size())) {
            String cell = line.split(",", -1)[at];
            values.add(cell.isEmpty() ? Double.NaN : Double.parseDouble(cell));
        }
        return values;
    }

    @ParameterizedTest
    @CsvSource({"P1-oxide-wedge, photo.png", "P2-wafer, photo.tif", "P3-resist-dome, photo.tif"})
    void pageTellsWhatTheFilesHold(String scene, String photo) throws IOException {
        Path images = Path.of("test-images").resolve(scene);
        Path result = folder.resolve(scene);
        run("map", "--recipe", images.resolve("recipe.toml"), "--out", result, images.resolve(photo));
        ImageProcessor thickness = IJ.openImage(result.resolve("thickness.tif").toString()).getProcessor();
        int w = thickness.getWidth();
        int h = thickness.getHeight();
        browser.open(result.resolve("report.html"));
        for (String layer : List.of("photo", "uncertainty", "state", "thickness")) {
            browser.element("#layer-" + layer).click();
            assertEquals(layer, browser.element("#map").getDomAttribute("data-layer"));
        }
        WebElement stage = browser.element("#stage");
        for (int[] pixel : new int[][] {{w / 2, h / 2}, {w / 3, h / 2}, {w / 2 + 20, h / 3}}) {
            new Actions(browser.driver()).moveToElement(stage, offset(pixel[0], w, stage.getSize().width),
                    offset(pixel[1], h, stage.getSize().height)).perform();
            Matcher place = Pattern.compile("x (\\d+), y (\\d+) px").matcher(browser.text("#at-position").replace('\u00a0', ' '));
            assertTrue(place.find(), browser.text("#at-position"));
            int x = Integer.parseInt(place.group(1));
            int y = Integer.parseInt(place.group(2));
            assertTrue(Math.abs(x - pixel[0]) <= 1 && Math.abs(y - pixel[1]) <= 1, "the pointer stands on whole points of the screen");
            float nm = thickness.getf(x, y);
            String wanted = Float.isNaN(nm) ? "\u2013" : String.format(Locale.ROOT, "%.2f nm", nm);
            assertEquals(wanted, browser.text("#at-thickness").replace('\u00a0', ' ').replace('\u202f', ' '));
        }
        Path figure = folder.resolve(scene + "-profile.png");
        run("profile", result, "--from", "0," + h / 2, "--to", (w - 1) + "," + h / 2, "--out", figure);
        List<String> shown = browser.element("#profile-values").getDomProperty("value").lines().toList();
        List<Double> page = column(shown, "thickness_nm");
        List<Double> command = column(Files.readAllLines(folder.resolve(scene + "-profile.csv")), "thickness_nm");
        assertEquals(command.size(), page.size());
        for (int k = 0; k < page.size(); k++) {
            assertEquals(command.get(k), page.get(k), 1e-3, "sample " + k);
        }
        assertEquals(List.of(), browser.console());
        assertTrue(browser.requests().stream().allMatch(url -> url.startsWith("file:") || url.startsWith("data:")
                || url.startsWith("blob:")), browser.requests().toString());
    }

    private static int offset(int pixel, int pixels, int size) {
        return (int) Math.round((pixel + 0.5) / pixels * size - size / 2.0);
    }
}
