package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.apache.commons.math3.distribution.ChiSquaredDistribution;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.SingularValueDecomposition;

/** Judges a fit: residuals, chi-square, leave-one-out errors, condition. */
final class Judgement {
    /** Reach of the curve around a step on which it is read when left out, nm. */
    private static final double REACH_NM = 40;
    /** Ratio of singular values below which rounding decides. */
    private static final double SMALLEST_RATIO = 1e-14;

    /** A pixel's noise that is supposed where a reading's weights need one, as a fraction of the flat's signal. */
    private static final double PIXEL_NOISE = 0.005;
    private static final double SAMPLING_NM = 2;
    /** Leave-one-out errors count against the stated uncertainty as so many errors of just that size do for it. */
    private static final double TRUST = 4;
    private static final double LARGEST_SCORE = 3;
    /** Share of the thicknesses that count: the rest is weak, where the curve turns. */
    private static final double COUNTED = 0.9;

    private final FitInput input;
    private final Observations data;
    private final Suppositions suppositions;
    private final Mixture mixture;
    private final NoiseLevel level;

    Judgement(FitInput input, Observations data, Suppositions suppositions, Mixture mixture) {
        this.input = input;
        this.data = data;
        this.suppositions = suppositions;
        this.mixture = mixture;
        this.level = suppositions.levels().get(mixture.best());
    }

    FitFigures figures(Calibration found, ApertureEstimate aperture, Optional<IndexEstimate> index) {
        Posterior best = mixture.fits().get(mixture.best());
        NoiseLevel stated = new NoiseLevel(input.inputs().flatResidual(), level.stepNm());
        Posterior nominal = LaplaceFit.of(data, suppositions.priors().get(mixture.best()), stated);
        double determined = nominal.determined();
        double freedom = Math.max(0.5, nominal.residual().length - determined);
        double pValue = 1 - new ChiSquaredDistribution(freedom).cumulativeProbability(nominal.chiSquare());
        NoiseLevel mean = suppositions.mean(mixture);
        List<LeaveOneOut> leftOut = leaveOneOut();
        FitFigures figures = new FitFigures(residuals(nominal), leftOut, nominal.chiSquare(), freedom, pValue, best.evidence(),
                determined, condition(best), mean.residual(), mean.stepNm(), aperture.factor() * aperture.stated(), aperture.stated(),
                aperture.sigma() * aperture.stated(), index.orElse(null), expectedError(found, leftOut), List.of());
        return figures.with(Remarks.of(input, figures));
    }

    /** Stated systematic uncertainty over the span of the steps, times how the leave-one-out errors compare with theirs. */
    private double expectedError(Calibration found, List<LeaveOneOut> leftOut) {
        double thinnest = input.steps().stream().mapToDouble(StepSignal::thicknessNm).min().orElse(Double.NaN);
        double thickest = input.steps().stream().mapToDouble(StepSignal::thicknessNm).max().orElse(Double.NaN);
        if (!(thickest > thinnest)) {
            return Double.NaN;
        }
        double samples = Math.max(2, Math.ceil((thickest - thinnest) / SAMPLING_NM));
        ColourCurve curve = found.curve(new ThicknessRange(thinnest, thickest), (thickest - thinnest) / samples);
        double[] noise = new double[data.channels()];
        for (int c = 0; c < noise.length; c++) {
            noise[c] = PIXEL_NOISE * Arrays.stream(data.signal()[c]).max().orElse(1);
        }
        double[] variance = new double[curve.size()];
        found.budget(curve, noise).values().forEach(part -> Arrays.setAll(variance, s -> variance[s] + part[s] * part[s]));
        double square = Arrays.stream(variance).sorted().limit((long) (COUNTED * variance.length)).average().orElse(Double.NaN);
        double scores = leftOut.stream().mapToDouble(l -> Math.min(LARGEST_SCORE, Math.abs(l.errorNm()) / l.uncertaintyNm()))
                .map(z -> z * z).sum();
        return Math.sqrt(square * (TRUST + scores) / (TRUST + leftOut.size()));
    }

    private List<StepResidual> residuals(Posterior fit) {
        List<StepResidual> result = new ArrayList<>();
        for (int j = 0; j < data.count(); j++) {
            for (int c = 0; c < data.channels(); c++) {
                int at = c * data.count() + j;
                double measured = data.signal()[c][j];
                result.add(new StepResidual(label(j), input.channels().get(c), measured, measured - fit.residual()[at],
                        Math.sqrt(fit.noise()[at][at])));
            }
        }
        return result;
    }

    private String label(int observation) {
        int step = observation - data.stepsFrom();
        if (step < 0) {
            return "flat";
        }
        return step < data.steps() ? input.steps().get(step).label() : input.patches().get(step - data.steps()).label();
    }

    private List<LeaveOneOut> leaveOneOut() {
        double thinnest = input.steps().stream().mapToDouble(StepSignal::thicknessNm).min().orElse(0);
        double thickest = input.steps().stream().mapToDouble(StepSignal::thicknessNm).max().orElse(0);
        Suppositions ofLevel = suppositions.at(level);
        return IntStream.range(0, input.steps().size()).parallel().mapToObj(j -> {
            StepSignal step = input.steps().get(j);
            Mixture without = ofLevel.fit(data.withoutStep(j));
            ResponseModel model = new ResponseModel(input.channels(), input.carriers(), without.mean(), input.stack(), IndexChange.NONE,
                    input.view());
            ThicknessRange near = new ThicknessRange(Math.max(0, step.thicknessNm() - REACH_NM), step.thicknessNm() + REACH_NM);
            ColourCurve curve = new Calibration(model, without.factors(), List.of(), null).curve(near, 1);
            double[] variance = step.variance();
            for (int c = 0; c < variance.length; c++) {
                variance[c] += Math.pow(level.residual() * step.signal()[c], 2);
            }
            CurveReading reading = CurveReading.near(curve, step.signal(), variance, step.thicknessNm());
            double own = Double.isNaN(step.uncertaintyNm()) ? level.stepNm() : step.uncertaintyNm();
            return new LeaveOneOut(step.label(), step.thicknessNm(), reading.thicknessNm(),
                    Math.hypot(reading.uncertaintyNm(), own), step.thicknessNm() == thinnest || step.thicknessNm() == thickest);
        }).toList();
    }

    /** Ratio of singular values of N^-1/2 J P^1/2. */
    private static double condition(Posterior fit) {
        double[][] signal = fit.prior().sandwich(fit.rows());
        Cholesky noise = Cholesky.of(fit.noise());
        double[][] half = new double[signal.length][];
        for (int a = 0; a < signal.length; a++) {
            half[a] = noise.forward(signal[a]);
        }
        double[][] white = new double[signal.length][signal.length];
        for (int a = 0; a < signal.length; a++) {
            double[] column = new double[signal.length];
            for (int b = 0; b < signal.length; b++) {
                column[b] = half[b][a];
            }
            white[a] = noise.forward(column);
        }
        double[] values = new SingularValueDecomposition(new Array2DRowRealMatrix(white)).getSingularValues();
        double least = Math.max(values[values.length - 1], values[0] * SMALLEST_RATIO);
        return Math.sqrt(values[0] / least);
    }
}
