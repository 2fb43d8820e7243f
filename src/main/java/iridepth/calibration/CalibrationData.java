package iridepth.calibration;

import iridepth.optics.Polarisation;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.spectrum.Spectrum;
import java.util.Arrays;
import java.util.List;

/**
 * A calibration as plain numbers, for a file: what {@link Calibration#of} needs to serve without a new fit.
 *
 * @param stack      notation of the stack that it was made with
 * @param flat       notation of the flat's stack, empty where the signals are not relative to one
 * @param model      the responses
 * @param factors    factors of the covariance of their parameters, [direction][parameter]: the covariance is the sum of their
 *                   outer products
 * @param variations what the inputs' uncertainties make of the model
 * @param figures    the figures by which the fit was judged
 */
public record CalibrationData(String stack, String flat, Model model, double[][] factors, List<Moved> variations,
                              FitFigures figures) {
    /**
     * Responses before a film.
     *
     * @param channels     names
     * @param carriers     what each channel's bumps multiply, on the wavelength grid
     * @param parameters   weights of the bumps and, behind them, the glare, channel by channel
     * @param view         the directions, in words
     * @param sine         sines of the angles of incidence
     * @param weight       their weights
     * @param polarisation the light's polarisation
     * @param index        how the film's index differs from the stated one
     */
    public record Model(List<String> channels, double[][] carriers, double[] parameters, String view, double[] sine, double[] weight,
                        Polarisation polarisation, IndexChange index) {
    }

    /**
     * The model refitted with one input moved by its standard uncertainty.
     *
     * @param input which input
     * @param model the refitted model
     */
    public record Moved(String input, Model model) {
    }

    static Model of(ResponseModel model) {
        double[][] carriers = model.carriers().stream().map(Spectrum::toArray).toArray(double[][]::new);
        View view = model.view();
        return new Model(model.channels(), carriers, model.parameters(), view.text(), view.sine(), view.weight(), view.polarisation(),
                model.index());
    }

    static ResponseModel model(Model data, Stack stack) {
        List<Spectrum> carriers = Arrays.stream(data.carriers()).map(Spectrum::of).toList();
        return new ResponseModel(data.channels(), carriers, data.parameters(), stack, data.index(),
                new View(data.view(), data.sine(), data.weight(), data.polarisation()));
    }
}
