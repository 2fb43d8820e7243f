package iridepth.report;

import iridepth.optics.Fringes;
import iridepth.optics.Stack;
import java.util.List;
import java.util.Locale;

/**
 * The bright and dark thicknesses of a film by order, for the terminal and as CSV.
 *
 * @param stack   the stack
 * @param fringes its fringes
 */
public record FringeTable(Stack stack, Fringes fringes) {
    private String heading() {
        return String.format(Locale.ROOT, "Bright and dark thicknesses of %s at %s nm; index of the film %.4f", stack,
                Numbers.significant(fringes.wavelengthNm(), 6), fringes.filmIndex());
    }

    private String shifts() {
        String which = switch (fringes.shiftCount()) {
            case 0 -> "no half-wave shift at either boundary of the film";
            case 1 -> "a half-wave shift at the film's " + (fringes.upperShift() ? "upper" : "lower") + " boundary";
            default -> "a half-wave shift at both boundaries of the film";
        };
        return which + (fringes.shiftCount() == 1 ? ": dark where the round trip is a whole number of wavelengths"
                : ": bright where the round trip is a whole number of wavelengths");
    }

    /** The table in lines for people. */
    public String text() {
        StringBuilder text = new StringBuilder(heading()).append('\n').append(shifts()).append('\n');
        text.append(String.format(Locale.ROOT, "%8s  %-6s  %14s  %14s%n", "order", "", "by the rule", "computed").replace("\r", ""));
        for (Fringes.Extremum e : fringes.extrema()) {
            String computed = Double.isNaN(e.computedNm()) ? "-" : Numbers.fixed(e.computedNm(), 1) + " nm";
            text.append(String.format(Locale.ROOT, "%8.1f  %-6s  %14s  %14s%n", e.order(), word(e),
                    Numbers.fixed(e.ruleNm(), 1) + " nm", computed).replace("\r", ""));
        }
        return text.toString();
    }

    private static String word(Fringes.Extremum e) {
        return e.bright() ? "bright" : "dark";
    }

    /** The table as CSV; a computed thickness is missing where the reflectance has no extremum nearby. */
    public CsvTable csv() {
        CsvTable table = CsvTable.of(List.of(heading(), shifts(), "rule_nm: from the half-wave shifts alone; computed_nm: extremum "
                + "of the computed reflectance"), List.of("order", "kind", "rule_nm", "computed_nm"));
        for (Fringes.Extremum e : fringes.extrema()) {
            table.row(e.order(), word(e), Numbers.fixed(e.ruleNm(), 3), Numbers.fixed(e.computedNm(), 3));
        }
        return table;
    }
}
