package iridepth.photo;

import java.io.EOFException;
import java.util.zip.DataFormatException;
import java.util.zip.Inflater;
import java.util.zip.ZipException;

/** The lossless compressions of TIFF strips and tiles that photos come in. */
enum TiffCompression {

    NONE {
        @Override
        void decode(byte[] packed, byte[] into) throws EOFException {
            if (packed.length < into.length) {
                throw new EOFException();
            }
            System.arraycopy(packed, 0, into, 0, into.length);
        }
    },

    /** Lempel-Ziv-Welch, TIFF 6.0 section 13: codes of 9 to 12 bits, most significant bit first. */
    LZW {
        @Override
        void decode(byte[] packed, byte[] into) throws EOFException, ZipException {
            new Lzw(packed, into).decode();
        }
    },

    /** Deflate with the zlib wrapper: Adobe Photoshop TIFF Technical Notes (2002). */
    DEFLATE {
        @Override
        void decode(byte[] packed, byte[] into) throws EOFException, ZipException {
            Inflater inflater = new Inflater();
            try {
                inflater.setInput(packed);
                int length = 0;
                while (length < into.length) {
                    int more = inflater.inflate(into, length, into.length - length);
                    if (more == 0 && (inflater.finished() || inflater.needsInput() || inflater.needsDictionary())) {
                        throw new EOFException();
                    }
                    length += more;
                }
            } catch (DataFormatException e) {
                throw new ZipException("deflate: " + e.getMessage());
            } finally {
                inflater.end();
            }
        }
    },

    /** Byte runs, TIFF 6.0 section 9. */
    PACK_BITS {
        @Override
        void decode(byte[] packed, byte[] into) throws EOFException {
            int from = 0;
            int to = 0;
            while (to < into.length) {
                if (from >= packed.length) {
                    throw new EOFException();
                }
                int n = packed[from++];
                if (n == -128) {
                    continue;
                }
                int length = Math.min(n >= 0 ? n + 1 : 1 - n, into.length - to);
                if (from + (n >= 0 ? length : 1) > packed.length) {
                    throw new EOFException();
                }
                if (n >= 0) {
                    System.arraycopy(packed, from, into, to, length);
                    from += n + 1;
                } else {
                    java.util.Arrays.fill(into, to, to + length, packed[from++]);
                }
                to += length;
            }
        }
    };

    /** Fills {@code into}, or fails when the packed bytes end before it is full. */
    abstract void decode(byte[] packed, byte[] into) throws EOFException, ZipException;

    /** The compression of a TIFF tag 259, null where it is not supported. */
    static TiffCompression of(long tag) {
        return switch ((int) tag) {
            case 1 -> NONE;
            case 5 -> LZW;
            case 8, 32946 -> DEFLATE;
            case 32773 -> PACK_BITS;
            default -> null;
        };
    }

    /** One LZW decoding. A table entry is the stretch of output that it stood for when it was made, so no copies are held. */
    private static final class Lzw {

        private static final int CLEAR = 256;
        private static final int END = 257;

        private final byte[] packed;
        private final byte[] into;
        private final int[] start = new int[4096];
        private final int[] length = new int[4096];
        private long bitAt;

        Lzw(byte[] packed, byte[] into) {
            this.packed = packed;
            this.into = into;
        }

        void decode() throws EOFException, ZipException {
            int bits = 9;
            int next = END + 1;
            int to = 0;
            int previousStart = -1;
            int previousLength = 0;
            while (to < into.length) {
                int code = code(bits);
                if (code == END) {
                    throw new EOFException();
                }
                if (code == CLEAR) {
                    bits = 9;
                    next = END + 1;
                    previousStart = -1;
                    continue;
                }
                if (previousStart >= 0 && next < 4096) {
                    start[next] = previousStart;
                    length[next++] = previousLength + 1;
                }
                int begin = to;
                if (code < CLEAR) {
                    into[to++] = (byte) code;
                } else if (code < next) {
                    int end = Math.min(to + length[code], into.length);
                    for (int from = start[code]; to < end; from++) {
                        into[to++] = into[from];
                    }
                } else {
                    throw new ZipException("LZW code out of sequence");
                }
                previousStart = begin;
                previousLength = to - begin;
                // the decoder has made entry 510 when the encoder, one ahead, has made 511: then codes take 10 bits
                if (next >= (1 << bits) - 1 && bits < 12) {
                    bits++;
                }
            }
        }

        private int code(int bits) throws EOFException {
            int at = (int) (bitAt >>> 3);
            if (bitAt + bits > packed.length * 8L) {
                throw new EOFException();
            }
            int word = (packed[at] & 0xff) << 16 | byteAt(at + 1) << 8 | byteAt(at + 2);
            int code = word >>> 24 - (int) (bitAt & 7) - bits & (1 << bits) - 1;
            bitAt += bits;
            return code;
        }

        private int byteAt(int at) {
            return at < packed.length ? packed[at] & 0xff : 0;
        }
    }
}
