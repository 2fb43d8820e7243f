package iridepth.photo;

import java.io.EOFException;
import java.nio.ByteOrder;
import java.nio.file.Path;
import java.util.Arrays;

/**
 * How the samples of one TIFF page lie in the file: a grid of chunks, which are tiles, or strips as wide as the picture.
 *
 * @param samples samples a pixel in the file, with an alpha sample if there is one
 * @param channels of these, the ones that carry the picture
 * @param planar whether each sample has its own chunks ("separate planes"), else samples are interleaved
 * @param predicted whether samples are stored as differences along the row
 * @param whiteIsZero whether a count of 0 is white, so that counts must be turned over
 */
record TiffPage(int width, int height, int samples, int channels, int bits, boolean planar, int chunkWidth,
        int chunkHeight, long[] offsets, long[] sizes, TiffCompression compression, boolean predicted,
        boolean whiteIsZero, ByteOrder order) {

    /** @throws PhotoException if the page is of a kind that is not supported, or damaged */
    static TiffPage of(Path path, TiffDirectory tags, long fileSize) throws EOFException {
        int width = size(path, tags, TiffDirectory.IMAGE_WIDTH, "width");
        int height = size(path, tags, TiffDirectory.IMAGE_LENGTH, "height");
        int samples = (int) tags.integer(TiffDirectory.SAMPLES_PER_PIXEL, 1);
        int channels = channels(path, tags, samples);
        int bits = bits(path, tags);
        TiffCompression compression = TiffCompression.of(tags.integer(TiffDirectory.COMPRESSION, 1));
        if (compression == null) {
            throw new PhotoException(path, "has TIFF compression " + tags.integer(TiffDirectory.COMPRESSION, 1)
                    + ", which is not supported; save it uncompressed or with LZW, deflate or PackBits");
        }
        long predictor = tags.integer(TiffDirectory.PREDICTOR, 1);
        if (predictor != 1 && predictor != 2 || tags.integer(TiffDirectory.FILL_ORDER, 1) != 1) {
            throw new PhotoException(path, "has a TIFF predictor or fill order that is not supported; save it uncompressed");
        }
        boolean planar = tags.integer(TiffDirectory.PLANAR_CONFIGURATION, 1) == 2 && samples > 1;
        boolean tiled = tags.has(TiffDirectory.TILE_OFFSETS);
        int chunkWidth = tiled ? size(path, tags, TiffDirectory.TILE_WIDTH, "tile width") : width;
        int chunkHeight = tiled ? size(path, tags, TiffDirectory.TILE_LENGTH, "tile height")
                : (int) Math.min(height, Math.max(1, tags.integer(TiffDirectory.ROWS_PER_STRIP, height)));
        if ((long) chunkWidth * chunkHeight * samples > 1 << 29) {
            if (tiled || compression != TiffCompression.NONE) {
                throw new PhotoException(path, "has strips or tiles of more than 1 GB; save it with smaller ones");
            }
        }
        TiffPage page = new TiffPage(width, height, samples, channels, bits, planar, chunkWidth, chunkHeight,
                tags.integers(tiled ? TiffDirectory.TILE_OFFSETS : TiffDirectory.STRIP_OFFSETS),
                tags.integers(tiled ? TiffDirectory.TILE_BYTE_COUNTS : TiffDirectory.STRIP_BYTE_COUNTS), compression,
                predictor == 2 && compression != TiffCompression.NONE,
                tags.integer(TiffDirectory.PHOTOMETRIC, 1) == 0, tags.order());
        return page.checked(path, fileSize);
    }

    private static int size(Path path, TiffDirectory tags, int tag, String name) {
        long value = tags.integer(tag, 0);
        if (value < 1 || value > Integer.MAX_VALUE) {
            throw new PhotoException(path, "has a " + name + " of " + value + "; export the photo again");
        }
        return (int) value;
    }

    private static int channels(Path path, TiffDirectory tags, int samples) {
        long photometric = tags.integer(TiffDirectory.PHOTOMETRIC, 1);
        int channels = switch ((int) photometric) {
            case 0, 1 -> 1;
            case 2 -> 3;
            case 3 -> throw new PhotoException(path, "is a palette image, whose counts are no measure of light; save the "
                    + "camera's photo as grey or RGB");
            case 5 -> throw new PhotoException(path, "is a CMYK image, made for print; save the camera's photo as RGB");
            case 32803 -> throw new PhotoException(path, "is a raw sensor mosaic; develop it to linear RGB first");
            default -> throw new PhotoException(path, "has TIFF colour kind " + photometric
                    + ", which is not supported; save it as grey or RGB");
        };
        if (samples < channels || samples > channels + 1) {
            throw new PhotoException(path, "has " + samples + " samples a pixel, " + channels
                    + (channels == 1 ? " (grey)" : " (RGB)") + " expected; save it as grey or RGB without extra channels");
        }
        return channels;
    }

    private static int bits(Path path, TiffDirectory tags) {
        long[] bits = tags.integers(TiffDirectory.BITS_PER_SAMPLE);
        int depth = bits.length == 0 ? 1 : (int) bits[0];
        if (Arrays.stream(tags.integers(TiffDirectory.SAMPLE_FORMAT)).anyMatch(format -> format != 1 && format != 4)) {
            throw new PhotoException(path, "holds " + depth + "-bit signed or floating-point samples; save the counts as "
                    + "unsigned 8 or 16 bit");
        }
        if (depth != 8 && depth != 16 || Arrays.stream(bits).anyMatch(bit -> bit != depth)) {
            throw new PhotoException(path, "has a bit depth of " + (bits.length == 0 ? "1" : join(bits))
                    + ", which is not supported; save it as 8 or 16 bit");
        }
        return depth;
    }

    private static String join(long[] values) {
        return Arrays.stream(values).distinct().mapToObj(Long::toString).reduce((a, b) -> a + "/" + b).orElse("");
    }

    private TiffPage checked(Path path, long fileSize) throws EOFException {
        long chunks = (long) columns() * chunkRows() * planes();
        if (offsets.length < chunks) {
            throw new PhotoException(path, "is damaged (" + offsets.length + " strips or tiles where " + chunks
                    + " are needed); export the photo again");
        }
        for (int i = 0; i < chunks; i++) {
            long needed = compression == TiffCompression.NONE ? plainBytes(i) : i < sizes.length ? sizes[i] : -1;
            if (needed < 0 || needed > Integer.MAX_VALUE - 8L && compression != TiffCompression.NONE) {
                throw new PhotoException(path, "is damaged (no length of strip " + i + "); export the photo again");
            }
            if (offsets[i] < 0 || offsets[i] > fileSize - needed) {
                throw new EOFException();
            }
        }
        return this;
    }

    /** Bytes of an uncompressed chunk; the last strip may be short, tiles are always whole. */
    private long plainBytes(int chunk) {
        int row = chunk / columns() % chunkRows();
        return rowBytes() * (columns() == 1 && chunkWidth == width ? rowsOf(row) : chunkHeight);
    }

    int columns() {
        return (width + chunkWidth - 1) / chunkWidth;
    }

    int chunkRows() {
        return (height + chunkHeight - 1) / chunkHeight;
    }

    int planes() {
        return planar ? samples : 1;
    }

    /** Samples of one pixel that lie together. */
    int interleaved() {
        return planar ? 1 : samples;
    }

    /** Bytes of one row of a chunk. */
    long rowBytes() {
        return (long) chunkWidth * interleaved() * (bits / 8);
    }

    /** Picture rows in a row of chunks. */
    int rowsOf(int chunkRow) {
        return Math.min(chunkHeight, height - chunkRow * chunkHeight);
    }

    int maxCount() {
        return (1 << bits) - 1;
    }
}
