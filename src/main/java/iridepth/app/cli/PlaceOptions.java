package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.photo.RoiFile;
import iridepth.quality.Area;
import iridepth.quality.Position;
import iridepth.quality.SitePlan;
import iridepth.report.CsvFile;
import iridepth.report.Place;
import java.awt.Rectangle;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import picocli.CommandLine.Option;

/** Places on a map as options: sites of a plan, points, rectangles, selections of ImageJ. */
final class PlaceOptions {
    @Option(names = "--sites", paramLabel = "N", description = "A plan of 5, 9, 13, 25 or 49 sites: the centre and rings about it, as "
            + "on a wafer.")
    private Integer sites;

    @Option(names = "--centre", paramLabel = "X,Y", description = "Centre of the plan in pixels (default: the middle of the map).")
    private String centre;

    @Option(names = "--radius", paramLabel = "PX", description = "Radius of its outermost ring (default: as large as the map has "
            + "room for).")
    private Double radius;

    @Option(names = "--points", paramLabel = "FILE.csv", description = "Sites from a table with the columns x and y in pixels and, if "
            + "you like, name.")
    private Path points;

    @Option(names = "--point", paramLabel = "X,Y", description = "A single site; may be repeated.")
    private List<String> point = List.of();

    @Option(names = "--disk", paramLabel = "PX", defaultValue = "3", description = "Radius of the disk about a site over which the "
            + "mean is taken; at least 0.71 (default: 3).")
    private double disk;

    @Option(names = "--region", paramLabel = "X,Y,W,H", description = "A rectangle; may be repeated.")
    private List<String> regions = List.of();

    @Option(names = "--roi", paramLabel = "FILE", description = "Selections saved by ImageJ, .roi or .zip: areas and points; may be "
            + "repeated.")
    private List<Path> rois = List.of();

    /** The points among the places: sites of the plan, then those of the table, those given singly, those of selections. */
    List<Place> sites(int width, int height) {
        if (disk < 0.71) {
            throw new IllegalArgumentException("--disk " + disk + ": give 0.71 pixels or more, or a disk may hold no pixel");
        }
        List<Place> places = new ArrayList<>();
        if (sites != null) {
            for (Position p : plan(width, height)) {
                add(places, "", p);
            }
        } else if (centre != null || radius != null) {
            throw new IllegalArgumentException("--centre and --radius go with --sites N");
        }
        if (points != null) {
            CsvFile table = CsvFile.read(points);
            List<String> names = table.has("name") ? table.texts("name") : List.of();
            double[] x = table.numbers("x");
            double[] y = table.numbers("y");
            for (int i = 0; i < x.length; i++) {
                if (Double.isNaN(x[i]) || Double.isNaN(y[i])) {
                    throw new PhotoException(points + ", line " + table.lines().get(i) + ": a site needs x and y");
                }
                add(places, names.isEmpty() ? "" : names.get(i), new Position(x[i], y[i]));
            }
        }
        point.forEach(text -> add(places, "", Coordinates.point("--point", text)));
        return places;
    }

    private List<Position> plan(int width, int height) {
        Position middle = centre == null ? new Position((width - 1) / 2.0, (height - 1) / 2.0) : Coordinates.point("--centre", centre);
        double across = Math.min(middle.x(), width - 1 - middle.x());
        double room = Math.min(across, Math.min(middle.y(), height - 1 - middle.y())) - disk;
        if (radius == null && !(room > 0)) {
            throw new IllegalArgumentException("the map of " + width + " x " + height + " pixels has no room for sites about the "
                    + "centre; give another --centre, or --radius");
        }
        return SitePlan.ofSites(sites).positions(middle, radius == null ? room : radius);
    }

    private void add(List<Place> places, String name, Position p) {
        places.add(Place.disk(name.isEmpty() ? String.valueOf(places.size() + 1) : name, p, disk));
    }

    /** All places, at least one, the sites first. Those without a name are numbered. */
    List<Place> all(int width, int height) {
        List<Place> places = any(width, height);
        if (places.isEmpty()) {
            throw new IllegalArgumentException("say where to measure: --sites N, --points FILE.csv, --point X,Y, --region X,Y,W,H or "
                    + "--roi FILE");
        }
        return places;
    }

    /** All places, perhaps none, as {@link #all}. */
    List<Place> any(int width, int height) {
        List<Place> places = new ArrayList<>(sites(width, height));
        for (String text : regions) {
            places.add(Place.rectangle(String.valueOf(places.size() + 1), Coordinates.region("--region", text)));
        }
        for (Path file : rois) {
            for (RoiFile roi : RoiFile.read(file)) {
                addSelection(places, file, roi);
            }
        }
        return places;
    }

    private void addSelection(List<Place> places, Path file, RoiFile roi) {
        if (roi.isPoints()) {
            double[][] pixels = roi.points();
            for (int i = 0; i < pixels.length; i++) {
                places.add(Place.disk(roi.name() + (pixels.length == 1 ? "" : "-" + (i + 1)), new Position(pixels[i][0], pixels[i][1]),
                        disk));
            }
        } else if (roi.isArea()) {
            Rectangle bounds = roi.bounds();
            boolean[] mask = roi.mask();
            places.add(new Place(roi.name(), new Position(bounds.x + (bounds.width - 1) / 2.0, bounds.y + (bounds.height - 1) / 2.0),
                    Area.masked(bounds.x, bounds.y, bounds.width, bounds.height, (x, y) -> mask[y * bounds.width + x]),
                    roi.outline()));
        } else {
            throw new PhotoException(file, "holds the selection '" + roi.name() + "', which is neither an area nor points; for a line "
                    + "use profile --roi");
        }
    }
}
