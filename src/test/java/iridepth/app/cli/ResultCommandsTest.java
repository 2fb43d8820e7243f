package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.io.RoiEncoder;
import ij.process.ImageProcessor;
import iridepth.report.CsvFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What profile, measure and contours find on the map of a wafer whose thickness is known. */
class ResultCommandsTest {
    private static final Path WAFER = Path.of("test-images/P2-wafer");

    @TempDir
    static Path folder;

    private static Path result;
    private static ImageProcessor truth;

    @BeforeAll
    static void map() throws IOException {
        for (String name : new String[] {"dark.tif", "flat.tif", "steps.tif"}) {
            Files.copy(WAFER.resolve(name), folder.resolve(name));
        }
        Path recipe = Files.writeString(folder.resolve("recipe.toml"), Files.readString(WAFER.resolve("recipe.toml"))
                + "\n[scale]\npixel_um = 250\n\n[tolerance]\nlimits_nm = [280, 295]\n");
        result = folder.resolve("result");
        Answer.to("map", "--recipe", recipe, "--out", result, WAFER.resolve("photo.tif"));
        truth = IJ.openImage(WAFER.resolve("truth.tif").toString()).getProcessor();
    }

    private static CsvFile table(String name, Object... args) {
        Object[] all = Stream.concat(Arrays.stream(args), Stream.of("--out", folder.resolve(name + ".png"))).toArray();
        Answer.to(all);
        assertTrue(Files.isRegularFile(folder.resolve(name + ".png")));
        return CsvFile.read(folder.resolve(name + ".csv"));
    }

    @Test
    void profileFollowsTheFilmWithinItsBand() {
        CsvFile line = table("line", "profile", result, "--from", "100,150", "--to", "300,150");
        double[] x = line.numbers("x_px");
        double[] nm = line.numbers("thickness_nm");
        double[] u = line.numbers("uncertainty_nm");
        assertEquals(201, x.length);
        int within = 0;
        for (int i = 0; i < x.length; i++) {
            assertEquals(100 + i, x[i], 1e-9);
            assertEquals(0.25 * i * 1000, line.numbers("distance_um")[i], 1e-6);
            within += Math.abs(nm[i] - truth.getf(100 + i, 150)) <= 2 * u[i] ? 1 : 0;
        }
        assertTrue(within >= 0.9 * x.length, within + " of " + x.length + " within the band");
    }

    @Test
    void averagingAcrossShrinksTheRandomPartOnly() {
        CsvFile one = table("one", "profile", result, "--from", "150,100", "--to", "250,100");
        CsvFile nine = table("nine", "profile", result, "--from", "150,100", "--to", "250,100", "--width", "9");
        assertEquals(9, nine.numbers("readings")[50]);
        assertEquals(one.numbers("random_nm")[50] / 3, nine.numbers("random_nm")[50], 0.05 * one.numbers("random_nm")[50]);
        assertEquals(one.numbers("systematic_nm")[50], nine.numbers("systematic_nm")[50], 0.005);
        assertTrue(one.numbers("systematic_nm")[50] > 0.05);
    }

    @Test
    void aLineOfImageJIsTheSameAsItsEnds() throws IOException {
        Path roi = Files.write(folder.resolve("line.roi"), RoiEncoder.saveAsByteArray(new Line(120, 90, 260, 200)));
        CsvFile byRoi = table("by-roi", "profile", result, "--roi", roi);
        CsvFile byEnds = table("by-ends", "profile", result, "--from", "120,90", "--to", "260,200");
        assertEquals(byEnds.rows(), byRoi.rows());
    }

    @Test
    void radialProfileIsTheMeanOfItsRings() {
        CsvFile rings = table("rings", "profile", result, "--centre", "200,150", "--ring", "10", "--radius", "120");
        double[] nm = rings.numbers("thickness_nm");
        assertEquals(12, nm.length);
        for (int i = 0; i < nm.length; i++) {
            double sum = 0;
            int count = 0;
            for (int y = 30; y <= 270; y++) {
                for (int x = 80; x <= 320; x++) {
                    if ((int) (Math.hypot(x - 200, y - 150) / 10) == i) {
                        sum += truth.getf(x, y);
                        count++;
                    }
                }
            }
            assertEquals(sum / count, nm[i], 2 * rings.numbers("uncertainty_nm")[i] + 0.1, "ring " + i);
        }
    }

    @Test
    void sitesAndSelectionsAreMeasuredAndJudged() throws IOException {
        Path roi = Files.write(folder.resolve("oval.roi"), RoiEncoder.saveAsByteArray(new OvalRoi(190, 140, 21, 21)));
        Path points = Files.writeString(folder.resolve("points.csv"), "name,x,y\nleft,90,150\nright,325,150\n");
        CsvFile table = table("sites", "measure", result, "--sites", "9", "--centre", "200,150", "--radius", "120", "--points", points,
                "--region", "150,100,20,10", "--roi", roi);
        assertEquals(13, table.rows().size());
        assertEquals("left", table.texts("place").get(9));
        assertEquals("oval", table.texts("place").get(12));
        double[] x = table.numbers("x_px");
        double[] y = table.numbers("y_px");
        double[] mean = table.numbers("mean_nm");
        double[] u = table.numbers("uncertainty_nm");
        for (int i = 0; i < 9; i++) {
            assertEquals(disk(x[i], y[i], 3), mean[i], 2.5 * u[i], "site " + (i + 1));
        }
        assertEquals(200, table.numbers("pixels")[11]);
        for (int i = 0; i < x.length; i++) {
            double guard = 2 * u[i];
            String verdict = mean[i] <= 295 - guard ? "in tolerance" : mean[i] > 295 + guard ? "out of tolerance" : "too close to call";
            assertEquals(verdict, table.texts("verdict").get(i));
        }
        assertTrue(table.texts("verdict").contains("out of tolerance"));
        Answer again = Answer.any("measure", result, "--point", "325,150", "--out", folder.resolve("again.png"));
        assertEquals(1, again.code());
    }

    private static double disk(double cx, double cy, double radius) {
        double sum = 0;
        int count = 0;
        for (int y = (int) cy - 4; y <= cy + 4; y++) {
            for (int x = (int) cx - 4; x <= cx + 4; x++) {
                if (Math.hypot(x - cx, y - cy) <= radius) {
                    sum += truth.getf(x, y);
                    count++;
                }
            }
        }
        return sum / count;
    }

    @Test
    void contoursRunWhereTheFilmHasTheirThickness() {
        CsvFile lines = table("lines", "contours", result, WAFER.resolve("photo.tif"), "--at", "290,295", "--smooth", "3");
        double[] level = lines.numbers("thickness_nm");
        double[] x = lines.numbers("x_px");
        double[] y = lines.numbers("y_px");
        double[] error = new double[x.length];
        for (int i = 0; i < x.length; i++) {
            error[i] = Math.abs(truth.getf((int) Math.round(x[i]), (int) Math.round(y[i])) - level[i]);
        }
        assertTrue(x.length > 800, x.length + " points");
        assertTrue(Arrays.stream(error).sum() / x.length < 0.3, "mean distance in nm " + Arrays.stream(error).sum() / x.length);
    }

    @Test
    void wrongRequestsAreRefusedInOneLine() throws IOException {
        Path out = folder.resolve("refused.png");
        Path photo = WAFER.resolve("photo.tif");
        Answer.refusal(2, "give --from and --to", "profile", result, "--out", out);
        Answer.refusal(2, "--from a,b: give X,Y", "profile", result, "--from", "a,b", "--to", "1,1", "--out", out);
        Answer.refusal(2, "no pixel of the profile has been read", "profile", result, "--from", "1,1", "--to", "9,9", "--out", out);
        Answer.refusal(2, "lies at or beyond the edge", "profile", result, "--centre", "-50,1", "--out", out);
        Answer.refusal(2, "two different points", "profile", result, "--from", "5,5", "--to", "5,5", "--out", out);
        Answer.refusal(3, "is no result folder", "profile", folder, "--from", "1,1", "--to", "9,9", "--out", out);
        Answer.refusal(2, "say where to measure", "measure", result, "--out", out);
        Answer.refusal(2, "choose 5, 9, 13, 25 or 49", "measure", result, "--sites", "7", "--out", out);
        Answer.refusal(2, "lies outside the map of 400 x 300", "measure", result, "--region", "500,1,5,5", "--out", out);
        Answer.refusal(2, "x and y must be 0 or more", "measure", result, "--region=-4,1,5,5", "--out", out);
        Answer.refusal(3, "is no selection of ImageJ", "measure", result, "--roi", folder.resolve("recipe.toml"), "--out", out);
        Answer.refusal(2, "give --at NM,... or --every NM", "contours", result, photo, "--out", out);
        Answer.refusal(2, "does not cross", "contours", result, photo, "--at", "900", "--out", out);
        Answer.refusal(2, "give a larger step", "contours", result, photo, "--every", "0.01", "--out", out);
        Answer.refusal(3, "but the map", "contours", result, Path.of("test-images/P1-oxide-wedge/photo.png"), "--at", "290", "--out", out);
        Answer.refusal(2, "--out names the picture", "profile", result, "--from", "100,150", "--to", "120,150", "--out",
                folder.resolve("a.csv"));
        Files.createFile(folder.resolve("taken.png"));
        Answer.refusal(4, "already exists", "profile", result, "--from", "100,150", "--to", "120,150", "--out", folder.resolve("taken.png"));
        assertTrue(Files.notExists(out));
    }

    @Test
    void incompleteResultsAreRefused() throws IOException {
        Path broken = Files.createDirectory(folder.resolve("broken"));
        Files.writeString(broken.resolve("summary.json"), "{\"title\": ");
        Answer.refusal(3, "thickness.tif is missing", "profile", broken, "--from", "1,1", "--to", "9,9", "--out", folder.resolve("b.png"));
        for (String name : new String[] {"thickness.tif", "uncertainty.tif", "state.tif", "uncertainty.csv"}) {
            Files.createFile(broken.resolve(name));
        }
        Answer.refusal(3, "is damaged", "profile", broken, "--from", "1,1", "--to", "9,9", "--out", folder.resolve("b.png"));
        Files.writeString(broken.resolve("summary.json"), "{\"title\": \"a\"}");
        Answer.refusal(3, "uncertainty.csv", "profile", broken, "--from", "1,1", "--to", "9,9", "--out", folder.resolve("b.png"));
    }
}
