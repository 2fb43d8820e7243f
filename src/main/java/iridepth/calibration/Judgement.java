package iridepth.calibration;

import iridepth.curve.ColourCurve;
import iridepth.curve.ThicknessRange;
import java.util.ArrayList;
import java.util.List;
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

    private final FitInput input;
    private final Observations data;
    private final Mixture mixture;
    private final SensorPrior prior;
    private final List<SensorPrior> priors;
    private final NoiseLevel level;

    Judgement(FitInput input, Observations data, Mixture mixture, SensorPrior prior, NoiseLevel level, List<SensorPrior> priors) {
        this.input = input;
        this.data = data;
        this.mixture = mixture;
        this.prior = prior;
        this.level = level;
        this.priors = priors;
    }

    FitFigures figures(double[] aperture, double apertureStated, List<NoiseLevel> levels) {
        Posterior best = mixture.fits().get(mixture.best());
        Posterior nominal = LaplaceFit.of(data, prior, new NoiseLevel(input.inputs().flatResidual(), level.stepNm()));
        double determined = nominal.determined();
        double freedom = Math.max(0.5, nominal.residual().length - determined);
        double pValue = 1 - new ChiSquaredDistribution(freedom).cumulativeProbability(nominal.chiSquare());
        double misfit = 0;
        double stepNm = 0;
        for (int i = 0; i < levels.size(); i++) {
            misfit += mixture.probability()[i] * levels.get(i).residual();
            stepNm += mixture.probability()[i] * levels.get(i).stepNm();
        }
        return new FitFigures(residuals(nominal), leaveOneOut(), nominal.chiSquare(), freedom, pValue, best.evidence(),
                determined, condition(best), misfit, stepNm, aperture[0] * apertureStated, apertureStated,
                aperture[1] * apertureStated);
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
        return IntStream.range(0, input.steps().size()).parallel().mapToObj(j -> {
            StepSignal step = input.steps().get(j);
            Observations others = data.withoutStep(j);
            List<Posterior> fits = priors.stream().map(p -> LaplaceFit.of(others, p, level)).toList();
            Mixture without = Mixture.of(fits, new double[fits.size()]);
            ResponseModel model = new ResponseModel(input.channels(), input.carriers(), without.mean(), input.stack(),
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
