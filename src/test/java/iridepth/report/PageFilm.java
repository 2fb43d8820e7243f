package iridepth.report;

import iridepth.photo.Signal;
import iridepth.quality.Distribution;
import iridepth.quality.Histogram;
import iridepth.quality.Tolerance;
import iridepth.quality.Verdict;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** An invented film to put on a page: thickness and uncertainty are planes, with a doubtful patch and a hole. */
final class PageFilm {
    static final int WIDTH = 96;
    static final int HEIGHT = 64;
    static final double PIXEL_UM = 0.65;
    /** Text that would break out of its place if it were not escaped, with characters that HTML forbids. */
    static final String HOSTILE = "</script><script>window.broken = 1</script><img src=x onerror='window.broken = 2'>\"&amp; \u2028 \u0000 "
            + "\ud800 end";

    private PageFilm() {
    }

    static float thickness(int x, int y) {
        return 100 + 1.25f * x + 0.375f * y;
    }

    static float uncertainty(int x, int y) {
        return 0.5f + 0.0078125f * x;
    }

    static StateStyle state(int x, int y) {
        return x >= 60 && x < 70 && y >= 10 && y < 20 ? StateStyle.OFF_CURVE
                : x >= 20 && x < 40 && y >= 40 && y < 50 ? StateStyle.ORDER_DOUBTFUL : StateStyle.READ;
    }

    /** The other candidate of the doubtful patch. */
    static float alternative(int x, int y) {
        return state(x, y) == StateStyle.ORDER_DOUBTFUL ? thickness(x, y) + 200 : Float.NaN;
    }

    static PageMap map() {
        PageMap map = PageMap.of(WIDTH, HEIGHT, PIXEL_UM, 2);
        for (int y = HEIGHT - 1; y >= 0; y--) {
            float[] nm = new float[WIDTH];
            float[] sigma = new float[WIDTH];
            float[] other = new float[WIDTH];
            float[] none = new float[WIDTH];
            byte[] codes = new byte[WIDTH];
            Arrays.fill(none, Float.NaN);
            for (int x = 0; x < WIDTH; x++) {
                nm[x] = thickness(x, y);
                sigma[x] = uncertainty(x, y);
                other[x] = alternative(x, y);
                codes[x] = (byte) state(x, y).code();
            }
            map.add(y, nm, sigma, codes, other, none);
        }
        return map;
    }

    /** Red rises to the right, green downwards, blue is half. */
    static PagePhoto photo() {
        float[] value = new float[3 * WIDTH * HEIGHT];
        for (int i = 0; i < WIDTH * HEIGHT; i++) {
            value[3 * i] = i % WIDTH / (WIDTH - 1f);
            value[3 * i + 1] = i / WIDTH / (HEIGHT - 1f);
            value[3 * i + 2] = 0.5f;
        }
        PagePhoto photo = PagePhoto.of(WIDTH, HEIGHT, false);
        photo.add(0, new Signal(WIDTH, HEIGHT, 3, value, new float[WIDTH * HEIGHT], new byte[value.length]));
        return photo;
    }

    static Histogram histogram() {
        float[] values = new float[WIDTH * HEIGHT];
        for (int i = 0; i < values.length; i++) {
            values[i] = thickness(i % WIDTH, i / WIDTH);
        }
        return Histogram.of(Distribution.of(values));
    }

    /** A page with everything on it. */
    static PageContent full() {
        return new PageContent("Film " + HOSTILE, "photo " + HOSTILE,
                Optional.of(new PageContent.Judged(Verdict.UNDECIDED, HOSTILE)),
                List.of(new PageContent.Fact("Mean", "171.2 nm"), new PageContent.Fact(HOSTILE, HOSTILE)), map(), Optional.of(photo()),
                histogram(), Optional.of(Tolerance.between(120, 210)),
                List.of(new PageContent.Doubt(20, 40, 20, 10, 200, "about 154 nm", "354 nm", HOSTILE)),
                List.of(new PageContent.Section("Uncertainty budget", List.of(HOSTILE), List.of(new PageContent.Table(HOSTILE,
                        List.of("Source", "nm"), List.of(List.of(HOSTILE, "0.4"), List.of("Index", "\u2212\u20090.3")))))),
                new PageContent.Origin("recipe " + HOSTILE, "title = \"" + HOSTILE + "\"\r\n[film]", Map.of("Iridepth", "1"),
                        Map.of(HOSTILE, "00ff")), List.of(HOSTILE), "Check against a reference. " + HOSTILE);
    }

    /** A page with no photo, tolerance, doubt, section, note or pixel size, of a map in which nothing is read. */
    static PageContent bare() {
        PageMap map = PageMap.of(3, 2, Double.NaN, 0);
        byte[] codes = new byte[6];
        Arrays.fill(codes, (byte) StateStyle.DARK.code());
        map.add(0, new float[6], new float[6], codes);
        return new PageContent("Nothing", "dark.png", Optional.empty(), List.of(), map, Optional.empty(),
                Histogram.of(Distribution.of()), Optional.empty(), List.of(), List.of(),
                new PageContent.Origin("recipe.toml", "", Map.of(), Map.of()), List.of(), "Check against a reference.");
    }
}
