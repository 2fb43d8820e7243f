package iridepth.recipe;

import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Region;
import iridepth.photo.RegionStatistics;
import iridepth.photo.ShadingField;
import iridepth.photo.SignalSource;
import java.util.Optional;

/**
 * How the counts of a rig's photos become linear signal: encoding, dark, flat and noise. One for all photos of the same camera,
 * light and objective.
 *
 * @param recipe   the recipe
 * @param dark     field of the dark frame
 * @param flat     field of the flat above the dark
 */
public record Rig(Recipe recipe, Optional<ShadingField> dark, Optional<ShadingField> flat) {
    /**
     * Reads the dark and the flat that a recipe names.
     *
     * @throws PhotoException if one cannot be used
     */
    public static Rig of(Recipe recipe) {
        CameraSpec camera = recipe.camera();
        Optional<ShadingField> dark = Optional.empty();
        if (camera.dark() != null) {
            try (PhotoFile file = PhotoFile.open(camera.dark())) {
                dark = Optional.of(ShadingField.dark(file, encoding(camera, file.info())));
            }
        }
        Optional<ShadingField> flat = Optional.empty();
        if (camera.flat() != null) {
            try (PhotoFile file = PhotoFile.open(camera.flat())) {
                flat = Optional.of(ShadingField.flat(file, encoding(camera, file.info()), dark));
            }
        }
        return new Rig(recipe, dark, flat);
    }

    /** How the counts of a photo stand for light. */
    public Encoding encoding(PhotoInfo photo) {
        return encoding(recipe.camera(), photo);
    }

    private static Encoding encoding(CameraSpec camera, PhotoInfo photo) {
        if (camera.isColourManaged()) {
            return Encoding.managed(photo);
        }
        if (photo.profile().isPresent()) {
            throw new PhotoException(photo.path() + ": it embeds a colour profile, but the recipe says camera.encoding = \"linear\"; "
                    + "set \"srgb\" to honour the profile, or save the sensor's linear values without one");
        }
        return Encoding.linear(Double.isNaN(camera.fullScale()) ? photo.maxCount() : camera.fullScale());
    }

    /** The linear signal of a photo of this rig with its noise. */
    public SignalSource signal(PhotoFile photo) {
        Encoding encoding = encoding(photo.info());
        return SignalSource.of(photo, encoding, dark, flat, noise(photo, encoding));
    }

    /**
     * What a region of a photo of this rig amounts to, channel by channel. The means carry their own scatter, so that no noise model
     * enters.
     */
    public RegionStatistics[] patch(PhotoFile photo, Region region) {
        return RegionStatistics.of(SignalSource.of(photo, encoding(photo.info()), dark, flat, NoiseModel.of(0, 1)).region(0, region));
    }

    private NoiseModel noise(PhotoFile photo, Encoding encoding) {
        CameraSpec camera = recipe.camera();
        if (!Double.isNaN(camera.fullWell())) {
            double fullScale = Double.isNaN(camera.fullScale()) ? photo.info().maxCount() : camera.fullScale();
            return NoiseModel.of(camera.readNoise() / fullScale * camera.fullWell(), camera.fullWell());
        }
        // A flat is often the mean of several exposures and so quieter than the photo: the photo's own noise is what counts.
        return NoiseModel.fromPhoto(photo, encoding, dark);
    }
}
