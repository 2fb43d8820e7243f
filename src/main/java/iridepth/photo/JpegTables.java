package iridepth.photo;

import java.nio.ByteBuffer;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import javax.imageio.IIOException;

/** Gathers the quantisation tables (DQT) and the sampling of components (frame header) of a JPEG file, ITU-T T.81 annex B. */
final class JpegTables {

    private final Map<Integer, int[]> tables = new HashMap<>();

    /** Takes a DQT segment in. */
    void add(ByteBuffer segment) throws IIOException {
        int at = 0;
        while (at < segment.limit()) {
            int head = segment.get(at++);
            int size = (head >> 4 & 0xf) == 0 ? 1 : 2;
            if (at + 64 * size > segment.limit()) {
                throw new IIOException("a quantisation table is cut short");
            }
            int[] steps = new int[64];
            for (int i = 0; i < 64; i++, at += size) {
                steps[zigzag(i)] = size == 1 ? segment.get(at) & 0xff : segment.getShort(at) & 0xffff;
            }
            tables.put(head & 0xf, steps);
        }
    }

    /** Row-wise place of the i-th coefficient of the zigzag path, figure A.6. */
    private static int zigzag(int i) {
        int diagonal = 0;
        int first = 0;
        while (first + length(diagonal) <= i) {
            first += length(diagonal++);
        }
        int step = i - first;
        int low = Math.max(0, diagonal - 7);
        int row = diagonal % 2 == 0 ? Math.min(diagonal, 7) - step : low + step;
        return row * 8 + diagonal - row;
    }

    private static int length(int diagonal) {
        return diagonal < 8 ? diagonal + 1 : 15 - diagonal;
    }

    /** The quantisation of a frame with this header. */
    JpegQuantisation quantisation(ByteBuffer frame) throws IIOException {
        int count = frame.get(5);
        if (frame.limit() < 6 + 3 * count) {
            throw new IIOException("its frame header is cut short");
        }
        int widest = 1;
        int tallest = 1;
        for (int i = 0; i < count; i++) {
            widest = Math.max(widest, frame.get(7 + 3 * i) >> 4 & 0xf);
            tallest = Math.max(tallest, frame.get(7 + 3 * i) & 0xf);
        }
        List<JpegQuantisation.Component> components = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            int across = frame.get(7 + 3 * i) >> 4 & 0xf;
            int down = frame.get(7 + 3 * i) & 0xf;
            int[] steps = tables.get((int) frame.get(8 + 3 * i));
            if (steps == null || across == 0 || down == 0) {
                throw new IIOException("a quantisation table is missing");
            }
            boolean alone = count == 1;
            components.add(new JpegQuantisation.Component(steps, alone ? 1 : Math.max(1, widest / across),
                    alone ? 1 : Math.max(1, tallest / down)));
        }
        return new JpegQuantisation(List.copyOf(components));
    }
}
