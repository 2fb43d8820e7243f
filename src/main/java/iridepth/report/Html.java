package iridepth.report;

/**
 * HTML as it is being written (WHATWG HTML, serialised by hand). Whatever is given as text or as the value of an attribute is
 * escaped; tags and names of attributes are the program's own.
 */
final class Html {
    private final StringBuilder html = new StringBuilder();

    /** Text with {@code & < > " '} escaped; control characters and lone surrogates, which HTML forbids,
     * become U+FFFD. */
    static String escape(String text) {
        StringBuilder escaped = new StringBuilder(text.length() + 16);
        text.replace("\r\n", "\n").codePoints().forEach(c -> {
            switch (c) {
                case '&' -> escaped.append("&amp;");
                case '<' -> escaped.append("&lt;");
                case '>' -> escaped.append("&gt;");
                case '"' -> escaped.append("&quot;");
                case '\'' -> escaped.append("&#39;");
                default -> escaped.appendCodePoint(forbidden(c) ? 0xFFFD : c);
            }
        });
        return escaped.toString();
    }

    private static boolean forbidden(int c) {
        return Character.isISOControl(c) && c != '\n' && c != '\t' || c >= Character.MIN_SURROGATE && c <= Character.MAX_SURROGATE;
    }

    /**
     * JSON that may stand in a script element: {@code <}, {@code >} and {@code &} as well as U+2028 and U+2029, which end a line
     * in older JavaScript, are written as escapes, so that no text can close the element.
     */
    static String json(String json) {
        return json.replace("<", "\\u003c").replace(">", "\\u003e").replace("&", "\\u0026").replace("\u2028", "\\u2028")
                .replace("\u2029", "\\u2029");
    }

    /**
     * Opens an element.
     *
     * @param attributes names and values in turn
     */
    Html open(String tag, String... attributes) {
        html.append('<').append(tag);
        for (int i = 0; i < attributes.length; i += 2) {
            html.append(' ').append(attributes[i]).append("=\"").append(escape(attributes[i + 1])).append('"');
        }
        html.append('>');
        return this;
    }

    Html close(String tag) {
        html.append("</").append(tag).append(">\n");
        return this;
    }

    Html text(String text) {
        html.append(escape(text));
        return this;
    }

    /** An element that holds nothing but text. */
    Html element(String tag, String text, String... attributes) {
        return open(tag, attributes).text(text).close(tag);
    }

    /** The program's own HTML, as it stands. */
    static Html raw(String html) {
        Html raw = new Html();
        raw.html.append(html);
        return raw;
    }

    /** Adds another piece. */
    Html add(Html other) {
        html.append(other.html);
        return this;
    }

    @Override
    public String toString() {
        return html.toString();
    }
}
