package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.gui.PointRoi;
import ij.gui.PolygonRoi;
import ij.gui.Roi;
import ij.gui.ShapeRoi;
import ij.io.RoiEncoder;
import ij.process.FloatProcessor;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import java.util.zip.ZipEntry;
import java.util.zip.ZipOutputStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Selections written by ImageJ, a program apart, hold the pixels that it counts in them. */
class RoiFileTest {
    @TempDir
    private Path folder;

    private Path save(String name, Roi roi) throws IOException {
        return Files.write(folder.resolve(name), RoiEncoder.saveAsByteArray(roi));
    }

    private RoiFile saved(String name, Roi roi) throws IOException {
        return RoiFile.read(save(name, roi)).get(0);
    }

    private static int count(boolean[] mask) {
        int count = 0;
        for (boolean in : mask) {
            count += in ? 1 : 0;
        }
        return count;
    }

    @Test
    void areasHoldThePixelsThatImageJCounts() throws IOException {
        Roi polygon = new PolygonRoi(new int[] {5, 40, 22}, new int[] {3, 10, 33}, 3, Roi.POLYGON);
        Roi hole = new ShapeRoi(new Roi(4, 4, 20, 20)).not(new ShapeRoi(new Roi(9, 9, 5, 5)));
        for (Roi roi : List.of(new Roi(2, 3, 7, 5), new OvalRoi(10, 8, 21, 13), polygon, hole)) {
            RoiFile file = saved("area.roi", roi);
            FloatProcessor picture = new FloatProcessor(60, 50);
            picture.setRoi(roi);
            assertTrue(file.isArea() && !file.isLine() && !file.isPoints());
            assertEquals(picture.getStatistics().pixelCount, count(file.mask()), roi.getTypeAsString());
            assertEquals(roi.getBounds(), file.bounds());
            assertEquals(roi.getBounds(), file.outline().getBounds());
        }
    }

    @Test
    void linesAndPointsKeepTheirPlaces() throws IOException {
        RoiFile line = saved("line.roi", new Line(3, 4, 30.5, 40));
        assertTrue(line.isLine() && !line.isArea());
        assertArrayEquals(new double[] {3, 4, 30.5, 40}, line.line(), 1e-6);
        RoiFile points = saved("points.roi", new PointRoi(new int[] {7, 20}, new int[] {8, 30}, 2));
        assertTrue(points.isPoints() && !points.isArea() && !points.isLine());
        assertArrayEquals(new double[] {7, 8}, points.points()[0]);
        assertArrayEquals(new double[] {20, 30}, points.points()[1]);
        assertFalse(saved("bent.roi", new PolygonRoi(new int[] {1, 5, 9}, new int[] {1, 2, 9}, 3, Roi.POLYLINE)).isLine());
    }

    @Test
    void aZipHoldsManySelectionsWithTheirNames() throws IOException {
        Path zip = folder.resolve("RoiSet.zip");
        try (OutputStream out = Files.newOutputStream(zip); ZipOutputStream entries = new ZipOutputStream(out)) {
            for (String name : List.of("centre.roi", "rim.roi", "notes.txt")) {
                Roi roi = new Roi(1, 2, 3, 4);
                roi.setName(name.equals("rim.roi") ? "the rim" : null);
                entries.putNextEntry(new ZipEntry(name));
                entries.write(RoiEncoder.saveAsByteArray(roi));
            }
        }
        assertEquals(List.of("centre", "the rim"), RoiFile.read(zip).stream().map(RoiFile::name).toList());
    }

    @Test
    void whatIsNoSelectionIsRefused() throws IOException {
        for (Path file : Stream.of("", "Iout", "thickness of the film").map(text -> {
            try {
                return Files.writeString(folder.resolve("a" + text.length() + ".roi"), text);
            } catch (IOException e) {
                throw new java.io.UncheckedIOException(e);
            }
        }).toList()) {
            assertTrue(assertThrows(PhotoException.class, () -> RoiFile.read(file)).getMessage().contains("no selection"));
        }
        assertTrue(assertThrows(PhotoException.class, () -> RoiFile.read(folder.resolve("none.roi"))).getMessage()
                .contains("no such file"));
    }
}
