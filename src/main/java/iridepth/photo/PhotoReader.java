package iridepth.photo;

import java.io.Closeable;
import java.io.IOException;
import java.util.Optional;

/** Reads the counts of one file format. Safe for several threads at once. */
interface PhotoReader extends Closeable {

    /** @return what the header says */
    PhotoInfo info();

    /** @return how a JPEG rounds, empty for other formats */
    default Optional<JpegQuantisation> quantisation() {
        return Optional.empty();
    }

    /** Fills {@code into} with rows y to y + count - 1 of a frame, interleaved; the arguments have been checked. */
    void read(int frame, int y, int count, short[] into) throws IOException;
}
