package iridepth.app.cli;

import java.nio.file.Path;

/** How files that go beside each other are named. */
final class OutputNames {
    private OutputNames() {
    }

    /** The table beside a picture: the same name ending in {@code .csv}. */
    static Path table(Path picture) {
        String name = picture.getFileName().toString();
        int dot = name.lastIndexOf('.');
        String stem = dot > 0 ? name.substring(0, dot) : name;
        if (name.equals(stem + ".csv")) {
            throw new IllegalArgumentException("--out names the picture, FILE.png, not '" + name + "'; the table goes beside it as "
                    + "FILE.csv");
        }
        return picture.resolveSibling(stem + ".csv");
    }
}
