package iridepth.recipe;

import iridepth.photo.Encoding;
import iridepth.photo.NoiseModel;
import iridepth.photo.OpenPhotos;
import iridepth.photo.PhotoException;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.Region;
import iridepth.photo.RegionStatistics;
import iridepth.photo.Registration;
import iridepth.photo.ShadingField;
import iridepth.photo.SignalSource;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * How the counts of a rig's photos become linear signal: encoding, dark, flat and noise. One for all photos of the same camera,
 * lights and objective.
 *
 * @param recipe the recipe
 * @param darks  field of the dark frame under each of the recipe's lights
 * @param flats  field of the flat above the dark under each of the recipe's lights
 */
public record Rig(Recipe recipe, List<Optional<ShadingField>> darks, List<Optional<ShadingField>> flats) {
    /**
     * Reads the darks and the flats that a recipe names.
     *
     * @throws PhotoException if one cannot be used
     */
    public static Rig of(Recipe recipe) {
        CameraSpec camera = recipe.camera();
        Map<Path, ShadingField> read = new HashMap<>();
        List<Optional<ShadingField>> darks = new ArrayList<>();
        List<Optional<ShadingField>> flats = new ArrayList<>();
        for (int light = 0; light < recipe.lights().size(); light++) {
            Optional<ShadingField> dark = Optional.empty();
            if (!camera.darks().isEmpty()) {
                dark = Optional.of(read.computeIfAbsent(camera.darks().get(light), path -> dark(camera, path)));
            }
            darks.add(dark);
            flats.add(camera.flats().isEmpty() ? Optional.empty() : Optional.of(flat(camera, camera.flats().get(light), dark)));
        }
        return new Rig(recipe, List.copyOf(darks), List.copyOf(flats));
    }

    private static ShadingField dark(CameraSpec camera, Path path) {
        try (PhotoFile file = PhotoFile.open(path)) {
            return ShadingField.dark(file, encoding(camera, file.info()));
        }
    }

    private static ShadingField flat(CameraSpec camera, Path path, Optional<ShadingField> dark) {
        try (PhotoFile file = PhotoFile.open(path)) {
            return ShadingField.flat(file, encoding(camera, file.info()), dark);
        }
    }

    /** How the counts of a photo stand for light. */
    public Encoding encoding(PhotoInfo photo) {
        return encoding(recipe.camera(), photo);
    }

    /** How the counts of a photo stand for light that a camera took. */
    static Encoding encoding(CameraSpec camera, PhotoInfo photo) {
        if (camera.isColourManaged()) {
            return Encoding.managed(photo);
        }
        if (photo.profile().isPresent()) {
            throw new PhotoException(photo.path() + ": it embeds a colour profile, but the recipe says camera.encoding = \"linear\"; "
                    + "set \"srgb\" to honour the profile, or save the sensor's linear values without one");
        }
        return Encoding.linear(Double.isNaN(camera.fullScale()) ? photo.maxCount() : camera.fullScale());
    }

    /** The linear signal with its noise of a photo under each of the recipe's lights, read jointly where there are several. */
    public SignalSource signal(PhotoFile... photos) {
        return signal(List.of(photos));
    }

    /**
     * The linear signal with its noise of a photo under each of the recipe's lights, read jointly where there are several.
     *
     * @param photos photos of one field, in the order of the lights
     * @throws RecipeException if there are not as many as lights
     * @throws PhotoException  if they differ in size, or one is shifted against the first by a pixel or more
     */
    public SignalSource signal(List<PhotoFile> photos) {
        int lights = recipe.lights().size();
        if (photos.size() != lights) {
            throw new RecipeException(recipe.file() + ": it has " + lights + (lights == 1 ? " light: give one photo"
                    : " lights: give " + lights + " photos of one field, in their order") + ", not " + photos.size());
        }
        List<SignalSource> parts = new ArrayList<>();
        for (int light = 0; light < lights; light++) {
            PhotoFile photo = photos.get(light);
            if (light > 0) {
                Registration.require(photos.get(0), photo);
            }
            Encoding encoding = encoding(photo.info());
            parts.add(SignalSource.of(photo, encoding, darks.get(light), flats.get(light), noise(photo, encoding, darks.get(light))));
        }
        return SignalSource.jointly(parts);
    }

    /**
     * What a region of a photo of this rig amounts to, channel by channel. The means carry their own scatter, so that no noise model
     * enters.
     *
     * @param light which of the recipe's lights the photo was taken under
     */
    public RegionStatistics[] patch(PhotoFile photo, int light, Region region) {
        return RegionStatistics.of(SignalSource.of(photo, encoding(photo.info()), darks.get(light), flats.get(light),
                NoiseModel.of(0, 1)).region(0, region));
    }

    private static NoiseModel noise(List<Path> exposures, PhotoInfo photo, Encoding encoding, Optional<ShadingField> dark) {
        try (OpenPhotos flats = OpenPhotos.of(exposures)) {
            for (PhotoFile flat : flats.files()) {
                PhotoInfo info = flat.info();
                if (info.channels() != photo.channels() || info.bitDepth() != photo.bitDepth()) {
                    throw new PhotoException(info.path(), "differs from " + photo.path() + " in channels or bit depth; give exposures with "
                            + "the same camera settings in camera.noise_flats");
                }
                dark.ifPresent(field -> field.requireFits(info, "dark"));
            }
            return NoiseModel.fromFlats(flats.files(), encoding, dark);
        }
    }

    private NoiseModel noise(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark) {
        CameraSpec camera = recipe.camera();
        if (!Double.isNaN(camera.fullWell())) {
            double fullScale = Double.isNaN(camera.fullScale()) ? photo.info().maxCount() : camera.fullScale();
            return NoiseModel.of(camera.readNoise() / fullScale * camera.fullWell(), camera.fullWell());
        }
        if (!camera.noiseFlats().isEmpty()) {
            return noise(camera.noiseFlats(), photo.info(), encoding, dark);
        }
        // A flat is often the mean of several exposures and so quieter than the photo: the photo's own noise is what counts.
        return NoiseModel.fromPhoto(photo, encoding, dark);
    }
}
