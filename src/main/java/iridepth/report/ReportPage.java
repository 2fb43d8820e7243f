package iridepth.report;

import java.io.IOException;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The report as one HTML file that needs nothing else: no network, no server. Photo, thickness, uncertainty and state are
 * layers of a map from which pointer or keyboard read off points, profiles and rectangles; tables and recipe need no script.
 * A content security policy (W3C CSP 3) in the file itself forbids all requests and every script and style but its own.
 */
public final class ReportPage {
    private static final List<String> SCRIPTS = List.of("planes.js", "measure.js", "chart.js", "plots.js", "layers.js", "view.js",
            "page.js");
    private static final Pattern PLACE = Pattern.compile("\\{\\{([a-z-]+)}}");

    private ReportPage() {
    }

    /**
     * Writes a page; a file that stands there is overwritten.
     *
     * @throws OutputException       if it cannot be written
     * @throws IllegalStateException if rows of the map have not been added
     */
    public static void write(Path html, PageContent content) {
        content.map().complete();
        Map<String, String> parts = parts(content);
        try (Writer out = Files.newBufferedWriter(html, StandardCharsets.UTF_8)) {
            String template = PageResource.text("page.html");
            Matcher place = PLACE.matcher(template);
            int done = 0;
            while (place.find()) {
                out.append(template, done, place.start()).append(parts.get(place.group(1)));
                done = place.end();
            }
            out.append(template, done, template.length());
        } catch (IOException e) {
            throw OutputException.of(html, e);
        }
    }

    private static Map<String, String> parts(PageContent content) {
        PageParts page = new PageParts(content);
        PageData data = new PageData(content);
        String style = PageResource.text("page.css");
        String script = script();
        Map<String, String> parts = new LinkedHashMap<>();
        parts.put("policy", "default-src 'none'; img-src data:; style-src '" + PageResource.hash(style) + "'; script-src '"
                + PageResource.hash(script) + "'; base-uri 'none'; form-action 'none'");
        parts.put("style", style);
        parts.put("script", script);
        parts.put("title", Html.escape(content.title()));
        parts.put("source", Html.escape(page.source()));
        parts.put("verdict", page.verdict().toString());
        parts.put("facts", page.facts().toString());
        parts.put("caution", Html.escape(content.caution()));
        parts.put("notes", page.notes().toString());
        parts.put("links", page.links().toString());
        parts.put("photo", content.photo().map(photo -> new Html().open("img", "id", "photo", "alt", "", "src", photo.dataUri()))
                .orElseGet(Html::new).toString());
        parts.put("sampling", page.sampling().toString());
        parts.put("states", page.states().toString());
        parts.put("histogram", page.histogram().toString());
        parts.put("limit-key", page.limitKey().toString());
        parts.put("bins", page.bins().toString());
        parts.put("doubts", page.doubts().toString());
        parts.put("sections", page.sections().toString());
        parts.put("versions", page.versions().toString());
        parts.put("hashes", page.hashes().toString());
        parts.put("recipe-name", Html.escape(content.origin().recipeName()));
        parts.put("recipe", Html.escape(content.origin().recipe()));
        parts.put("data", Html.json(data.json()));
        parts.put("planes", planes(data));
        return parts;
    }

    private static String planes(PageData data) {
        Html html = new Html();
        data.planes().forEach((name, packed) ->
                html.element("script", packed, "type", "text/plain", "id", "plane-" + name));
        return html.toString();
    }

    /** The script of all pages; its parts share one scope of their own. */
    private static String script() {
        StringBuilder script = new StringBuilder("(() => {\n'use strict';\n");
        SCRIPTS.forEach(name -> script.append(PageResource.text(name)).append('\n'));
        return script.append("})();\n").toString();
    }
}
