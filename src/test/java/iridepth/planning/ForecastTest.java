package iridepth.planning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import iridepth.colour.Light;
import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Materials;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.photo.ChannelNoise;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.simulation.CramerRao;
import iridepth.simulation.Detector;
import iridepth.simulation.Field;
import iridepth.simulation.FilmStack;
import iridepth.simulation.Lamp;
import iridepth.simulation.Rig;
import iridepth.simulation.Scene;
import iridepth.simulation.Sensor;
import iridepth.simulation.Shot;
import iridepth.spectrum.Spectrum;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.junit.jupiter.api.Test;

class ForecastTest {
    private static final Stack OXIDE = Stack.parse("air / SiO2 / Si", Materials.bundled());

    private static ColourCurve curve(List<Spectrum> responses, double toNm) {
        ThicknessRange range = new ThicknessRange(0, toNm);
        List<String> names = new ArrayList<>();
        responses.forEach(r -> names.add("channel " + names.size()));
        return ColourCurve.of(new EffectiveResponses(names, responses), Reflectance.of(OXIDE, View.aperture(0, OXIDE, toNm)), range,
                range.step(OXIDE));
    }

    private static ColourCurve band(double toNm) {
        Spectrum light = Light.narrowBand(546, 1).power();
        return curve(List.of(light.times(1 / light.integral())), toNm);
    }

    private static int at(Forecast forecast, double nm) {
        return (int) Math.round((nm - forecast.thickness(0)) / (forecast.thickness(1) - forecast.thickness(0)));
    }

    @Test
    void randomUncertaintyIsTheCramerRaoBoundOfAnIndependentSimulation() {
        Detector detector = Detector.linear(20_000);
        Rig rig = Rig.of(Sensor.mixture(), Lamp.planck(3200), iridepth.simulation.View.aperture(0), detector);
        Shot shot = new Scene("wedge", rig, FilmStack.parse("air / SiO2 / Si"), FilmStack.parse("air / Si"), new double[] {0, 500},
                null, Field.wedge(60, 2, 0, 500), rig.lamp(), rig.view(), 1).shot();
        List<Spectrum> responses = new ArrayList<>();
        for (double[] response : rig.responses()) {
            responses.add(Spectrum.of(response));
        }
        double[] level = new double[3];
        for (int c = 0; c < 3; c++) {
            level[c] = shot.fractionSlope(c, 0, 0, 60, 2);
        }
        ChannelNoise noise = ChannelNoise.of(NoiseModel.of(detector.read(), detector.well()), Encoding.linear(65535), level);
        Forecast forecast = Forecast.of(curve(responses, 500), noise, 16);
        for (double nm : new double[] {30, 75, 130, 210, 266, 333, 420, 485}) {
            assertEquals(1, forecast.uncertainty(at(forecast, nm)).randomNm() / CramerRao.bound(shot, nm, 0, 0, 60, 2), 0.01,
                    nm + " nm");
            assertEquals(0, forecast.uncertainty(at(forecast, nm)).systematicNm(), 1e-6);
        }
    }

    @Test
    void systematicErrorsAddInQuadrature() {
        ColourCurve plain = band(80);
        double[] covariance = new double[plain.size()];
        java.util.Arrays.fill(covariance, 9e-6);
        ChannelNoise noise = (channel, signal) -> 16e-6;
        Forecast forecast = Forecast.of(plain.withCovariance(covariance), noise, 16);
        ExpectedUncertainty u = forecast.uncertainty(at(forecast, 50));
        // Variances of 16 and 9 part the total 4 : 3 in standard deviation.
        assertEquals(0.75, u.systematicNm() / u.randomNm(), 1e-9);
        assertEquals(1.25, u.combinedNm() / u.randomNm(), 1e-9);
    }

    @Test
    void oneLineConfusesThicknessesHalfAWavelengthApart() {
        double period = 546 / (2 * OXIDE.film().nAt(546));
        Forecast forecast = Forecast.of(band(400), (channel, signal) -> 1e-6, 16);
        double nm = 60;
        List<Rival> rivals = rivals(band(400), nm);
        // 60 nm looks like every order of itself and of its mirror image: period - 60, period + 60, 2 period - 60 ...
        double[] expected = {period - nm, period + nm, 2 * period - nm};
        assertEquals(expected.length, rivals.size(), rivals.toString());
        for (int k = 0; k < expected.length; k++) {
            assertEquals(expected[k], rivals.get(k).rivalNm(), 1.5, rivals.toString());
            assertTrue(rivals.get(k).chiSquare() < 16);
        }
        assertTrue(forecast.wrongOrder(at(forecast, nm)) > 0.6);
    }

    private static List<Rival> rivals(ColourCurve curve, double nm) {
        return new RivalSearch(curve, CurveMetric.of(curve, (channel, signal) -> 1e-5), 16).of(nm);
    }

    @Test
    void oneLineIsFreeOfDoubtUpToItsFirstTurn() {
        Forecast forecast = Forecast.of(band(300), (channel, signal) -> 1e-8, 16);
        double turn = 546 / (4 * OXIDE.film().nAt(546));
        assertEquals(turn, forecast.freeToNm(), 8);
        Forecast within = Forecast.of(band(turn - 1), (channel, signal) -> 1e-8, 16);
        assertTrue(within.stretches().isEmpty());
        assertEquals(0, within.meanWrongOrder());
    }

    @Test
    void brokenTiesAreAsOftenWrongAsTheNormalLawSays() {
        // Two thicknesses of a straight line through channel space never meet; a rival at chi-square 16 wins in 2.3 % of cases,
        // Phi(-2) by any table of the normal distribution.
        Forecast forecast = Forecast.of(band(300), (channel, signal) -> 1e-8, 16);
        for (int i = 0; i < forecast.size(); i++) {
            assertTrue(forecast.rivals(i) > 0 || forecast.wrongOrder(i) == 0);
            assertTrue(forecast.rivals(i) == 0 || forecast.wrongOrder(i) > 0.0227, String.format(Locale.ROOT, "%.1f nm",
                    forecast.thickness(i)));
        }
    }

    @Test
    void moreNoiseMeansMoreDoubt() {
        Camera quiet = Camera.genericColour(NoiseModel.of(5, 100_000), Encoding.linear(4095), 0.8);
        Camera loud = Camera.genericColour(NoiseModel.of(5, 5_000), Encoding.linear(4095), 0.8);
        ThicknessRange range = new ThicknessRange(0, 1200);
        View view = View.aperture(0, OXIDE, 1200);
        Forecast calm = LightChoice.jointly(quiet, OXIDE, view, range, List.of(Light.illuminant("D65")), 16).forecast();
        Forecast rough = LightChoice.jointly(loud, OXIDE, view, range, List.of(Light.illuminant("D65")), 16).forecast();
        assertTrue(rough.meanWrongOrder() > 3 * calm.meanWrongOrder());
        assertTrue(rough.freeToNm() < calm.freeToNm());
        assertTrue(rough.confusablePairs() > calm.confusablePairs());
    }

    @Test
    void limitMustBePositive() {
        assertThrows(IllegalArgumentException.class, () -> Forecast.of(band(80), (channel, signal) -> 1e-6, 0));
    }
}
