package iridepth.reading;

import iridepth.curve.ColourCurve;
import iridepth.curve.EffectiveResponses;
import iridepth.curve.ThicknessRange;
import iridepth.optics.Material;
import iridepth.optics.Materials;
import iridepth.optics.Reflectance;
import iridepth.optics.Stack;
import iridepth.optics.View;
import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoFile;
import iridepth.photo.ShadingField;
import iridepth.photo.SignalSource;
import iridepth.simulation.Detector;
import iridepth.simulation.Scene;
import iridepth.simulation.SceneFolder;
import iridepth.spectrum.Spectrum;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A simulated photograph with what a perfect calibration would know: the true responses and the true noise.
 *
 * @param signal the photo
 * @param curve  the colour curve relative to the flat
 * @param scene  what was photographed
 * @param truth  thickness of every pixel, NaN where there is none to read
 */
record SimulatedPhoto(SignalSource signal, ColourCurve curve, Scene scene, double[] truth) {
    /** Takes a scene's photographs into a folder and opens them. The film may be of the invented material of the scene. */
    static SimulatedPhoto take(Scene scene, Path folder) throws IOException {
        Path dir = Files.createDirectories(folder.resolve(scene.name()));
        SceneFolder files = SceneFolder.write(dir, scene);
        Encoding encoding = Encoding.linear(scene.rig().detector().fullScale());
        Optional<ShadingField> dark = Optional.of(ShadingField.dark(PhotoFile.open(dir.resolve("dark.tif")), encoding));
        Optional<ShadingField> flat = Optional.of(ShadingField.flat(PhotoFile.open(dir.resolve("flat.tif")), encoding, dark));
        Detector detector = scene.rig().detector();
        SignalSource signal = SignalSource.of(PhotoFile.open(files.photo()), encoding, dark, flat,
                NoiseModel.of(detector.read(), detector.well()));
        return new SimulatedPhoto(signal, curve(scene), scene, files.truth());
    }

    static ColourCurve curve(Scene scene) {
        Materials materials = new Materials(Map.of("resist", Material.constant("resist", 1.60, 0)));
        Stack stack = Stack.parse(scene.stack().text(), materials);
        Stack flat = Stack.parse(scene.flatStack().text(), materials);
        ThicknessRange range = new ThicknessRange(scene.rangeNm()[0], scene.rangeNm()[1]);
        View view = View.aperture(aperture(scene), stack, range.toNm());
        List<String> names = new ArrayList<>();
        List<Spectrum> responses = new ArrayList<>();
        for (double[] response : scene.rig().responses()) {
            names.add("channel " + (names.size() + 1));
            responses.add(Spectrum.of(response));
        }
        EffectiveResponses relative = new EffectiveResponses(names, responses)
                .relativeTo(Reflectance.of(flat, view).spectrum(0));
        return ColourCurve.of(relative, Reflectance.of(stack, view), range, range.step(stack));
    }

    private static double aperture(Scene scene) {
        String statement = scene.rig().view().statement();
        return Double.parseDouble(statement.substring(statement.indexOf('=') + 1).strip());
    }

    int width() {
        return scene.field().width();
    }
}
