package iridepth.report;

import iridepth.quality.Average;
import iridepth.report.LineFigure.Curve;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;

/**
 * Thickness against time at places of a film that drains, dries or grows: a figure with the band of its expanded uncertainty,
 * and a table.
 *
 * @param title    what the photos show
 * @param places   names of the places
 * @param frames   one per photo, in order
 * @param interval seconds from one to the next
 */
public record TimeSeries(String title, List<String> places, List<Frame> frames, double interval) {
    private static final double COVERAGE = 2;

    /**
     * A photo of the series.
     *
     * @param photo    its name
     * @param readings mean over each place; empty if the photo could not be used
     * @param message  why it could not be used; else empty
     */
    public record Frame(String photo, List<Average> readings, String message) {
        public Frame {
            readings = List.copyOf(readings);
        }

        /** A photo that could not be used. */
        public static Frame unusable(String photo, String message) {
            return new Frame(photo, List.of(), message);
        }

        private double at(int place, ToDoubleFunction<Average> value) {
            return readings.isEmpty() ? Double.NaN : value.applyAsDouble(readings.get(place));
        }
    }

    public TimeSeries {
        places = List.copyOf(places);
        frames = List.copyOf(frames);
        if (!(interval > 0 && interval < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("an interval of " + interval + " s: give one above 0");
        }
    }

    /**
     * Draws the figure and writes it as PNG; a file that stands there is overwritten.
     *
     * @throws OutputException if the file cannot be written
     */
    public void write(Path png) {
        figure().write(png);
    }

    LineFigure figure() {
        TimeUnit unit = TimeUnit.of((frames.size() - 1) * interval);
        double[] time = new double[frames.size()];
        for (int i = 0; i < time.length; i++) {
            time[i] = i * interval / unit.seconds();
        }
        LineFigure figure = LineFigure.of(title, "Time (" + unit.name() + ")", "Thickness (nm)")
                .remark("Thickness against time, with the band of its expanded uncertainty (k = 2)");
        for (int p = 0; p < places.size(); p++) {
            int place = p;
            double[] nm = frames.stream().mapToDouble(f -> f.at(place, Average::thickness)).toArray();
            double[] half = frames.stream().mapToDouble(f -> COVERAGE * f.at(place, Average::standardUncertainty)).toArray();
            figure = figure.with(Curve.line("place " + places.get(p), time, nm).withHalfWidth(half));
        }
        return figure;
    }

    /** The series as a table, one row per photo. */
    public CsvTable csv() {
        List<String> columns = new ArrayList<>(List.of("frame", "photo", "time_s"));
        for (String place : places) {
            for (String value : List.of("readings", "nm", "random_nm", "systematic_nm", "uncertainty_nm")) {
                columns.add(place + "_" + value);
            }
        }
        columns.add("message");
        CsvTable table = CsvTable.of(List.of(title + ": thickness against time", "of each place the count of readings, their mean, "
                + "the random and systematic parts of its standard uncertainty, and both together"), columns);
        for (int i = 0; i < frames.size(); i++) {
            Frame frame = frames.get(i);
            List<Object> row = new ArrayList<>(List.of(i + 1, frame.photo(), i * interval));
            for (int p = 0; p < places.size(); p++) {
                row.add(frame.readings().isEmpty() ? "" : frame.readings().get(p).count());
                row.addAll(List.of(frame.at(p, Average::thickness), frame.at(p, Average::random), frame.at(p, Average::systematic),
                        frame.at(p, Average::standardUncertainty)));
            }
            row.add(frame.message());
            table.row(row.toArray());
        }
        return table;
    }
}
