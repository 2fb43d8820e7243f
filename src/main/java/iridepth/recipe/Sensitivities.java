package iridepth.recipe;

import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.nio.file.Path;
import java.util.List;

/**
 * Spectral sensitivities of a camera from a table.
 *
 * @param channels names of the channels
 * @param spectra  their sensitivities, any unit
 */
public record Sensitivities(List<String> channels, List<Spectrum> spectra) {
    /**
     * Reads a table with one column per channel.
     *
     * @throws iridepth.photo.PhotoException if the file is missing or is no such table
     */
    public static Sensitivities read(Path file) {
        SpectralTable table = new Tables(Path.of("command line")).read(file.toAbsolutePath().toString());
        return new Sensitivities(table.columns(), table.columns().stream().map(table::spectrum).toList());
    }
}
