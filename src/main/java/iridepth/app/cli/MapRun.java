package iridepth.app.cli;

import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.SignalSource;
import iridepth.quality.NonUniformity;
import iridepth.quality.Tolerance;
import iridepth.quality.Tolerance.Judgement;
import iridepth.quality.Uniformity;
import iridepth.quality.Verdict;
import iridepth.reading.FilmReader;
import iridepth.reading.ThicknessMap;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.report.MapFolder;
import iridepth.report.ResultFolder;
import iridepth.report.SummaryJson;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;

/** One photo before an instrument: reads it and writes its result folder. */
record MapRun(Instrument instrument, Path photo, PrintWriter terminal) {
    /** Reads the photo, writes the folder and tells the essentials; returns the exit code. */
    int write(Path out, boolean replace) {
        try (ResultFolder folder = ResultFolder.create(out, replace); PhotoFile file = PhotoFile.open(photo)) {
            CompletableFuture<Map<String, String>> hashes = CompletableFuture.supplyAsync(() -> instrument.hashes(photo));
            SignalSource signal = instrument.signal(file);
            PhotoInfo info = file.info();
            FilmReader reader = instrument.reader(info);
            try (MapFolder map = MapFolder.create(folder, info.width(), info.height(), instrument.pixelUm(info),
                    recipe().range().fromNm(), recipe().range().toNm())) {
                read(reader, signal, map);
                Optional<Tolerance> tolerance = tolerance();
                map.finish(recipe().title(), tolerance);
                Optional<Judgement> judgement = tolerance.map(map::judge);
                SummaryJson.write(summary(map, info, signal, judgement, hashes.join()), folder.file("summary.json"));
                folder.commit();
                tell(map, judgement, out);
                return judgement.map(Judgement::verdict).filter(v -> v == Verdict.FAIL).isPresent() ? Iridepth.OUT_OF_TOLERANCE
                        : Iridepth.DONE;
            }
        }
    }

    private Recipe recipe() {
        return instrument.recipe();
    }

    private Optional<Tolerance> tolerance() {
        return Optional.ofNullable(recipe().tolerance()).map(t -> Tolerance.between(t[0], t[1]));
    }

    private void read(FilmReader reader, SignalSource signal, MapFolder map) {
        long pixels = (long) signal.info().width() * signal.info().height();
        try (ProgressBar bar = new ProgressBar("reading", pixels)) {
            ThicknessMap result = reader.read(signal, 0, bar);
            map.add(0, result.thickness(), result.random(), result.systematic(), result.state());
        }
    }

    private Map<String, Object> summary(MapFolder map, PhotoInfo info, SignalSource signal, Optional<Judgement> judgement,
                                        Map<String, String> hashes) {
        Uniformity u = map.uniformity();
        Map<String, Object> summary = new LinkedHashMap<>();
        summary.put("program", "iridepth " + Iridepth.Version.number());
        summary.put("title", recipe().title());
        Map<String, Object> photograph = new LinkedHashMap<>();
        photograph.put("file", info.path().getFileName().toString());
        photograph.put("width", info.width());
        photograph.put("height", info.height());
        photograph.put("pixel_um", instrument.pixelUm(info));
        summary.put("photo", photograph);
        summary.put("encoding", recipe().camera().encoding());
        summary.put("stack", recipe().stack().toString());
        summary.put("range_nm", List.of(recipe().range().fromNm(), recipe().range().toNm()));
        Map<String, Object> counts = new LinkedHashMap<>();
        map.counts().forEach((state, n) -> counts.put(state.label(), n));
        summary.put("pixels", counts);
        summary.put("thickness", u);
        Map<String, Object> spread = new LinkedHashMap<>();
        for (NonUniformity n : NonUniformity.values()) {
            spread.put(n.formula(), n.percent(u));
        }
        summary.put("non_uniformity_percent", spread);
        Map<String, Object> uncertainty = new LinkedHashMap<>();
        uncertainty.put("random_nm", map.randomNm());
        uncertainty.put("systematic_nm", map.systematicNm());
        summary.put("standard_uncertainty_rms", uncertainty);
        judgement.ifPresent(j -> summary.put("tolerance", judged(j)));
        summary.put("noise", signal.noise().toString());
        summary.put("correlated_pixels", signal.noise().correlatedPixels());
        summary.put("inputs_sha256", hashes);
        summary.put("caution", Iridepth.CAUTION);
        return summary;
    }

    private Map<String, Object> judged(Judgement judgement) {
        Map<String, Object> result = new LinkedHashMap<>();
        result.put("limits_nm", recipe().tolerance());
        result.put("verdict", judgement.verdict().words());
        result.put("judgement", judgement);
        return result;
    }

    private void tell(MapFolder map, Optional<Judgement> judgement, Path out) {
        Uniformity u = map.uniformity();
        terminal.println(recipe().title() + ": " + map.words());
        if (u.count() > 0) {
            terminal.printf(Locale.ROOT, "thickness    mean %.2f nm, median %.2f nm, standard deviation %.2f nm, 1-99 %% %.1f to %.1f nm%n",
                    u.mean(), u.median(), u.standardDeviation(), u.percentile(1), u.percentile(99));
            terminal.printf(Locale.ROOT, "uncertainty  random %.2f nm, systematic %.2f nm (standard, rms over pixels)%n",
                    map.randomNm(), map.systematicNm());
        }
        judgement.ifPresent(j -> terminal.printf(Locale.ROOT, "tolerance    %s to %s nm: %s, %.2f %% of pixels within%n",
                recipe().tolerance()[0], recipe().tolerance()[1], j.verdict().words(), 100 * j.inside()));
        terminal.println("wrote        " + out);
        terminal.println(Iridepth.CAUTION);
        terminal.flush();
    }
}
