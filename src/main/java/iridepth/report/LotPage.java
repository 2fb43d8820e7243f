package iridepth.report;

import iridepth.quality.RunChart;
import iridepth.quality.Verdict;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.io.Writer;
import java.net.URI;
import java.net.URISyntaxException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Base64;
import java.util.Locale;
import java.util.StringJoiner;

/**
 * The page of a lot: its verdicts, run chart and one row per photo with a small picture of its map, all on one colour scale, that
 * leads to the report in its result folder. Nothing but text and pictures in the file itself; no script, no request. Written row
 * by row, so that memory does not grow with the lot.
 *
 * @param lot     the lot
 * @param folder  where the result folders of its photos lie
 * @param origin  the recipe and the program, in words
 * @param caution what the figures must not be used for without a check
 */
public record LotPage(Lot lot, Path folder, String origin, String caution) {
    private static final int STOPS = 16;

    /**
     * Writes the page; a file that stands there is overwritten.
     *
     * @param html  the file; it is meant to lie in the lot's folder
     * @param chart the run chart, a PNG file
     * @throws OutputException if it cannot be written
     */
    public void write(Path html, Path chart) {
        Span scale = scale();
        String style = PageResource.text("lot.css") + ".scale { background: " + gradient() + "; }\n";
        try (Writer out = Files.newBufferedWriter(html, StandardCharsets.UTF_8)) {
            out.append("<!DOCTYPE html>\n").append(head(style).toString()).append(top(chart, scale).toString());
            for (int i = 0; i < lot.rows().size(); i++) {
                out.append(row(i, scale).toString());
            }
            out.append(foot().toString());
        } catch (IOException e) {
            throw OutputException.of(html, e);
        }
    }

    /** The thicknesses of all photos but for the hundredth at either end of each. */
    private Span scale() {
        Span span = Span.NONE;
        for (LotRow row : lot.rows()) {
            span = span.with(row.low(), row.high());
        }
        Span wide = span.widened(0);
        double step = Ticks.step((wide.to() - wide.from()) / 20);
        return new Span(Math.floor(wide.from() / step) * step, Math.ceil(wide.to() / step) * step);
    }

    private static String gradient() {
        StringJoiner stops = new StringJoiner(", ", "linear-gradient(to right, ", ")");
        for (int i = 0; i <= STOPS; i++) {
            stops.add(String.format(Locale.ROOT, "#%06x", ColourScale.thickness().rgb(ColourScale.index((double) i / STOPS)) & 0xFFFFFF));
        }
        return stops.toString();
    }

    private Html head(String style) {
        String policy = "default-src 'none'; img-src data:; style-src '" + PageResource.hash(style)
                + "'; base-uri 'none'; form-action 'none'";
        return new Html().open("html", "lang", "en").open("head").open("meta", "charset", "utf-8")
                .open("meta", "http-equiv", "Content-Security-Policy", "content", policy)
                .open("meta", "name", "viewport", "content", "width=device-width, initial-scale=1")
                .element("title", lot.title() + " \u00b7 lot").open("link", "rel", "icon", "href", "data:,")
                .add(Html.raw("<style>" + style + "</style>\n")).close("head");
    }

    private Html top(Path chart, Span scale) throws IOException {
        Html html = new Html().open("body").open("main").element("p", "Iridepth", "class", "brand").element("h1", lot.title())
                .element("p", lot.words(), "class", "words", "id", "words").element("p", origin, "class", "soft");
        html.open("p", "class", "caution").element("strong", "Caution.").text(" " + caution).close("p");
        html.element("h2", "Run chart").open("img", "class", "chart", "id", "chart", "alt", chartText(), "src",
                "data:image/png;base64," + Base64.getEncoder().encodeToString(Files.readAllBytes(chart)));
        html.element("h2", "Photos").open("p", "class", "key").text("Thickness " + Numbers.significant(scale.from(), 6) + " ")
                .open("span", "class", "scale").close("span").text(" " + Numbers.significant(scale.to(), 6) + " nm; grey where nothing was read").close("p");
        html.open("table").element("caption", "One row per photo, in the order of the lot", "class", "unseen").open("thead").open("tr");
        for (String name : new String[] {"Map", "Photo", "Mean (nm)", "Standard deviation (nm)", "1 sigma / mean", "Read", "Verdict"}) {
            html.element("th", name, "scope", "col");
        }
        return html.close("tr").close("thead").open("tbody");
    }

    private String chartText() {
        RunChart means = lot.means();
        return "Mean and spread of the thickness of each photo in order; mean of all " + nm(means.mean()) + " nm, control limits "
                + nm(means.lower()) + " to " + nm(means.upper()) + " nm. The same figures stand in the table below and in lot.csv.";
    }

    private Html row(int i, Span scale) {
        LotRow row = lot.rows().get(i);
        if (!row.isUsable()) {
            return new Html().open("tr", "class", "unusable").element("td", "\u2013", "class", "map").open("th", "scope", "row")
                    .element("span", (i + 1) + ".", "class", "number").text(" " + row.photo()).close("th")
                    .open("td", "colspan", "5").element("strong", "Could not be used.").text(" " + row.message()).close("td").close("tr");
        }
        String link = link(row.folder());
        Html html = new Html().open("tr").open("td", "class", "map").open("a", "href", link, "tabindex", "-1", "aria-hidden", "true")
                .open("img", "alt", "", "loading", "lazy", "src", Thumbnail.dataUri(SavedResult.open(folder.resolve(row.folder()))
                .thickness(), scale.from(), scale.to())).close("a").close("td");
        html.open("th", "scope", "row").element("span", (i + 1) + ".", "class", "number").text(" ").element("a", row.photo(), "href", link)
                .close("th");
        cell(html, "Mean (nm)", nm(row.mean()) + (lot.means().isBeyond(i) ? " \u2191\u2193" : ""));
        cell(html, "Standard deviation (nm)", nm(row.deviation()) + (lot.deviations().isBeyond(i) ? " \u2191\u2193" : ""));
        cell(html, "1 sigma / mean", percent(row.nonUniformity()));
        cell(html, "Read", percent(100 * row.share()));
        String verdict = row.verdict().map(Verdict::words).orElse("\u2013");
        String kind = row.verdict().map(v -> v.name().toLowerCase(Locale.ROOT)).orElse("none");
        return html.open("td", "data-label", "Verdict", "class", "verdict " + kind).element("span", verdict).close("td").close("tr");
    }

    private static void cell(Html html, String label, String value) {
        html.element("td", value, "data-label", label, "class", "figure");
    }

    private Html foot() {
        return new Html().close("tbody").close("table").element("p", "\u2191\u2193 beyond the control limits of the run chart, mean \u00b1 "
                + "2.66 times the mean moving range: the photo differs from the others by more than they do from one to the next.",
                "class", "soft").close("main").close("body").close("html");
    }

    /** A relative link to the report in a folder, percent-encoded (RFC 3986). */
    private static String link(String name) {
        try {
            return new URI(null, null, "./" + name + "/" + MapFolder.REPORT, null).toASCIIString();
        } catch (URISyntaxException e) {
            throw new UncheckedIOException(new IOException("the folder name " + name + " cannot be linked to", e));
        }
    }

    private static String nm(double value) {
        return Double.isNaN(value) ? "\u2013" : Numbers.fixed(value, 2);
    }

    private static String percent(double value) {
        return Double.isNaN(value) ? "\u2013" : Numbers.fixed(value, 2) + " %";
    }
}
