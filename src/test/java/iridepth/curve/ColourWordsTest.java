package iridepth.curve;

import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.ReferenceTable;
import iridepth.colour.Lab;
import iridepth.colour.Light;
import iridepth.colour.Observer;
import iridepth.colour.Xyz;
import iridepth.optics.Materials;
import iridepth.optics.Polarisation;
import iridepth.optics.Stack;
import iridepth.optics.View;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import org.junit.jupiter.api.Test;

/**
 * Computed colours against the colour words of published charts.
 *
 * <p>Words become sectors of hue by the ten hues of the Munsell system (Newhall, Nickerson and Judd, J. Opt. Soc. Am. 33, 385,
 * 1943): the CIELAB hue angle of each centre hue at middle value and chroma, from memory to a few degrees, with half the spacing
 * of 36 degrees to either side. A word for two hues ("blue-green") spans from the one centre to the other. Words for weak colour
 * ("grey", "metallic", "-ish" alone) ask for low chroma instead of, or with, a hue.
 */
class ColourWordsTest {
    private static final double HALF = 18;
    private static final double WEAK = 32;
    private static final Map<String, double[]> CENTRES = Map.ofEntries(
            Map.entry("red", new double[] {23, 23}), Map.entry("orange", new double[] {61, 61}),
            Map.entry("yellow", new double[] {92, 92}), Map.entry("green", new double[] {163, 163}),
            Map.entry("blue", new double[] {238, 275}), Map.entry("violet", new double[] {315, 315}),
            Map.entry("purple", new double[] {315, 350}), Map.entry("pink", new double[] {350, 383}),
            Map.entry("brown", new double[] {61, 61}), Map.entry("tan", new double[] {61, 92}),
            Map.entry("gold", new double[] {92, 92}), Map.entry("melon", new double[] {23, 61}),
            Map.entry("salmon", new double[] {23, 61}), Map.entry("flesh", new double[] {23, 61}),
            Map.entry("indigo", new double[] {275, 315}), Map.entry("lavender", new double[] {275, 315}));
    private static final Map<String, String> ADJECTIVES = Map.of("bluish", "blue", "yellowish", "yellow", "greenish", "green",
            "reddish", "red", "brownish", "brown");

    /** Whether a colour answers to a chart's text; alternatives are parted by "to" and "or". */
    private static boolean answers(Lab lab, String text) {
        for (String alternative : text.split(" to | or | with slight ")) {
            if (answersOne(lab, alternative.strip())) {
                return true;
            }
        }
        return false;
    }

    private static boolean answersOne(Lab lab, String text) {
        if (text.equals("black")) {
            return lab.l() < 10;
        }
        if (text.equals("white")) {
            return lab.chroma() < 10 && lab.l() > 90;
        }
        List<String> hues = new ArrayList<>();
        boolean weak = false;
        for (String word : text.split("[ -]")) {
            String hue = ADJECTIVES.getOrDefault(word, word);
            weak |= word.equals("metallic") || word.equals("grey");
            if (CENTRES.containsKey(hue)) {
                hues.add(hue);
            }
        }
        if (weak && lab.chroma() > WEAK) {
            return false;
        }
        return hues.isEmpty() ? weak : inSector(lab.hueDeg(), hues);
    }

    private static boolean inSector(double hue, List<String> hues) {
        double[] first = CENTRES.get(hues.get(0));
        if (hues.size() == 1) {
            return between(hue, first[0] - HALF, first[1] + HALF);
        }
        double a = (first[0] + first[1]) / 2;
        double[] second = CENTRES.get(hues.get(1));
        double b = (second[0] + second[1]) / 2;
        double turn = ((b - a) % 360 + 540) % 360 - 180;
        return turn > 0 ? between(hue, a, a + turn) : between(hue, a + turn, a);
    }

    private static boolean between(double hue, double from, double to) {
        return ((hue - from) % 360 + 360) % 360 <= to - from;
    }

    private static void requireNineRowsInTen(List<Map<String, String>> rows, Function<Map<String, String>, Double> thickness,
                                                Function<Double, Lab> colour) {
        List<String> missed = new ArrayList<>();
        for (Map<String, String> row : rows) {
            double d = thickness.apply(row);
            double window = Math.max(15, 0.04 * d);
            boolean found = false;
            for (double x = Math.max(0, d - window); x <= d + window && !found; x += 1) {
                found = answers(colour.apply(x), row.get("colour"));
            }
            if (!found) {
                missed.add(row.toString());
            }
        }
        assertTrue(missed.size() <= 0.1 * rows.size(), missed.size() + " of " + rows.size() + " missed: " + missed);
    }

    private static Function<Double, Lab> colours(ColourChart chart) {
        return d -> chart.rows().get((int) Math.round(d)).lab();
    }

    /**
     * Pliskin and Conrad, IBM J. Res. Dev. 8, 43-51 (1964): oxide on silicon under daylight fluorescent light, for which CIE FL2
     * stands here; the eye adapts to the bare wafer.
     */
    @Test
    void oxideOnSiliconHasTheColoursOfThePublishedChart() {
        ColourChart chart = ColourChart.of(Stack.parse("air / SiO2 / Si", Materials.bundled()),
                View.incidence(0, Polarisation.NONE), Light.illuminant("FL2"), Observer.CIE_1931, ColourChart.White.BARE,
                new ThicknessRange(0, 1100), 1, 1);
        requireNineRowsInTen(ReferenceTable.read("oxide-colours.csv"),
                row -> 1000 * Double.parseDouble(row.get("thickness_um")), colours(chart));
    }

    /**
     * Newton's scale: a film in air so weak that both boundaries reflect alike and only once shows the colours of a retarder
     * between crossed polarisers, with 2 n d for the retardation; white is the brightest that the two waves can add up to.
     */
    @Test
    void weakFilmInAirHasTheColoursOfNewtonsScale() {
        double n = 1.05;
        double amplitude = (n - 1) / (n + 1);
        Light light = Light.illuminant("D65");
        ColourChart chart = ColourChart.of(Stack.parse("v n=1 / film n=1.05 / v n=1", Materials.bundled()),
                View.incidence(0, Polarisation.NONE), light, Observer.CIE_1931, ColourChart.White.PERFECT,
                new ThicknessRange(0, 900), 1, 1);
        Xyz white = Observer.CIE_1931.white(light).times(4 * amplitude * amplitude);
        requireNineRowsInTen(ReferenceTable.read("interference-scale.csv"),
                row -> Double.parseDouble(row.get("retardation_nm")) / (2 * n),
                d -> Lab.of(chart.rows().get((int) Math.round(d)).xyz(), white));
    }

    /**
     * Bonn Agreement Oil Appearance Code (from memory): sheen is silvery or grey from 0.04 um, rainbow from 0.3 um, beyond 5 um no
     * colours of interference. White is twice the film's mean reflectance; below a chroma of 10 a colour counts as near grey,
     * above 30 as strong (common practice).
     */
    @Test
    void oilOnWaterIsColourlessThenRainbowThenFades() {
        ColourChart chart = ColourChart.of(Stack.parse("air / oil n=1.47 / water", Materials.bundled()),
                View.incidence(0, Polarisation.NONE), Light.illuminant("D65"), Observer.CIE_1931, ColourChart.White.PERFECT,
                new ThicknessRange(0, 8000), 1, 1);
        Xyz mean = mean(chart);
        assertTrue(largestChroma(chart, mean, 0, 100) < 10, "sheen");
        assertTrue(largestChroma(chart, mean, 300, 1000) > 30, "rainbow");
        assertTrue(largestChroma(chart, mean, 2500, 8000) < 2, "fading");
    }

    private static Xyz mean(ColourChart chart) {
        double[] sum = new double[3];
        for (ColourChart.Row row : chart.rows()) {
            sum[0] += row.xyz().x() / chart.rows().size();
            sum[1] += row.xyz().y() / chart.rows().size();
            sum[2] += row.xyz().z() / chart.rows().size();
        }
        return Xyz.of(sum).times(2);
    }

    private static double largestChroma(ColourChart chart, Xyz white, int from, int to) {
        double largest = 0;
        for (int d = from; d <= to; d++) {
            largest = Math.max(largest, Lab.of(chart.rows().get(d).xyz(), white).chroma());
        }
        return largest;
    }
}
