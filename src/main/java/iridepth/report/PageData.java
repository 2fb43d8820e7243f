package iridepth.report;

import iridepth.quality.Histogram;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** What the script of a page works on: a description as JSON, and the planes of numbers. */
final class PageData {
    /** Steps to which uncertainties and other candidates are rounded, nm; thickness is kept whole. */
    private static final double UNCERTAINTY_STEP = 1e-4;
    private static final double ALTERNATIVE_STEP = 0.1;
    /** Share of the points beyond either end of the colours, so that a few stray ones do not stretch them. */
    private static final double STRAY = 0.001;
    /** Uncertainty rises without bound where the colour hardly changes: more points may lie beyond its colours. */
    private static final double STRAY_UNCERTAINTY = 0.02;

    private final PageContent content;

    PageData(PageContent content) {
        this.content = content;
    }

    /** The description. */
    String json() {
        PageMap map = content.map();
        PageGrid grid = map.grid();
        Map<String, Object> data = new LinkedHashMap<>();
        data.put("width", grid.width());
        data.put("height", grid.height());
        data.put("factor", grid.factor());
        data.put("columns", grid.columns());
        data.put("rows", grid.rows());
        data.put("firstX", grid.firstX());
        data.put("firstY", grid.firstY());
        data.put("pixelUm", map.pixelUm());
        data.put("alternatives", map.alternatives().length);
        data.put("uncertaintyStep", UNCERTAINTY_STEP);
        data.put("alternativeStep", ALTERNATIVE_STEP);
        data.put("thicknessRange", range(map.thickness(), STRAY, false));
        data.put("uncertaintyRange", range(map.uncertainty(), STRAY_UNCERTAINTY, true));
        data.put("states", states());
        data.put("colours", colours());
        data.put("histogram", histogram());
        data.put("tolerance", content.tolerance().map(t -> new double[] {t.lower(), t.upper()}).orElse(null));
        data.put("doubts", content.doubts().stream()
                .map(d -> new int[] {d.x(), d.y(), d.width(), d.height()}).toList());
        return SummaryJson.text(data);
    }

    private static double[] range(float[] values, double stray, boolean fromZero) {
        float[] sorted = new float[values.length];
        int count = 0;
        for (float v : values) {
            if (Float.isFinite(v)) {
                sorted[count++] = v;
            }
        }
        if (count == 0) {
            return new double[] {0, 1};
        }
        Arrays.parallelSort(sorted, 0, count);
        double low = fromZero ? 0 : sorted[(int) (stray * (count - 1))];
        double high = sorted[count - 1 - (int) (stray * (count - 1))];
        double step = Ticks.step(Math.max((high - low) / 20, fromZero ? 1e-3 : 0.05));
        double from = Math.floor(low / step) * step;
        double to = Math.ceil(high / step) * step;
        return new double[] {from, to > from ? to : from + step};
    }

    private static List<Map<String, Object>> states() {
        List<Map<String, Object>> states = new ArrayList<>();
        for (StateStyle state : StateStyle.values()) {
            Map<String, Object> style = new LinkedHashMap<>();
            style.put("label", state.label());
            style.put("rgb", state.rgb());
            style.put("hasThickness", state.hasThickness());
            states.add(style);
        }
        return states;
    }

    private static int[] colours() {
        int[] colours = new int[ColourScale.SIZE];
        Arrays.setAll(colours, ColourScale.thickness()::rgb);
        return colours;
    }

    private Map<String, Object> histogram() {
        Histogram histogram = content.histogram();
        Map<String, Object> data = new LinkedHashMap<>();
        data.put("first", histogram.bins() == 0 ? 0 : histogram.edge(0));
        data.put("width", histogram.width());
        data.put("counts", histogram.counts());
        return data;
    }

    /** The planes by name, packed as {@link PagePlane} says. */
    Map<String, String> planes() {
        PageMap map = content.map();
        Map<String, int[]> values = new LinkedHashMap<>();
        values.put("thickness", PagePlane.exact(map.thickness()));
        values.put("uncertainty", PagePlane.stepped(map.uncertainty(), UNCERTAINTY_STEP));
        values.put("state", PagePlane.codes(map.state()));
        for (int k = 0; k < map.alternatives().length; k++) {
            values.put("alternative-" + k, PagePlane.stepped(map.alternatives()[k], ALTERNATIVE_STEP));
        }
        List<String> packed = values.values().parallelStream().map(plane -> PagePlane.pack(plane, map.grid().columns())).toList();
        Map<String, String> planes = new LinkedHashMap<>();
        values.keySet().forEach(name -> planes.put(name, packed.get(planes.size())));
        return planes;
    }
}
