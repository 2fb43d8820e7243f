package iridepth.photo;

import java.util.Arrays;
import java.util.List;

/** Several photos of one field, each under its own light, as one photo with the channels of all. */
final class JointSignal implements SignalSource {

    private final List<SignalSource> parts;
    private final PhotoInfo info;
    /** First channel of each part, and behind the last the number of all. */
    private final int[] first;

    private JointSignal(List<SignalSource> parts, PhotoInfo info, int[] first) {
        this.parts = parts;
        this.info = info;
        this.first = first;
    }

    static SignalSource of(List<SignalSource> photos) {
        int[] first = new int[photos.size() + 1];
        PhotoInfo a = photos.get(0).info();
        for (int p = 0; p < photos.size(); p++) {
            PhotoInfo b = photos.get(p).info();
            if (b.width() != a.width() || b.height() != a.height() || b.frames() != a.frames()) {
                throw new PhotoException(b.path(), "has " + b.width() + " x " + b.height() + " pixels and " + b.frames()
                        + " frames, but " + a.path() + " has " + a.width() + " x " + a.height() + " and " + a.frames()
                        + "; take all photos of a field with the same camera settings");
            }
            first[p + 1] = first[p] + b.channels();
        }
        PhotoInfo all = new PhotoInfo(a.path(), a.width(), a.height(), first[photos.size()], a.bitDepth(), a.frames(), a.pixelUm(),
                a.profile(), a.lossy());
        return new JointSignal(List.copyOf(photos), all, first);
    }

    private int part(int channel) {
        int p = 0;
        while (channel >= first[p + 1]) {
            p++;
        }
        return p;
    }

    @Override
    public List<SignalSource> parts() {
        return parts;
    }

    @Override
    public PhotoInfo info() {
        return info;
    }

    @Override
    public NoiseModel noise() {
        return NoiseModel.jointly(parts.stream().map(SignalSource::noise).toList(),
                parts.stream().mapToInt(p -> p.info().channels()).toArray());
    }

    @Override
    public int saturation(int channel) {
        int p = part(channel);
        return parts.get(p).saturation(channel - first[p]);
    }

    @Override
    public Frame counts(int frame, int y, int count) {
        int channels = info.channels();
        short[] all = new short[info.width() * count * channels];
        int bitDepth = info.bitDepth();
        for (int p = 0; p < parts.size(); p++) {
            Frame own = parts.get(p).counts(frame, y, count);
            bitDepth = Math.max(bitDepth, own.bitDepth());
            int few = own.channels();
            for (int i = 0; i < info.width() * count; i++) {
                System.arraycopy(own.counts(), i * few, all, i * channels + first[p], few);
            }
        }
        return new Frame(info.width(), count, channels, bitDepth, all);
    }

    @Override
    public void convert(Frame rows, int row, int y, Signal line) {
        int width = rows.width();
        int channels = rows.channels();
        Arrays.fill(line.light(), 0);
        for (int p = 0; p < parts.size(); p++) {
            SignalSource part = parts.get(p);
            int few = first[p + 1] - first[p];
            short[] own = new short[width * few];
            for (int x = 0; x < width; x++) {
                System.arraycopy(rows.counts(), (row * width + x) * channels + first[p], own, x * few, few);
            }
            Signal partLine = Signal.row(part.info());
            part.convert(new Frame(width, 1, few, part.info().bitDepth(), own), 0, y, partLine);
            for (int x = 0; x < width; x++) {
                System.arraycopy(partLine.value(), x * few, line.value(), x * channels + first[p], few);
                System.arraycopy(partLine.limit(), x * few, line.limit(), x * channels + first[p], few);
                line.light()[x] += partLine.light()[x] / parts.size();
            }
        }
    }

    @Override
    public double variance(int channel, double value, double light) {
        int p = part(channel);
        return parts.get(p).variance(channel - first[p], value, light);
    }

    @Override
    public double[] lightRange() {
        double[] range = {Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY};
        for (SignalSource part : parts) {
            double[] own = part.lightRange();
            range[0] = Math.min(range[0], own[0]);
            range[1] = Math.max(range[1], own[1]);
        }
        return range;
    }
}
