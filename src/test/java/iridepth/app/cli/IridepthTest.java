package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What the command line answers: exit codes, one-line errors, and nothing half-written. */
class IridepthTest {
    private static final Path WEDGE = Path.of("test-images/P1-oxide-wedge");

    @TempDir
    private Path folder;

    private record Answer(int code, String out, String err) {
    }

    private static Answer run(Object... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int code = Iridepth.run(new PrintWriter(out), new PrintWriter(err),
                Arrays.stream(args).map(Object::toString).toArray(String[]::new));
        return new Answer(code, out.toString(), err.toString());
    }

    private void refused(int code, String reason, Object... args) throws IOException {
        List<Path> before = list();
        Answer answer = run(args);
        assertEquals(code, answer.code(), answer.err());
        assertEquals(1, answer.err().lines().count(), answer.err());
        assertTrue(answer.err().contains(reason), answer.err());
        assertFalse(answer.err().contains("\tat "), answer.err());
        assertEquals(before, list(), "files left behind");
    }

    private List<Path> list() throws IOException {
        try (var files = Files.walk(folder)) {
            return files.sorted().toList();
        }
    }

    private Path write(String name, String text) throws IOException {
        return Files.writeString(folder.resolve(name), text);
    }

    private Object[] map(Path recipe, Path photo) {
        return new Object[] {"map", "--recipe", recipe, "--out", folder.resolve("result"), photo};
    }

    @Test
    void helpNamesEveryCommandAndTheCaution() {
        Answer answer = run("--help");
        assertEquals(0, answer.code());
        assertTrue(answer.out().contains("chart") && answer.out().contains("map"));
        assertTrue(answer.out().contains("no certified measurement"));
        assertEquals(0, run("map", "--help").code());
        assertEquals(0, run("chart", "--help").code());
        assertTrue(run("--version").out().startsWith("iridepth"));
    }

    @Test
    void wrongCommandLinesAreAnsweredWithTwo() throws IOException {
        refused(2, "Unknown options", "chart", "--stak", "air / Si");
        refused(2, "Missing required option", "map", "photo.png");
        refused(2, "nothing to do", "chart", "--stack", "air / SiO2 / Si", "--range", "0:500");
        Path out = folder.resolve("c.png");
        refused(2, "unknown material 'SiO9'; the nearest known is 'SiO'", "chart", "--stack", "air / SiO9 / Si", "--range", "0:500",
                "--out", out);
        refused(2, "two layers have no thickness", "chart", "--stack", "air / PMMA / SiO2 / Si", "--range", "0:500", "--out", out);
        refused(2, "has no film", "chart", "--stack", "air / SiO2 9 nm / Si", "--range", "0:500", "--out", out);
        refused(2, "needs at least an ambient", "chart", "--stack", "air", "--range", "0:500", "--out", out);
        refused(2, "must rise", "chart", "--stack", "air / SiO2 / Si", "--range", "500:0", "--out", out);
        refused(2, "write it in nm as FROM:TO", "chart", "--stack", "air / SiO2 / Si", "--range", "500", "--out", out);
        refused(2, "nearest known is 'D65'", "chart", "--stack", "air / SiO2 / Si", "--range", "0:5", "--out", out, "--light", "D66");
        refused(2, "must be perfect or bare", "chart", "--stack", "air / SiO2 / Si", "--range", "0:5", "--out", out, "--white", "x");
        refused(2, "cannot be the white", "chart", "--stack", "air / soap n=1.33 / air", "--range", "0:5", "--out", out, "--white",
                "bare");
    }

    @Test
    void wrongRecipesAreAnsweredWithTwo() throws IOException {
        refused(2, "there is no such recipe", map(folder.resolve("none.toml"), WEDGE.resolve("photo.png")));
        Path unknown = write("r.toml", Files.readString(WEDGE.resolve("recipe.toml")) + "\n[tolerence]\n");
        refused(2, "line 17: unknown key tolerence; the nearest known is tolerance", map(unknown, WEDGE.resolve("photo.png")));
        Path linear = write("linear.toml", Files.readString(WEDGE.resolve("recipe.toml")).replace("\"srgb\"", "\"linear\""));
        refused(2, "needs camera.sensitivities, or camera.steps", map(linear, WEDGE.resolve("photo.png")));
    }

    @Test
    void photosThatCannotBeUsedAreAnsweredWithThree() throws IOException {
        Path recipe = WEDGE.resolve("recipe.toml");
        refused(3, "none.png", map(recipe, folder.resolve("none.png")));
        refused(3, "r.txt", map(recipe, write("r.txt", "no image")));
        refused(3, "empty.png", map(recipe, write("empty.png", "")));
        byte[] whole = Files.readAllBytes(WEDGE.resolve("photo.png"));
        Path half = Files.write(folder.resolve("half.png"), Arrays.copyOf(whole, whole.length / 2));
        refused(3, "half.png", map(recipe, half));
        refused(3, folder.getFileName().toString(), map(recipe, folder));
    }

    @Test
    void outputThatCannotBeWrittenIsAnsweredWithFour() throws IOException {
        Path file = write("file", "in the way");
        refused(4, "file", "map", "--recipe", WEDGE.resolve("recipe.toml"), "--out", file.resolve("result"),
                WEDGE.resolve("photo.png"));
        Path taken = Files.createDirectory(folder.resolve("taken"));
        write("taken/summary.json", "{}");
        refused(4, "already exists", "map", "--recipe", WEDGE.resolve("recipe.toml"), "--out", taken, WEDGE.resolve("photo.png"));
    }

    @Test
    void chartWritesAPictureAndATable() throws IOException {
        Path out = folder.resolve("oxide.png");
        Answer answer = run("chart", "--stack", "air / SiO2 / Si", "--range", "0:300", "--out", out, "--wavelength", "546");
        assertEquals(0, answer.code(), answer.err());
        assertTrue(answer.out().contains("bright"));
        assertEquals(301, Files.readAllLines(folder.resolve("oxide.csv")).stream()
                .filter(l -> !l.startsWith("#") && !l.startsWith("thickness")).count());
        assertTrue(Files.size(out) > 10_000);
    }
}
