package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import iridepth.recipe.Instrument;
import iridepth.recipe.RecipeException;
import iridepth.report.Lot;
import iridepth.report.LotFolder;
import iridepth.report.LotRow;
import iridepth.report.OutputException;
import iridepth.report.SavedResult;
import java.io.PrintWriter;
import java.io.Writer;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/** Many photos before one instrument: reads those that have no result yet and sums all of them up. */
final class LotRun {
    private final Instrument instrument;
    private final List<Path> photos;
    private final List<String> names;
    private final Path out;
    private final PrintWriter terminal;
    private int kept;

    private LotRun(Instrument instrument, List<Path> photos, Path out, PrintWriter terminal) {
        this.instrument = instrument;
        this.photos = photos;
        this.names = LotFolder.names(photos);
        this.out = out;
        this.terminal = terminal;
    }

    static LotRun of(Instrument instrument, List<Path> photos, Path out, PrintWriter terminal) {
        return new LotRun(instrument, photos, out, terminal);
    }

    /** Reads what is missing, writes table, chart and page, and returns the exit code. */
    int write() {
        instrument.hashes();
        Map<String, Object> about = about();
        LotFolder folder = LotFolder.open(out, about);
        List<LotRow> rows = new ArrayList<>();
        for (int i = 0; i < photos.size(); i++) {
            LotRow row = row(i);
            rows.add(row);
            terminal.println(line(i, row));
            terminal.flush();
        }
        Optional<Tolerance> tolerance = Optional.ofNullable(instrument.recipe().tolerance()).map(t -> Tolerance.between(t[0], t[1]));
        Lot lot = new Lot(instrument.recipe().title(), rows, tolerance);
        folder.finish(about, lot, "Recipe " + instrument.recipe().file().getFileName() + ", " + program(), Iridepth.CAUTION);
        terminal.println(lot.words() + (kept > 0 ? "; " + kept + " kept from before" : ""));
        terminal.println("wrote " + out);
        terminal.println(Iridepth.CAUTION);
        terminal.flush();
        if (!lot.unusable().isEmpty()) {
            return Iridepth.UNUSABLE_INPUT;
        }
        return lot.count(Verdict.FAIL) > 0 ? Iridepth.OUT_OF_TOLERANCE : Iridepth.DONE;
    }

    private static String program() {
        return "iridepth " + Iridepth.Version.number();
    }

    private Map<String, Object> about() {
        Map<String, Object> about = new LinkedHashMap<>();
        about.put("program", program());
        about.put("title", instrument.recipe().title());
        about.put("recipe", instrument.recipe().file().getFileName().toString());
        return about;
    }

    private LotRow row(int i) {
        Path photo = photos.get(i);
        String name = photo.getFileName().toString();
        Path folder = out.resolve(names.get(i));
        try {
            Optional<SavedResult> before = SavedResult.of(folder, program(), instrument.hashes(photo));
            if (before.isPresent()) {
                kept++;
                return LotRow.of(name, before.get());
            }
        } catch (PhotoException e) {
            return LotRow.unusable(name, e.getMessage());
        }
        instrument.ready();
        try {
            new MapRun(instrument, List.of(photo), true, new PrintWriter(Writer.nullWriter())).write(folder, true);
            return LotRow.of(name, SavedResult.open(folder));
        } catch (RecipeException | OutputException e) {
            throw e;
        } catch (RuntimeException e) {
            // whatever it is, it must not keep the others from being read
            return LotRow.unusable(name, Iridepth.message(e));
        }
    }

    private String line(int i, LotRow row) {
        String number = String.format(Locale.ROOT, "%" + String.valueOf(photos.size()).length() + "d/%d  %s  ", i + 1, photos.size(),
                row.photo());
        if (!row.isUsable()) {
            return number + "could not be used: " + row.message();
        }
        String figures = row.share() == 0 ? "nothing read" : String.format(Locale.ROOT, "mean %.2f nm, sd %.2f nm, read %.1f %%",
                row.mean(), row.deviation(), 100 * row.share());
        return number + figures + row.verdict().map(v -> ", " + v.words()).orElse("");
    }
}
