package iridepth.photo;

import java.util.List;
import java.util.Optional;

/**
 * A photo as linear signal: value = linear(count) - dark, divided by the flat where there is one, with its censoring at
 * the ends of the scale and the variance of its noise. Several photos of one field, each under its own light, may stand for one
 * photo with the channels of all. Rows may be asked for from several threads.
 */
public interface SignalSource {

    /**
     * @param photo the open photo; stays the caller's to close
     * @param encoding how its counts stand for light
     * @param dark field of a dark frame
     * @param flat field of a flat frame above that dark
     * @param noise noise of a pixel, in linear fractions of full scale
     * @return the source
     * @throws PhotoException if encoding, dark or flat do not belong to such a photo
     */
    static SignalSource of(PhotoFile photo, Encoding encoding, Optional<ShadingField> dark, Optional<ShadingField> flat,
            NoiseModel noise) {
        return PhotoSignal.open(photo, encoding, dark, flat, noise);
    }

    /**
     * @param photos photos of one field in register, one or more; their channels follow each other in this order
     * @return the source of one photo with the channels of all
     * @throws PhotoException if they differ in size
     */
    static SignalSource jointly(List<SignalSource> photos) {
        return photos.size() == 1 ? photos.get(0) : JointSignal.of(photos);
    }

    /** @return the photos that are read jointly, or this one alone */
    default List<SignalSource> parts() {
        return List.of(this);
    }

    /** @return what the photo's header says; of photos read jointly that of the first, with the channels of all */
    PhotoInfo info();

    /** @return the noise model in use */
    NoiseModel noise();

    /**
     * @param channel 0 and up
     * @return the lowest count taken as clipped: full scale, or a level just below it at which samples pile up
     */
    int saturation(int channel);

    /**
     * Reads and converts a band of rows.
     *
     * @param frame 0 up to frames - 1
     * @param y first row
     * @param count how many rows
     * @return their signal
     */
    default Signal rows(int frame, int y, int count) {
        return convert(counts(frame, y, count), y);
    }

    /**
     * The signal of a region of the photo.
     *
     * @param frame 0 up to frames - 1
     * @param region rectangle on the photo
     * @return its signal
     * @throws PhotoException if it reaches outside the photo
     */
    default Signal region(int frame, Region region) {
        region.requireWithin(info());
        return rows(frame, region.y(), region.height())
                .crop(new Region(region.x(), 0, region.width(), region.height()));
    }

    /**
     * Reads the counts of a band of rows, to be converted row by row.
     *
     * @param frame 0 up to frames - 1
     * @param y first row
     * @param count how many rows
     * @return their counts
     */
    Frame counts(int frame, int y, int count);

    /**
     * Converts rows that have been read.
     *
     * @param rows whole rows of the photo
     * @param y the first of them
     * @return their signal
     */
    default Signal convert(Frame rows, int y) {
        Signal signal = Signal.blank(rows.width(), rows.height(), rows.channels());
        Signal line = Signal.row(info());
        int width = rows.width();
        for (int row = 0; row < rows.height(); row++) {
            convert(rows, row, y + row, line);
            System.arraycopy(line.value(), 0, signal.value(), row * line.value().length, line.value().length);
            System.arraycopy(line.limit(), 0, signal.limit(), row * line.limit().length, line.limit().length);
            System.arraycopy(line.light(), 0, signal.light(), row * width, width);
        }
        return signal;
    }

    /**
     * Converts one row.
     *
     * @param rows rows of the photo
     * @param row which of them
     * @param y its place in the photo
     * @param line receives its signal: of the photo's width, one row high
     */
    void convert(Frame rows, int row, int y, Signal line);

    /**
     * Variance of the noise where a value is expected: by the noise model at the light that gives this value, with the
     * rounding to counts, without the uncertainty of the flat itself. The light is taken to fall off alike in all channels.
     *
     * @param channel 0 and up
     * @param value expected signal
     * @param light light over its mean in the picture, above 0, and 1 without a flat; see {@link Signal#light}
     * @return variance of the value, above 0
     */
    double variance(int channel, double value, double light);

    /**
     * @return the least and the most of {@link Signal#light} in the picture, on a grid of rows fine enough for a smooth field
     */
    double[] lightRange();
}
