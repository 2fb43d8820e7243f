package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.report.CsvFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class PlanCommandTest {
    private static final Path IMAGES = Path.of("test-images");

    @TempDir
    private Path folder;

    private static String[] oxide(String... more) {
        String[] args = {"plan", "--stack", "air / SiO2 / Si", "--range", "0:400"};
        String[] all = Arrays.copyOf(args, args.length + more.length);
        System.arraycopy(more, 0, all, args.length, more.length);
        return all;
    }

    @Test
    void planOfAGenericCameraProposesSteps() throws IOException {
        String png = folder.resolve("plan.png").toString();
        String out = Answer.to((Object[]) oxide("--light", "3200K", "--aperture", "0.2", "--steps", "5", "--out", png)).out();
        assertTrue(out.contains("generic colour camera, 4096 counts") && out.contains("calibrate with 5:"), out);
        assertTrue(out.contains("numerical aperture 0.2") && out.contains("no certified measurement"), out);
        CsvFile table = CsvFile.read(folder.resolve("plan.csv"));
        double[] combined = table.numbers("combined_nm");
        double[] random = table.numbers("random_nm");
        double[] systematic = table.numbers("systematic_nm");
        assertTrue(combined.length > 390);
        for (int i = 0; i < combined.length; i++) {
            assertEquals(combined[i], Math.hypot(random[i], systematic[i]), 2e-3 * combined[i]);
        }
        assertTrue(Files.size(folder.resolve("plan.png")) > 10_000);
    }

    @Test
    void lightsAreRankedAloneAndInPairs() {
        String out = Answer.to((Object[]) oxide("--camera", "mono", "--light", "450nm+-5nm", "--light", "546nm+-5nm", "--light",
                "650nm+-5nm", "--steps", "4")).out();
        assertEquals(6, out.lines().filter(l -> l.startsWith("    ") && l.contains("nm band") && !l.contains("wrong %")).count(), out);
        assertTrue(out.contains("546 nm band, 10 nm wide + 650 nm band, 10 nm wide"), out);
        String joint = Answer.to((Object[]) oxide("--camera", "mono", "--light", "546nm+-5nm", "--light", "650nm+-5nm", "--jointly",
                "--steps", "4")).out();
        assertTrue(joint.contains("read jointly"), joint);
    }

    @Test
    void recipeTellsCameraLightAndView() {
        String out = Answer.to("plan", "--recipe", IMAGES.resolve("P1-oxide-wedge/recipe.toml"), "--full-well", 20000, "--read-noise",
                0).out();
        assertTrue(out.contains("colour-managed camera, 256 counts, full well 20000 e") && out.contains("D65"), out);
        assertTrue(out.contains("median 0.5"), out);
    }

    @Test
    void filmsAtHandAreChosenFrom() {
        String out = Answer.to((Object[]) oxide("--light", "A", "--films", "20,60,110,180,250,330,390", "--steps", "4")).out();
        assertTrue(out.matches("(?s).*calibrate with 4: (20|60|110|180|250|330|390), (20|60|110|180|250|330|390), .*"), out);
    }

    @Test
    void wrongRequestsAreAnswered() {
        Answer.refusal(2, "give --stack and --range, or --recipe", "plan", "--stack", "air / SiO2 / Si");
        Answer.refusal(2, "unknown material 'SiO9'", "plan", "--stack", "air / SiO9 / Si", "--range", "0:9");
        Answer.refusal(2, "has no film", "plan", "--stack", "air / SiO2 9 nm / Si", "--range", "0:9");
        Answer.refusal(2, "must rise", "plan", "--stack", "air / SiO2 / Si", "--range", "9:0");
        Answer.refusal(2, "light 'D66'", (Object[]) oxide("--light", "D66"));
        Answer.refusal(2, "--camera must be", (Object[]) oxide("--camera", "phone"));
        Answer.refusal(3, "there is no such file", (Object[]) oxide("--camera", folder.resolve("none.csv").toString()));
        Answer.refusal(2, "--bits must be 4 to 16", (Object[]) oxide("--bits", "20"));
        Answer.refusal(2, "above 0 and below 1", (Object[]) oxide("--exposure", "1.5"));
        Answer.refusal(2, "are not possible", (Object[]) oxide("--full-well", "10", "--read-noise", "20"));
        Answer.refusal(2, "must be above 0", (Object[]) oxide("--misfit", "0"));
        Answer.refusal(2, "give 1 to 12 steps", (Object[]) oxide("--steps", "20"));
        Answer.refusal(2, "lies outside the range", (Object[]) oxide("--films", "20,900"));
        Answer.refusal(2, "keep the range below", "plan", "--stack", "air / SiO2 / Si", "--range", "0:90000");
        Answer.refusal(2, "there is no such recipe", "plan", "--recipe", folder.resolve("none.toml"));
    }
}
