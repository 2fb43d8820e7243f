package iridepth.optics;

import iridepth.spectrum.Grid;
import iridepth.spectrum.SpectralTable;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/**
 * What is wrong with a table of n and k, and what is odd about it.
 *
 * <p>A fault makes the table useless: no column n, n not above 0, k negative. A remark is to be thought over: a jump of the
 * index from one row to the next, which in nature is smooth; wide gaps; end values that are held; columns that are not used.
 *
 * @param faults  one line each; empty where the table can be used
 * @param remarks one line each
 */
public record MaterialCheck(List<String> faults, List<String> remarks) {
    /** Gaps between rows up to which linear interpolation serves ordinary dispersion, common practice. */
    private static final double WIDEST_GAP_NM = 75;
    /** A step of n or k below this is no jump: it moves the optical thickness by less than a tenth of a per cent or so. */
    private static final double LEAST_JUMP = 0.002;
    /** A jump is so many times steeper than the scatter of the slopes around it. */
    private static final double STEEPNESS = 12;
    /** Rounded numbers step by what they are rounded to; a jump exceeds that. */
    private static final double ROUNDINGS = 2.5;
    private static final int NEIGHBOURS = 3;

    /** Keeps copies of the lists. */
    public MaterialCheck {
        faults = List.copyOf(faults);
        remarks = List.copyOf(remarks);
    }

    /** Checks a table, which as such is finite, rises in wavelength and covers 400-700 nm. */
    public static MaterialCheck of(SpectralTable table) {
        List<String> faults = new ArrayList<>();
        List<String> remarks = new ArrayList<>();
        if (table.has("n")) {
            firstBelow(table, "n", Double.MIN_VALUE, "it must be above 0", faults);
            jumps(table, "n", remarks);
        } else {
            faults.add("there is no column n; it has " + String.join(", ", table.columns()) + ", and the header must be "
                    + "wavelength_nm,n,k or wavelength_nm,n");
        }
        if (table.has("k")) {
            firstBelow(table, "k", 0, "it must not be negative: light that passes an absorber fades, with k above 0", faults);
            jumps(table, "k", remarks);
        } else {
            remarks.add("there is no column k: the material is taken as transparent");
        }
        table.columns().stream().filter(c -> !c.equals("n") && !c.equals("k"))
                .forEach(c -> remarks.add("column " + c + " is not used"));
        gaps(table, remarks);
        if (table.isHeld()) {
            remarks.add(String.format(Locale.ROOT, "it covers %.0f-%.0f nm of the %d-%d nm in use; beyond, its end values are held",
                    table.firstNm(), table.lastNm(), Grid.FIRST_NM, Grid.LAST_NM));
        }
        if (table.remark("source").isEmpty()) {
            remarks.add("it names no source; add a line '# source: ...'");
        }
        return new MaterialCheck(faults, remarks);
    }

    private static double[] column(SpectralTable table, String name) {
        return table.values()[table.columns().indexOf(name)];
    }

    private static void firstBelow(SpectralTable table, String name, double least, String why, List<String> faults) {
        double[] values = column(table, name);
        for (int i = 0; i < values.length; i++) {
            if (values[i] < least) {
                faults.add(String.format(Locale.ROOT, "%s is %s at %s nm; %s", name, values[i], nm(table.wavelength()[i]), why));
                return;
            }
        }
    }

    private static String nm(double wavelength) {
        return wavelength == Math.rint(wavelength) ? String.valueOf((long) wavelength) : String.valueOf(wavelength);
    }

    private static void gaps(SpectralTable table, List<String> remarks) {
        double[] at = table.wavelength();
        for (int i = 1; i < at.length; i++) {
            if (at[i] - at[i - 1] > WIDEST_GAP_NM && at[i] > 400 && at[i - 1] < 700) {
                remarks.add("there is no row between " + nm(at[i - 1]) + " and " + nm(at[i]) + " nm; in between the index is "
                        + "taken as linear");
                return;
            }
        }
    }

    /** Tells the steepest jump: an interval whose slope lies far from the slopes of its neighbours. */
    private static void jumps(SpectralTable table, String name, List<String> remarks) {
        double[] at = table.wavelength();
        double[] values = column(table, name);
        double[] slope = new double[at.length - 1];
        Arrays.setAll(slope, i -> (values[i + 1] - values[i]) / (at[i + 1] - at[i]));
        int worst = -1;
        double worstStep = Math.max(LEAST_JUMP, ROUNDINGS * rounding(values));
        for (int i = 0; i < slope.length; i++) {
            double[] around = around(slope, i);
            if (around.length < NEIGHBOURS || at[i + 1] <= Grid.FIRST_NM || at[i] >= Grid.LAST_NM) {
                continue;
            }
            double middle = median(around);
            double scatter = median(Arrays.stream(around).map(s -> Math.abs(s - middle)).toArray());
            double excess = Math.abs(slope[i] - middle);
            double step = excess * (at[i + 1] - at[i]);
            if (step > worstStep && excess > STEEPNESS * scatter && beyondNext(slope, i) > excess / 2) {
                worst = i;
                worstStep = step;
            }
        }
        if (worst >= 0) {
            remarks.add(name + " jumps from " + values[worst] + " at " + nm(at[worst]) + " nm to " + values[worst + 1] + " at "
                    + nm(at[worst + 1]) + " nm; look for a mistyped number");
        }
    }

    /** How far a slope lies beyond both next to it: in the flank of an absorption band one of them is about as steep. */
    private static double beyondNext(double[] slope, int i) {
        double before = slope[Math.max(0, i - 1)];
        double after = slope[Math.min(slope.length - 1, i + 1)];
        double one = i == 0 ? after : before;
        double other = i == slope.length - 1 ? before : after;
        return Math.max(slope[i] - Math.max(one, other), Math.min(one, other) - slope[i]);
    }

    /** The smallest change from row to row, rows without change apart: what the numbers are rounded to, or more. */
    private static double rounding(double[] values) {
        double least = Double.POSITIVE_INFINITY;
        for (int i = 1; i < values.length; i++) {
            double change = Math.abs(values[i] - values[i - 1]);
            least = change > 0 ? Math.min(least, change) : least;
        }
        return Double.isInfinite(least) ? 0 : least;
    }

    private static double[] around(double[] values, int middle) {
        int from = Math.max(0, middle - NEIGHBOURS);
        int to = Math.min(values.length, middle + NEIGHBOURS + 1);
        double[] result = new double[to - from - 1];
        for (int i = from, k = 0; i < to; i++) {
            if (i != middle) {
                result[k++] = values[i];
            }
        }
        return result;
    }

    private static double median(double[] values) {
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        int half = sorted.length / 2;
        return sorted.length % 2 == 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
    }
}
