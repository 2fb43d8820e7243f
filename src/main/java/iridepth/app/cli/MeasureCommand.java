package iridepth.app.cli;

import iridepth.quality.AreaStatistics;
import iridepth.quality.Average;
import iridepth.quality.Disk;
import iridepth.quality.MeasuredField;
import iridepth.quality.NonUniformity;
import iridepth.quality.Sites;
import iridepth.quality.Uniformity;
import iridepth.quality.Verdict;
import iridepth.report.Place;
import iridepth.report.PlacesFigure;
import iridepth.report.SavedResult;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.Callable;
import java.util.stream.IntStream;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code measure}: thickness at sites and in regions of a map. */
@Command(name = "measure", mixinStandardHelpOptions = true,
        description = {"Measures the thickness at sites and in regions of a map: mean with its uncertainty, spread, extremes, "
            + "non-uniformity and, where the recipe sets limits, a verdict on each mean.", "",
            "Points are pixels, columns to the right and rows downwards, their centres at whole numbers. Of a mean's uncertainty the "
                + "random part shrinks with the number of readings, the systematic part does not.", "",
            "Examples:",
            "  measure result --sites 9 --centre 150,150 --radius 120 --out sites.png",
            "  measure result --region 10,20,64,64 --region 200,20,64,64 --out regions.png",
            "  measure result --roi RoiSet.zip --out selections.png", ""},
        footer = {"", "Exit code 1 if a mean is out of tolerance."})
final class MeasureCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "RESULT", description = "A result folder that map has written.")
    private Path result;

    @Mixin
    private PlaceOptions where;

    @Mixin
    private PictureAndTable output;

    @Override
    public Integer call() {
        SavedResult saved = SavedResult.open(result);
        MeasuredField field = saved.measured();
        List<Place> places = where.all(field.thickness().width(), field.thickness().height());
        List<AreaStatistics> measured = places.stream().map(place -> measure(field, place)).toList();
        PlacesFigure figure = new PlacesFigure(saved.figure(), places, measured, saved.tolerance());
        String written = output.write(figure::write, figure.csv());
        tell(figure, written, field);
        boolean bad = IntStream.range(0, places.size()).anyMatch(i -> figure.verdict(i).filter(v -> v == Verdict.FAIL).isPresent());
        return bad ? Iridepth.OUT_OF_TOLERANCE : Iridepth.DONE;
    }

    private static AreaStatistics measure(MeasuredField field, Place place) {
        AreaStatistics statistics = AreaStatistics.of(field, place.area());
        if (statistics.pixels() == 0) {
            throw new IllegalArgumentException("place " + place.name() + " lies outside the map of " + field.thickness().width()
                    + " x " + field.thickness().height() + " pixels; move it");
        }
        return statistics;
    }

    private void tell(PlacesFigure figure, String written, MeasuredField field) {
        PrintWriter terminal = spec.commandLine().getOut();
        terminal.printf(Locale.ROOT, "%-12s %9s %9s %10s %10s  %s%n", "place", "readings", "mean nm", "\u00b1 (k=2)", "sd nm", "verdict");
        for (int i = 0; i < figure.places().size(); i++) {
            Average a = figure.measured().get(i).average();
            terminal.printf(Locale.ROOT, "%-12s %9d %9s %10s %10s  %s%n", figure.places().get(i).name(), a.count(), nm(a.thickness()),
                    nm(2 * a.standardUncertainty()), nm(a.spread()), figure.verdict(i).map(Verdict::words).orElse(""));
        }
        List<Disk> disks = figure.places().stream().map(Place::area).filter(Disk.class::isInstance).map(Disk.class::cast).toList();
        if (disks.size() > 1) {
            Uniformity u = Sites.of(field, disks.stream().map(Disk::centre).toList(), disks.get(0).radius()).uniformity();
            terminal.printf(Locale.ROOT, "over %d sites: mean %.2f nm, sd %.2f nm", u.count(), u.mean(), u.standardDeviation());
            for (NonUniformity n : List.of(NonUniformity.SIGMA, NonUniformity.HALF_RANGE)) {
                terminal.printf(Locale.ROOT, ", %s %.2f %%", n.formula(), n.percent(u));
            }
            terminal.println();
        }
        terminal.println(written);
        terminal.flush();
    }

    private static String nm(double value) {
        return Double.isNaN(value) ? "-" : String.format(Locale.ROOT, "%.2f", value);
    }
}
