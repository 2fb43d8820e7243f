package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.photo.NumberImage;
import iridepth.report.CsvFile;
import iridepth.simulation.Batch;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class SequenceCommandTest {
    private static final int WIDTH = 210;
    private static final int HEIGHT = 120;
    private static final int FRAMES = 60;
    private static final int BROKEN = 30;
    private static final int[][] POINTS = {{40, 60}, {40, 110}, {20, 20}};

    @TempDir
    private Path folder;

    @Test
    void drainingFilmIsFollowedWithinItsUncertainty() throws IOException {
        Batch batch = Batch.soap(folder, FRAMES);
        Files.writeString(batch.photos().resolve("part-" + (BROKEN + 1) + ".tif"), "lost");
        Answer answer = Answer.any("sequence", "--recipe", batch.recipe(), "--interval", "0.5", "--point", "40,60", "--point", "40,110",
                "--point", "20,20", "--disk", "1", "--line", "40,0,40,119", "--out", folder.resolve("out"), batch.photos());
        assertEquals(3, answer.code(), answer.err());
        assertTrue(answer.out().contains("60 photos over 29.5 s, 1 could not be used"), answer.out());

        CsvFile table = CsvFile.read(folder.resolve("out/time.csv"));
        assertEquals(FRAMES, table.rows().size());
        assertEquals("part-10.tif", table.texts("photo").get(9));
        assertTrue(table.texts("message").get(BROKEN).contains("not a TIFF, PNG or JPEG"));
        double[] time = table.numbers("time_s");
        int within = 0;
        int withinTwice = 0;
        for (int p = 0; p < POINTS.length; p++) {
            double[] nm = table.numbers((p + 1) + "_nm");
            double[] u = table.numbers((p + 1) + "_uncertainty_nm");
            for (int i = 0; i < FRAMES; i++) {
                assertEquals(0.5 * i, time[i], 1e-9);
                if (i == BROKEN) {
                    assertTrue(Double.isNaN(nm[i]) && Double.isNaN(u[i]));
                    continue;
                }
                double error = Math.abs(nm[i] - batch.truth().get(i)[POINTS[p][1] * WIDTH + POINTS[p][0]]);
                assertTrue(error < 2, "frame " + i + ", point " + p + ": off by " + error);
                within += error <= u[i] ? 1 : 0;
                withinTwice += error <= 2 * u[i] ? 1 : 0;
            }
        }
        // Of 177 readings 68 % and 95 % are expected; the bounds leave them four standard deviations of that count.
        assertTrue(within >= 95 && within <= 146, within + " of 177 within the standard uncertainty");
        assertTrue(withinTwice >= 157, withinTwice + " of 177 within twice that");

        NumberImage kymograph = NumberImage.open(folder.resolve("out/kymograph.tif"));
        assertEquals(FRAMES, kymograph.width());
        assertEquals(HEIGHT, kymograph.height());
        int read = 0;
        for (int y = 0; y < HEIGHT; y++) {
            for (int i = 0; i < FRAMES; i++) {
                float nm = kymograph.at(i, y);
                if (i == BROKEN) {
                    assertTrue(Float.isNaN(nm));
                } else if (!Float.isNaN(nm)) {
                    read++;
                    assertEquals(batch.truth().get(i)[y * WIDTH + 40], nm, 15, "frame " + i + ", row " + y);
                }
            }
        }
        assertTrue(read > 0.98 * (FRAMES - 1) * HEIGHT, read + " samples read");
        assertTrue(Files.isRegularFile(folder.resolve("out/kymograph.png")) && Files.isRegularFile(folder.resolve("out/time.png")));
    }

    @Test
    void pagesOfOneFileAreReadLikeFiles() throws IOException {
        Batch batch = Batch.soap(folder, 3);
        Answer.to("sequence", "--recipe", batch.recipe(), "--interval", "60", "--region", "10,20,30,40", "--out", folder.resolve("a"),
                batch.photos());
        Answer.to("sequence", "--recipe", batch.recipe(), "--interval", "60", "--region", "10,20,30,40", "--out", folder.resolve("b"),
                batch.stack());
        CsvFile files = CsvFile.read(folder.resolve("a/time.csv"));
        CsvFile pages = CsvFile.read(folder.resolve("b/time.csv"));
        assertEquals(List.of("stack.tiff page 1", "stack.tiff page 2", "stack.tiff page 3"), pages.texts("photo"));
        assertArrayEquals(files.numbers("1_nm"), pages.numbers("1_nm"), 0.05);
        assertArrayEquals(new double[] {0, 60, 120}, pages.numbers("time_s"));
        assertFalse(Files.exists(folder.resolve("b/kymograph.png")));
    }

    @Test
    void wrongRequestsAreRefused() throws IOException {
        Batch batch = Batch.soap(folder, 2);
        Path out = folder.resolve("out");
        Answer.refusal(2, "say what to follow", "sequence", "--recipe", batch.recipe(), "--interval", "1", "--out", out, batch.photos());
        Answer.refusal(2, "--interval -1", "sequence", "--recipe", batch.recipe(), "--interval", "-1", "--point", "1,1", "--out", out,
                batch.photos());
        Answer.refusal(2, "lies outside the photos of 210 x 120 pixels", "sequence", "--recipe", batch.recipe(), "--interval", "1",
                "--point", "300,1", "--out", out, batch.photos());
        Answer.refusal(2, "--line 1,2,3: give X0,Y0,X1,Y1", "sequence", "--recipe", batch.recipe(), "--interval", "1", "--line", "1,2,3",
                "--out", out, batch.photos());
        Files.writeString(batch.photos().resolve("part-1.tif"), "");
        Files.delete(batch.photos().resolve("part-2.tif"));
        Answer.refusal(3, "no photo of the sequence can be used", "sequence", "--recipe", batch.recipe(), "--interval", "1", "--point",
                "1,1", "--out", out, batch.photos());
        assertFalse(Files.exists(out));
    }
}
