package iridepth.app.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.optics.Materials;
import iridepth.spectrum.Grid;
import iridepth.spectrum.SpectralTable;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class MaterialsCommandTest {
    @TempDir
    private Path folder;

    private Path write(String name, String text) throws IOException {
        return Files.writeString(folder.resolve(name), text);
    }

    @Test
    void listNamesEveryMaterialWithItsSource() {
        String out = Answer.to("materials").out();
        for (String name : Materials.catalogue().names()) {
            assertTrue(out.lines().anyMatch(l -> l.startsWith(name + " ")), name);
            assertTrue(out.contains(Materials.bundled().get(name).source()), name);
        }
    }

    @Test
    void pictureAndTableShowOneMaterial() throws IOException {
        String out = Answer.to("materials", "Si", "--out", folder.resolve("si.png")).out();
        assertTrue(out.contains("crystalline silicon") && out.contains("Green"), out);
        assertTrue(Files.size(folder.resolve("si.png")) > 10_000);
        SpectralTable table = SpectralTable.read(folder.resolve("si.csv"));
        assertEquals(Grid.SIZE, table.wavelength().length);
        assertEquals(Materials.bundled().get("Si").n().at(170), table.spectrum("n").at(170), 1e-9);
    }

    @Test
    void tableOfOnesOwnIsCheckedAndShown() throws IOException {
        Path good = write("resist.csv", "# source: data sheet\nwavelength_nm,n\n380,1.64\n480,1.62\n580,1.61\n680,1.605\n780,1.60\n");
        String out = Answer.to("materials", "--check", good).out();
        assertTrue(out.contains("note: there is no column k") && out.contains("can be used") && out.contains("data sheet"), out);
    }

    @Test
    void tablesThatCannotBeUsedAreRefusedWithTheReason() throws IOException {
        String header = "wavelength_nm,n,k\n";
        Answer.refusal(3, "there is no such file", "materials", "--check", folder.resolve("none.csv"));
        Answer.refusal(3, "n is -1.6 at 550 nm", "materials", "--check",
                write("a.csv", header + "400,1.6,0\n550,-1.6,0\n700,1.6,0\n"));
        Answer.refusal(3, "k is -0.1 at 400 nm", "materials", "--check", write("b.csv", header + "400,1.6,-0.1\n700,1.6,0\n"));
        Answer.refusal(3, "in nm and not in um", "materials", "--check", write("c.csv", header + "0.4,1.6,0\n0.7,1.6,0\n"));
        Answer.refusal(3, "it must cover 400-700 nm", "materials", "--check", write("d.csv", header + "450,1.6,0\n700,1.6,0\n"));
        Answer.refusal(3, "line 2: 'NaN' is not a finite number", "materials", "--check",
                write("e.csv", header + "400,NaN,0\n700,1.6,0\n"));
        Answer.refusal(3, "no column n", "materials", "--check", write("f.csv", "wavelength_nm,index\n400,1\n700,1\n"));
    }

    @Test
    void wrongRequestsAreAnswered() {
        Answer.refusal(2, "nearest known is 'SiO'", "materials", "SiO9");
        Answer.refusal(2, "not both", "materials", "Si", "--check", "x.csv");
        Answer.refusal(2, "which material", "materials", "--out", folder.resolve("x.png"));
        Answer.refusal(2, "--out names the picture", "materials", "Si", "--out", folder.resolve("x.csv"));
    }
}
