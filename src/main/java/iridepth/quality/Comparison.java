package iridepth.quality;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * A map against the points of a reference instrument.
 *
 * @param points     the points, in the order given
 * @param agreement  of those that are read
 * @param errors     normalised errors of all points; no score where a point is not read or the reference has no uncertainty
 * @param regression readings over references, where there are three points and they vary
 */
public record Comparison(List<Point> points, Agreement agreement, NormalizedErrors errors, Optional<DemingRegression> regression) {
    /** Coverage factor of the expanded uncertainties. */
    private static final double COVERAGE = 2;

    /**
     * What a reference instrument says of a place.
     *
     * @param position      where
     * @param thicknessNm   its thickness, nm
     * @param uncertaintyNm standard uncertainty of that, nm; NaN where nobody stated it
     */
    public record Reference(Position position, double thicknessNm, double uncertaintyNm) {
    }

    /**
     * A point.
     *
     * @param reference what the reference instrument says
     * @param reading   what the map says; empty where it is not read
     */
    public record Point(Reference reference, Average reading) {
        /** Reading less reference, nm; NaN where it is not read. */
        public double difference() {
            return reading.thickness() - reference.thicknessNm;
        }
    }

    /**
     * Compares a map with references.
     *
     * @param radius of the disk about each point over which the map is averaged, pixels; less than 0.71 for the nearest pixel
     * @throws IllegalArgumentException if no point is read
     */
    public static Comparison of(MeasuredField field, List<Reference> references, double radius) {
        List<Point> points = new ArrayList<>();
        for (Reference reference : references) {
            Position at = reference.position;
            Disk disk = radius < 0.71 ? new Disk(new Position(Math.rint(at.x()), Math.rint(at.y())), 0.5) : new Disk(at, radius);
            points.add(new Point(reference, disk.average(field)));
        }
        double[] readings = points.stream().mapToDouble(p -> p.reading.thickness()).toArray();
        double[] known = points.stream().mapToDouble(p -> p.reference.thicknessNm).toArray();
        if (points.stream().allMatch(p -> p.reading.count() == 0)) {
            throw new IllegalArgumentException("none of the " + points.size() + " points is read on the map of "
                    + field.thickness().width() + " x " + field.thickness().height() + " pixels; are x and y in its pixels?");
        }
        return new Comparison(List.copyOf(points), Agreement.of(readings, known), errors(points), regression(points, readings, known));
    }

    private static NormalizedErrors errors(List<Point> points) {
        double[] readings = points.stream().mapToDouble(p -> Double.isNaN(p.reference.uncertaintyNm) ? Double.NaN
                : p.reading.thickness()).toArray();
        return NormalizedErrors.of(readings, points.stream().mapToDouble(p -> COVERAGE * p.reading.standardUncertainty()).toArray(),
                points.stream().mapToDouble(p -> p.reference.thicknessNm).toArray(),
                points.stream().mapToDouble(p -> COVERAGE * p.reference.uncertaintyNm).toArray());
    }

    /** The line, its ratio of error variances from the stated uncertainties where all are stated, else 1. */
    private static Optional<DemingRegression> regression(List<Point> points, double[] readings, double[] known) {
        List<Point> read = points.stream().filter(p -> p.reading.count() > 0).toList();
        double spread = read.stream().mapToDouble(p -> p.reference.thicknessNm).max().orElse(0)
                - read.stream().mapToDouble(p -> p.reference.thicknessNm).min().orElse(0);
        if (read.size() < 3 || !(spread > 0)) {
            return Optional.empty();
        }
        double ofReadings = read.stream().mapToDouble(p -> Math.pow(p.reading.standardUncertainty(), 2)).sum();
        double ofReferences = read.stream().mapToDouble(p -> Math.pow(p.reference.uncertaintyNm, 2)).sum();
        double ratio = ofReadings / ofReferences;
        return Optional.of(DemingRegression.fit(known, readings, ratio > 0 && Double.isFinite(ratio) ? ratio : 1));
    }

    /** Number of points that are read. */
    public int read() {
        return agreement.pairs();
    }
}
