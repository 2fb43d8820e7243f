package iridepth.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.curve.ColourCurve;
import iridepth.photo.Signal;
import java.util.Random;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The grid finds what the exhaustive search finds. */
class GridSearchTest {
    private static final int PIXELS = 1500;
    private static final LightLevels LEVELS = LightLevels.of(0.7, 1.2);
    private static final double[][] BANDS = {{546, 4}, {450, 30, 610, 35}, {450, 30, 535, 30, 610, 35},
        {440, 15, 530, 25, 600, 15, 660, 20}, {420, 12, 470, 12, 520, 12, 590, 12, 660, 12}};

    private static ExpectedNoise photons(double fullWell) {
        return (channel, value, light) -> 1e-8 + Math.max(value, 0) / (fullWell * light);
    }

    @ParameterizedTest
    @CsvSource({"1, 80000, 0", "2, 80000, 0", "3, 80000, 0", "4, 80000, 0", "5, 80000, 0", "3, 2000000, 0", "3, 3000, 0",
        "1, 3000, 0", "1, 2000000, 0", "3, 80000, 0.01", "1, 80000, 0.01", "4, 80000, 0.02"})
    void findsTheSameCandidatesAsTheExhaustiveSearch(int channels, double fullWell, double uncertainty) {
        ColourCurve curve = FilmCurves.inBands(1500, BANDS[channels - 1]);
        compare(uncertainty > 0 ? FilmCurves.uncertain(curve, uncertainty) : curve, photons(fullWell), false);
    }

    @ParameterizedTest
    @ValueSource(ints = {2, 3, 4})
    void findsThemInPixelsWithAChannelAtTheEndOfItsScale(int channels) {
        compare(FilmCurves.inBands(800, BANDS[channels - 1]), photons(80_000), true);
    }

    private static void compare(ColourCurve curve, ExpectedNoise noise, boolean censored) {
        CurveIndex index = CurveIndex.of(curve, noise, LEVELS);
        ExhaustiveSearch exhaustive = new ExhaustiveSearch(index);
        GridSearch grid = new GridSearch(index);
        Misfit misfit = new Misfit(curve, noise);
        Random random = new Random(11);
        int found = 0;
        int doubtful = 0;
        int pixels = censored ? PIXELS / 5 : PIXELS;
        for (int i = 0; i < pixels; i++) {
            int level = random.nextInt(LEVELS.count());
            float[] pixel = pixel(curve, noise, LEVELS.light(level), random, i % 2 == 0);
            byte[] limits = new byte[pixel.length];
            if (censored) {
                limits[random.nextInt(limits.length)] = random.nextBoolean() ? Signal.AT_LEAST : Signal.AT_MOST;
            }
            CandidateRow expected = new CandidateRow(1);
            CandidateRow actual = new CandidateRow(1);
            exhaustive.find(pixel, limits, 0, level, expected);
            grid.find(pixel, limits, 0, level, actual);
            misfit.load(pixel, limits, 0, LEVELS.light(level));
            int unmatched = unmatched(index, level, expected, actual, misfit) + unmatched(index, level, actual, expected, misfit);
            doubtful += unmatched > 0 ? 1 : 0;
            found += expected.size();
        }
        assertTrue(found > pixels / 3, "candidates found: " + found);
        assertTrue(doubtful <= 0.06 * found, doubtful + " pixels with a candidate at an edge, of " + found);
    }

    /** A pixel of the film with noise, sometimes far too much of it, or one of any colour. */
    private static float[] pixel(ColourCurve curve, ExpectedNoise noise, double light, Random random, boolean film) {
        double d = random.nextDouble() * curve.toNm();
        double[] value = new double[curve.channels()];
        curve.at(d, value, new double[value.length], new double[value.length]);
        double excess = random.nextInt(4) == 0 ? 4 : 1;
        float[] pixel = new float[value.length];
        for (int c = 0; c < value.length; c++) {
            double sigma = Math.sqrt(noise.variance(c, value[c], light));
            pixel[c] = (float) (film ? value[c] + excess * sigma * random.nextGaussian() : 1.3 * random.nextDouble() - 0.1);
        }
        return pixel;
    }

    /**
     * Counts the candidates of one list that the other lacks. One that is missing must lie close to the threshold, or be one
     * of two minima that nearly merge: between them and the other's chi-square hardly rises.
     */
    private static int unmatched(CurveIndex index, int level, CandidateRow some, CandidateRow others, Misfit misfit) {
        int count = 0;
        for (int k = 0; k < some.size(); k++) {
            float d = some.thickness(k);
            TangentTable table = index.tables()[level];
            double u = Math.hypot(table.random(table.nearest(d)), table.systematic(table.nearest(d)));
            int j = nearest(others, d);
            if (j >= 0 && Math.abs(others.thickness(j) - d) < 0.1 * u + 0.01) {
                assertEquals(misfit.cost(d), some.cost(k), 1, "cost at " + d);
                continue;
            }
            count++;
            double chiSquare = misfit.chiSquare(d);
            boolean nearThreshold = chiSquare > 0.96 * index.threshold();
            boolean merging = j >= 0 && misfit.chiSquare((others.thickness(j) + d) / 2) < chiSquare + 0.3;
            assertTrue(nearThreshold || merging, "missing " + d + " nm with chi-square " + chiSquare + " of " + index.threshold()
                    + "; " + (j < 0 ? "none" : "nearest " + others.thickness(j)) + "; u " + u);
        }
        return count;
    }

    private static int nearest(CandidateRow row, float d) {
        int best = -1;
        for (int k = 0; k < row.size(); k++) {
            best = best < 0 || Math.abs(row.thickness(k) - d) < Math.abs(row.thickness(best) - d) ? k : best;
        }
        return best;
    }
}
