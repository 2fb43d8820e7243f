package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.report.CsvFile;
import iridepth.simulation.Batch;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class LotCommandTest {
    private static final int PHOTOS = 30;

    @TempDir
    private Path folder;

    private static double[] centres(int count) {
        Random random = new Random(4);
        double[] centres = new double[count];
        Arrays.setAll(centres, i -> 100 + 0.8 * random.nextGaussian());
        return centres;
    }

    private Object[] lot(Batch batch) {
        return new Object[] {"lot", "--recipe", batch.recipe(), "--out", folder.resolve("lot"), batch.photos()};
    }

    private List<Path> results() throws IOException {
        if (!Files.isDirectory(folder.resolve("lot"))) {
            return List.of();
        }
        try (Stream<Path> list = Files.list(folder.resolve("lot"))) {
            return list.filter(path -> Files.isRegularFile(path.resolve("summary.json"))
                    && !path.getFileName().toString().startsWith(".")).toList();
        }
    }

    private static Map<Path, FileTime> times(List<Path> folders) throws IOException {
        Map<Path, FileTime> times = new HashMap<>();
        for (Path each : folders) {
            for (String file : List.of("summary.json", "thickness.tif", "report.html")) {
                times.put(each.resolve(file), Files.getLastModifiedTime(each.resolve(file)));
            }
        }
        return times;
    }

    private static double mean(double[] values) {
        return Arrays.stream(values).average().orElseThrow();
    }

    /** Runs the command in a process of its own and ends that as Ctrl-C would once it has written some results. */
    private void interrupt(Object[] args, int atLeast) throws Exception {
        List<String> command = new ArrayList<>(List.of(Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                "-Djava.awt.headless=true", "-cp", System.getProperty("java.class.path"), "iridepth.app.cli.Iridepth"));
        Arrays.stream(args).map(Object::toString).forEach(command::add);
        File log = folder.resolve("log.txt").toFile();
        Process process = new ProcessBuilder(command).redirectErrorStream(true).redirectOutput(log).start();
        while (process.isAlive() && results().size() < atLeast) {
            Thread.sleep(5);
        }
        assertTrue(process.isAlive(), () -> "it ended by itself: " + log);
        process.destroy();
        process.waitFor();
    }

    @Test
    void interruptedLotWithBadFilesEndsWithEveryRowAndNothingDoneTwice() throws Exception {
        Batch batch = Batch.oxide(folder, centres(PHOTOS), "");
        Path truncated = batch.photos().resolve("part-7.tif");
        Files.write(truncated, Arrays.copyOf(Files.readAllBytes(truncated), 3000));
        Files.writeString(batch.photos().resolve("part-12.tif"), "no picture");

        interrupt(lot(batch), 4);
        List<Path> done = results();
        assertTrue(done.size() >= 4 && done.size() < PHOTOS - 2, done.size() + " results when interrupted");
        assertFalse(Files.exists(folder.resolve("lot/lot.csv")), "a table of an unfinished lot");
        assertTrue(Files.readString(folder.resolve("lot/lot.json")).contains("\"finished\" : false"));
        Map<Path, FileTime> before = times(done);

        Answer answer = Answer.any(lot(batch));
        assertEquals(3, answer.code(), answer.err());
        assertTrue(answer.out().contains(done.size() + " kept from before"), answer.out());
        assertEquals(before, times(done));
        assertTrue(Files.readString(folder.resolve("lot/lot.json")).contains("\"finished\" : true"));

        CsvFile table = CsvFile.read(folder.resolve("lot/lot.csv"));
        List<String> messages = table.texts("message");
        double[] means = table.numbers("mean_nm");
        double[] read = table.numbers("read_px");
        assertEquals(PHOTOS, messages.size());
        for (int i = 0; i < PHOTOS; i++) {
            assertEquals("part-" + (i + 1) + ".tif", table.texts("photo").get(i));
            if (i == 6 || i == 11) {
                assertTrue(messages.get(i).contains(i == 6 ? "truncated" : "is not a TIFF, PNG or JPEG"), messages.get(i));
                assertTrue(Double.isNaN(means[i]));
            } else {
                assertEquals("", messages.get(i));
                assertEquals(mean(batch.truth().get(i)), means[i], 0.1);
                assertTrue(read[i] > 0.99 * batch.truth().get(i).length);
            }
        }
        try (Stream<Path> left = Files.list(folder.resolve("lot"))) {
            assertEquals(List.of(), left.filter(path -> path.getFileName().toString().endsWith(".part")).toList());
        }
    }

    @Test
    void whatChangesIsDoneAgainAndNothingElse() throws IOException {
        Batch batch = Batch.oxide(folder, centres(3), "");
        assertEquals(0, Answer.to(lot(batch)).code());
        Files.copy(batch.photos().resolve("part-3.tif"), batch.photos().resolve("part-1.tif"),
                java.nio.file.StandardCopyOption.REPLACE_EXISTING);
        Files.delete(folder.resolve("lot/part-2/report.html"));
        Answer again = Answer.to(lot(batch));
        assertTrue(again.out().contains("; 1 kept from before"), again.out());
        double[] means = CsvFile.read(folder.resolve("lot/lot.csv")).numbers("mean_nm");
        assertEquals(means[2], means[0], 1e-9);
        Files.writeString(folder.resolve("camera.csv"), "# checked\n" + Files.readString(folder.resolve("camera.csv")));
        assertFalse(Answer.to(lot(batch)).out().contains("kept"));
    }

    @Test
    void oneOutOfToleranceMakesTheVerdict() throws IOException {
        Batch batch = Batch.oxide(folder, new double[] {100, 109, 100.3}, "\n[tolerance]\nlimits_nm = [95, 105]\n");
        Answer answer = Answer.to(lot(batch));
        assertEquals(1, answer.code());
        assertTrue(answer.out().contains("3 photos, 2 in tolerance, 1 out of tolerance"), answer.out());
        assertEquals(List.of("in tolerance", "out of tolerance", "in tolerance"),
                CsvFile.read(folder.resolve("lot/lot.csv")).texts("verdict"));
    }

    @Test
    void theRecipesOwnFilesAreNoPhotosOfTheLot() throws IOException {
        Batch batch = Batch.oxide(folder, centres(2), "");
        for (String name : List.of("part-1.tif", "part-2.tif")) {
            Files.move(batch.photos().resolve(name), folder.resolve(name));
        }
        Files.delete(folder.resolve("truth.tif"));
        Files.delete(folder.resolve("limit.tif"));
        Files.delete(batch.stack());
        Answer.to("lot", "--recipe", batch.recipe(), "--out", folder.resolve("lot"), folder);
        assertEquals(List.of("part-1.tif", "part-2.tif"), CsvFile.read(folder.resolve("lot/lot.csv")).texts("photo"));
    }

    @Test
    void faultsOfTheRigAndStrangeFoldersAreRefused() throws IOException {
        Batch batch = Batch.oxide(folder, centres(1), "");
        Files.createDirectory(folder.resolve("strange"));
        Files.writeString(folder.resolve("strange/letter.txt"), "Dear");
        Answer.refusal(4, "is not empty and holds no lot.json", "lot", "--recipe", batch.recipe(), "--out", folder.resolve("strange"),
                batch.photos());
        Answer.refusal(3, "holds no photo", "lot", "--recipe", batch.recipe(), "--out", folder.resolve("lot"), folder.resolve("strange"));
        Answer.refusal(2, "Missing required parameter", "lot", "--recipe", batch.recipe(), "--out", folder.resolve("lot"));
        Path two = Files.writeString(folder.resolve("two.toml"), Files.readString(batch.recipe()).replace("[light]",
                "[[light]]\nwavelength_nm = 546\nbandwidth_nm = 10\n\n[[light]]").replace("flat = \"flat.tif\"",
                "flat = [\"flat.tif\", \"flat.tif\"]"));
        Answer.refusal(2, "it has 2 lights", "lot", "--recipe", two, "--out", folder.resolve("lot"), batch.photos());
        Files.delete(folder.resolve("flat.tif"));
        Answer.refusal(3, "flat.tif", lot(batch));
        assertFalse(Files.exists(folder.resolve("lot")));
    }
}
