package iridepth.photo;

import java.util.List;

/**
 * The photon-transfer model through the points of one channel: variance - rounding = read^2 + gain max(0, s - black), by
 * weighted least squares in which points above the curve count less than points below it, since texture only ever adds.
 * The plainest model that explains the points is taken: photon noise alone, read noise alone, or both; where the
 * straight line crosses zero above s = 0, it begins at a black level.
 *
 * @param readVariance read^2
 * @param gain growth of the variance with the signal
 * @param black signal at which photon noise begins
 */
record TransferFit(double readVariance, double gain, double black) {

    private static final int ROUNDS = 20;
    /** How far a point may lie off the model besides its chance error, as a fraction of its variance. */
    private static final double MODEL_ERROR = 0.03;
    /** How well the variance of rounding is known, as a fraction of it. */
    private static final double ROUNDING_ERROR = 0.15;
    /** Deviations above the curve from which a point counts less. */
    private static final double UPPER = 2;
    /** Gain in chi-square that a second parameter must bring. */
    private static final double WORTH = 6;

    static TransferFit of(List<PhotonTransfer.Point> points) {
        TransferFit read = iterate(points, Kind.READ);
        TransferFit photon = iterate(points, Kind.PHOTON);
        TransferFit one = photon.chiSquare(points) <= read.chiSquare(points) + 1 ? photon : read;
        TransferFit both = iterate(points, Kind.BOTH);
        return both.chiSquare(points) < one.chiSquare(points) - WORTH ? both : one;
    }

    private enum Kind { READ, PHOTON, BOTH }

    private static TransferFit iterate(List<PhotonTransfer.Point> points, Kind kind) {
        TransferFit fit = null;
        for (int round = 0; round < ROUNDS; round++) {
            fit = solve(points, kind, fit);
        }
        return fit;
    }

    private static TransferFit solve(List<PhotonTransfer.Point> points, Kind kind, TransferFit last) {
        double w = 0;
        double ws = 0;
        double wss = 0;
        double wv = 0;
        double wsv = 0;
        for (PhotonTransfer.Point p : points) {
            double weight = weight(p, last);
            double v = p.variance() - p.rounding();
            double s = Math.max(0, p.level());
            w += weight;
            ws += weight * s;
            wss += weight * s * s;
            wv += weight * v;
            wsv += weight * s * v;
        }
        double determinant = w * wss - ws * ws;
        double gain = kind == Kind.READ ? 0 : wss > 0 ? Math.max(0, wsv / wss) : 0;
        double read = kind == Kind.READ ? Math.max(0, wv / w) : 0;
        if (kind == Kind.BOTH && determinant > 1e-12 * w * wss) {
            double slope = (w * wsv - ws * wv) / determinant;
            double start = (wv - slope * ws) / w;
            if (slope > 0 && start < 0) {
                return new TransferFit(0, slope, -start / slope);
            }
            read = slope > 0 ? start : Math.max(0, wv / w);
            gain = Math.max(0, slope);
        }
        return new TransferFit(read, gain, 0);
    }

    private static double weight(PhotonTransfer.Point point, TransferFit last) {
        double modelled = last == null ? point.variance() : last.variance(point);
        double error = error(point, modelled);
        double deviation = last == null ? 0 : (point.variance() - modelled) / error;
        return 1 / (error * error) * (deviation > UPPER ? UPPER * UPPER / (deviation * deviation) : 1);
    }

    private static double error(PhotonTransfer.Point point, double modelled) {
        double chance = modelled * Math.sqrt(2 / point.freedom());
        double model = MODEL_ERROR * modelled;
        double rounding = ROUNDING_ERROR * point.rounding();
        return Math.sqrt(chance * chance + model * model + rounding * rounding) + Double.MIN_NORMAL;
    }

    /** Variance by the model at a level, with that of rounding. */
    double variance(double level, double rounding) {
        return readVariance + gain * Math.max(0, level - black) + rounding;
    }

    private double variance(PhotonTransfer.Point point) {
        return variance(point.level(), point.rounding());
    }

    private double chiSquare(List<PhotonTransfer.Point> points) {
        double sum = 0;
        for (PhotonTransfer.Point point : points) {
            double deviation = (point.variance() - variance(point)) / error(point, variance(point));
            sum += deviation > UPPER ? UPPER * (2 * deviation - UPPER) : deviation * deviation;
        }
        return sum;
    }
}
