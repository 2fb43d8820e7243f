package iridepth.photo;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Predicate;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/** The photos that files and folders name. */
public final class PhotoList {

    private static final Set<String> ENDINGS = Set.of("tif", "tiff", "png", "jpg", "jpeg");
    private static final Pattern PIECE = Pattern.compile("\\d+|\\D+");

    /** Names with numbers in the order of the numbers: frame-9 before frame-10. Upper and lower case count as one at first. */
    static final Comparator<String> BY_NAME = PhotoList::compare;

    private PhotoList() {
    }

    /**
     * Files stand where they are given, whatever their ending. A folder stands for the files in it that end in tif, tiff, png,
     * jpg or jpeg, by name, numbers in names by their value; hidden files and folders within are passed over. A file named twice
     * counts once.
     *
     * @param given  files and folders
     * @param wanted whether a file from a folder is a photo to read, and not a flat or the like
     * @return the files in order, at least one
     * @throws PhotoException if a folder holds no photo or cannot be listed
     */
    public static List<Path> of(List<Path> given, Predicate<Path> wanted) {
        Map<Path, Path> photos = new LinkedHashMap<>();
        for (Path path : given) {
            for (Path photo : Files.isDirectory(path) ? listed(path, wanted) : List.of(path)) {
                photos.putIfAbsent(photo.toAbsolutePath().normalize(), photo);
            }
        }
        return List.copyOf(photos.values());
    }

    private static List<Path> listed(Path folder, Predicate<Path> wanted) {
        try (Stream<Path> files = Files.list(folder)) {
            List<Path> photos = files.filter(PhotoList::isPhoto).filter(wanted)
                    .sorted(Comparator.comparing(file -> file.getFileName().toString(), BY_NAME)).toList();
            if (photos.isEmpty()) {
                throw new PhotoException(folder, "holds no photo; give a folder with TIFF, PNG or JPEG files");
            }
            return photos;
        } catch (IOException e) {
            throw new PhotoException(folder, "cannot be listed (" + e.getMessage() + ")");
        }
    }

    private static boolean isPhoto(Path file) {
        String name = file.getFileName().toString();
        String ending = name.substring(name.lastIndexOf('.') + 1).toLowerCase(java.util.Locale.ROOT);
        return !name.startsWith(".") && ENDINGS.contains(ending) && Files.isRegularFile(file);
    }

    private static int compare(String a, String b) {
        List<String> first = pieces(a);
        List<String> second = pieces(b);
        for (int i = 0; i < Math.min(first.size(), second.size()); i++) {
            int order = comparePieces(first.get(i), second.get(i));
            if (order != 0) {
                return order;
            }
        }
        int order = Integer.compare(first.size(), second.size());
        return order != 0 ? order : a.compareTo(b);
    }

    private static int comparePieces(String a, String b) {
        if (!Character.isDigit(a.charAt(0)) || !Character.isDigit(b.charAt(0))) {
            return a.compareToIgnoreCase(b);
        }
        String x = a.replaceFirst("^0+(?=.)", "");
        String y = b.replaceFirst("^0+(?=.)", "");
        return x.length() != y.length() ? Integer.compare(x.length(), y.length()) : x.compareTo(y);
    }

    private static List<String> pieces(String name) {
        List<String> pieces = new ArrayList<>();
        Matcher matcher = PIECE.matcher(name);
        while (matcher.find()) {
            pieces.add(matcher.group());
        }
        return pieces;
    }
}
