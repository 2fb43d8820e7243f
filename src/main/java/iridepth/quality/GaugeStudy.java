package iridepth.quality;

import java.util.Arrays;
import java.util.List;
import java.util.stream.Stream;

/**
 * Gauge study: repeatability and reproducibility of a measurement by analysis of variance, in the balanced design of p parts
 * by o operators by r repeats with all effects random (AIAG, Measurement Systems Analysis, 4th edition, 2010; Montgomery,
 * Introduction to Statistical Quality Control; both from memory).
 *
 * <p>Components of variance from the mean squares MS: repeatability = MS_e; interaction = (MS_po - MS_e) / r;
 * operator = (MS_o - MS_po) / (p r); part = (MS_p - MS_po) / (o r). If the interaction is not significant
 * (p &gt; {@value #POOLING}), its squares and degrees of freedom are pooled into MS_e, which then stands for MS_po too.
 *
 * @param parts p
 * @param operators o
 * @param repeats r
 * @param full the analysis with interaction: part, operator, interaction, repeatability, total
 * @param used the analysis on which the components rest: after pooling part, operator, repeatability, total
 * @param components variances, nm^2
 */
public record GaugeStudy(int parts, int operators, int repeats, List<VarianceSource> full, List<VarianceSource> used,
        GaugeComponents components) {

    /** An interaction with a larger p-value than this is pooled into the repeatability. */
    public static final double POOLING = 0.25;

    public GaugeStudy {
        full = List.copyOf(full);
        used = List.copyOf(used);
    }

    /**
     * Analyses parts measured by several operators.
     *
     * @param values nm, indexed [part][operator][repeat], at least two of each
     * @throws IllegalArgumentException if there are fewer, the design is not balanced, or a value is NaN
     */
    public static GaugeStudy of(double[][][] values) {
        int p = values.length;
        int o = p == 0 ? 0 : values[0].length;
        int r = o == 0 ? 0 : values[0][0].length;
        check(values, p, o, r);
        double total = sample(Arrays.stream(values).flatMap(Arrays::stream)).squares();
        double[][] cells = Arrays.stream(values)
                .map(part -> Arrays.stream(part).mapToDouble(cell -> new Sample(cell).mean()).toArray())
                .toArray(double[][]::new);
        double ssParts = o * r * new Sample(means(cells)).squares();
        double ssOperators = p * r * new Sample(means(transposed(cells))).squares();
        double ssCells = r * sample(Arrays.stream(cells)).squares();
        double ssError = Arrays.stream(values).flatMap(Arrays::stream).mapToDouble(c -> new Sample(c).squares()).sum();
        // Rounding may leave a trace below zero.
        double ssInteraction = Math.max(0, ssCells - ssParts - ssOperators);

        VarianceSource part = VarianceSource.untested("part", p - 1, ssParts);
        VarianceSource operator = VarianceSource.untested("operator", o - 1, ssOperators);
        VarianceSource error = VarianceSource.untested("repeatability", p * o * (r - 1), ssError);
        VarianceSource interaction = VarianceSource.untested("part x operator", (p - 1) * (o - 1), ssInteraction)
                .against(error);
        VarianceSource all = VarianceSource.untested("total", p * o * r - 1, total);
        List<VarianceSource> full =
                List.of(part.against(interaction), operator.against(interaction), interaction, error, all);
        if (interaction.p() <= POOLING) {
            return new GaugeStudy(p, o, r, full, full, components(p, o, r, part, operator, interaction, error));
        }
        VarianceSource pooled = VarianceSource.untested("repeatability",
                error.degreesOfFreedom() + interaction.degreesOfFreedom(), ssError + ssInteraction);
        return new GaugeStudy(p, o, r, full, List.of(part.against(pooled), operator.against(pooled), pooled, all),
                components(p, o, r, part, operator, pooled, pooled));
    }

    /**
     * Analyses parts measured repeatedly by one operator, one part included: repeatability, and the parts if there are several.
     *
     * @param values nm, indexed [part][repeat], at least two repeats
     * @throws IllegalArgumentException if there are fewer, the design is not balanced, or a value is NaN
     */
    public static GaugeStudy ofRepeats(double[][] values) {
        int p = values.length;
        int r = p == 0 ? 0 : values[0].length;
        if (Arrays.stream(values).anyMatch(part -> part.length != r)) {
            throw new IllegalArgumentException("gauge study: every part needs as many repeats as the first, " + r);
        }
        OneWayAnova anova = OneWayAnova.of(values);
        VarianceSource part = anova.between().named("part");
        VarianceSource error = anova.within().named("repeatability");
        VarianceSource all = VarianceSource.untested("total", p * r - 1, part.sumOfSquares() + error.sumOfSquares());
        double ofPart = p == 1 ? Double.NaN : Math.max(0, (part.meanSquare() - error.meanSquare()) / r);
        List<VarianceSource> table = List.of(part, error, all);
        return new GaugeStudy(p, 1, r, table, table, new GaugeComponents(error.meanSquare(), 0, 0, ofPart));
    }

    /** Whether the interaction was pooled into the repeatability. */
    public boolean pooled() {
        return used.size() < full.size();
    }

    private static GaugeComponents components(int p, int o, int r, VarianceSource part, VarianceSource operator,
            VarianceSource interaction, VarianceSource error) {
        return new GaugeComponents(error.meanSquare(),
                Math.max(0, (operator.meanSquare() - interaction.meanSquare()) / (p * r)),
                Math.max(0, (interaction.meanSquare() - error.meanSquare()) / r),
                Math.max(0, (part.meanSquare() - interaction.meanSquare()) / (o * r)));
    }

    private static void check(double[][][] values, int p, int o, int r) {
        if (p < 2 || o < 2 || r < 2) {
            throw new IllegalArgumentException("gauge study of " + p + " parts by " + o + " operators by " + r
                    + " repeats: at least two of each are needed");
        }
        for (int i = 0; i < p; i++) {
            if (values[i].length != o) {
                throw new IllegalArgumentException("gauge study, part " + (i + 1) + ": measured by " + values[i].length
                        + " operators, the first part by " + o + "; every operator must measure every part");
            }
            for (int j = 0; j < o; j++) {
                if (values[i][j].length != r
                        || Arrays.stream(values[i][j]).anyMatch(Double::isNaN)) {
                    throw new IllegalArgumentException("gauge study, part " + (i + 1) + ", operator " + (j + 1)
                            + ": " + r + " repeats are needed, as for the first part, with a value each time");
                }
            }
        }
    }

    private static Sample sample(Stream<double[]> rows) {
        return new Sample(rows.flatMapToDouble(Arrays::stream).toArray());
    }

    private static double[] means(double[][] rows) {
        return Arrays.stream(rows).mapToDouble(row -> new Sample(row).mean()).toArray();
    }

    private static double[][] transposed(double[][] rows) {
        double[][] columns = new double[rows[0].length][rows.length];
        for (int i = 0; i < rows.length; i++) {
            for (int j = 0; j < columns.length; j++) {
                columns[j][i] = rows[i][j];
            }
        }
        return columns;
    }
}
