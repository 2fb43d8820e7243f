package iridepth.recipe;

import iridepth.photo.PhotoInfo;
import iridepth.photo.Region;
import iridepth.reading.Pins;
import java.util.ArrayList;
import java.util.List;

/**
 * What a recipe knows of the thickness at places: {@code [[film.known]]} points, and {@code film.zero_edge}, edges of the picture at
 * which the film falls to nothing.
 *
 * @param points known points
 * @param edges  "left", "right", "top" or "bottom"
 */
public record PinSpec(List<Pins.Point> points, List<String> edges) {
    private static final List<String> EDGES = List.of("left", "right", "top", "bottom");

    /** Keeps copies. */
    public PinSpec {
        points = List.copyOf(points);
        edges = List.copyOf(edges);
    }

    static PinSpec read(Section film) {
        List<Pins.Point> points = new ArrayList<>();
        for (Section known : film.sections("known")) {
            double[] pixel = known.numbers("pixel", 2);
            if (pixel[0] < 0 || pixel[1] < 0 || pixel[0] != Math.rint(pixel[0]) || pixel[1] != Math.rint(pixel[1])) {
                throw known.error("pixel", "film.known.pixel must be [column, row] in whole pixels from 0");
            }
            points.add(new Pins.Point((int) pixel[0], (int) pixel[1], known.number("thickness_nm", 0, 0, 1e6)));
            known.finish();
        }
        List<String> edges = new ArrayList<>();
        if (film.has("zero_edge")) {
            edges.add(film.choice("zero_edge", "", EDGES));
        }
        return new PinSpec(points, edges);
    }

    /** The pins on a photo; points outside it are left out. */
    Pins pins(PhotoInfo photo) {
        int w = photo.width();
        int h = photo.height();
        List<Pins.Point> inside = points.stream().filter(p -> p.x() < w && p.y() < h).toList();
        List<Region> zero = edges.stream().map(edge -> switch (edge) {
            case "left" -> new Region(0, 0, 1, h);
            case "right" -> new Region(w - 1, 0, 1, h);
            case "top" -> new Region(0, 0, w, 1);
            default -> new Region(0, h - 1, w, 1);
        }).toList();
        return new Pins(inside, zero);
    }
}
