package iridepth.app.cli;

import iridepth.calibration.Calibration;
import iridepth.calibration.StepResidual;
import iridepth.quality.Histogram;
import iridepth.quality.NonUniformity;
import iridepth.quality.Tolerance;
import iridepth.quality.Tolerance.Judgement;
import iridepth.quality.Uniformity;
import iridepth.recipe.Recipe;
import iridepth.report.PageContent;
import iridepth.report.PageContent.Doubt;
import iridepth.report.PageContent.Fact;
import iridepth.report.PageContent.Judged;
import iridepth.report.PageContent.Origin;
import iridepth.report.PageContent.Section;
import iridepth.report.PageContent.Table;
import iridepth.report.PagePhoto;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;

/**
 * What the report page says of a map.
 *
 * @param findings what the map amounts to
 */
record MapPage(MapFindings findings) {
    PageContent content(PagePhoto photo) {
        Recipe recipe = findings.recipe();
        Optional<Tolerance> tolerance = Optional.ofNullable(recipe.tolerance()).map(t -> Tolerance.between(t[0], t[1]));
        return new PageContent(recipe.title(), findings.info().path().getFileName().toString(),
                findings.judgement().map(this::judged), facts(), findings.map().page(), Optional.of(photo),
                Histogram.of(findings.map().distribution()), tolerance, doubts(), sections(), origin(), findings.notes(),
                Iridepth.CAUTION);
    }

    private List<Doubt> doubts() {
        return findings.doubts().stream().map(d -> new Doubt(d.box().x(), d.box().y(), d.box().width(), d.box().height(), d.pixels(),
                nm(d.meanNm()), d.alternatives().stream().map(a -> nm(a.meanNm())).collect(Collectors.joining(", ")),
                MapFindings.REMEDY)).toList();
    }

    private Judged judged(Judgement j) {
        return new Judged(j.verdict(), String.format(Locale.ROOT, "%.2f %% of the pixels read lie within %s to %s nm (%.2f %% with a "
                + "guard band of twice the uncertainty), and the mean is %s.", 100 * j.inside(), findings.recipe().tolerance()[0],
                findings.recipe().tolerance()[1], 100 * j.provenInside(), j.mean().words()));
    }

    private List<Fact> facts() {
        Uniformity u = findings.map().uniformity();
        return List.of(new Fact("Mean", nm(u.mean())), new Fact("Median", nm(u.median())),
                new Fact("Standard deviation", nm(u.standardDeviation())),
                new Fact("1 % to 99 %", nm(u.percentile(1)) + " to " + nm(u.percentile(99))),
                new Fact("Uncertainty of one pixel (k = 2)", nm(2 * Math.hypot(findings.map().randomNm(), findings.map().systematicNm()))),
                new Fact("Pixels", findings.map().words()));
    }

    private static String nm(double value) {
        return Double.isNaN(value) ? "none" : String.format(Locale.ROOT, "%.2f nm", value);
    }

    private List<Section> sections() {
        List<Section> sections = new ArrayList<>();
        List<List<String>> budget = findings.budget().lines().stream().map(l -> List.of(l.cause(), l.kind(), number(l.nm()))).toList();
        sections.add(new Section("Uncertainty budget", List.of("Standard uncertainties, root mean squares over the pixels read; A from "
                + "the scatter of observations, B otherwise (GUM, JCGM 100)."),
                List.of(new Table("", List.of("cause", "type", "nm"), budget))));
        Uniformity u = findings.map().uniformity();
        List<List<String>> spread = new ArrayList<>();
        for (NonUniformity n : NonUniformity.values()) {
            spread.add(List.of(n.formula(), number(n.percent(u))));
        }
        sections.add(new Section("Non-uniformity", List.of("By its usual definitions; figures by different ones cannot be compared."),
                List.of(new Table("", List.of("definition", "%"), spread))));
        findings.setup().calibration().ifPresent(c -> sections.add(calibration(c)));
        return sections;
    }

    private static Section calibration(Calibration c) {
        List<List<String>> rows = new ArrayList<>();
        for (StepResidual r : c.figures().residuals()) {
            rows.add(List.of(r.label(), r.channel(), String.format(Locale.ROOT, "%.5f", r.measured()),
                    String.format(Locale.ROOT, "%.5f", r.fitted()), String.format(Locale.ROOT, "%.1f", r.inSigmas())));
        }
        String text = String.format(Locale.ROOT, "Responses fitted to %d signals: chi-square %.1f with %.1f degrees of freedom, p = %.3f; "
                + "numerical aperture %.3f (stated %.3f).", c.figures().residuals().size(), c.figures().chiSquare(),
                c.figures().degreesOfFreedom(), c.figures().pValue(), c.figures().aperture(), c.figures().apertureStated());
        return new Section("Calibration", List.of(text), List.of(new Table("Residuals", List.of("step", "channel", "measured", "fitted",
                "sigmas"), rows)));
    }

    private static String number(double value) {
        return Double.isNaN(value) ? "-" : String.format(Locale.ROOT, "%.3f", value);
    }

    private Origin origin() {
        Map<String, String> versions = new LinkedHashMap<>();
        versions.put("Iridepth", Iridepth.Version.number());
        versions.put("Java", System.getProperty("java.version"));
        try {
            return new Origin(findings.recipe().file().getFileName().toString(), Files.readString(findings.recipe().file()), versions,
                    findings.hashes());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
