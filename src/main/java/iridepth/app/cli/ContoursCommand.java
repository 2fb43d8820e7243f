package iridepth.app.cli;

import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.SignalSource;
import iridepth.quality.Contour;
import iridepth.quality.Contours;
import iridepth.quality.Field;
import iridepth.quality.Smoothing;
import iridepth.report.ContourFigure;
import iridepth.report.PagePhoto;
import iridepth.report.SavedResult;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.stream.LongStream;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code contours}: lines of equal thickness over the photo. */
@Command(name = "contours", mixinStandardHelpOptions = true,
        description = {"Draws lines of equal thickness over the photo and writes them as a table.", "",
            "Noise makes lines ragged: --smooth takes it off the map first, by the mean over a square around each pixel.", "",
            "Examples:",
            "  contours result photo.tif --at 285,290,295 --out lines.png",
            "  contours result photo.tif --every 5 --out lines.png", ""})
final class ContoursCommand implements Callable<Integer> {
    private static final int MOST_LEVELS = 200;

    @Spec
    private CommandSpec spec;

    @Parameters(index = "0", paramLabel = "RESULT", description = "A result folder that map has written.")
    private Path result;

    @Parameters(index = "1", paramLabel = "PHOTO", description = "The photo that it was read from.")
    private Path photo;

    @Option(names = "--at", paramLabel = "NM,...", description = "Thicknesses in nm.")
    private String at;

    @Option(names = "--every", paramLabel = "NM", description = "All multiples of this thickness that the film reaches.")
    private Double every;

    @Option(names = "--smooth", paramLabel = "PX", defaultValue = "2", description = "Reach of the mean before lines are drawn; 2 "
            + "means 5 x 5 pixels, 0 none (default: 2).")
    private int smooth;

    @Mixin
    private PictureAndTable output;

    @Override
    public Integer call() {
        if ((at == null) == (every == null)) {
            throw new IllegalArgumentException("give --at NM,... or --every NM");
        }
        SavedResult saved = SavedResult.open(result);
        PagePhoto picture = picture(saved);
        Field map = Smoothing.mean(saved.thickness(), smooth);
        double[] levels = at == null ? multiples(map) : Coordinates.list("--at", at);
        List<Contour> lines = Contours.of(map, levels);
        if (lines.isEmpty()) {
            throw new IllegalArgumentException("the film of " + result + " does not cross "
                    + (at == null ? "a multiple of " + every : at) + " nm; choose thicknesses between those of the map");
        }
        String remark = "lines of equal thickness" + (smooth == 0 ? "" : ", map smoothed over " + (2 * smooth + 1) + " \u00d7 "
                + (2 * smooth + 1) + " pixels");
        ContourFigure figure = new ContourFigure(saved.title(), remark, picture, lines, saved.pixelUm());
        String written = output.write(figure::write, figure.csv());
        PrintWriter terminal = spec.commandLine().getOut();
        for (double level : levels) {
            List<Contour> of = lines.stream().filter(c -> c.level() == level).toList();
            terminal.printf(Locale.ROOT, "%9.2f nm  %d lines, %.0f pixels long%n", level, of.size(),
                    of.stream().mapToDouble(Contour::length).sum());
        }
        terminal.println(written);
        terminal.flush();
        return Iridepth.DONE;
    }

    private PagePhoto picture(SavedResult saved) {
        try (PhotoFile file = PhotoFile.open(photo)) {
            Field map = saved.thickness();
            if (file.info().width() != map.width() || file.info().height() != map.height()) {
                throw new PhotoException(photo, "is " + file.info().width() + " x " + file.info().height() + " pixels large, but the "
                        + "map " + result + " is " + map.width() + " x " + map.height() + "; give the photo that it was read from");
            }
            boolean linear = saved.text("encoding").equals("linear");
            Encoding encoding = linear ? Encoding.linear(file.info().maxCount()) : Encoding.managed(file.info());
            return PagePhoto.of(SignalSource.of(file, encoding, Optional.empty(), Optional.empty(), NoiseModel.of(0, 1)), 0, linear);
        }
    }

    private double[] multiples(Field map) {
        if (!(every > 0)) {
            throw new IllegalArgumentException("--every " + every + ": give a thickness above 0 nm");
        }
        double[] ends = ends(map);
        long first = (long) Math.ceil(ends[0] / every);
        long last = (long) Math.floor(ends[1] / every);
        if (last - first >= MOST_LEVELS) {
            throw new IllegalArgumentException("--every " + every + " nm gives " + (last - first + 1) + " thicknesses; give a larger "
                    + "step, for " + MOST_LEVELS + " at most");
        }
        return LongStream.rangeClosed(first, last).mapToDouble(k -> k * every).toArray();
    }

    private static double[] ends(Field map) {
        double[] ends = {Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY};
        for (int y = 0; y < map.height(); y++) {
            for (int x = 0; x < map.width(); x++) {
                double nm = map.at(x, y);
                ends[0] = nm < ends[0] ? nm : ends[0];
                ends[1] = nm > ends[1] ? nm : ends[1];
            }
        }
        return ends;
    }
}
