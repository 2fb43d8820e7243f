package iridepth.simulation;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;

/** Photographs against the model that they claim to follow, and against a scene made by another implementation. */
class ShotTest {
    private static final FilmStack OXIDE = FilmStack.parse("air / SiO2 / Si");
    private static final FilmStack BARE = FilmStack.parse("air / Si");
    private static final Rig PLAIN = Rig.of(Sensor.mixture(), Lamp.planck(3200), View.aperture(0),
            Detector.linear(80_000));

    private static Shot shot(Rig rig) {
        return Shot.of(rig, OXIDE, BARE, 0, 520);
    }

    private static double variance(Photograph photo, int channel) {
        double mean = photo.mean(channel, 0, 0, photo.width(), photo.height());
        double sum = 0;
        for (int i = channel; i < photo.counts().length; i += photo.channels()) {
            double off = Short.toUnsignedInt(photo.counts()[i]) - mean;
            sum += off * off;
        }
        return sum / (photo.width() * photo.height() - 1);
    }

    /** Source: film-colours.csv for X, Y, Z; matrix and encoding of IEC 61966-2-1. */
    @Test
    void colourManagedOxideHasTheColourOfTheReferenceTable() {
        Table table = Table.resource("/iridepth/reference/film-colours.csv");
        int row = 0;
        while (!(table.text(row, "stack").equals("air / SiO2 / Si") && table.text(row, "illuminant").equals("D65")
                && table.number(row, "thickness_nm") == 100)) {
            row++;
        }
        double x = table.number(row, "X");
        double y = table.number(row, "Y");
        double z = table.number(row, "Z");
        double[] linear = {3.2406 * x - 1.5372 * y - 0.4986 * z, -0.9689 * x + 1.8758 * y + 0.0415 * z,
            0.0557 * x - 0.2040 * y + 1.0570 * z};
        Photograph photo = shot(Rig.srgb(Lamp.illuminant("D65"), View.aperture(0), 20_000))
                .photo(Field.constant(150, 150, 100), 1);
        for (int c = 0; c < 3; c++) {
            assertEquals(255 * Detector.encode(linear[c]), photo.mean(c, 0, 0, 150, 150), 0.05);
        }
    }

    /**
     * Source: an oxide wedge under D65 rendered to 8-bit sRGB with 20 000 electrons at full scale by another
     * implementation; its mean counts over bare silicon and its Cramer-Rao limits at four thicknesses.
     */
    @Test
    void theOxideWedgeOfAnotherImplementationIsReproduced() {
        Shot shot = shot(Rig.srgb(Lamp.illuminant("D65"), View.aperture(0), 20_000));
        Photograph photo = shot.photo(Field.constant(100, 100, 0), 1);
        double[] counts = {158.56, 163.41, 174.57};
        for (int c = 0; c < 3; c++) {
            assertEquals(counts[c], photo.mean(c, 0, 0, 100, 100), 0.1);
        }
        double[][] limits = {{50.046947, 0.44060543}, {99.62441, 0.4964277}, {260.37558, 0.43605655},
            {500, 0.3545729}};
        for (double[] limit : limits) {
            double bound = CramerRao.bound(shot, limit[0], 0, 0, 1, 1);
            assertEquals(limit[1], bound, 0.01 * limit[1], "at " + limit[0] + " nm");
        }
    }

    /** Variance of n Gaussian values: relative standard deviation sqrt(2 / n), here 1 %; four of these are allowed. */
    @Test
    void noiseHasTheVarianceOfThePhotonTransferModel() {
        for (Rig rig : new Rig[] {PLAIN, PLAIN.detector(Detector.linear(20_000).bits(10))}) {
            Shot shot = shot(rig);
            Photograph photo = shot.photo(Field.constant(150, 150, 130), 5);
            for (int c = 0; c < 3; c++) {
                double f = shot.fraction(shot.curve().signal(c, 130), c, 0, 0, 1, 1);
                double expected = Math.pow(65535 * rig.detector().noiseRounded(f), 2);
                assertEquals(expected, variance(photo, c), 0.04 * expected);
                assertEquals(65535 * (f + 0.01), photo.mean(c, 0, 0, 150, 150), 4 * Math.sqrt(expected) / 150);
            }
        }
    }

    @Test
    void doubledNoiseHasFourTimesTheVariance() {
        Photograph once = shot(PLAIN).photo(Field.constant(150, 150, 130), 6);
        Photograph twice = shot(PLAIN.detector(PLAIN.detector().noiseDoubled())).photo(Field.constant(150, 150, 130), 7);
        assertEquals(4, variance(twice, 1) / variance(once, 1), 0.2);
    }

    @Test
    void theFlatReachesTheExposureAndTheDarkTheBlackLevel() {
        Shot shot = shot(PLAIN.glare(0.02).exposure(0.8));
        Photograph flat = shot.flat(60, 60, 1);
        double brightest = Math.max(flat.mean(0, 0, 0, 60, 60), Math.max(flat.mean(1, 0, 0, 60, 60),
                flat.mean(2, 0, 0, 60, 60)));
        assertEquals(0.81, brightest / 65535, 2e-4);
        assertEquals(0.01, shot.dark(60, 60, 2).mean(0, 0, 0, 60, 60) / 65535, 2e-5);
    }

    /** The mean of four frames: a quarter of the variance of one. */
    @Test
    void theFlatAveragesFourFrames() {
        Shot shot = shot(PLAIN);
        assertEquals(4, variance(shot.flatFrame(150, 150, 3), 0) / variance(shot.flat(150, 150, 4), 0), 0.2);
    }

    @Test
    void equalSeedsGiveEqualPicturesAndOthersDiffer() {
        Field field = Field.wedge(40, 30, 50, 300);
        assertArrayEquals(shot(PLAIN).photo(field, 9).counts(), shot(PLAIN).photo(field, 9).counts());
        assertFalse(Arrays.equals(shot(PLAIN).photo(field, 9).counts(), shot(PLAIN).photo(field, 10).counts()));
    }

    @Test
    void aTwelveBitConverterLeavesOnlyItsOwnLevels() {
        Photograph photo = shot(PLAIN.detector(Detector.linear(80_000).bits(12))).photo(Field.wedge(50, 50, 0, 400), 3);
        for (short count : photo.counts()) {
            double level = Short.toUnsignedInt(count) * 4095 / 65535.0;
            assertEquals(Math.rint(level), level, 0.04);
        }
    }

    @Test
    void tooMuchLightClipsAtFullScale() {
        Photograph photo = shot(PLAIN.exposure(1.3)).photo(Field.constant(20, 20, 0), 3);
        assertEquals(65535, photo.mean(0, 0, 0, 20, 20));
    }

    @Test
    void shadingFallsByTheCosineLawFromItsCentre() {
        Shading shading = new Shading(0.1, 0, 0, 0, 0, 0);
        assertEquals(1, shading.at(99.5, 49.5, 200, 100, 0), 1e-12);
        assertEquals(1 / (1.1 * 1.1), shading.at(199.5, 49.5, 200, 100, 0), 1e-12);
        Photograph flat = shot(PLAIN.shading(shading)).flat(200, 100, 1);
        double middle = flat.mean(1, 95, 45, 10, 10) - 655.35;
        assertEquals(shading.at(4.5, 49.5, 200, 100, 1), (flat.mean(1, 0, 45, 10, 10) - 655.35) / middle, 2e-3);
    }

    @Test
    void theIdealCorrectionGivesTheCurveBack() {
        Shot shot = shot(PLAIN.glare(0.02).shading(new Shading(0.1, 0.05, 30, 0.1, 0, 0.1)));
        double[] signals = shot.signals(shot.photo(Field.constant(100, 100, 200), 3));
        double mean = 0;
        for (int i = 1; i < signals.length; i += 3) {
            mean += signals[i] / 10_000;
        }
        double expected = shot.curve().signal(1, 200);
        assertEquals(expected, mean, 5 * shot.signalNoise(1, expected) / 100);
    }

    @Test
    void theCurveBetweenItsNodesEqualsTheOptics() {
        SignalCurve curve = shot(PLAIN).curve();
        double[][] e = PLAIN.responses();
        double[] r = FilmReflectance.of(OXIDE, PLAIN.view(), 93.4, 0.001, 2).spectrum(0);
        double sum = 0;
        for (int i = 0; i < r.length; i++) {
            sum += e[2][i] * r[i];
        }
        assertEquals(sum, curve.signal(2, 93.4), 1e-7);
        double slope = (curve.signal(2, 93.45) - curve.signal(2, 93.35)) / 0.1;
        assertEquals(slope, curve.slope(2, 93.4), 1e-6);
    }

    /** The spread of maximum-likelihood readings of single pixels reaches the bound; 2500 readings tell it to 1.4 %. */
    @Test
    void maximumLikelihoodReadingsReachTheBound() {
        Shot shot = shot(PLAIN);
        double[] signals = shot.signals(shot.photo(Field.constant(50, 50, 280), 8));
        double sum = 0;
        for (int i = 0; i < signals.length; i += 3) {
            double along = 0;
            double information = 0;
            for (int c = 0; c < 3; c++) {
                double s = shot.curve().signal(c, 280);
                double weight = shot.curve().slope(c, 280) / Math.pow(shot.signalNoise(c, s), 2);
                along += weight * (signals[i + c] - s);
                information += weight * shot.curve().slope(c, 280);
            }
            sum += Math.pow(along / information, 2);
        }
        assertEquals(CramerRao.bound(shot, 280, 0, 0, 1, 1), Math.sqrt(sum / 2500), 0.02);
    }

    @Test
    void thicknessesOutsideTheCurveAreRefused() {
        SignalCurve curve = shot(PLAIN).curve();
        assertTrue(curve.signal(0, 520) > 0);
        Exception refusal = assertThrows(IllegalArgumentException.class, () -> curve.signal(0, 600));
        assertTrue(refusal.getMessage().contains("600.0 nm lies outside"), refusal.getMessage());
    }
}
