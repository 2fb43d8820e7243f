package iridepth.report;

import iridepth.quality.Distribution;
import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import iridepth.quality.Tolerance.Judgement;
import iridepth.quality.UncertaintyCurve;
import iridepth.quality.Uniformity;
import iridepth.reading.OtherCandidates;
import iridepth.reading.ReadingSink;
import iridepth.reading.State;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * The files of a thickness map, written as its rows come, in any order: {@code thickness.tif}, {@code uncertainty.tif},
 * {@code state.tif}, and at the end {@code thickness.png}, {@code histogram.csv}, {@code histogram.png} and
 * {@code uncertainty.csv}.
 */
public final class MapFolder implements ReadingSink, AutoCloseable {
    /** Other candidates of a pixel that the report page tells. */
    private static final int OTHERS = 2;
    static final String THICKNESS = "thickness.tif";
    static final String UNCERTAINTY = "uncertainty.tif";
    static final String STATE = "state.tif";
    /** The two parts of the uncertainty against thickness. */
    static final String UNCERTAINTY_PARTS = "uncertainty.csv";
    /** The page that shows it all. */
    static final String REPORT = "report.html";
    /** The maps and tables from which a result can be measured again. */
    static final List<String> DATA = List.of(THICKNESS, UNCERTAINTY, STATE, UNCERTAINTY_PARTS);
    /** What is there to be looked at. */
    static final List<String> VIEWS = List.of("thickness.png", "histogram.csv", "histogram.png", REPORT);

    private final ResultFolder folder;
    private final int width;
    private final double pixelUm;
    private final TiffWriter thickness;
    private final TiffWriter uncertainty;
    private final TiffWriter state;
    private final MapCells cells;
    private final PageMap page;
    private final OtherCandidates others;
    private final double fromNm;
    private final double toNm;
    private Distribution distribution;
    private UncertaintyCurve.Gathering parts;
    private final long[] counts = new long[State.values().length];
    private double randomSquares;
    private double systematicSquares;

    private MapFolder(ResultFolder folder, int width, int height, double pixelUm, double fromNm, double toNm, OtherCandidates others) {
        this.others = others;
        this.fromNm = fromNm;
        this.toNm = toNm;
        this.folder = folder;
        this.width = width;
        this.pixelUm = pixelUm;
        this.thickness = MapTiff.nanometres(folder.file(THICKNESS), width, height, pixelUm);
        this.uncertainty = MapTiff.nanometres(folder.file(UNCERTAINTY), width, height, pixelUm);
        this.state = MapTiff.states(folder.file(STATE), width, height, pixelUm);
        this.cells = MapCells.of(width, height, MapFigure.MOST_CELLS);
        this.page = PageMap.of(width, height, pixelUm, OTHERS);
        this.distribution = Distribution.over(fromNm, toNm);
        this.parts = new UncertaintyCurve.Gathering(fromNm, toNm);
    }

    /**
     * Starts the files of a map.
     *
     * @param folder  where they go
     * @param width   pixels per row
     * @param height  rows
     * @param pixelUm edge of a pixel in um, NaN if unknown
     * @param fromNm  thinnest film considered
     * @param toNm    thickest film considered
     * @param others  tells the candidates that were not chosen
     * @throws OutputException if they cannot be written
     */
    public static MapFolder create(ResultFolder folder, int width, int height, double pixelUm, double fromNm, double toNm,
                                   OtherCandidates others) {
        return new MapFolder(folder, width, height, pixelUm, fromNm, toNm, others);
    }

    @Override
    public void readings(int firstRow, float[] nm, float[] random, float[] systematic, float[] margin) {
        float[] combined = new float[nm.length];
        for (int i = 0; i < nm.length; i++) {
            combined[i] = (float) Math.sqrt(random[i] * random[i] + systematic[i] * systematic[i]);
            if (!Float.isNaN(nm[i])) {
                distribution.add(nm[i]);
                parts.add(nm[i], random[i], systematic[i]);
                randomSquares += random[i] * random[i];
                systematicSquares += systematic[i] * systematic[i];
            }
        }
        thickness.writeRows(firstRow, nm);
        uncertainty.writeRows(firstRow, combined);
    }

    @Override
    public void restart() {
        distribution = Distribution.over(fromNm, toNm);
        parts = new UncertaintyCurve.Gathering(fromNm, toNm);
        randomSquares = 0;
        systematicSquares = 0;
    }

    @Override
    public void states(int firstRow, byte[] codes) {
        float[] nm = new float[codes.length];
        float[] combined = new float[codes.length];
        thickness.readRows(firstRow, nm);
        uncertainty.readRows(firstRow, combined);
        for (byte code : codes) {
            counts[code]++;
        }
        state.writeRows(firstRow, codes);
        cells.add(firstRow, nm, codes);
        float[][] alternatives = new float[OTHERS][codes.length];
        for (float[] plane : alternatives) {
            Arrays.fill(plane, Float.NaN);
        }
        PageGrid shown = page.grid();
        IntStream.range(0, codes.length / width).filter(row -> shown.shows(firstRow + row)).parallel()
                .forEach(row -> others.row(firstRow + row, shown.firstX(), shown.factor(), nm, row * width, alternatives));
        page.add(firstRow, nm, combined, codes, alternatives);
    }

    /** How many pixels are in each state. */
    public Map<State, Long> counts() {
        Map<State, Long> result = new LinkedHashMap<>();
        for (State s : State.values()) {
            result.put(s, counts[s.code()]);
        }
        return result;
    }

    /** Pixels that have a thickness. */
    public long read() {
        return distribution.count();
    }

    /** The readings as the report page shows them. */
    public PageMap page() {
        return page;
    }

    /** The thicknesses. */
    public Distribution distribution() {
        return distribution;
    }

    /** Root mean square of the random standard uncertainty of the pixels read, nm; NaN if there are none. */
    public double randomNm() {
        return Math.sqrt(randomSquares / distribution.count());
    }

    /** Root mean square of the systematic standard uncertainty of the pixels read, nm; NaN if there are none. */
    public double systematicNm() {
        return Math.sqrt(systematicSquares / distribution.count());
    }

    /**
     * How the map stands against a tolerance, with guard bands of twice the standard uncertainty: of the systematic part for the
     * mean, since the random part averages out, and of both for single pixels.
     */
    public Judgement judge(Tolerance tolerance) {
        boolean none = distribution.count() == 0;
        double mean = none ? 0 : 2 * systematicNm();
        double pixel = none ? 0 : 2 * Math.hypot(randomNm(), systematicNm());
        return tolerance.judge(distribution, mean, pixel);
    }

    /**
     * Closes the maps and draws the figures.
     *
     * @param title     what the map shows
     * @param tolerance the limits, if any
     */
    public void finish(String title, Optional<Tolerance> tolerance) {
        thickness.close();
        uncertainty.close();
        state.close();
        MapFigure.of(title, cells, pixelUm).write(folder.file("thickness.png"));
        Histogram histogram = Histogram.of(distribution);
        HistogramFigure figure = new HistogramFigure(title, List.of(words()), histogram, distribution, tolerance);
        figure.write(folder.file("histogram.png"));
        figure.csv().write(folder.file("histogram.csv"));
        uncertaintyTable(title).write(folder.file(UNCERTAINTY_PARTS));
    }

    private CsvTable uncertaintyTable(String title) {
        UncertaintyCurve curve = parts.curve();
        CsvTable table = CsvTable.of(List.of("Standard uncertainty of one pixel against its thickness: " + title,
                "root mean squares over the pixels within half a nanometre"),
                List.of("thickness_nm", "pixels", "random_nm", "systematic_nm"));
        for (int i = 0; i < curve.thickness().length; i++) {
            table.row(curve.thickness()[i], curve.pixels()[i], curve.random()[i], curve.systematic()[i]);
        }
        return table;
    }

    /** The counts of all states that occur, in words. */
    public String words() {
        List<String> parts = new ArrayList<>();
        long all = 0;
        for (long n : counts) {
            all += n;
        }
        for (State s : State.values()) {
            if (counts[s.code()] > 0) {
                parts.add(String.format(Locale.ROOT, "%s %.2f %%", s.label(), 100.0 * counts[s.code()] / all));
            }
        }
        return String.join(", ", parts);
    }

    /** Statistics of the pixels read. */
    public Uniformity uniformity() {
        return Uniformity.of(distribution);
    }

    /** Where the files are being written. */
    public Path file(String name) {
        return folder.file(name);
    }

    /** Width of the map in pixels. */
    public int width() {
        return width;
    }

    /** Closes the maps, finished or not. */
    @Override
    public void close() {
        thickness.close();
        uncertainty.close();
        state.close();
    }
}
