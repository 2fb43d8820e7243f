package iridepth.quality;

import java.util.Arrays;
import java.util.stream.IntStream;

/**
 * The two parts of the standard uncertainty of a reading against its thickness: root mean squares over the pixels of a map whose
 * thickness falls into the same nanometre. Both parts hang together with thickness, since each is the noise, or the doubt of the
 * calibration, divided by how steeply the colour changes there.
 *
 * @param thickness nm, the middle of each nanometre that holds a reading, rising
 * @param pixels readings in it, 1 or more
 * @param random random part of one reading, nm
 * @param systematic systematic part, nm
 */
public record UncertaintyCurve(double[] thickness, long[] pixels, double[] random, double[] systematic) {

    public UncertaintyCurve {
        if (pixels.length != thickness.length || random.length != thickness.length || systematic.length != thickness.length) {
            throw new IllegalArgumentException("the columns of an uncertainty curve differ in length");
        }
        for (int i = 1; i < thickness.length; i++) {
            if (!(thickness[i] > thickness[i - 1])) {
                throw new IllegalArgumentException("the thicknesses of an uncertainty curve must rise");
            }
        }
    }

    /** Readings that are being gathered. Not safe for several threads at once. */
    public static final class Gathering {
        private final long first;
        private final long[] pixels;
        private final double[] randomSquares;
        private final double[] systematicSquares;

        /**
         * An empty gathering.
         *
         * @param fromNm least thickness
         * @param toNm greatest thickness
         */
        public Gathering(double fromNm, double toNm) {
            first = (long) Math.floor(fromNm);
            int bins = Math.toIntExact((long) Math.floor(toNm) - first + 1);
            pixels = new long[bins];
            randomSquares = new double[bins];
            systematicSquares = new double[bins];
        }

        /**
         * Adds a reading.
         *
         * @param nm its thickness, within the range
         * @param random random part of its standard uncertainty, nm
         * @param systematic systematic part, nm
         */
        public void add(double nm, double random, double systematic) {
            int bin = (int) ((long) Math.floor(nm) - first);
            pixels[bin]++;
            randomSquares[bin] += random * random;
            systematicSquares[bin] += systematic * systematic;
        }

        /** The curve of all that has been added. */
        public UncertaintyCurve curve() {
            int[] filled = IntStream.range(0, pixels.length).filter(i -> pixels[i] > 0).toArray();
            return new UncertaintyCurve(Arrays.stream(filled).mapToDouble(i -> first + i + 0.5).toArray(),
                    Arrays.stream(filled).mapToLong(i -> pixels[i]).toArray(),
                    Arrays.stream(filled).mapToDouble(i -> Math.sqrt(randomSquares[i] / pixels[i])).toArray(),
                    Arrays.stream(filled).mapToDouble(i -> Math.sqrt(systematicSquares[i] / pixels[i])).toArray());
        }
    }

    /**
     * Systematic part at a thickness, linear between the nanometres that hold readings.
     *
     * @param nm thickness; beyond the ends the value of the end, NaN for NaN or if the curve is empty
     */
    public double systematicAt(double nm) {
        if (thickness.length == 0 || Double.isNaN(nm)) {
            return Double.NaN;
        }
        int at = Arrays.binarySearch(thickness, nm);
        int above = at >= 0 ? at : -at - 1;
        if (above == 0 || above == thickness.length) {
            return systematic[Math.min(above, thickness.length - 1)];
        }
        double share = (nm - thickness[above - 1]) / (thickness[above] - thickness[above - 1]);
        return systematic[above - 1] + share * (systematic[above] - systematic[above - 1]);
    }

    /**
     * A measured field from thickness and combined uncertainty: the systematic part of a pixel by this curve at its thickness,
     * but no more than all of its uncertainty; the random part is what remains, sqrt(u^2 - systematic^2).
     *
     * @param thickness nm, NaN where not read
     * @param combined combined standard uncertainty, nm
     * @param correlatedPixels how many neighbouring pixels share one random error, 1 or more
     */
    public MeasuredField divide(Field thickness, Field combined, double correlatedPixels) {
        int width = thickness.width();
        int height = thickness.height();
        Field systematicPart = Field.view(width, height,
                (x, y) -> Math.min(combined.at(x, y), systematicAt(thickness.at(x, y))));
        Field randomPart = Field.view(width, height, (x, y) -> {
            double all = combined.at(x, y);
            double part = systematicPart.at(x, y);
            return Math.sqrt(all * all - part * part);
        });
        return new MeasuredField(thickness, randomPart, systematicPart, correlatedPixels);
    }
}
