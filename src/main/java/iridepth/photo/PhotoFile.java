package iridepth.photo;

import java.io.EOFException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Optional;
import java.util.zip.ZipException;

/**
 * A photo on disk: TIFF (also BigTIFF), PNG or JPEG, grey or red-green-blue, 8 or 16 bit. Gives the counts exactly as
 * the file holds them, before any colour conversion. Rows may be asked for in any order and from several threads; of a
 * TIFF only the strips or tiles that hold them are read, so that memory does not grow with the picture. PNG and JPEG
 * are decoded whole when the first row is asked for.
 *
 * <p>A picture that it cannot give faithfully (palette, CMYK, other bit depths, transparency) is refused.
 */
public final class PhotoFile implements AutoCloseable {

    private final PhotoReader reader;

    private PhotoFile(PhotoReader reader) {
        this.reader = reader;
    }

    /**
     * Opens a photo and reads its header.
     *
     * @param path the file
     * @return the open photo; close it after use
     * @throws PhotoException if the file is missing, is no TIFF, PNG or JPEG, is damaged, or is of a kind not supported
     */
    public static PhotoFile open(Path path) {
        if (!Files.exists(path)) {
            throw new PhotoException(path, "there is no such file; check the path");
        }
        if (Files.isDirectory(path)) {
            throw new PhotoException(path, "is a folder, not a photo; give a TIFF, PNG or JPEG file");
        }
        FileChannel channel = null;
        try {
            channel = FileChannel.open(path, StandardOpenOption.READ);
            return new PhotoFile(reader(path, channel));
        } catch (IOException e) {
            close(channel);
            throw failure(path, e);
        } catch (RuntimeException e) {
            close(channel);
            throw e;
        }
    }

    private static PhotoReader reader(Path path, FileChannel channel) throws IOException {
        if (channel.size() == 0) {
            throw new PhotoException(path, "is empty; give a TIFF, PNG or JPEG file");
        }
        ByteBuffer start = ByteBuffer.allocate(8);
        while (start.hasRemaining() && channel.read(start, start.position()) > 0) {
            // a read may give less than asked for
        }
        int magic = start.getInt(0);
        if (magic == 0x49492a00 || magic == 0x4d4d002a || magic == 0x49492b00 || magic == 0x4d4d002b) {
            return TiffPhoto.open(path, channel);
        }
        if (start.getLong(0) == PngPhoto.SIGNATURE) {
            return PngPhoto.open(path, channel);
        }
        if (magic >>> 8 == 0xffd8ff) {
            return JpegPhoto.open(path, channel);
        }
        throw new PhotoException(path, "is not a TIFF, PNG or JPEG image; save the photo as one of these");
    }

    /** @return what the header says */
    public PhotoInfo info() {
        return reader.info();
    }

    /** How a JPEG rounds its coefficients, empty for other formats. */
    Optional<JpegQuantisation> quantisation() {
        return reader.quantisation();
    }

    /**
     * Reads a band of rows.
     *
     * @param frame 0 up to frames - 1
     * @param y first row, 0 at the top
     * @param count how many rows, 1 or more
     * @return their counts
     * @throws PhotoException if the file is truncated or damaged there
     * @throws IllegalArgumentException if the photo has no such rows or frame
     */
    public Frame rows(int frame, int y, int count) {
        PhotoInfo info = info();
        if (frame < 0 || frame >= info.frames()) {
            throw new IllegalArgumentException("frame " + frame + " asked for, but " + info.path() + " has "
                    + info.frames() + " (counted from 0)");
        }
        if (y < 0 || count < 1 || y > info.height() - count) {
            throw new IllegalArgumentException(count + " rows from row " + y + " asked for, but " + info.path() + " has "
                    + info.height());
        }
        long length = (long) info.width() * info.channels() * count;
        if (length > Integer.MAX_VALUE - 8) {
            throw new IllegalArgumentException(count + " rows of " + info.path() + " are too many at once; read fewer");
        }
        short[] counts = new short[(int) length];
        try {
            reader.read(frame, y, count, counts);
        } catch (IOException e) {
            throw failure(info.path(), e);
        } catch (java.io.UncheckedIOException e) {
            throw failure(info.path(), e.getCause());
        }
        return new Frame(info.width(), count, info.channels(), info.bitDepth(), counts);
    }

    /**
     * Reads a band of rows of the first frame.
     *
     * @param y first row, 0 at the top
     * @param count how many rows, 1 or more
     * @return their counts
     */
    public Frame rows(int y, int count) {
        return rows(0, y, count);
    }

    /** @return the whole first frame */
    public Frame all() {
        return rows(0, 0, info().height());
    }

    @Override
    public void close() {
        try {
            reader.close();
        } catch (IOException e) {
            throw failure(info().path(), e);
        }
    }

    private static void close(FileChannel channel) {
        try {
            if (channel != null) {
                channel.close();
            }
        } catch (IOException e) {
            // nothing was written, so nothing is lost; the first failure is the one to tell
        }
    }

    private static PhotoException failure(Path path, IOException e) {
        if (e instanceof EOFException) {
            return new PhotoException(path, "is truncated; copy or export the photo again");
        }
        if (e instanceof java.nio.file.AccessDeniedException) {
            return new PhotoException(path, "may not be read; check its permissions");
        }
        String detail = String.valueOf(e.getMessage()).replaceAll("\\s+", " ");
        if (e instanceof ZipException || e instanceof javax.imageio.IIOException) {
            return new PhotoException(path, "is damaged (" + detail + "); copy or export the photo again");
        }
        return new PhotoException(path, "cannot be read (" + detail + ")");
    }
}
