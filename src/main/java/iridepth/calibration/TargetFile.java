package iridepth.calibration;

import iridepth.colour.Lab;
import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.spectrum.SpectralTable;
import iridepth.spectrum.Spectrum;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.Reader;
import java.io.StringReader;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A reference target's patches, from a text file by ANSI CGATS.17 (also ISO 28178): keywords, a data format between
 * BEGIN_DATA_FORMAT and END_DATA_FORMAT, data between BEGIN_DATA and END_DATA, blanks or tabs between, text with blanks in
 * quotes, remarks behind {@code #}.
 *
 * <p>Of each patch the spectrum is taken where there is one (SPECTRAL_NM_380, SPECTRAL_NM380, SPEC_380 or NM_380 and so on, as
 * fraction or, where a value exceeds 2, per cent), else XYZ_X, XYZ_Y, XYZ_Z (white at Y = 100), else LAB_L, LAB_A, LAB_B; colours
 * are those of the CIE 1931 observer under D50 (ISO 13655), and stand for the smoothest reflectance of that colour.
 */
public final class TargetFile {
    /**
     * A patch.
     *
     * @param label       SAMPLE_NAME or SAMPLE_ID, else its number
     * @param reflectance its reflectance
     * @param uncertainty of a broad channel's signal, as a fraction: 1 % where the spectrum is known (instruments agree to about
     *                    that, common practice), 5 % where only the colour is
     */
    public record Patch(String label, Spectrum reflectance, double uncertainty) {
        /** What the camera saw of it: one signal per channel, and the variance of each. */
        public PatchSignal seen(double[] signal, double[] variance) {
            return new PatchSignal(label, reflectance, uncertainty, signal, variance);
        }
    }

    private static final Pattern TOKEN = Pattern.compile("\"([^\"]*)\"|(\\S+)");
    private static final Pattern WAVELENGTH = Pattern.compile("(?:SPECTRAL_NM_?|SPEC_?|NM_?)(\\d{3,4}(?:\\.\\d+)?)");
    private static final double SPECTRUM_UNCERTAINTY = 0.01;
    private static final double COLOUR_UNCERTAINTY = 0.05;
    private static final double LARGEST_FRACTION = 2;
    private static final double PER_CENT = 100;

    private final String name;
    private final List<String> fields;
    private final Map<String, Integer> column = new HashMap<>();

    private TargetFile(String name, List<String> fields) {
        this.name = name;
        this.fields = fields;
        for (int i = 0; i < fields.size(); i++) {
            column.put(fields.get(i).toUpperCase(Locale.ROOT), i);
        }
    }

    /**
     * Reads a file.
     *
     * @param name   what to call it in messages
     * @param reader its text
     * @return its patches, in the file's order
     * @throws IllegalArgumentException if it is no such file, or its patches have neither spectra nor colours
     * @throws IOException              if it cannot be read
     */
    public static List<Patch> read(String name, Reader reader) throws IOException {
        BufferedReader lines = new BufferedReader(reader);
        List<String> fields = new ArrayList<>();
        List<String> data = new ArrayList<>();
        List<String> target = null;
        boolean ended = false;
        for (String line = lines.readLine(); line != null && !ended; line = lines.readLine()) {
            for (String token : tokens(line)) {
                switch (token) {
                    case "BEGIN_DATA_FORMAT" -> target = fields;
                    case "BEGIN_DATA" -> target = data;
                    case "END_DATA_FORMAT" -> target = null;
                    case "END_DATA" -> ended = true;
                    default -> {
                        if (target != null && !ended) {
                            target.add(token);
                        }
                    }
                }
            }
        }
        if (fields.isEmpty() || !ended) {
            throw new IllegalArgumentException(name + ": no CGATS.17 file: it needs BEGIN_DATA_FORMAT ... END_DATA_FORMAT and "
                    + "BEGIN_DATA ... END_DATA");
        }
        if (data.isEmpty() || data.size() % fields.size() != 0) {
            throw new IllegalArgumentException(name + ": " + data.size() + " values between BEGIN_DATA and END_DATA do not make rows of "
                    + fields.size() + " fields");
        }
        TargetFile file = new TargetFile(name, fields);
        List<Patch> patches = new ArrayList<>();
        for (int at = 0; at < data.size(); at += fields.size()) {
            patches.add(file.patch(data.subList(at, at + fields.size()), patches.size() + 1));
        }
        return List.copyOf(patches);
    }

    private static List<String> tokens(String line) {
        List<String> tokens = new ArrayList<>();
        Matcher m = TOKEN.matcher(line);
        while (m.find()) {
            if (m.group(2) != null && m.group(2).startsWith("#")) {
                break;
            }
            tokens.add(m.group(1) != null ? m.group(1) : m.group(2));
        }
        return tokens;
    }

    private Patch patch(List<String> row, int number) {
        String label = has("SAMPLE_NAME") ? row.get(column.get("SAMPLE_NAME"))
                : has("SAMPLE_ID") ? row.get(column.get("SAMPLE_ID")) : String.valueOf(number);
        StringBuilder table = new StringBuilder("wavelength_nm,reflectance\n");
        double largest = 0;
        List<double[]> spectrum = new ArrayList<>();
        for (int i = 0; i < fields.size(); i++) {
            Matcher m = WAVELENGTH.matcher(fields.get(i).toUpperCase(Locale.ROOT));
            if (m.matches()) {
                spectrum.add(new double[] {Double.parseDouble(m.group(1)), number(row, i, label)});
                largest = Math.max(largest, spectrum.get(spectrum.size() - 1)[1]);
            }
        }
        if (!spectrum.isEmpty()) {
            double unit = largest > LARGEST_FRACTION ? PER_CENT : 1;
            spectrum.sort((a, b) -> Double.compare(a[0], b[0]));
            spectrum.forEach(s -> table.append(s[0]).append(',').append(s[1] / unit).append('\n'));
            return new Patch(label, spectrum(table.toString()), SPECTRUM_UNCERTAINTY);
        }
        return new Patch(label, SmoothReflectance.of(colour(row, label)), COLOUR_UNCERTAINTY);
    }

    private Spectrum spectrum(String table) {
        try {
            return SpectralTable.read(name, new BufferedReader(new StringReader(table))).spectrum("reflectance");
        } catch (IOException e) {
            throw new IllegalStateException(e);
        }
    }

    private Xyz colour(List<String> row, String label) {
        if (has("XYZ_X") && has("XYZ_Y") && has("XYZ_Z")) {
            return new Xyz(value(row, "XYZ_X", label), value(row, "XYZ_Y", label), value(row, "XYZ_Z", label)).times(1 / PER_CENT);
        }
        if (has("LAB_L") && has("LAB_A") && has("LAB_B")) {
            Xyz white = Observer.CIE_1931.white(Light.illuminant("D50"));
            return new Lab(value(row, "LAB_L", label), value(row, "LAB_A", label), value(row, "LAB_B", label)).toXyz(white);
        }
        throw new IllegalArgumentException(name + ": the patches have neither spectra (SPECTRAL_NM_...) nor XYZ_X, XYZ_Y, XYZ_Z nor "
                + "LAB_L, LAB_A, LAB_B; the fields are " + String.join(" ", fields));
    }

    private boolean has(String field) {
        return column.containsKey(field);
    }

    private double value(List<String> row, String field, String label) {
        return number(row, column.get(field), label);
    }

    private double number(List<String> row, int at, String label) {
        try {
            double value = Double.parseDouble(row.get(at).replace(',', '.'));
            if (Double.isFinite(value)) {
                return value;
            }
        } catch (NumberFormatException e) {
            // the message below
        }
        throw new IllegalArgumentException(name + ": patch " + label + ": '" + row.get(at) + "' in field " + fields.get(at)
                + " is no number");
    }
}
