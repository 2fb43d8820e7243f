package iridepth.planning;

import iridepth.curve.ColourCurve;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Finds the rivals of a film: the thicknesses d' at which chi^2 = (s(d) - s(d'))^T C(d')^-1 (s(d) - s(d')) has a minimum below a
 * limit, and which a stretch of curve that lies beyond the limit parts from d. A minimum that hangs together with d below the
 * limit is no rival: it makes the reading of d less certain, not doubtful.
 *
 * <p>Serves one thread.
 */
final class RivalSearch {
    private static final int STEPS = 12;
    private static final double CLOSE_NM = 1e-3;

    private final ColourCurve curve;
    private final CurveMetric metric;
    private final double limit;
    private final double[] scan;
    private final double[] film;
    private final double[] value;
    private final double[] first;
    private final double[] second;
    private final double[] residual;
    private final double[] slope;

    /**
     * @param limit chi-square up to which another thickness is a rival
     */
    RivalSearch(ColourCurve curve, CurveMetric metric, double limit) {
        this.curve = curve;
        this.metric = metric;
        this.limit = limit;
        int n = curve.channels();
        this.scan = new double[curve.size()];
        this.film = new double[n];
        this.value = new double[n];
        this.first = new double[n];
        this.second = new double[n];
        this.residual = new double[n];
        this.slope = new double[n];
    }

    /** The rivals of a thickness, the thinnest first. */
    List<Rival> of(double thicknessNm) {
        curve.at(thicknessNm, film, first, second);
        for (int k = 0; k < scan.length; k++) {
            scan[k] = metric.chiSquare(film, k);
        }
        int own = metric.nearest(thicknessNm);
        int from = end(own, -1);
        int to = end(own, 1);
        List<Rival> rivals = new ArrayList<>();
        for (int k = 0; k < scan.length; k++) {
            boolean least = (k == 0 || scan[k] < scan[k - 1]) && (k == scan.length - 1 || scan[k] <= scan[k + 1]);
            if (least && (k < from || k > to)) {
                Rival rival = refined(thicknessNm, k);
                if (rival.chiSquare() <= limit) {
                    rivals.add(rival);
                }
            }
        }
        return rivals;
    }

    /** The last sample in a direction that hangs together with the film's own below the limit; its neighbour at least. */
    private int end(int own, int step) {
        int k = own;
        while (k + step >= 0 && k + step < scan.length && scan[k + step] <= limit) {
            k += step;
        }
        return k == own ? own + step : k;
    }

    /** The minimum next to a sample by Gauss-Newton steps that stay between its neighbours. */
    private Rival refined(double filmNm, int sample) {
        double low = curve.thickness(Math.max(0, sample - 1));
        double high = curve.thickness(Math.min(curve.size() - 1, sample + 1));
        double d = curve.thickness(sample);
        double best = scan[sample];
        double at = d;
        for (int i = 0; i < STEPS; i++) {
            double chiSquare = misfit(d, sample);
            if (chiSquare < best) {
                best = chiSquare;
                at = d;
            }
            double gradient = 0;
            double curvature = 0;
            for (int c = 0; c < residual.length; c++) {
                gradient += slope[c] * residual[c];
                curvature += slope[c] * slope[c];
            }
            double next = curvature > 0 ? Math.min(high, Math.max(low, d + gradient / curvature)) : d;
            if (Math.abs(next - d) < CLOSE_NM) {
                break;
            }
            d = next;
        }
        return new Rival(filmNm, at, best);
    }

    private double misfit(double thicknessNm, int sample) {
        curve.at(thicknessNm, value, first, second);
        for (int c = 0; c < value.length; c++) {
            value[c] = film[c] - value[c];
        }
        metric.whiten(sample, value, residual);
        metric.whiten(sample, first, slope);
        return Arrays.stream(residual).map(r -> r * r).sum();
    }
}
