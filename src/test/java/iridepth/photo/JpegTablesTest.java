package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.nio.ByteBuffer;
import javax.imageio.IIOException;
import org.junit.jupiter.api.Test;

class JpegTablesTest {

    /** ITU-T T.81 figure A.6, rows of the table of places along the zigzag path; from memory. */
    private static final int[] ZIGZAG = {
        0, 1, 5, 6, 14, 15, 27, 28,
        2, 4, 7, 13, 16, 26, 29, 42,
        3, 8, 12, 17, 25, 30, 41, 43,
        9, 11, 18, 24, 31, 40, 44, 53,
        10, 19, 23, 32, 39, 45, 52, 54,
        20, 22, 33, 38, 46, 51, 55, 60,
        21, 34, 37, 47, 50, 56, 59, 61,
        35, 36, 48, 49, 57, 58, 62, 63};

    private static ByteBuffer frame(int count, int... specification) {
        ByteBuffer frame = ByteBuffer.allocate(6 + 3 * count).put(5, (byte) count);
        for (int i = 0; i < specification.length; i++) {
            frame.put(6 + i, (byte) specification[i]);
        }
        return frame;
    }

    @Test
    void stepsFollowTheZigzagPath() throws IIOException {
        JpegTables tables = new JpegTables();
        ByteBuffer segment = ByteBuffer.allocate(65);
        for (int i = 0; i < 64; i++) {
            segment.put(1 + i, (byte) i);
        }
        tables.add(segment);
        assertArrayEquals(ZIGZAG, tables.quantisation(frame(1, 1, 0x11, 0)).components().get(0).steps());
    }

    @Test
    void chrominanceMaySpanSeveralPixels() throws IIOException {
        JpegTables tables = new JpegTables();
        tables.add(ByteBuffer.allocate(65));
        tables.add(ByteBuffer.allocate(129).put(0, (byte) 0x11).putShort(1, (short) 700));
        JpegQuantisation found = tables.quantisation(frame(3, 1, 0x21, 0, 2, 0x11, 1, 3, 0x11, 1));
        assertEquals(1, found.components().get(0).across());
        assertEquals(2, found.components().get(1).across());
        assertEquals(1, found.components().get(2).down());
        assertEquals(700, found.components().get(2).steps()[0]);
    }

    @Test
    void tablesThatAreMissingOrCutShortAreTold() {
        JpegTables tables = new JpegTables();
        assertEquals("a quantisation table is cut short",
                assertThrows(IIOException.class, () -> tables.add(ByteBuffer.allocate(30))).getMessage());
        assertEquals("a quantisation table is missing",
                assertThrows(IIOException.class, () -> tables.quantisation(frame(1, 1, 0x11, 2))).getMessage());
    }
}
