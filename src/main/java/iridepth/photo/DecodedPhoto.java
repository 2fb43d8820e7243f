package iridepth.photo;

import java.awt.image.Raster;
import java.io.ByteArrayInputStream;
import java.io.EOFException;
import java.io.IOException;
import java.util.ArrayList;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import javax.imageio.IIOException;
import javax.imageio.ImageIO;
import javax.imageio.ImageReader;
import javax.imageio.stream.MemoryCacheImageInputStream;

/** A photo that is decoded whole, when its first row is asked for, and kept. */
final class DecodedPhoto implements PhotoReader {

    private final PhotoInfo info;
    private final String format;
    private final Optional<JpegQuantisation> quantisation;
    private byte[] file;
    private short[] counts;

    /**
     * @param info what the header says
     * @param format name of the format for ImageIO
     * @param file bytes of the file, without anything that would make the decoder convert colours
     * @param quantisation of a JPEG
     */
    DecodedPhoto(PhotoInfo info, String format, byte[] file, Optional<JpegQuantisation> quantisation) {
        this.info = info;
        this.format = format;
        this.file = file;
        this.quantisation = quantisation;
    }

    @Override
    public PhotoInfo info() {
        return info;
    }

    @Override
    public Optional<JpegQuantisation> quantisation() {
        return quantisation;
    }

    @Override
    public synchronized void read(int frame, int y, int count, short[] into) throws IOException {
        if (counts == null) {
            if (file == null) {
                throw new IOException("it has been closed");
            }
            counts = decode();
            file = null;
        }
        System.arraycopy(counts, y * info.width() * info.channels(), into, 0, into.length);
    }

    private short[] decode() throws IOException {
        Iterator<ImageReader> readers = ImageIO.getImageReadersByFormatName(format);
        ImageReader reader = readers.next();
        List<String> warnings = new ArrayList<>();
        reader.addIIOReadWarningListener((source, warning) -> warnings.add(warning));
        try (MemoryCacheImageInputStream in = new MemoryCacheImageInputStream(new ByteArrayInputStream(file))) {
            reader.setInput(in);
            Raster raster = reader.read(0).getRaster();
            if (!warnings.isEmpty()) {
                throw new IIOException(warnings.get(0));
            }
            return counts(raster);
        } catch (IndexOutOfBoundsException | IllegalArgumentException e) {
            throw new IIOException(String.valueOf(e.getMessage()), e);
        } catch (IIOException e) {
            if (e.getCause() instanceof EOFException || String.valueOf(e.getMessage()).matches("(?i).*(truncated|premature end).*")) {
                throw new EOFException();
            }
            throw e;
        } finally {
            reader.dispose();
        }
    }

    /** Interleaved counts; an alpha band must be opaque and is left out. */
    private short[] counts(Raster raster) throws IIOException {
        int width = info.width();
        int bands = raster.getNumBands();
        int channels = info.channels();
        if (raster.getWidth() != width || raster.getHeight() != info.height() || bands < channels) {
            throw new IIOException("its header and its picture differ");
        }
        short[] all = new short[Math.toIntExact((long) width * info.height() * channels)];
        int[] row = new int[width * bands];
        int at = 0;
        for (int y = 0; y < info.height(); y++) {
            raster.getPixels(0, y, width, 1, row);
            for (int i = 0; i < row.length; i += bands) {
                for (int c = 0; c < channels; c++) {
                    all[at++] = (short) row[i + c];
                }
                if (bands > channels && row[i + channels] != info.maxCount()) {
                    throw new PhotoException(info.path(), "has transparent pixels; save it without an alpha channel");
                }
            }
        }
        return all;
    }

    @Override
    public synchronized void close() {
        file = null;
        counts = null;
    }
}
