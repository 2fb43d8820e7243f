package iridepth.calibration;

import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Fits the film's index along with the responses: mean and covariance of the shift of Cauchy's A and B over a grid of shifts, each
 * weighted by its prior and the evidence of the steps, averaged over what a fit supposes. A second, finer grid covers what the
 * first leaves.
 *
 * <p>Thickness and index are seen as their product almost alone; what tells them apart is the depth of the fringes, which is why the
 * steps' thicknesses must be known by an instrument that does not share the wrong index.
 */
final class IndexFit {
    private static final double[] PLACES = {-1, -0.5, 0, 0.5, 1};
    /** Half the grid's width in standard deviations: of the prior, then of the first grid's result. */
    private static final double REACH = 2.5;

    private final FitInput input;
    private final IndexPrior spread;

    private IndexFit(FitInput input, IndexPrior spread) {
        this.input = input;
        this.spread = spread;
    }

    static IndexEstimate of(FitInput input, IndexPrior spread) {
        IndexFit fit = new IndexFit(input, spread);
        return fit.over(fit.over(new IndexEstimate(0, 0, spread.sigmaA(), spread.sigmaB(), 0)));
    }

    private Observations data(double a, double b) {
        return Observations.of(input.withStack(new IndexChange(1, a, b).apply(input.stack())));
    }

    /** ln of evidence times prior at a shift. */
    private double log(double a, double b, Suppositions suppositions) {
        double[] evidence = suppositions.evidence(data(a, b));
        double best = Arrays.stream(evidence).max().orElseThrow();
        double x = a / spread.sigmaA();
        double y = b / spread.sigmaB();
        return best + Math.log(Arrays.stream(evidence).map(e -> Math.exp(e - best)).sum()) - (x * x + y * y) / 2;
    }

    /**
     * Mean and covariance over a grid around an estimate, spanned by its principal axes as far as its correlation goes: a is
     * gridded, and b around its regression on a.
     */
    private IndexEstimate over(IndexEstimate around) {
        int n = PLACES.length;
        double[] a = new double[n * n];
        double[] b = new double[n * n];
        double rest = Math.sqrt(Math.max(1e-4, 1 - around.correlation() * around.correlation()));
        for (int k = 0; k < a.length; k++) {
            double u = REACH * PLACES[k / n];
            double v = REACH * PLACES[k % n];
            a[k] = around.a() + u * around.sigmaA();
            b[k] = around.b() + (around.correlation() * u + rest * v) * around.sigmaB();
        }
        // The generic lobes that suit best depend on the index supposed, chiefly on a: choose them in the middle of each column.
        List<Suppositions> suppositions = IntStream.range(0, n)
                .mapToObj(column -> data(a[column * n + n / 2], b[column * n + n / 2]))
                .map(middle -> Suppositions.coarse(input, Suppositions.middle(input, middle))).toList();
        double[] log = IntStream.range(0, a.length).parallel().mapToDouble(k -> log(a[k], b[k], suppositions.get(k / n))).toArray();
        double best = Arrays.stream(log).max().orElseThrow();
        double[] p = Arrays.stream(log).map(l -> Math.exp(l - best)).toArray();
        double sum = Arrays.stream(p).sum();
        double meanA = 0;
        double meanB = 0;
        for (int k = 0; k < p.length; k++) {
            p[k] /= sum;
            meanA += p[k] * a[k];
            meanB += p[k] * b[k];
        }
        // A cell of the grid is uncertain by its width over the root of 12.
        double cell = REACH / 2 / Math.sqrt(12);
        double varA = square(cell * around.sigmaA());
        double varB = square(cell * around.sigmaB());
        double both = around.correlation() * square(cell) * around.sigmaA() * around.sigmaB();
        for (int k = 0; k < p.length; k++) {
            varA += p[k] * square(a[k] - meanA);
            varB += p[k] * square(b[k] - meanB);
            both += p[k] * (a[k] - meanA) * (b[k] - meanB);
        }
        return new IndexEstimate(meanA, meanB, Math.sqrt(varA), Math.sqrt(varB), both / Math.sqrt(varA * varB));
    }

    private static double square(double x) {
        return x * x;
    }
}
