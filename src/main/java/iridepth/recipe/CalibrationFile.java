package iridepth.recipe;

import com.fasterxml.jackson.core.JacksonException;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.MapperFeature;
import com.fasterxml.jackson.databind.PropertyNamingStrategies;
import com.fasterxml.jackson.databind.json.JsonMapper;
import iridepth.calibration.Calibration;
import iridepth.calibration.CalibrationData;
import iridepth.optics.Stack;
import iridepth.photo.PhotoException;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;

/** A calibration in a JSON file: what {@code calibrate} writes and {@code map} can take instead of fitting anew. */
public final class CalibrationFile {
    /** Name of the file in a calibration's result folder. */
    public static final String NAME = "calibration.json";

    private CalibrationFile() {
    }

    /** The calibration file in a result folder, or the file itself. */
    static Path in(Path file) {
        return Files.isDirectory(file) ? file.resolve(NAME) : file;
    }

    /**
     * Reads a calibration for a recipe.
     *
     * @param file a calibration file, or the result folder that holds it
     * @throws PhotoException if it cannot be read, or was made for another stack or flat
     */
    public static Calibration read(Path file, Recipe recipe) {
        Path json = in(file);
        try {
            JsonMapper mapper = JsonMapper.builder().propertyNamingStrategy(PropertyNamingStrategies.SNAKE_CASE)
                    .enable(MapperFeature.ACCEPT_CASE_INSENSITIVE_ENUMS).build();
            JsonNode tree = mapper.readTree(Files.readAllBytes(json));
            CalibrationData data = mapper.treeToValue(tree, CalibrationData.class);
            Stack flat = recipe.camera().flatStack();
            String wanted = flat == null ? "" : flat.toString();
            if (!wanted.equals(data.flat())) {
                throw new PhotoException(json + ": it was made with the flat '" + data.flat() + "', the recipe has '" + wanted
                        + "'; calibrate again");
            }
            return Calibration.of(data, recipe.stack());
        } catch (JacksonException | NullPointerException e) {
            throw new PhotoException(json + ": it is no calibration; make one with the calibrate command");
        } catch (IllegalArgumentException e) {
            throw new PhotoException(json + ": " + e.getMessage());
        } catch (IOException e) {
            throw new PhotoException(json + ": there is no such calibration that can be read; make one with the calibrate command");
        }
    }
}
