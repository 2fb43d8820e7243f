package iridepth.photo;

import java.nio.file.Path;
import java.util.Optional;

/**
 * What a photo's header says.
 *
 * @param path the file
 * @param width pixels a row
 * @param height rows
 * @param channels 1 (grey) or 3 (red, green, blue); an opaque alpha channel is not counted; photos read
 *     jointly count the channels of all
 * @param bitDepth 8 or 16: counts run from 0 to 2^bitDepth - 1
 * @param frames pictures of this size in the file, 1 or more
 * @param pixelUm pitch of the pixels on the object in um, NaN when the file does not say
 * @param profile the embedded ICC profile, if any
 * @param lossy whether the file was compressed with loss (JPEG)
 */
public record PhotoInfo(Path path, int width, int height, int channels, int bitDepth, int frames, double pixelUm,
        Optional<IccProfile> profile, boolean lossy) {

    /** @return the highest count, 255 or 65535 */
    public int maxCount() {
        return (1 << bitDepth) - 1;
    }
}
