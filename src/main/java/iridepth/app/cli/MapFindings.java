package iridepth.app.cli;

import iridepth.calibration.Calibration;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Region;
import iridepth.photo.SignalSource;
import iridepth.quality.NonUniformity;
import iridepth.quality.Tolerance.Judgement;
import iridepth.quality.Uniformity;
import iridepth.reading.DoubtfulRegion;
import iridepth.recipe.Instrument;
import iridepth.recipe.Recipe;
import iridepth.recipe.Setup;
import iridepth.report.MapFolder;
import iridepth.report.UncertaintyBudget;
import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;

/**
 * What a map amounts to, for {@code summary.json} and the terminal.
 *
 * @param instrument what it was read with
 * @param setup      its curve
 * @param info       the photo
 * @param signal     its signal
 * @param map        the map
 * @param doubts     regions whose order is open
 * @param judgement  how it stands against the tolerance, if there is one
 * @param budget     its uncertainty by cause
 * @param hashes     SHA-256 of all inputs
 */
record MapFindings(Instrument instrument, Setup setup, PhotoInfo info, SignalSource signal, MapFolder map,
                   List<DoubtfulRegion> doubts, Optional<Judgement> judgement, UncertaintyBudget budget,
                   Map<String, String> hashes) {
    /** Doubtful regions that the terminal lists at most; summary.json has all. */
    private static final int SHOWN_DOUBTS = 5;
    /** What settles the order of a region. */
    static final String REMEDY = "a known point in it ([[film.known]] in the recipe), an edge where its film falls to nothing "
            + "(film.zero_edge), or a photo under another light";

    static MapFindings of(Instrument instrument, Setup setup, SignalSource signal, MapFolder map, List<DoubtfulRegion> doubts,
                          Optional<Judgement> judgement, Map<String, String> hashes) {
        return new MapFindings(instrument, setup, signal.info(), signal, map, doubts, judgement, budget(setup, signal, map), hashes);
    }

    Recipe recipe() {
        return instrument.recipe();
    }

    /** Content of {@code summary.json}. */
    Map<String, Object> summary() {
        Uniformity u = map.uniformity();
        Map<String, Object> summary = new LinkedHashMap<>();
        summary.put("program", "iridepth " + Iridepth.Version.number());
        summary.put("title", recipe().title());
        summary.put("photo", photo());
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
        summary.put("doubtful_regions", doubts.stream().map(MapFindings::doubt).toList());
        summary.put("uncertainty_budget", budget().lines());
        setup().calibration().ifPresent(c -> summary.put("calibration", calibration(c)));
        judgement.ifPresent(j -> summary.put("tolerance", judged(j)));
        summary.put("noise", signal.noise().toString());
        summary.put("correlated_pixels", signal.noise().correlatedPixels());
        summary.put("notes", notes());
        summary.put("inputs_sha256", hashes);
        summary.put("caution", Iridepth.CAUTION);
        return summary;
    }

    private Map<String, Object> photo() {
        Map<String, Object> photograph = new LinkedHashMap<>();
        photograph.put("file", info.path().getFileName().toString());
        if (signal.parts().size() > 1) {
            photograph.put("read_jointly", signal.parts().stream().map(p -> p.info().path().getFileName().toString()).toList());
        }
        photograph.put("width", info.width());
        photograph.put("height", info.height());
        photograph.put("pixel_um", instrument.pixelUm(info));
        return photograph;
    }

    private static Map<String, Object> calibration(Calibration calibration) {
        Map<String, Object> result = new LinkedHashMap<>();
        result.put("chi_square", calibration.figures().chiSquare());
        result.put("degrees_of_freedom", calibration.figures().degreesOfFreedom());
        result.put("p_value", calibration.figures().pValue());
        result.put("numerical_aperture", calibration.figures().aperture());
        result.put("glare", calibration.glare());
        return result;
    }

    private static Map<String, Object> doubt(DoubtfulRegion region) {
        Map<String, Object> result = new LinkedHashMap<>();
        Region box = region.box();
        result.put("region", List.of(box.x(), box.y(), box.width(), box.height()));
        result.put("pixels", region.pixels());
        result.put("mean_nm", region.meanNm());
        result.put("alternatives", region.alternatives());
        result.put("remedy", REMEDY);
        return result;
    }

    private Map<String, Object> judged(Judgement j) {
        Map<String, Object> result = new LinkedHashMap<>();
        result.put("limits_nm", recipe().tolerance());
        result.put("verdict", j.verdict().words());
        result.put("judgement", j);
        return result;
    }

    /** The uncertainty by cause. */
    private static UncertaintyBudget budget(Setup setup, SignalSource signal, MapFolder map) {
        Map<String, Double> causes = setup.calibration().map(c -> {
            double[] noise = new double[setup.curve().channels()];
            double[] middle = new double[noise.length];
            setup.curve().at(map.uniformity().median(), middle, new double[noise.length], new double[noise.length]);
            for (int i = 0; i < noise.length; i++) {
                noise[i] = Math.sqrt(signal.variance(i, middle[i], 1));
            }
            return UncertaintyBudget.average(c.budget(setup.curve(), noise), setup.curve().fromNm(), setup.curve().stepNm(),
                    map.distribution());
        }).orElse(Map.of());
        return UncertaintyBudget.of(map.randomNm(), map.systematicNm(), causes);
    }

    /** What a reader should know of the run. */
    List<String> notes() {
        List<String> notes = new ArrayList<>(instrument.notes());
        if (setup().calibration().isEmpty() && recipe().inputs().isEmpty()) {
            notes.add("film index, light, aperture and camera are taken as exact: the systematic uncertainty is 0 until the recipe "
                    + "states theirs in [uncertainty]");
        }
        if (signal.noise().correlated()) {
            notes.add("the photo's noise is correlated between pixels (compression, demosaicing or smoothing): means are less certain "
                    + "than the number of pixels suggests");
        }
        return notes;
    }

    /** The essentials, for the terminal. */
    void tell(PrintWriter terminal) {
        Uniformity u = map.uniformity();
        terminal.println(recipe().title() + ": " + map.words());
        if (u.count() > 0) {
            terminal.printf(Locale.ROOT, "thickness    mean %.2f nm, median %.2f nm, standard deviation %.2f nm, 1-99 %% %.1f to %.1f nm%n",
                    u.mean(), u.median(), u.standardDeviation(), u.percentile(1), u.percentile(99));
            terminal.printf(Locale.ROOT, "uncertainty  random %.2f nm, systematic %.2f nm (standard, rms over pixels)%n",
                    map.randomNm(), map.systematicNm());
        }
        for (DoubtfulRegion region : doubts.subList(0, Math.min(SHOWN_DOUBTS, doubts.size()))) {
            terminal.printf(Locale.ROOT, "in doubt     %s: %.0f nm, or as well %s%n", region.box(), region.meanNm(), region.alternatives()
                    .stream().map(a -> String.format(Locale.ROOT, "%.0f nm", a.meanNm())).collect(Collectors.joining(", ")));
        }
        if (!doubts.isEmpty()) {
            terminal.println("             what settles it: " + REMEDY);
        }
        judgement.ifPresent(j -> terminal.printf(Locale.ROOT, "tolerance    %s to %s nm: %s, %.2f %% of pixels within%n",
                recipe().tolerance()[0], recipe().tolerance()[1], j.verdict().words(), 100 * j.inside()));
        notes().forEach(note -> terminal.println("note         " + note));
    }
}
