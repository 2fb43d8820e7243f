package iridepth.report;

import iridepth.calibration.Calibration;
import iridepth.calibration.LeaveOneOut;
import iridepth.calibration.StepResidual;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.spectrum.Grid;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/**
 * Figures and table by which a calibration is judged.
 *
 * @param title       what was calibrated
 * @param calibration the calibration
 * @param curve       its colour curve
 */
public record CalibrationFigures(String title, Calibration calibration, ColourCurve curve) {
    /** Red, green and blue that colour-blind eyes tell apart; further channels go through the list again. */
    private static final int[] COLOURS = {0xC8452D, 0x2E8B57, 0x2456A6, 0x7A4FA3};
    private static final double COVERAGE = 2;

    private static int colour(String channel, int index) {
        return channel.equals("grey") ? 0x444444 : COLOURS[index % COLOURS.length];
    }

    /** The fitted effective responses against wavelength, with their band of twice the standard uncertainty. */
    public LineFigure responseFigure() {
        EffectiveResponses responses = calibration.responses();
        double[][] band = calibration.band();
        double[] nm = new double[Grid.SIZE];
        Arrays.setAll(nm, Grid::wavelength);
        LineFigure figure = LineFigure.of("Effective responses: " + title, "Wavelength (nm)", "Response per nm")
                .remark("light x optics x sensor as fitted to the steps; bands: twice the standard uncertainty").zeroBased();
        for (int c = 0; c < responses.count(); c++) {
            double[] half = Arrays.stream(band[c]).map(u -> COVERAGE * u).toArray();
            figure = figure.with(LineFigure.Curve.line(responses.channels().get(c), nm, responses.response().get(c).toArray())
                    .withHalfWidth(half).inColour(colour(responses.channels().get(c), c)));
        }
        return figure;
    }

    /** The colour curve against thickness with the steps on it. */
    public LineFigure curveFigure() {
        double[] nm = new double[curve.size()];
        Arrays.setAll(nm, curve::thickness);
        LineFigure figure = LineFigure.of("Colour curve: " + title, "Thickness (nm)", "Signal")
                .remark("lines: fitted signal with a band of twice its standard uncertainty; points: the steps as measured");
        for (int c = 0; c < curve.channels(); c++) {
            int channel = c;
            double[] signal = new double[curve.size()];
            double[] half = new double[curve.size()];
            Arrays.setAll(signal, k -> curve.signal(k, channel));
            Arrays.setAll(half, k -> COVERAGE * Math.sqrt(curve.covariance(k, channel, channel)));
            String name = curve.channelNames().get(c);
            figure = figure.with(LineFigure.Curve.line(name, nm, signal).withHalfWidth(half).inColour(colour(name, c)));
            figure = figure.with(points(name, c));
        }
        return figure;
    }

    private LineFigure.Curve points(String channel, int index) {
        List<StepResidual> ofSteps = calibration.figures().residuals().stream().filter(r -> r.channel().equals(channel)).toList();
        List<LeaveOneOut> steps = calibration.figures().leaveOneOut();
        List<double[]> points = new ArrayList<>();
        for (LeaveOneOut step : steps) {
            ofSteps.stream().filter(r -> r.label().equals(step.label())).findFirst()
                    .ifPresent(r -> points.add(new double[] {step.thicknessNm(), r.measured()}));
        }
        return LineFigure.Curve.points("steps, " + channel, points.stream().mapToDouble(p -> p[0]).toArray(),
                points.stream().mapToDouble(p -> p[1]).toArray()).inColour(colour(channel, index));
    }

    /** Every step with its leave-one-out error, and the residual of each channel. */
    public CsvTable stepTable() {
        CsvTable table = CsvTable.of(List.of("steps of the calibration " + title,
                "left_out_*: the step read by a calibration without it", "residual: measured less fitted signal"),
                List.of("step", "thickness_nm", "left_out_reading_nm", "left_out_error_nm", "left_out_uncertainty_nm", "extrapolated",
                        "channel", "measured", "fitted", "residual_sigmas"));
        for (StepResidual r : calibration.figures().residuals()) {
            LeaveOneOut left = calibration.figures().leaveOneOut().stream().filter(l -> l.label().equals(r.label())).findFirst()
                    .orElse(null);
            table.row(r.label(), left == null ? "" : left.thicknessNm(), left == null ? "" : number(left.readNm()),
                    left == null ? "" : number(left.errorNm()), left == null ? "" : number(left.uncertaintyNm()),
                    left == null ? "" : left.extrapolated() ? "yes" : "no", r.channel(), r.measured(), r.fitted(), number(r.inSigmas()));
        }
        return table;
    }

    private static String number(double value) {
        return String.format(Locale.ROOT, "%.3f", value);
    }
}
