package iridepth.report;

import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * What stands on a report page. All text is plain text: the page escapes it.
 *
 * @param title     what the map shows
 * @param source    name of the photo
 * @param verdict   how the film stands against its tolerance; empty if there is none to judge by
 * @param facts     the few figures to see first, in order
 * @param map       the readings
 * @param photo     the photo, of the same size as the map; empty to leave it out
 * @param histogram of the thicknesses of all pixels
 * @param tolerance the limits, if any
 * @param doubts    regions whose interference order is open; may be empty
 * @param sections  uncertainty budget, calibration and the like, in order
 * @param origin    what is needed to repeat the run
 * @param notes     remarks of the run, such as a table that had to be extended
 * @param caution   what the figures must not be used for without a check
 */
public record PageContent(String title, String source, Optional<Judged> verdict, List<Fact> facts, PageMap map,
                          Optional<PagePhoto> photo, Histogram histogram, Optional<Tolerance> tolerance, List<Doubt> doubts,
                          List<Section> sections, Origin origin, List<String> notes, String caution) {
    public PageContent {
        facts = List.copyOf(facts);
        doubts = List.copyOf(doubts);
        sections = List.copyOf(sections);
        notes = List.copyOf(notes);
        if (photo.isPresent() && !photo.get().grid().equals(map.grid())) {
            throw new IllegalArgumentException("photo and map of a page differ in size");
        }
    }

    /**
     * A verdict.
     *
     * @param verdict the verdict
     * @param reason  one sentence that says by which rule and figures
     */
    public record Judged(Verdict verdict, String reason) {
    }

    /**
     * A figure with its name.
     *
     * @param name  such as "Mean thickness"
     * @param value with its unit
     */
    public record Fact(String name, String value) {
    }

    /**
     * A region of which the interference order is open.
     *
     * @param x            left column of the rectangle around it, px
     * @param y            top row, px
     * @param width        columns
     * @param height       rows
     * @param pixels       pixels of the region
     * @param reading      the thickness that the map shows, in words
     * @param alternatives the others, in words
     * @param remedy       what would settle it
     */
    public record Doubt(int x, int y, int width, int height, long pixels, String reading, String alternatives, String remedy) {
    }

    /**
     * A part of the page under a heading of its own.
     *
     * @param title      heading
     * @param paragraphs text before the tables
     * @param tables     tables
     */
    public record Section(String title, List<String> paragraphs, List<Table> tables) {
        public Section {
            paragraphs = List.copyOf(paragraphs);
            tables = List.copyOf(tables);
        }
    }

    /**
     * A table; columns of numbers are set flush right.
     *
     * @param caption what it shows; may be empty if the heading says it
     * @param header  names of the columns, with units
     * @param rows    cells as text, the first of each naming the row; as many as there are columns
     */
    public record Table(String caption, List<String> header, List<List<String>> rows) {
        public Table {
            header = List.copyOf(header);
            rows = rows.stream().map(List::copyOf).toList();
            for (List<String> row : rows) {
                if (row.size() != header.size()) {
                    throw new IllegalArgumentException("table \"" + caption + "\" has " + header.size() + " columns but a row of "
                            + row.size());
                }
            }
        }
    }

    /**
     * What is needed to repeat a run.
     *
     * @param recipeName name of the recipe file
     * @param recipe     its text
     * @param versions   version of the program and of what it ran on, by name, in order
     * @param hashes     SHA-256 of every input, by name, in order
     */
    public record Origin(String recipeName, String recipe, Map<String, String> versions, Map<String, String> hashes) {
        public Origin {
            versions = Collections.unmodifiableMap(new LinkedHashMap<>(versions));
            hashes = Collections.unmodifiableMap(new LinkedHashMap<>(hashes));
        }
    }
}
