package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.SignalSource;
import iridepth.quality.AreaStatistics;
import iridepth.quality.Average;
import iridepth.quality.Field;
import iridepth.quality.MeasuredField;
import iridepth.quality.Position;
import iridepth.quality.Profile;
import iridepth.reading.ThicknessMap;
import iridepth.recipe.Instrument;
import iridepth.report.Kymograph;
import iridepth.report.Place;
import iridepth.report.ResultFolder;
import iridepth.report.SummaryJson;
import iridepth.report.TimeSeries;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/** A sequence of photos before one instrument: keeps of each what places and line need, not the map. */
final class SequenceRun {
    private final Instrument instrument;
    private final List<Path> photos;
    private final double interval;
    private final PlaceOptions where;
    private final Optional<Position[]> line;
    private final int width;
    private final PrintWriter terminal;
    private final List<TimeSeries.Frame> frames = new ArrayList<>();
    private final List<Optional<Profile>> profiles = new ArrayList<>();
    private final Map<String, String> hashes = new LinkedHashMap<>();
    private PhotoInfo first;
    private List<Place> places = List.of();

    SequenceRun(Instrument instrument, List<Path> photos, double interval, PlaceOptions where, Optional<Position[]> line, int width,
                PrintWriter terminal) {
        this.instrument = instrument;
        this.photos = photos;
        this.interval = interval;
        this.where = where;
        this.line = line;
        this.width = width;
        this.terminal = terminal;
    }

    /** Reads the photos, writes the folder and tells the essentials; returns the exit code. */
    int write(Path out, boolean replace) {
        try (ResultFolder folder = ResultFolder.create(out, replace)) {
            instrument.ready();
            hashes.putAll(instrument.hashes());
            try (ProgressBar bar = new ProgressBar("reading", photos.size())) {
                for (int i = 0; i < photos.size(); i++) {
                    read(photos.get(i));
                    bar.accept(i + 1);
                }
            }
            List<TimeSeries.Frame> unusable = frames.stream().filter(f -> !f.message().isEmpty()).toList();
            if (first == null) {
                throw new PhotoException("no photo of the sequence can be used; the first: " + unusable.get(0).message());
            }
            TimeSeries series = new TimeSeries(instrument.recipe().title(), places.stream().map(Place::name).toList(), frames, interval);
            if (!places.isEmpty()) {
                series.csv().write(folder.file("time.csv"));
                series.write(folder.file("time.png"));
            }
            line.ifPresent(ends -> {
                Kymograph kymograph = kymograph(ends);
                kymograph.write(folder.file("kymograph.png"));
                kymograph.writeNumbers(folder.file("kymograph.tif"));
            });
            SummaryJson.write(summary(unusable), folder.file(ResultFolder.SUMMARY));
            folder.commit();
            tell(unusable, out);
            return unusable.isEmpty() ? Iridepth.DONE : Iridepth.UNUSABLE_INPUT;
        }
    }

    /** Reads the pages of a file; one that cannot be used leaves a gap. */
    private void read(Path photo) {
        String name = photo.getFileName().toString();
        int done = 0;
        int pages = 1;
        try (PhotoFile file = PhotoFile.open(photo)) {
            PhotoInfo info = file.info();
            pages = info.frames();
            requireLikeFirst(info);
            SignalSource signal = instrument.signal(file);
            for (; done < pages; done++) {
                add(pages == 1 ? name : name + " page " + (done + 1), field(signal, done));
            }
            hashes.putAll(instrument.hashes(photo));
        } catch (PhotoException e) {
            for (; done < pages; done++) {
                frames.add(TimeSeries.Frame.unusable(pages == 1 ? name : name + " page " + (done + 1), e.getMessage()));
                profiles.add(Optional.empty());
            }
        }
    }

    private void requireLikeFirst(PhotoInfo info) {
        if (first != null && (info.width() != first.width() || info.height() != first.height())) {
            throw new PhotoException(info.path(), "is " + info.width() + " x " + info.height() + " pixels large, but the sequence began "
                    + "with " + first.width() + " x " + first.height());
        }
    }

    private MeasuredField field(SignalSource signal, int page) {
        ThicknessMap map = instrument.reader(signal.info()).read(signal, page, done -> { });
        if (first == null) {
            first = signal.info();
            places = where.any(map.width(), map.height());
        }
        return new MeasuredField(Field.of(map.width(), map.height(), map.thickness()), Field.of(map.width(), map.height(), map.random()),
                Field.of(map.width(), map.height(), map.systematic()), signal.noise().correlatedPixels());
    }

    private void add(String name, MeasuredField field) {
        List<Average> readings = new ArrayList<>();
        for (Place place : places) {
            AreaStatistics statistics = AreaStatistics.of(field, place.area());
            if (statistics.pixels() == 0) {
                throw new IllegalArgumentException("place " + place.name() + " lies outside the photos of " + first.width() + " x "
                        + first.height() + " pixels; move it");
            }
            readings.add(statistics.average());
        }
        frames.add(new TimeSeries.Frame(name, readings, ""));
        profiles.add(line.map(ends -> Profile.along(field, ends[0], ends[1], width)));
    }

    private Kymograph kymograph(Position[] ends) {
        String remark = String.format(Locale.ROOT, "Along the line from (%s, %s) to (%s, %s)%s", number(ends[0].x()), number(ends[0].y()),
                number(ends[1].x()), number(ends[1].y()), width > 1 ? ", mean of " + width + " samples across" : "");
        return new Kymograph(instrument.recipe().title(), remark, profiles, interval, instrument.pixelUm(first));
    }

    private static String number(double value) {
        return value == Math.rint(value) ? String.valueOf((long) value) : String.valueOf(value);
    }

    private Map<String, Object> summary(List<TimeSeries.Frame> unusable) {
        Map<String, Object> summary = new LinkedHashMap<>();
        summary.put("program", "iridepth " + Iridepth.Version.number());
        summary.put("title", instrument.recipe().title());
        summary.put("photos", frames.size());
        summary.put("interval_s", interval);
        Map<String, Object> at = new LinkedHashMap<>();
        places.forEach(p -> at.put(p.name(), new double[] {p.centre().x(), p.centre().y()}));
        summary.put("places_px", at);
        line.ifPresent(ends -> {
            summary.put("line_px", new double[] {ends[0].x(), ends[0].y(), ends[1].x(), ends[1].y()});
            summary.put("line_width_px", width);
        });
        summary.put("pixel_um", instrument.pixelUm(first));
        Map<String, Object> reasons = new LinkedHashMap<>();
        unusable.forEach(f -> reasons.put(f.photo(), f.message()));
        summary.put("unusable", reasons);
        summary.put("notes", instrument.notes());
        summary.put("inputs_sha256", hashes);
        summary.put("caution", Iridepth.CAUTION);
        return summary;
    }

    private void tell(List<TimeSeries.Frame> unusable, Path out) {
        terminal.printf(Locale.ROOT, "%s: %d photos over %s s%s%n", instrument.recipe().title(), frames.size(),
                number((frames.size() - 1) * interval), unusable.isEmpty() ? "" : ", " + unusable.size() + " could not be used");
        unusable.forEach(f -> terminal.println("unusable     " + f.photo() + ": " + f.message()));
        for (int p = 0; p < places.size(); p++) {
            int place = p;
            List<Average> read = frames.stream().filter(f -> !f.readings().isEmpty()).map(f -> f.readings().get(place))
                    .filter(a -> a.count() > 0).toList();
            if (!read.isEmpty()) {
                terminal.printf(Locale.ROOT, "place %-6s first %.2f nm, last %.2f nm%n", places.get(p).name(), read.get(0).thickness(),
                        read.get(read.size() - 1).thickness());
            }
        }
        terminal.println("wrote        " + out);
        terminal.println(Iridepth.CAUTION);
        terminal.flush();
    }
}
