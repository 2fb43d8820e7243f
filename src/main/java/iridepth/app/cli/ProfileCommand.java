package iridepth.app.cli;

import iridepth.photo.PhotoException;
import iridepth.photo.RoiFile;
import iridepth.quality.Field;
import iridepth.quality.MeasuredField;
import iridepth.quality.Position;
import iridepth.quality.Profile;
import iridepth.report.ProfileFigure;
import iridepth.report.SavedResult;
import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code profile}: thickness along a line, or in rings about a centre. */
@Command(name = "profile", mixinStandardHelpOptions = true,
        description = {"Draws the thickness along a line, or in rings about a centre, with its band of uncertainty, and writes it as a "
            + "table.", "",
            "Points are pixels, columns to the right and rows downwards, their centres at whole numbers. A line is sampled once per "
                + "pixel of its length; a sample between pixels is empty where one of them was not read. A mean across --width "
                + "samples, or over a ring, lessens the random part of the uncertainty; the systematic part stays.", "",
            "Examples:",
            "  profile result --from 20,80 --to 280,80 --width 9 --out across.png",
            "  profile result --centre 150,150 --out radial.png",
            "  profile result --roi line.roi --out line.png", ""})
final class ProfileCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "RESULT", description = "A result folder that map has written.")
    private Path result;

    @Option(names = "--from", paramLabel = "X,Y", description = "Where the line starts, in pixels.")
    private String from;

    @Option(names = "--to", paramLabel = "X,Y", description = "Where it ends.")
    private String to;

    @Option(names = "--roi", paramLabel = "FILE.roi", description = "Take the line from a straight line saved by ImageJ.")
    private Path roi;

    @Option(names = "--width", paramLabel = "N", defaultValue = "1", description = "Samples across the line of which the mean is "
            + "taken, one pixel apart (default: 1).")
    private int width;

    @Option(names = "--centre", paramLabel = "X,Y", description = "Centre of a radial profile.")
    private String centre;

    @Option(names = "--radius", paramLabel = "PX", description = "Its largest radius in pixels (default: to the nearest edge of the "
            + "map).")
    private Double radius;

    @Option(names = "--ring", paramLabel = "PX", defaultValue = "1", description = "Width of its rings in pixels (default: 1).")
    private double ring;

    @Mixin
    private PictureAndTable output;

    @Override
    public Integer call() {
        boolean line = from != null || to != null;
        if ((line ? 1 : 0) + (roi == null ? 0 : 1) + (centre == null ? 0 : 1) != 1 || line && (from == null || to == null)) {
            throw new IllegalArgumentException("give --from and --to for a line, --roi for a line saved by ImageJ, or --centre for "
                    + "a radial profile");
        }
        SavedResult saved = SavedResult.open(result);
        ProfileFigure figure = centre == null ? along(saved) : radial(saved);
        PrintWriter terminal = spec.commandLine().getOut();
        String written = output.write(figure::write, figure.csv());
        List<Profile.Point> points = figure.profile().points();
        terminal.printf(Locale.ROOT, "%d points, %d of them read%n", points.size(),
                points.stream().filter(p -> p.average().count() > 0).count());
        terminal.println(written);
        terminal.flush();
        return Iridepth.DONE;
    }

    private ProfileFigure along(SavedResult saved) {
        Position[] ends = roi == null ? new Position[] {Coordinates.point("--from", from), Coordinates.point("--to", to)}
                : ends(RoiFile.read(roi));
        MeasuredField field = saved.measured();
        Profile profile = read(Profile.along(field, ends[0], ends[1], width));
        return ProfileFigure.along(saved.title(), profile, ends[0], ends[1], width, saved.pixelUm(), saved.tolerance());
    }

    private Position[] ends(List<RoiFile> rois) {
        if (rois.size() != 1 || !rois.get(0).isLine()) {
            throw new PhotoException(roi, "is not one straight line; save a single line from ImageJ");
        }
        double[] line = rois.get(0).line();
        return new Position[] {new Position(line[0], line[1]), new Position(line[2], line[3])};
    }

    private ProfileFigure radial(SavedResult saved) {
        Position middle = Coordinates.point("--centre", centre);
        MeasuredField field = saved.measured();
        double reach = radius == null ? toNearestEdge(field.thickness(), middle) : radius;
        Profile profile = read(Profile.radial(field, middle, reach, ring));
        return ProfileFigure.radial(saved.title(), profile, middle, ring, saved.pixelUm(), saved.tolerance());
    }

    private static double toNearestEdge(Field map, Position p) {
        double across = Math.min(p.x() + 0.5, map.width() - 0.5 - p.x());
        double nearest = Math.min(across, Math.min(p.y() + 0.5, map.height() - 0.5 - p.y()));
        if (nearest < 1) {
            throw new IllegalArgumentException("--centre lies at or beyond the edge of the map of " + map.width() + " x "
                    + map.height() + " pixels; move it, or give --radius");
        }
        return nearest;
    }

    private Profile read(Profile profile) {
        if (profile.points().stream().allMatch(p -> p.average().count() == 0)) {
            throw new IllegalArgumentException("no pixel of the profile has been read; choose another place on the map " + result);
        }
        return profile;
    }
}
