package iridepth.photo;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Pattern;
import java.util.stream.IntStream;

/**
 * Counts of a TIFF or BigTIFF file. Plain rows are read straight from their place; packed strips and tiles are decoded
 * as they are needed, several at once, and those that a band of rows uses in part are kept for the next band.
 *
 * <p>ImageJ saves 16-bit RGB as three grey pages and says "channels=3" in the description: these are put together.
 */
final class TiffPhoto implements PhotoReader {

    /** Packed chunk rows kept: bands that march up or down share at most one with their neighbour. */
    private static final int KEPT = 2;

    private static final Pattern IMAGEJ_RGB = Pattern.compile("(?s)ImageJ=.*\\nchannels=3\\n.*");

    private record Key(int page, int chunkRow) {
    }

    private final FileChannel channel;
    private final List<TiffPage> pages;
    private final PhotoInfo info;
    /** Pages that make one frame: 3 where each holds a channel. */
    private final int pagesPerFrame;
    private final Map<Key, short[]> kept = new LinkedHashMap<>();

    private TiffPhoto(FileChannel channel, List<TiffPage> pages, int pagesPerFrame, PhotoInfo info) {
        this.channel = channel;
        this.pages = pages;
        this.info = info;
        this.pagesPerFrame = pagesPerFrame;
    }

    /** @throws PhotoException if the file is damaged or of a kind not supported */
    static TiffPhoto open(Path path, FileChannel channel) throws IOException {
        List<TiffDirectory> directories = TiffDirectory.readAll(path, channel).stream()
                .filter(tags -> (tags.integer(TiffDirectory.NEW_SUBFILE_TYPE, 0) & 5) == 0).toList();
        if (directories.isEmpty()) {
            throw new PhotoException(path, "holds only reduced copies or masks of a picture; export the photo again");
        }
        List<TiffPage> pages = new ArrayList<>();
        for (TiffDirectory tags : directories) {
            TiffPage page = TiffPage.of(path, tags, channel.size());
            TiffPage first = pages.isEmpty() ? page : pages.get(0);
            if (page.width() != first.width() || page.height() != first.height() || page.bits() != first.bits()
                    || page.channels() != first.channels()) {
                throw new PhotoException(path, "has pages of several kinds (page " + (pages.size() + 1) + " is "
                        + page.width() + " x " + page.height() + ", the first " + first.width() + " x " + first.height()
                        + "); save each as a file of its own");
            }
            pages.add(page);
        }
        TiffDirectory tags = directories.get(0);
        TiffPage page = pages.get(0);
        byte[] icc = tags.bytes(TiffDirectory.ICC_PROFILE);
        Optional<IccProfile> profile = icc.length == 0 ? Optional.empty()
                : Optional.of(IccProfile.parse(icc, path.toString()));
        boolean split = page.channels() == 1 && pages.size() % 3 == 0
                && IMAGEJ_RGB.matcher(tags.text(TiffDirectory.IMAGE_DESCRIPTION)).matches();
        int pagesPerFrame = split ? 3 : 1;
        return new TiffPhoto(channel, List.copyOf(pages), pagesPerFrame, new PhotoInfo(path, page.width(), page.height(),
                page.channels() * pagesPerFrame, page.bits(), pages.size() / pagesPerFrame, PixelPitch.of(tags), profile,
                false));
    }

    @Override
    public PhotoInfo info() {
        return info;
    }

    @Override
    public void read(int frame, int y, int count, short[] into) throws IOException {
        if (pagesPerFrame == 1) {
            readPage(frame, y, count, into);
            return;
        }
        short[] grey = new short[into.length / pagesPerFrame];
        for (int c = 0; c < pagesPerFrame; c++) {
            readPage(frame * pagesPerFrame + c, y, count, grey);
            for (int i = 0; i < grey.length; i++) {
                into[i * pagesPerFrame + c] = grey[i];
            }
        }
    }

    private void readPage(int index, int y, int count, short[] into) throws IOException {
        TiffPage page = pages.get(index);
        int end = y + count;
        int rowLength = page.width() * page.channels();
        if (page.compression() == TiffCompression.NONE) {
            decode(page, y, end, into);
            return;
        }
        int first = y;
        if (y % page.chunkHeight() != 0) {
            int chunkRow = y / page.chunkHeight();
            first = Math.min(end, chunkRow * page.chunkHeight() + page.rowsOf(chunkRow));
            copyKept(index, chunkRow, y, first, into, 0);
        }
        int last = end == page.height() ? end : end - end % page.chunkHeight();
        if (first < last) {
            short[] whole = first == y && last == end ? into : new short[(last - first) * rowLength];
            decode(page, first, last, whole);
            if (whole != into) {
                System.arraycopy(whole, 0, into, (first - y) * rowLength, whole.length);
            }
        }
        if (Math.max(first, last) < end) {
            copyKept(index, last / page.chunkHeight(), Math.max(first, last), end, into,
                    (Math.max(first, last) - y) * rowLength);
        }
    }

    private void copyKept(int index, int chunkRow, int y, int end, short[] into, int at) throws IOException {
        TiffPage page = pages.get(index);
        Key key = new Key(index, chunkRow);
        short[] rows;
        synchronized (kept) {
            rows = kept.get(key);
        }
        int top = chunkRow * page.chunkHeight();
        int rowLength = page.width() * page.channels();
        if (rows == null) {
            rows = new short[page.rowsOf(chunkRow) * rowLength];
            decode(page, top, top + page.rowsOf(chunkRow), rows);
            synchronized (kept) {
                while (kept.size() >= KEPT) {
                    kept.remove(kept.keySet().iterator().next());
                }
                kept.put(key, rows);
            }
        }
        System.arraycopy(rows, (y - top) * rowLength, into, at, (end - y) * rowLength);
    }

    /** Decodes rows y to end - 1; packed chunks must be wanted whole. */
    private void decode(TiffPage page, int y, int end, short[] into) throws IOException {
        int firstRow = y / page.chunkHeight();
        int chunkRows = (end - 1) / page.chunkHeight() - firstRow + 1;
        int perRow = page.columns() * page.planes();
        IntStream jobs = IntStream.range(0, chunkRows * perRow);
        try {
            (page.compression() == TiffCompression.NONE ? jobs : jobs.parallel()).forEach(job -> {
                int chunkRow = firstRow + job / perRow;
                int top = Math.max(y, chunkRow * page.chunkHeight());
                int bottom = Math.min(end, chunkRow * page.chunkHeight() + page.rowsOf(chunkRow));
                for (int from = top, rows; from < bottom; from += rows) {
                    rows = page.compression() == TiffCompression.NONE ? Math.min(bottom - from, rowsAtOnce(page))
                            : bottom - from;
                    place(page, job % perRow / page.columns(), job % page.columns(), y, from, rows, into);
                }
            });
        } catch (UncheckedIOException e) {
            throw e.getCause();
        }
    }

    /** Plain rows read at once: about a megabyte, so that the buffers stay in the processor's cache. */
    private static int rowsAtOnce(TiffPage page) {
        return (int) Math.max(1, (1 << 20) / page.rowBytes());
    }

    /** Brings part of a chunk to its place among the interleaved channels. */
    private void place(TiffPage page, int plane, int column, int y, int from, int rows, short[] into) {
        int chunkRow = from / page.chunkHeight();
        int chunk = (plane * page.chunkRows() + chunkRow) * page.columns() + column;
        int left = column * page.chunkWidth();
        int width = Math.min(page.chunkWidth(), page.width() - left);
        int samples = page.interleaved();
        int channels = page.channels();
        boolean straight = samples == channels && page.chunkWidth() == page.width() && !page.planar();
        int at = ((from - y) * page.width() + left) * channels + (page.planar() ? plane : 0);
        short[] counts = straight ? into : new short[page.chunkWidth() * rows * samples];
        int start = straight ? at : 0;
        unpack(page, chunk, from - chunkRow * page.chunkHeight(), rows, counts, start);
        if (straight) {
            return;
        }
        for (int row = 0; row < rows; row++) {
            int source = row * page.chunkWidth() * samples;
            int target = at + row * page.width() * channels;
            if (samples == channels && !page.planar()) {
                System.arraycopy(counts, source, into, target, width * channels);
            } else {
                spread(page, plane, counts, source, width, into, target);
            }
        }
    }

    /** Copies the channels of a row and checks an alpha sample, which must be opaque. */
    private void spread(TiffPage page, int plane, short[] counts, int source, int width, short[] into, int target) {
        int samples = page.interleaved();
        int kept = page.planar() ? plane < page.channels() ? 1 : 0 : page.channels();
        for (int x = 0; x < width; x++) {
            for (int c = 0; c < kept; c++) {
                into[target + x * page.channels() + c] = counts[source + x * samples + c];
            }
            if (kept < samples && (counts[source + x * samples + kept] & 0xffff) != alphaOf(page)) {
                throw new PhotoException(info.path(), "has transparent pixels; save it without an alpha channel");
            }
        }
    }

    /** The count of an opaque pixel, after the turning over of white-is-zero counts. */
    private static int alphaOf(TiffPage page) {
        return page.whiteIsZero() ? 0 : page.maxCount();
    }

    private void unpack(TiffPage page, int chunk, int skipRows, int rows, short[] counts, int start) {
        int length = page.chunkWidth() * rows * page.interleaved();
        ByteBuffer raw;
        try {
            if (page.compression() == TiffCompression.NONE) {
                raw = TiffDirectory.read(channel, page.offsets()[chunk] + skipRows * page.rowBytes(),
                        Math.toIntExact(rows * page.rowBytes()));
            } else {
                ByteBuffer packed = TiffDirectory.read(channel, page.offsets()[chunk], (int) page.sizes()[chunk]);
                raw = ByteBuffer.allocate(Math.toIntExact(rows * page.rowBytes()));
                page.compression().decode(packed.array(), raw.array());
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        if (page.bits() == 16) {
            raw.order(page.order()).asShortBuffer().get(counts, start, length);
        } else {
            byte[] bytes = raw.array();
            for (int i = 0; i < length; i++) {
                counts[start + i] = (short) (bytes[i] & 0xff);
            }
        }
        if (page.predicted()) {
            integrate(page, rows, counts, start);
        }
        if (page.whiteIsZero()) {
            for (int i = start; i < start + length; i++) {
                counts[i] ^= (short) page.maxCount();
            }
        }
    }

    /** Undoes horizontal differencing, TIFF 6.0 section 14. */
    private static void integrate(TiffPage page, int rows, short[] counts, int start) {
        int samples = page.interleaved();
        int rowLength = page.chunkWidth() * samples;
        int mask = page.maxCount();
        for (int row = 0; row < rows; row++) {
            int begin = start + row * rowLength;
            for (int i = begin + samples; i < begin + rowLength; i++) {
                counts[i] = (short) (counts[i] + counts[i - samples] & mask);
            }
        }
    }

    @Override
    public void close() throws IOException {
        channel.close();
    }
}
