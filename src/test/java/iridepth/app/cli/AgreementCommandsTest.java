package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.report.CsvFile;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import iridepth.simulation.View;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Locale;
import java.util.Random;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** {@code compare} and {@code repeat} on maps of simulated photos. */
class AgreementCommandsTest {
    private static final int WIDTH = 80;
    private static final int HEIGHT = 40;
    private static final int MAPS = 4;

    @TempDir
    private static Path shared;
    @TempDir
    private Path folder;

    private static Scene scene(long seed) {
        return new Scene("wedge", Rig.srgb(Lamp.illuminant("D65"), View.aperture(0), 20_000), FilmStack.parse("air / SiO2 / Si"), null,
                new double[] {0, 350}, null, Field.wedge(WIDTH, HEIGHT, 100, 300), Lamp.illuminant("D65"), View.aperture(0), seed);
    }

    @BeforeAll
    static void mapOneFieldAgainAndAgain() throws IOException {
        for (int i = 0; i < MAPS; i++) {
            SceneFolder files = SceneFolder.write(shared.resolve("photo-" + i), scene(i));
            Answer.to("map", "--recipe", files.recipe(), "--out", map(i), files.photo());
        }
    }

    private static Path map(int i) {
        return shared.resolve("map-" + i);
    }

    private static double truth(double x) {
        return 100 + 200 * x / (WIDTH - 1);
    }

    private Path write(String name, String text) throws IOException {
        return Files.writeString(folder.resolve(name), text);
    }

    /** Reference points of standard uncertainty 0.5 nm that read too thick by an amount. */
    private Path points(String name, double bias) throws IOException {
        Random random = new Random(9);
        StringBuilder text = new StringBuilder("# invented\nx,y,thickness_nm,uncertainty_nm\n");
        for (int i = 0; i < 40; i++) {
            int x = 3 + random.nextInt(WIDTH - 6);
            text.append(String.format(Locale.ROOT, "%d,%d,%.3f,0.5%n", x, 3 + random.nextInt(HEIGHT - 6),
                    truth(x) + bias + 0.5 * random.nextGaussian()));
        }
        return write(name, text.toString());
    }

    @Test
    void mapAgreesWithAReferenceWithinWhatBothState() throws IOException {
        Answer answer = Answer.to("compare", map(0), points("reference.csv", 0), "--radius", 3, "--out", folder.resolve("a.png"));
        assertTrue(answer.out().contains("40 of 40 read") && answer.out().contains("none shown"), answer.out());
        CsvFile table = CsvFile.read(folder.resolve("a.csv"));
        double[] scores = table.numbers("E_n");
        assertTrue(Arrays.stream(scores).filter(e -> Math.abs(e) <= 1).count() >= 36, Arrays.toString(scores));
        double[] difference = table.numbers("difference_nm");
        assertEquals(0.5, Math.sqrt(Arrays.stream(difference).map(d -> d * d).average().orElseThrow()), 0.15);
        assertTrue(Files.size(folder.resolve("a.png")) > 10_000);
    }

    @Test
    void biasOfTheReferenceShows() throws IOException {
        String out = Answer.to("compare", map(0), points("reference.csv", 3), "--radius", 3).out();
        assertTrue(out.contains("bias         -2.") || out.contains("bias         -3."), out);
        assertTrue(out.contains("the stated uncertainties are too small"), out);
    }

    @Test
    void pointsWithoutUncertaintyHaveNoScore() throws IOException {
        String out = Answer.to("compare", map(0), write("p.csv", "x,y,thickness_nm\n10,10,125.3\n200,3,110\n")).out();
        assertTrue(out.contains("1 of 2 read") && out.contains("E_n          none"), out);
    }

    @Test
    void pointsThatCannotBeUsedAreAnswered() throws IOException {
        Answer.refusal(3, "there is no such file", "compare", map(0), folder.resolve("none.csv"));
        Answer.refusal(3, "has no column y", "compare", map(0), write("a.csv", "x,thickness_nm\n1,2\n"));
        Answer.refusal(3, "line 2: 'abc' is not a finite number", "compare", map(0), write("b.csv", "x,y,thickness_nm\n1,abc,2\n"));
        Answer.refusal(3, "none of the 1 points is read", "compare", map(0), write("c.csv", "x,y,thickness_nm\n500,500,2\n"));
        Answer.refusal(3, "line 3: a point needs its place", "compare", map(0), write("d.csv", "x,y,thickness_nm\n1,1,2\n1,,2\n"));
        Answer.refusal(3, "the uncertainty is negative", "compare", map(0), write("e.csv",
                "x,y,thickness_nm,uncertainty_nm\n1,1,2,-1\n"));
        Answer.refusal(3, "the map has no pixel size", "compare", map(0), write("f.csv", "x_um,y_um,thickness_nm\n1,1,2\n"));
        Answer.refusal(3, "is no result folder", "compare", folder, write("g.csv", "x,y,thickness_nm\n1,1,2\n"));
        Answer.refusal(2, "over " + folder.resolve("g.csv"), "compare", map(0), folder.resolve("g.csv"), "--out",
                folder.resolve("g.png"), "--replace");
        Answer.refusal(2, "--radius must be 0", "compare", map(0), folder.resolve("g.csv"), "--radius", -1);
    }

    @Test
    void repeatedMapsScatterByTheirStatedRandomUncertainty() throws IOException {
        Object[] args = {"repeat", map(0), map(1), map(2), map(3), "--region", "0,0,40,40", "--tolerance", "150:250", "--map",
            folder.resolve("sd.tif"), "--out", folder.resolve("r.png")};
        String out = Answer.to(args).out();
        double scatter = Double.parseDouble(out.replaceAll("(?s).*s_r = ([\\d.]+) nm; two.*", "$1"));
        assertTrue(out.contains("region") && out.contains("6 s_r is"), out);
        double stated = CsvFile.read(map(0).resolve("uncertainty.csv")).numbers("random_nm")[100];
        assertTrue(scatter > 0.3 * stated && scatter < 3 * stated, scatter + " " + stated);
        String summary = Files.readString(map(0).resolve("summary.json"));
        double rms = Double.parseDouble(summary.replaceAll("(?s).*\"random_nm\" : ([\\d.]+).*", "$1"));
        assertEquals(1, scatter / rms, 0.1);
        assertEquals(MAPS, CsvFile.read(folder.resolve("r.csv")).rows().size());
        assertTrue(Files.size(folder.resolve("sd.tif")) > 4 * WIDTH * HEIGHT);
    }

    @Test
    void gaugeStudyFromAListIsThatOfTheManual() throws IOException {
        // AIAG, Measurement Systems Analysis, 4th edition, 2010: contribution 7.76 %, study variation 27.86 %, tolerance of 8: 22.68 %.
        String values = Files.readString(Path.of("src/test/resources/iridepth/quality/gauge-study.csv"));
        Path list = write("study.csv", values.replace("trial,value", "trial,thickness_nm"));
        String out = Answer.to("repeat", "--list", list, "--tolerance=-4:4", "--out", folder.resolve("gauge.png")).out();
        assertTrue(out.matches("(?s).*gauge +0\\.3024 +7\\.76 +27\\.86 +22\\.68.*"), out);
        assertTrue(out.contains("pooled into the repeatability") && out.contains("4 classes"), out);
        assertEquals(90, CsvFile.read(folder.resolve("gauge.csv")).rows().size());
    }

    @Test
    void listOfResultsTakesTheMeansOfTheMaps() throws IOException {
        Path list = write("parts.csv", "part,result\nA," + map(0) + "\nA," + map(1) + "\n");
        String out = Answer.to("repeat", "--list", list, "--region", "10,10,20,20").out();
        assertTrue(out.contains("1 part by 1 operator by 2 repeats"), out);
    }

    @Test
    void repeatsThatCannotBeUsedAreAnswered() throws IOException {
        Answer.refusal(2, "give two or more", "repeat", map(0));
        Answer.refusal(2, "or --list", "repeat");
        Answer.refusal(3, "is no result folder", "repeat", map(0), folder);
        Answer.refusal(2, "write it in nm as FROM:TO", "repeat", map(0), map(1), "--tolerance", "5");
        Answer.refusal(3, "has no column part", "repeat", "--list", write("a.csv", "operator,thickness_nm\n1,2\n"));
        Answer.refusal(3, "part 2, operator 2: 2 repeats are needed", "repeat", "--list", write("b.csv",
                "part,operator,thickness_nm\n1,a,1\n1,a,2\n1,b,1\n1,b,2\n2,a,1\n2,a,2\n"));
        Answer.refusal(3, "line 3: the thickness is missing", "repeat", "--list", write("c.csv", "part,thickness_nm\n1,2\n1,\n"));
    }
}
