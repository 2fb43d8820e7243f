package iridepth.report;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

class HtmlTest {
    @Test
    void markupBecomesText() {
        assertEquals("&lt;b&gt; &amp;amp; &quot;x&quot; &#39;y&#39;\n\uFFFD \uD83D\uDE00 \uFFFD", Html.escape(
                "<b> &amp; \"x\" 'y'\r\n\u0001 \uD83D\uDE00 \uDE00"));
    }

    @Test
    void attributesCannotBeClosedByTheirValues() {
        assertEquals("<a title=\"&quot; onclick=&quot;x\">&lt;i&gt;</a>\n", new Html().element("a", "<i>", "title", "\" onclick=\"x")
                .toString());
    }

    @Test
    void jsonCannotCloseItsScript() {
        assertEquals("[\"\\u003c/script\\u003e \\u003c!-- \\u0026 \\u2028\\u2029\"]", Html.json(
                "[\"</script> <!-- & \u2028\u2029\"]"));
    }
}
