package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Grid;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The effective responses of a camera's channels with their covariance, as found from films of known thickness. Immutable.
 */
public final class Calibration {
    private final ResponseModel model;
    private final double[][] factors;
    private final List<Variation> variations;
    private final FitFigures figures;
    private volatile Parts known;

    Calibration(ResponseModel model, double[][] factors, List<Variation> variations, FitFigures figures) {
        this.model = model;
        this.factors = factors;
        this.variations = List.copyOf(variations);
        this.figures = figures;
    }

    /**
     * A calibration from its data.
     *
     * @param stack the stack with the film that it is to serve
     * @throws IllegalArgumentException if the data are for another stack or do not fit together
     */
    public static Calibration of(CalibrationData data, Stack stack) {
        if (!data.stack().equals(stack.toString())) {
            throw new IllegalArgumentException("it was made with " + data.stack() + ", not " + stack + "; calibrate again");
        }
        int parameters = data.model().channels().size() * (Bumps.COUNT + 1);
        boolean fits = data.model().parameters().length == parameters && data.model().carriers().length == data.model().channels().size();
        for (double[] factor : data.factors()) {
            fits &= factor.length == parameters;
        }
        for (CalibrationData.Moved moved : data.variations()) {
            fits &= moved.model().parameters().length == parameters;
        }
        if (!fits) {
            throw new IllegalArgumentException("its numbers do not fit together; calibrate again");
        }
        List<Variation> variations = data.variations().stream()
                .map(v -> new Variation(v.input(), CalibrationData.model(v.model(), stack))).toList();
        return new Calibration(CalibrationData.model(data.model(), stack), data.factors(), variations, data.figures());
    }

    /**
     * This calibration as plain numbers, for a file.
     *
     * @param flat notation of the flat's stack, or empty
     */
    public CalibrationData data(String flat) {
        List<CalibrationData.Moved> moved = variations.stream()
                .map(v -> new CalibrationData.Moved(v.input(), CalibrationData.of(v.moved()))).toList();
        return new CalibrationData(model.stack().toString(), flat, CalibrationData.of(model), factors, moved, figures);
    }

    /** This calibration with its figures. */
    Calibration with(FitFigures judged) {
        return new Calibration(model, factors, variations, judged);
    }

    /** The effective responses E_c: relative to the flat where there is one, glare apart. */
    public EffectiveResponses responses() {
        return model.responses();
    }

    /** Veiling glare of each channel, on the scale of the signal. */
    public double[] glare() {
        return model.glare();
    }

    /** The stack, its film with the index that the steps call for where that was fitted. */
    public Stack stack() {
        return model.film();
    }

    /** The directions of view as the steps corrected them. */
    public View view() {
        return model.view();
    }

    /** The figures by which the fit is judged. */
    public FitFigures figures() {
        return figures;
    }

    /** Standard uncertainty of each channel's response, [channel][grid index]. */
    public double[][] band() {
        double[][] band = new double[model.channels().size()][Grid.SIZE];
        for (double[] factor : factors) {
            List<double[]> part = model.responses(factor);
            for (int c = 0; c < band.length; c++) {
                for (int i = 0; i < Grid.SIZE; i++) {
                    band[c][i] += part.get(c)[i] * part.get(c)[i];
                }
            }
        }
        for (double[] row : band) {
            Arrays.setAll(row, i -> Math.sqrt(row[i]));
        }
        return band;
    }

    /**
     * The colour curve with the covariance of its systematic errors: responses and glare, and the inputs that were varied.
     *
     * @param range  thicknesses
     * @param stepNm spacing of the samples, nm
     */
    public ColourCurve curve(ThicknessRange range, double stepNm) {
        ColourCurve curve = model.curve(range, stepNm);
        int n = curve.channels();
        double[] covariance = new double[curve.size() * n * n];
        for (double[][] part : parts(curve).values()) {
            for (int s = 0; s < part.length; s++) {
                for (int at = 0; at < part[s].length; at += n) {
                    for (int a = 0; a < n; a++) {
                        for (int b = 0; b < n; b++) {
                            covariance[(s * n + a) * n + b] += part[s][at + a] * part[s][at + b];
                        }
                    }
                }
            }
        }
        return curve.withCovariance(covariance);
    }

    /** Standard deviations of the signal by cause: [sample][direction * channels + channel]. Those worked out last are kept. */
    private Map<String, double[][]> parts(ColourCurve curve) {
        Parts last = known;
        if (last == null || last.fromNm != curve.fromNm() || last.toNm != curve.toNm() || last.stepNm != curve.stepNm()) {
            last = new Parts(curve.fromNm(), curve.toNm(), curve.stepNm(), worked(curve));
            known = last;
        }
        return last.byCause;
    }

    private Map<String, double[][]> worked(ColourCurve curve) {
        Map<String, double[][]> parts = new LinkedHashMap<>();
        parts.put(RESPONSES, model.along(factors, curve));
        for (Variation variation : variations) {
            ColourCurve moved = variation.moved().curve(new ThicknessRange(curve.fromNm(), curve.toNm()), curve.stepNm());
            double[][] part = new double[curve.size()][curve.channels()];
            for (int s = 0; s < part.length; s++) {
                for (int c = 0; c < curve.channels(); c++) {
                    part[s][c] = moved.signal(s, c) - curve.signal(s, c);
                }
            }
            parts.put(variation.input(), part);
        }
        return parts;
    }

    /** The parts on a curve; they follow from the calibration and the curve's samples alone. */
    private record Parts(double fromNm, double toNm, double stepNm, Map<String, double[][]> byCause) {
    }

    /** Name of the responses' own part in the {@link #budget}. */
    public static final String RESPONSES = "responses";

    /**
     * Systematic standard uncertainty of thickness, nm, by cause, at every sample of a curve: what each cause moves in a reading
     * d = a^T v, a = C^-1 s' / (s'^T C^-1 s'), of a signal v whose noise is given (JCGM 100, 5.1).
     *
     * @param curve a curve of this calibration
     * @param noise standard deviation of a pixel's signal, one value per channel
     * @return cause to one value per sample, 'responses' first
     */
    public Map<String, double[]> budget(ColourCurve curve, double[] noise) {
        int n = curve.channels();
        double[][] weights = new double[curve.size()][];
        for (int s = 0; s < weights.length; s++) {
            double[][] c = new double[n][n];
            double[] slope = new double[n];
            for (int a = 0; a < n; a++) {
                slope[a] = curve.slope(s, a);
                for (int b = 0; b < n; b++) {
                    c[a][b] = curve.covariance(s, a, b) + (a == b ? noise[a] * noise[a] : 0);
                }
            }
            double[] solved = Cholesky.of(c).solve(slope);
            double information = 0;
            for (int a = 0; a < n; a++) {
                information += solved[a] * slope[a];
            }
            double scale = information;
            weights[s] = Arrays.stream(solved).map(v -> v / scale).toArray();
        }
        Map<String, double[]> budget = new LinkedHashMap<>();
        parts(curve).forEach((cause, part) -> {
            double[] u = new double[curve.size()];
            for (int s = 0; s < u.length; s++) {
                double sum = 0;
                for (int at = 0; at < part[s].length; at += n) {
                    double moved = 0;
                    for (int c = 0; c < n; c++) {
                        moved += weights[s][c] * part[s][at + c];
                    }
                    sum += moved * moved;
                }
                u[s] = Math.sqrt(sum);
            }
            budget.put(cause, u);
        });
        return budget;
    }

    /**
     * Thicknesses where the calibration is weak: its standard uncertainty is above 1 nm, or above three times its median over the
     * range and above 0.3 nm.
     *
     * @param curve a curve of this calibration
     * @param noise standard deviation of a pixel's signal, one value per channel
     */
    public List<ThicknessRange> weakRanges(ColourCurve curve, double[] noise) {
        double[] u = new double[curve.size()];
        budget(curve, noise).values().forEach(part -> Arrays.setAll(u, s -> Math.hypot(u[s], part[s])));
        double[] sorted = u.clone();
        Arrays.sort(sorted);
        double limit = Math.min(1, Math.max(0.3, 3 * sorted[sorted.length / 2]));
        List<ThicknessRange> weak = new ArrayList<>();
        for (int s = 0; s < u.length; s++) {
            int from = s;
            while (s < u.length && !(u[s] <= limit)) {
                s++;
            }
            if (s > from + 1) {
                weak.add(new ThicknessRange(curve.thickness(from), curve.thickness(s - 1)));
            }
        }
        return weak;
    }
}
