package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.io.EOFException;
import java.io.IOException;
import org.junit.jupiter.api.Test;

class TiffCompressionTest {

    /** The worked example of Apple's Technical Note TN1023, Understanding PackBits; from memory. */
    @Test
    void packBitsUnpacksTheExampleOfItsInventor() throws IOException {
        int[] packed = {0xfe, 0xaa, 0x02, 0x80, 0x00, 0x2a, 0xfd, 0xaa, 0x03, 0x80, 0x00, 0x2a, 0x22, 0xf7, 0xaa};
        int[] plain = {0xaa, 0xaa, 0xaa, 0x80, 0x00, 0x2a, 0xaa, 0xaa, 0xaa, 0xaa, 0x80, 0x00, 0x2a, 0x22,
            0xaa, 0xaa, 0xaa, 0xaa, 0xaa, 0xaa, 0xaa, 0xaa, 0xaa, 0xaa};
        byte[] into = new byte[24];
        TiffCompression.PACK_BITS.decode(bytes(packed), into);
        assertArrayEquals(bytes(plain), into);
    }

    /** TIFF 6.0 section 13: the string 7 7 7 8 8 7 7 6 6 gives the codes 256 7 258 8 8 258 6 6 257; from memory. */
    @Test
    void lzwUnpacksTheExampleOfTheStandard() throws IOException {
        int[] codes = {256, 7, 258, 8, 8, 258, 6, 6, 257};
        byte[] packed = new byte[11];
        for (int i = 0; i < codes.length * 9; i++) {
            if ((codes[i / 9] >> 8 - i % 9 & 1) != 0) {
                packed[i / 8] |= (byte) (0x80 >> i % 8);
            }
        }
        byte[] into = new byte[9];
        TiffCompression.LZW.decode(packed, into);
        assertArrayEquals(new byte[] {7, 7, 7, 8, 8, 7, 7, 6, 6}, into);
    }

    @Test
    void allTellWhenTheirBytesEndEarly() {
        byte[] into = new byte[50];
        for (TiffCompression compression : TiffCompression.values()) {
            assertThrows(EOFException.class, () -> compression.decode(new byte[0], into), compression.name());
        }
    }

    private static byte[] bytes(int[] values) {
        byte[] bytes = new byte[values.length];
        for (int i = 0; i < values.length; i++) {
            bytes[i] = (byte) values[i];
        }
        return bytes;
    }
}
