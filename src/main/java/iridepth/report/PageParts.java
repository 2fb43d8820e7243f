package iridepth.report;

import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.regex.Pattern;

/** The parts of a page that need no script: verdict, figures, tables, recipe. */
final class PageParts {
    private static final Pattern NUMBER = Pattern.compile(
            "[<>\u2264\u2265\u00b1~ ]*[+\u2212-]?\\d[\\d ,.]*([eE\u00d7][+\u2212\\d^-]+)?( ?[%\\p{L}\u00b0\u00b2/]{0,8})?|[\u2013\u2014-]?");

    private final PageContent content;

    PageParts(PageContent content) {
        this.content = content;
    }

    /** What photo it is and how large. */
    String source() {
        PageGrid grid = content.map().grid();
        String size = grid.width() + " \u00d7 " + grid.height() + " pixels";
        double um = content.map().pixelUm();
        return content.source() + " \u00b7 " + size + (Double.isNaN(um) ? "" : " of " + Numbers.significant(um, 4) + " \u00b5m");
    }

    /** Says so where not every pixel is shown. */
    Html sampling() {
        PageGrid grid = content.map().grid();
        if (grid.factor() == 1) {
            return new Html();
        }
        return new Html().element("p", "The layers show " + grid.columns() + " \u00d7 " + grid.rows() + " points: of each "
                + grid.factor() + " \u00d7 " + grid.factor() + " pixels the middle one, as it was read. Profiles and rectangles on "
                + "this page use these points; the figures above, the histogram and the table of states use every pixel.",
                "class", "note", "id", "sampling");
    }

    Html verdict() {
        return content.verdict().map(judged -> new Html()
                .open("div", "class", "verdict " + judged.verdict().name().toLowerCase(Locale.ROOT), "id", "verdict")
                .element("span", mark(judged.verdict()), "class", "mark", "aria-hidden", "true")
                .open("p").element("strong", capital(judged.verdict().words())).text(judged.reason()).close("p")
                .close("div")).orElseGet(Html::new);
    }

    private static String mark(Verdict verdict) {
        return switch (verdict) {
            case PASS -> "\u2713";
            case FAIL -> "\u2715";
            case UNDECIDED -> "?";
        };
    }

    private static String capital(String words) {
        return words.substring(0, 1).toUpperCase(Locale.ROOT) + words.substring(1);
    }

    Html facts() {
        Html html = new Html();
        for (PageContent.Fact fact : content.facts()) {
            html.open("div").element("dt", fact.name()).element("dd", fact.value()).close("div");
        }
        return html;
    }

    Html notes() {
        if (content.notes().isEmpty()) {
            return new Html();
        }
        Html html = new Html().open("ul", "class", "notes", "id", "notes");
        content.notes().forEach(note -> html.element("li", note));
        return html.close("ul");
    }

    /** Digits in groups of three (ISO 80000-1) where there are five or more. */
    private static String grouped(long count) {
        return count < 10_000 ? Long.toString(count) : String.format(Locale.ROOT, "%,d", count).replace(',', '\u202F');
    }

    /** Rows of the table of states, those that occur. */
    Html states() {
        long[] total = content.map().total();
        double pixels = (double) content.map().grid().width() * content.map().grid().height();
        Html html = new Html();
        for (StateStyle state : StateStyle.values()) {
            long count = total[state.code()];
            if (count > 0) {
                String share = count / pixels < 0.0005 ? "<0.1 %" : String.format(Locale.ROOT, "%.1f %%", 100 * count / pixels);
                html.open("tr").open("th", "scope", "row")
                        .open("span", "class", "swatch " + state.label()).close("span").text(state.label()).close("th")
                        .element("td", grouped(count), "class", "number").element("td", share, "class", "number").close("tr");
            }
        }
        return html;
    }

    /** What the histogram shows, with the place where the script draws it. */
    Html histogram() {
        Histogram histogram = content.histogram();
        if (histogram.bins() == 0) {
            return new Html().element("p", "No pixel has been read.");
        }
        Html html = new Html().element("p", grouped(histogram.total()) + " pixels, in bins of " + Numbers.significant(histogram.width(), 6)
                        + " nm." + content.tolerance().map(t -> " " + limits(t) + ".").orElse(""),
                "id", "histogram-text")
                .open("div", "class", "plot").open("svg", "id", "histogram-chart", "role", "img", "aria-labelledby",
                        "histogram-title", "aria-describedby", "histogram-text").close("svg").close("div");
        if (content.tolerance().isPresent()) {
            html.open("p", "class", "key").add(limitKey())
                    .open("span").element("i", "", "class", "sample beyond").text("beyond the limits").close("span").close("p");
        }
        return html;
    }

    /** Explains the line of a limit, if there are limits. */
    Html limitKey() {
        Html html = new Html();
        if (content.tolerance().isPresent()) {
            html.open("span").element("i", "", "class", "sample limit").text("limit").close("span");
        }
        return html;
    }

    private static String limits(Tolerance tolerance) {
        String lower = Numbers.significant(tolerance.lower(), 6);
        String upper = Numbers.significant(tolerance.upper(), 6);
        return lower.isEmpty() ? "Upper limit " + upper + " nm" : upper.isEmpty() ? "Lower limit " + lower + " nm"
                : "Limits " + lower + " to " + upper + " nm";
    }

    /** The histogram's bins as a table's rows. */
    Html bins() {
        Histogram histogram = content.histogram();
        int decimals = histogram.width() < 0.1 ? 2 : histogram.width() < 1 ? 1 : 0;
        Html html = new Html();
        for (int i = 0; i < histogram.bins(); i++) {
            html.open("tr").element("th", Numbers.fixed(histogram.edge(i), decimals) + " to "
                            + Numbers.fixed(histogram.edge(i + 1), decimals), "scope", "row", "class", "number")
                    .element("td", grouped(histogram.count(i)), "class", "number").close("tr");
        }
        return html;
    }

    Html doubts() {
        if (content.doubts().isEmpty()) {
            return new Html().element("p", "None: wherever a thickness is shown, no other order was found to fit about as well.");
        }
        Html html = new Html().element("p", "In these regions another interference order explains the colours about as well. "
                + "The map shows one of the readings; what would settle it stands in the last column.")
                .open("div", "class", "wide").open("table", "id", "doubt-table").open("thead").open("tr");
        for (String name : List.of("Region", "Pixels", "As shown", "As well possible", "What would settle it")) {
            html.element("th", name, "scope", "col", "class", name.equals("Pixels") ? "number" : "");
        }
        html.close("tr").close("thead").open("tbody");
        for (int i = 0; i < content.doubts().size(); i++) {
            PageContent.Doubt doubt = content.doubts().get(i);
            String place = doubt.width() + " \u00d7 " + doubt.height() + " px at " + doubt.x() + ", " + doubt.y();
            html.open("tr").open("th", "scope", "row")
                    .element("button", "Show region " + (i + 1), "type", "button", "class", "show", "data-doubt", Integer.toString(i))
                    .element("span", place, "class", "soft").close("th")
                    .element("td", grouped(doubt.pixels()), "class", "number")
                    .element("td", doubt.reading()).element("td", doubt.alternatives()).element("td", doubt.remedy()).close("tr");
        }
        return html.close("tbody").close("table").close("div");
    }

    Html sections() {
        Html html = new Html();
        for (int i = 0; i < content.sections().size(); i++) {
            PageContent.Section section = content.sections().get(i);
            String id = "section-" + (i + 1);
            html.open("section", "id", id, "aria-labelledby", id + "-title").element("h2", section.title(), "id", id + "-title");
            section.paragraphs().forEach(paragraph -> html.element("p", paragraph));
            section.tables().forEach(table -> html.add(table(table)));
            html.close("section");
        }
        return html;
    }

    /** Links to the caller's sections. */
    Html links() {
        Html html = new Html();
        for (int i = 0; i < content.sections().size(); i++) {
            html.open("li").element("a", content.sections().get(i).title(), "href", "#section-" + (i + 1)).close("li");
        }
        return html;
    }

    private static Html table(PageContent.Table table) {
        Html html = new Html().open("div", "class", "wide").open("table");
        if (!table.caption().isBlank()) {
            html.element("caption", table.caption());
        }
        html.open("thead").open("tr");
        for (int c = 0; c < table.header().size(); c++) {
            html.element("th", table.header().get(c), "scope", "col", "class", style(table, c));
        }
        html.close("tr").close("thead").open("tbody");
        for (List<String> row : table.rows()) {
            html.open("tr").element("th", row.get(0), "scope", "row", "class", style(table, 0));
            for (int c = 1; c < row.size(); c++) {
                html.element("td", row.get(c), "class", style(table, c));
            }
            html.close("tr");
        }
        return html.close("tbody").close("table").close("div");
    }

    private static String style(PageContent.Table table, int column) {
        boolean numbers = !table.rows().isEmpty()
                && table.rows().stream().allMatch(row -> NUMBER.matcher(row.get(column)).matches());
        return numbers ? "number" : "";
    }

    Html versions() {
        return definitions(content.origin().versions());
    }

    Html hashes() {
        return definitions(content.origin().hashes());
    }

    private static Html definitions(Map<String, String> values) {
        Html html = new Html();
        values.forEach((name, value) -> html.open("tr").element("th", name, "scope", "row").open("td").element("code", value)
                .close("td").close("tr"));
        return html;
    }
}
