package iridepth.app.cli;

import iridepth.photo.OpenPhotos;
import iridepth.photo.PhotoInfo;
import iridepth.photo.SignalSource;
import iridepth.quality.Tolerance;
import iridepth.quality.Tolerance.Judgement;
import iridepth.quality.Verdict;
import iridepth.reading.DoubtfulRegion;
import iridepth.reading.FilmReader;
import iridepth.reading.OtherCandidates;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.recipe.Setup;
import iridepth.report.MapFolder;
import iridepth.report.PagePhoto;
import iridepth.report.ReportPage;
import iridepth.report.ResultFolder;
import iridepth.report.SummaryJson;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionException;

/**
 * A photo before an instrument, or one under each of its lights: reads it and writes its result folder.
 *
 * @param orderChoice whether neighbours settle the order of a pixel
 */
record MapRun(Instrument instrument, List<Path> photos, boolean orderChoice, PrintWriter terminal) {

    /** Reads the photo, writes the folder and tells the essentials; returns the exit code. */
    int write(Path out, boolean replace) {
        try (ResultFolder folder = ResultFolder.create(out, replace); OpenPhotos files = OpenPhotos.of(photos)) {
            CompletableFuture<Map<String, String>> hashes = CompletableFuture.supplyAsync(() -> instrument.hashes(photos.toArray(Path[]::new)));
            CompletableFuture<Void> curve = CompletableFuture.runAsync(() -> instrument.prepare(files.files().get(0).info()));
            SignalSource signal = instrument.signal(files.files());
            result(curve);
            PhotoInfo info = signal.info();
            Setup setup = instrument.setup(signal);
            FilmReader reader = reader(setup, info);
            OtherCandidates others = reader.others(signal, 0);
            try (MapFolder map = MapFolder.create(folder, info.width(), info.height(), instrument.pixelUm(info),
                    recipe().range().fromNm(), recipe().range().toNm(), others)) {
                List<DoubtfulRegion> doubts = read(reader, signal, map);
                Optional<Tolerance> tolerance = Optional.ofNullable(recipe().tolerance()).map(t -> Tolerance.between(t[0], t[1]));
                CompletableFuture<Void> figures = CompletableFuture.runAsync(() -> map.finish(recipe().title(), tolerance));
                MapFindings findings;
                try {
                    findings = MapFindings.of(instrument, setup, signal, map, doubts, tolerance.map(map::judge), result(hashes));
                    SummaryJson.write(findings.summary(), folder.file("summary.json"));
                    PagePhoto preview = PagePhoto.of(signal.parts().get(0), 0, !recipe().camera().isColourManaged());
                    ReportPage.write(folder.file("report.html"), new MapPage(findings).content(preview));
                } finally {
                    // a folder that is given up must not be written to any more
                    figures.exceptionally(failure -> null).join();
                }
                result(figures);
                folder.commit();
                findings.tell(terminal);
                terminal.println("wrote        " + out);
                terminal.println(Iridepth.CAUTION);
                terminal.flush();
                return findings.judgement().map(Judgement::verdict).filter(v -> v == Verdict.FAIL).isPresent()
                        ? Iridepth.OUT_OF_TOLERANCE : Iridepth.DONE;
            }
        }
    }

    /** The result of a task, or the failure that it met. */
    private static <T> T result(CompletableFuture<T> task) {
        try {
            return task.join();
        } catch (CompletionException e) {
            throw e.getCause() instanceof RuntimeException failure ? failure : e;
        }
    }

    private Recipe recipe() {
        return instrument.recipe();
    }

    private FilmReader reader(Setup setup, PhotoInfo info) {
        FilmReader reader = setup.reader(recipe(), info);
        return orderChoice ? reader : reader.withoutOrderChoice();
    }

    private static List<DoubtfulRegion> read(FilmReader reader, SignalSource signal, MapFolder map) {
        long pixels = 2L * signal.info().width() * signal.info().height();
        try (ProgressBar bar = new ProgressBar("reading", pixels)) {
            return reader.read(signal, 0, map, bar);
        }
    }
}
