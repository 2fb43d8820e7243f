package iridepth.recipe;

import iridepth.colour.Light;
import iridepth.optics.Material;
import iridepth.photo.Encoding;
import iridepth.photo.PhotoFile;
import iridepth.photo.PhotoInfo;
import iridepth.photo.SignalSource;
import iridepth.reading.FilmReader;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/**
 * A recipe made ready to read photos: dark, flat, noise, colour curve and hashes of the recipe's own files. Each is made when
 * first needed and then serves every photo, so that a lot of photos costs one set-up. The curve depends on what the channels of
 * a photo are; it is made again where a photo has others than the one before. Safe for use by several threads.
 */
public final class Instrument {
    private final Recipe recipe;
    private final Optional<Path> calibration;
    /** Hashes are made beside the set-up, not before or after it, hence a lock of their own. */
    private final Object hashing = new Object();
    /** As is the rig, beside which the curve of a calibration made before can be worked out. */
    private final Object correcting = new Object();
    private Map<String, String> hashes;
    private Rig rig;
    private Channels channels;
    private Setup setup;

    /** What the curve depends on: the number of channels, and their matrix to XYZ where the file tells it. */
    private record Channels(int count, String toXyz) {
        static Channels of(PhotoInfo photo, Encoding encoding) {
            return new Channels(photo.channels(), encoding.toXyz().map(Arrays::deepToString).orElse(""));
        }
    }

    private Instrument(Recipe recipe, Optional<Path> calibration) {
        this.recipe = recipe;
        this.calibration = calibration;
    }

    /** An instrument by a recipe; reads no photo yet. */
    public static Instrument of(Recipe recipe) {
        return new Instrument(recipe, Optional.empty());
    }

    /**
     * An instrument by a recipe with a calibration that has been made before.
     *
     * @param calibration the calibration's file or result folder
     */
    public static Instrument of(Recipe recipe, Path calibration) {
        return new Instrument(recipe, Optional.of(calibration));
    }

    /** The recipe. */
    public Recipe recipe() {
        return recipe;
    }

    /**
     * The linear signal of a photo with its noise.
     *
     * @param photo the open photo; stays the caller's to close
     * @throws iridepth.photo.PhotoException if it, the dark or the flat cannot be used
     */
    public SignalSource signal(PhotoFile photo) {
        return signal(List.of(photo));
    }

    /**
     * The linear signal of photos of one field, one under each of the recipe's lights, with its noise.
     *
     * @param photos the open photos in the order of the lights; they stay the caller's to close
     * @throws RecipeException                if there are not as many as lights
     * @throws iridepth.photo.PhotoException if one, or its dark or flat, cannot be used, or they are not in register
     */
    public SignalSource signal(List<PhotoFile> photos) {
        return rig().signal(photos);
    }

    /**
     * Reads what the recipe names now rather than with the first photo, so that a fault of the rig is told apart from a fault of
     * a photo.
     *
     * @throws iridepth.photo.PhotoException if dark or flat cannot be used
     */
    public void ready() {
        rig();
    }

    /** Whether a file is one that the recipe names, such as its flat. */
    public boolean uses(Path file) {
        return Provenance.files(recipe).stream().anyMatch(own -> own.toAbsolutePath().normalize()
                .equals(file.toAbsolutePath().normalize()));
    }

    private Rig rig() {
        synchronized (correcting) {
            if (rig == null) {
                rig = Rig.of(recipe);
            }
            return rig;
        }
    }

    /**
     * Colour curve and view for a photo.
     *
     * @param photo one of the photos, where several are read jointly
     * @throws RecipeException                if the recipe does not fix them
     * @throws iridepth.photo.PhotoException if the photo or a table contradicts it
     */
    public synchronized Setup setup(PhotoInfo photo) {
        Encoding encoding = Rig.encoding(recipe.camera(), photo);
        Channels wanted = Channels.of(photo, encoding);
        if (!wanted.equals(channels)) {
            Setup made = calibration.isEmpty() ? Setup.of(rig(), photo)
                    : Setup.of(recipe, CalibrationFile.read(calibration.get(), recipe));
            setup = made;
            channels = wanted;
        }
        return setup;
    }

    /**
     * Works out now what a photo needs besides dark, flat and noise: the curve of a calibration made before.
     *
     * @throws RecipeException if the calibration cannot be used
     */
    public void prepare(PhotoInfo photo) {
        if (calibration.isPresent()) {
            setup(photo);
        }
    }

    /**
     * The set-up for one photo: where the recipe has steps, and no calibration made before is given, refined on the films that the
     * photo itself shows.
     *
     * @throws RecipeException if the recipe's steps cannot be used
     */
    public Setup setup(SignalSource photo) {
        Setup general = setup(photo.parts().get(0).info());
        return calibration.isPresent() ? general : general.refined(rig(), photo);
    }

    /** The reader of films for a photo, on the curve of {@link #setup}. */
    public synchronized FilmReader reader(PhotoInfo photo) {
        return setup(photo).reader(recipe, photo);
    }

    /** What a user should know of the tables that the recipe uses, a line each. */
    public List<String> notes() {
        List<String> notes = new ArrayList<>();
        recipe.stack().media().stream().filter(Material::isHeld).distinct().forEach(m -> notes.add(String.format(Locale.ROOT,
                "the index of %s is tabulated for %.0f-%.0f nm; beyond, its end value is held", m.name(), m.firstNm(), m.lastNm())));
        recipe.lights().stream().filter(Light::held).forEach(l -> notes.add("the table of the light " + l.name()
                + " stops short of 380-780 nm; beyond, its end value is held"));
        return notes;
    }

    /** Edge of a photo's pixels in um by the recipe, else by the photo; NaN if neither tells. */
    public double pixelUm(PhotoInfo photo) {
        return Double.isNaN(recipe.pixelUm()) ? photo.pixelUm() : recipe.pixelUm();
    }

    /**
     * SHA-256 of the recipe, the files that it names and the calibration, by name.
     *
     * @throws iridepth.photo.PhotoException if a file cannot be read
     */
    public Map<String, String> hashes() {
        return Collections.unmodifiableMap(own());
    }

    /**
     * SHA-256 of all that goes into a reading, by name: the recipe, the files that it names, the calibration, the photos.
     *
     * @throws iridepth.photo.PhotoException if a file cannot be read
     */
    public Map<String, String> hashes(Path... photos) {
        Map<String, String> all = new LinkedHashMap<>(own());
        for (Path photo : photos) {
            Provenance.add(all, recipe, photo);
        }
        return all;
    }

    private Map<String, String> own() {
        synchronized (hashing) {
            if (hashes == null) {
                Map<String, String> made = Provenance.of(recipe);
                calibration.ifPresent(file -> Provenance.add(made, recipe, CalibrationFile.in(file)));
                hashes = made;
            }
            return hashes;
        }
    }
}
