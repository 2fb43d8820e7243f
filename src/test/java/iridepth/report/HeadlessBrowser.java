package iridepth.report;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.File;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.logging.Level;
import java.util.logging.Logger;
import java.util.stream.Stream;
import org.junit.jupiter.api.Assertions;
import org.junit.jupiter.api.Assumptions;
import org.openqa.selenium.By;
import org.openqa.selenium.WebElement;
import org.openqa.selenium.chrome.ChromeDriver;
import org.openqa.selenium.chrome.ChromeDriverService;
import org.openqa.selenium.chrome.ChromeOptions;
import org.openqa.selenium.logging.LogType;

/**
 * A real browser without a window: Chromium with its driver, both found on the search path. Tests that need it are skipped
 * where it is missing, unless the environment variable IRIDEPTH_BROWSER is "required": then they fail.
 */
public final class HeadlessBrowser implements AutoCloseable {
    private static final Logger DRIVER_LOG = Logger.getLogger("org.openqa.selenium");

    private final ChromeDriver driver;
    private final Path profile;

    private HeadlessBrowser(ChromeDriver driver, Path profile) {
        this.driver = driver;
        this.profile = profile;
    }

    /** Starts it, or skips the tests. */
    public static HeadlessBrowser start() throws IOException {
        Optional<Path> browser = find("chromium", "chromium-browser", "google-chrome");
        Optional<Path> chromedriver = find("chromedriver");
        if (browser.isEmpty() || chromedriver.isEmpty()) {
            String message = "no chromium with chromedriver on the search path; install Debian's chromium and chromium-driver";
            if ("required".equals(System.getenv("IRIDEPTH_BROWSER"))) {
                Assertions.fail(message);
            }
            Assumptions.abort("skipped: " + message);
        }
        DRIVER_LOG.setLevel(Level.SEVERE);
        Path profile = Files.createTempDirectory("browser");
        ChromeOptions options = new ChromeOptions();
        options.setBinary(browser.get().toFile());
        options.addArguments("--headless=new", "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
                "--disable-background-networking", "--disable-component-update", "--disable-sync", "--hide-scrollbars",
                "--window-size=1400,1000", "--user-data-dir=" + profile);
        options.setCapability("goog:loggingPrefs", Map.of(LogType.BROWSER, "ALL", LogType.PERFORMANCE, "ALL"));
        ChromeDriverService service = new ChromeDriverService.Builder().usingDriverExecutable(chromedriver.get().toFile()).build();
        return new HeadlessBrowser(new ChromeDriver(service, options), profile);
    }

    private static Optional<Path> find(String... names) {
        String path = Optional.ofNullable(System.getenv("PATH")).orElse("");
        return Stream.of(names).flatMap(name -> Stream.of(path.split(File.pathSeparator)).map(folder -> Path.of(folder, name)))
                .filter(Files::isExecutable).findFirst();
    }

    public ChromeDriver driver() {
        return driver;
    }

    /** Opens a page and waits until its script has put it together. */
    public void open(Path page) {
        driver.manage().logs().get(LogType.BROWSER);
        driver.manage().logs().get(LogType.PERFORMANCE);
        driver.get(page.toUri().toString());
        for (int i = 0; i < 600 && !"true".equals(element("html").getDomAttribute("data-ready")); i++) {
            sleep();
        }
        Assertions.assertEquals("true", element("html").getDomAttribute("data-ready"), "the page does not come to life: " + console());
    }

    private static void sleep() {
        try {
            Thread.sleep(50);
        } catch (InterruptedException e) {
            throw new IllegalStateException(e);
        }
    }

    /** Waits until an element's text is not what it was. */
    String changed(String selector, String before) {
        for (int i = 0; i < 100 && text(selector).equals(before); i++) {
            sleep();
        }
        return text(selector);
    }

    public WebElement element(String selector) {
        return driver.findElement(By.cssSelector(selector));
    }

    public String text(String selector) {
        return element(selector).getDomProperty("textContent");
    }

    Object run(String script, Object... arguments) {
        return driver.executeScript(script, arguments);
    }

    /** What the console has been told since the page was opened. */
    public List<String> console() {
        return driver.manage().logs().get(LogType.BROWSER).getAll().stream().map(entry -> entry.getMessage()).toList();
    }

    /** Addresses that the page has asked for since it was opened, itself included. */
    public List<String> requests() {
        List<String> urls = new ArrayList<>();
        try {
            for (var entry : driver.manage().logs().get(LogType.PERFORMANCE)) {
                JsonNode message = new ObjectMapper().readTree(entry.getMessage()).path("message");
                if (message.path("method").asText().equals("Network.requestWillBeSent")) {
                    urls.add(message.path("params").path("request").path("url").asText());
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return urls;
    }

    @Override
    public void close() throws IOException {
        driver.quit();
        try (Stream<Path> files = Files.walk(profile)) {
            files.sorted(java.util.Comparator.reverseOrder()).map(Path::toFile).forEach(File::delete);
        }
    }
}
