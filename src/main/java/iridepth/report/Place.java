package iridepth.report;

import iridepth.photo.Region;
import iridepth.quality.Area;
import iridepth.quality.Disk;
import iridepth.quality.Position;
import java.awt.Shape;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Rectangle2D;

/**
 * A place on a map where its thickness is measured.
 *
 * @param name    for tables and figures
 * @param centre  its middle, in pixels with their centres at whole numbers
 * @param area    its pixels
 * @param outline its outline, the first pixel of the map reaching from 0 to 1
 */
public record Place(String name, Position centre, Area area, Shape outline) {
    /** A disk about a point. */
    public static Place disk(String name, Position centre, double radius) {
        return new Place(name, centre, new Disk(centre, radius), new Ellipse2D.Double(centre.x() + 0.5 - radius,
                centre.y() + 0.5 - radius, 2 * radius, 2 * radius));
    }

    /** A rectangle of pixels. */
    public static Place rectangle(String name, Region region) {
        return new Place(name, new Position(region.x() + (region.width() - 1) / 2.0, region.y() + (region.height() - 1) / 2.0),
                Area.of(region), new Rectangle2D.Double(region.x(), region.y(), region.width(), region.height()));
    }
}
