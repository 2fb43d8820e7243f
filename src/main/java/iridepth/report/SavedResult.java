package iridepth.report;

import com.fasterxml.jackson.core.JacksonException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import iridepth.photo.NumberImage;
import iridepth.photo.PhotoException;
import iridepth.quality.Field;
import iridepth.quality.MeasuredField;
import iridepth.quality.Tolerance;
import iridepth.quality.UncertaintyCurve;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/**
 * A result folder that is read back. Its maps stay on disk, mapped into memory, until they are looked at.
 *
 * @param folder  the result folder
 * @param summary what its summary says
 */
public record SavedResult(Path folder, JsonNode summary) {
    /**
     * Opens a result folder.
     *
     * @throws PhotoException if it is none, or parts of it are missing
     */
    public static SavedResult open(Path folder) {
        Path file = folder.resolve(ResultFolder.SUMMARY);
        if (!Files.isRegularFile(file)) {
            throw new PhotoException(folder, "is no result folder; give one that map has written, with its "
                    + ResultFolder.SUMMARY);
        }
        for (String name : MapFolder.DATA) {
            if (!Files.isRegularFile(folder.resolve(name))) {
                throw new PhotoException(folder, "is no whole result folder: " + name + " is missing; map the photo again");
            }
        }
        try {
            JsonNode summary = new ObjectMapper().readTree(file.toFile());
            if (!summary.isObject()) {
                throw new PhotoException(file, "is no summary of a map; map the photo again");
            }
            return new SavedResult(folder, summary);
        } catch (JacksonException e) {
            throw new PhotoException(file, "is damaged (" + e.getOriginalMessage() + "); map the photo again");
        } catch (IOException e) {
            throw new PhotoException(file, "cannot be read (" + e.getMessage() + ")");
        }
    }

    /**
     * Opens a folder if it holds a whole result, with all its views, of a program and inputs.
     *
     * @param program  name and version of the program
     * @param hashes   SHA-256 of every input by name
     * @return the result; empty if there is none, or it was made from something else
     */
    public static Optional<SavedResult> of(Path folder, String program, Map<String, String> hashes) {
        boolean whole = Files.isRegularFile(folder.resolve(ResultFolder.SUMMARY))
                && MapFolder.VIEWS.stream().allMatch(name -> Files.isRegularFile(folder.resolve(name)));
        if (!whole) {
            return Optional.empty();
        }
        try {
            SavedResult result = open(folder);
            boolean same = result.summary.path("program").asText().equals(program) && result.hashes().equals(hashes);
            return same ? Optional.of(result) : Optional.empty();
        } catch (PhotoException e) {
            return Optional.empty();
        }
    }

    private Map<String, String> hashes() {
        Map<String, String> hashes = new LinkedHashMap<>();
        summary.path("inputs_sha256").fields().forEachRemaining(entry -> hashes.put(entry.getKey(), entry.getValue().asText()));
        return hashes;
    }

    /** What the map shows. */
    public String title() {
        return summary.path("title").asText();
    }

    /** A number of the summary by its keys, from the outermost on; NaN if there is none. */
    public double number(String... keys) {
        JsonNode node = summary;
        for (String key : keys) {
            node = node.path(key);
        }
        return node.asDouble(Double.NaN);
    }

    /** A text of the summary by its keys, from the outermost on; empty if there is none. */
    public String text(String... keys) {
        JsonNode node = summary;
        for (String key : keys) {
            node = node.path(key);
        }
        return node.asText("");
    }

    /** The thickness below which a percentage of the pixels lies, nm; NaN if the summary does not tell it. */
    public double percentile(double percent) {
        for (JsonNode each : summary.path("thickness").path("percentiles")) {
            if (each.path("percent").asDouble() == percent) {
                return each.path("value").asDouble(Double.NaN);
            }
        }
        return Double.NaN;
    }

    /** Edge of a pixel in um, NaN if unknown. */
    public double pixelUm() {
        return number("photo", "pixel_um");
    }

    /** The limits that the recipe sets, if any. */
    public Optional<Tolerance> tolerance() {
        JsonNode limits = summary.path("tolerance").path("limits_nm");
        return limits.size() == 2 ? Optional.of(Tolerance.between(limits.get(0).asDouble(), limits.get(1).asDouble()))
                : Optional.empty();
    }

    /** Thickness in nm, NaN where not read. */
    public Field thickness() {
        return map(MapFolder.THICKNESS);
    }

    /**
     * Thickness with the random and systematic part of its uncertainty. The folder tells the combined uncertainty of each pixel,
     * and both parts against thickness; the systematic part of a pixel is taken from the latter.
     *
     * @throws PhotoException if a map or table of the folder cannot be read
     */
    public MeasuredField measured() {
        CsvFile parts = CsvFile.read(folder.resolve(MapFolder.UNCERTAINTY_PARTS));
        double[] pixels = parts.numbers("pixels");
        long[] counts = new long[pixels.length];
        Arrays.setAll(counts, i -> (long) pixels[i]);
        UncertaintyCurve curve = new UncertaintyCurve(parts.numbers("thickness_nm"), counts, parts.numbers("random_nm"),
                parts.numbers("systematic_nm"));
        double correlated = number("correlated_pixels");
        return curve.divide(thickness(), map(MapFolder.UNCERTAINTY), correlated > 1 ? correlated : 1);
    }

    /** The map as a figure. */
    public MapFigure figure() {
        NumberImage nm = NumberImage.open(folder.resolve(MapFolder.THICKNESS));
        NumberImage states = NumberImage.open(folder.resolve(MapFolder.STATE));
        MapCells cells = MapCells.of(nm.width(), nm.height(), MapFigure.MOST_CELLS);
        float[] row = new float[nm.width()];
        byte[] codes = new byte[nm.width()];
        for (int y = 0; y < nm.height(); y++) {
            for (int x = 0; x < row.length; x++) {
                row[x] = nm.at(x, y);
                codes[x] = (byte) states.at(x, y);
            }
            cells.add(y, row, codes);
        }
        return MapFigure.of(title(), cells, pixelUm());
    }

    private Field map(String name) {
        NumberImage image = NumberImage.open(folder.resolve(name));
        return Field.view(image.width(), image.height(), image::at);
    }
}
