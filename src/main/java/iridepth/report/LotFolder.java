package iridepth.report;

import com.fasterxml.jackson.core.JacksonException;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.stream.Stream;

/**
 * The folder of a lot: a result folder for each photo, and beside them {@code lot.csv}, {@code run-chart.png},
 * {@code index.html} and {@code lot.json}. The lot may be done in several goes, so the folder does not appear whole; every
 * result folder and file in it does. {@code lot.json} marks it as a lot's and says whether it is finished.
 *
 * @param path the folder
 */
public record LotFolder(Path path) {
    private static final String MARK = "lot.json";
    private static final String TABLE = "lot.csv";
    private static final String CHART = "run-chart.png";
    private static final String PAGE = "index.html";
    private static final Set<String> OWN = Set.of(MARK, TABLE, CHART, PAGE);

    /**
     * Opens the folder of a lot, new or begun before, and marks it as unfinished.
     *
     * @param about what the lot is, for its mark
     * @throws OutputException if something else stands there, or it cannot be written
     */
    public static LotFolder open(Path path, Map<String, Object> about) {
        LotFolder folder = new LotFolder(path);
        if (Files.exists(path) && !Files.isDirectory(path)) {
            throw new OutputException("cannot write the lot folder " + path + ": a file of that name exists; choose another name");
        }
        if (Files.isDirectory(path) && !isEmpty(path) && !folder.isMarked()) {
            throw new OutputException("will not write into the folder " + path + ": it is not empty and holds no " + MARK
                    + " of a lot; choose another name");
        }
        folder.mark(about, false, Map.of());
        return folder;
    }

    private static boolean isEmpty(Path folder) {
        try (Stream<Path> list = Files.list(folder)) {
            return list.findAny().isEmpty();
        } catch (IOException e) {
            throw OutputException.of(folder, e);
        }
    }

    private boolean isMarked() {
        try {
            return new ObjectMapper().readTree(path.resolve(MARK).toFile()).has("finished");
        } catch (JacksonException e) {
            return false;
        } catch (IOException e) {
            return false;
        }
    }

    private void mark(Map<String, Object> about, boolean finished, Map<String, Object> findings) {
        Map<String, Object> mark = new LinkedHashMap<>(about);
        mark.put("finished", finished);
        mark.putAll(findings);
        try (OutputFile file = OutputFile.create(path.resolve(MARK), true)) {
            SummaryJson.write(mark, file.path());
            file.commit();
        }
    }

    /**
     * Names of the result folders of photos: the photo's name without its ending or, where two would share that or it is taken
     * by the lot's own files, with it, and if need be a number. Upper and lower case count as one, since some file systems do
     * not tell them apart.
     */
    public static List<String> names(List<Path> photos) {
        Map<String, Integer> stems = new LinkedHashMap<>();
        photos.forEach(photo -> stems.merge(key(stem(photo)), 1, Integer::sum));
        Set<String> taken = new HashSet<>(OWN);
        List<String> names = new ArrayList<>();
        for (Path photo : photos) {
            String whole = photo.getFileName().toString();
            String name = stems.get(key(stem(photo))) == 1 && !OWN.contains(key(stem(photo))) ? stem(photo) : whole;
            for (int i = 2; !taken.add(key(name)); i++) {
                name = whole + "-" + i;
            }
            names.add(name);
        }
        return names;
    }

    private static String stem(Path photo) {
        String name = photo.getFileName().toString();
        int dot = name.lastIndexOf('.');
        return dot > 0 ? name.substring(0, dot) : name;
    }

    private static String key(String name) {
        return name.toLowerCase(Locale.ROOT);
    }

    /**
     * Writes table, run chart and page, each whole, and marks the lot as finished.
     *
     * @param about   as for {@link #open}
     * @param lot     the lot
     * @param origin  the recipe and the program, in words
     * @param caution what the figures must not be used for without a check
     * @throws OutputException if one cannot be written
     */
    public void finish(Map<String, Object> about, Lot lot, String origin, String caution) {
        try (OutputFile table = OutputFile.create(path.resolve(TABLE), true);
                OutputFile chart = OutputFile.create(path.resolve(CHART), true);
                OutputFile page = OutputFile.create(path.resolve(PAGE), true)) {
            lot.csv().write(table.path());
            new LotFigure(lot).write(chart.path());
            new LotPage(lot, path, origin, caution).write(page.path(), chart.path());
            table.commit();
            chart.commit();
            page.commit();
        }
        mark(about, true, lot.summary());
    }
}
