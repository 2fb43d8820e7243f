package iridepth.report;

import iridepth.quality.Field;
import java.awt.image.BufferedImage;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Base64;

/**
 * A small picture of a map in the colours of {@link ColourScale}: each point the mean of the pixels under it, grey where fewer
 * than half of them were read.
 */
final class Thumbnail {
    /** Points along the longer edge at most. */
    static final int EDGE = 180;
    private static final int NOT_READ = 0xD9D9D9;

    private Thumbnail() {
    }

    /**
     * The picture as a data URI (RFC 2397).
     *
     * @param map    thickness, nm
     * @param fromNm thickness of the first colour
     * @param toNm   thickness of the last colour, above the first
     */
    static String dataUri(Field map, double fromNm, double toNm) {
        try {
            return "data:image/png;base64," + Base64.getEncoder().encodeToString(PngWriter.encode(draw(map, fromNm, toNm)));
        } catch (IOException e) {
            throw new UncheckedIOException("writing to memory cannot fail", e);
        }
    }

    static BufferedImage draw(Field map, double fromNm, double toNm) {
        int factor = (Math.max(map.width(), map.height()) - 1) / EDGE + 1;
        BufferedImage image = new BufferedImage((map.width() + factor - 1) / factor, (map.height() + factor - 1) / factor,
                BufferedImage.TYPE_INT_RGB);
        for (int y = 0; y < image.getHeight(); y++) {
            for (int x = 0; x < image.getWidth(); x++) {
                double mean = mean(map, x * factor, y * factor, factor);
                image.setRGB(x, y, Double.isNaN(mean) ? NOT_READ
                        : ColourScale.thickness().rgb(ColourScale.index((mean - fromNm) / (toNm - fromNm))));
            }
        }
        return image;
    }

    private static double mean(Field map, int left, int top, int factor) {
        double sum = 0;
        int read = 0;
        int pixels = 0;
        for (int y = top; y < Math.min(map.height(), top + factor); y++) {
            for (int x = left; x < Math.min(map.width(), left + factor); x++) {
                double nm = map.at(x, y);
                pixels++;
                if (!Double.isNaN(nm)) {
                    sum += nm;
                    read++;
                }
            }
        }
        return 2 * read >= pixels ? sum / read : Double.NaN;
    }
}
