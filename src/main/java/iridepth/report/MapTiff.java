package iridepth.report;

import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.stream.Collectors;

/**
 * The maps of a reading as TIFF files that open calibrated in ImageJ: pixel size in um and values in nm. The pixel size
 * stands in the resolution tags (per cm) as any reader expects it; {@code unit} and {@code vunit} in the description tell
 * ImageJ to show um, and nm for the values.
 */
public final class MapTiff {
    private MapTiff() {
    }

    /**
     * Thickness or its standard uncertainty: 32-bit float, nm, NaN where there is none.
     *
     * @param pixelUm edge of a pixel in um, or NaN if unknown
     * @throws OutputException if the file cannot be written
     */
    public static TiffWriter nanometres(Path file, int width, int height, double pixelUm) {
        return TiffWriter.create(file, TiffLayout.of(width, height, TiffWriter.Sample.FLOAT, List.of(),
                description(pixelUm, "vunit=nm\n"), pixelUm));
    }

    /**
     * States: 8-bit codes of {@link StateStyle} with a palette, so that the map can be told apart by eye; the description
     * lists the codes.
     *
     * @param pixelUm edge of a pixel in um, or NaN if unknown
     * @throws OutputException if the file cannot be written
     */
    public static TiffWriter states(Path file, int width, int height, double pixelUm) {
        List<Integer> palette = Arrays.stream(StateStyle.values()).map(StateStyle::rgb).toList();
        String codes = Arrays.stream(StateStyle.values()).map(s -> s.code() + " " + s.label()).collect(Collectors.joining(", "));
        return TiffWriter.create(file, TiffLayout.of(width, height, TiffWriter.Sample.BYTE, palette,
                description(pixelUm, "info=" + codes + "\n"), pixelUm));
    }

    private static String description(double pixelUm, String more) {
        return "ImageJ=1.54p\n" + (Double.isNaN(pixelUm) ? "" : "unit=um\n") + more;
    }
}
