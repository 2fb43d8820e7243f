package iridepth.report;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Locale;

/** Numbers as they stand in files and pictures: in plain decimal notation, the same on every machine and in every language. */
final class Numbers {
    private Numbers() {
    }

    /**
     * A number rounded to significant digits, without needless zeros.
     *
     * @param value  NaN and infinities have no text
     * @param digits significant digits
     * @return the text, or an empty one
     */
    static String significant(double value, int digits) {
        return Double.isFinite(value) ? rounded(value, digits).toPlainString() : "";
    }

    /** A finite number rounded to significant digits; zero has no sign. */
    static BigDecimal rounded(double value, int digits) {
        BigDecimal exact = new BigDecimal(value).round(new MathContext(digits)).stripTrailingZeros();
        return exact.signum() == 0 ? BigDecimal.ZERO : exact;
    }

    /** A number with a fixed count of decimals; empty for NaN and infinities. */
    static String fixed(double value, int decimals) {
        if (!Double.isFinite(value)) {
            return "";
        }
        String text = String.format(Locale.ROOT, "%." + decimals + "f", value);
        return text.matches("-0\\.?0*") ? text.substring(1) : text;
    }
}
