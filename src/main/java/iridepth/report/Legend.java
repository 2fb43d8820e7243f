package iridepth.report;

/** Samples with their names, one after the other in lines across a picture. */
final class Legend {
    /** Length of a sample, px. */
    static final int SAMPLE = 40;

    private static final int LINE = 28;
    private static final int GAP = 30;

    private final Picture picture;
    private final int left;
    private double x;
    private int y;
    private boolean used;

    /** Draws a sample at its left end and the height of its middle. */
    interface Sample {
        void draw(double x, double y);
    }

    /**
     * A legend.
     *
     * @param left where its lines begin, px
     * @param y    base line of its first line, px
     */
    Legend(Picture picture, int left, int y) {
        this.picture = picture;
        this.left = left;
        this.x = left;
        this.y = y;
    }

    /** Adds a sample, on the next line if it does not fit on this one. */
    void entry(String name, Sample sample) {
        picture.font(Picture.TEXT, false);
        double width = SAMPLE + 10 + picture.widthOf(name);
        if (x > left && x + width > picture.width() - left) {
            x = left;
            y += LINE;
        }
        sample.draw(x, y - Picture.TEXT / 3.0);
        picture.text(name, x + SAMPLE + 10, y, Picture.Align.LEFT, Picture.INK);
        x += width + GAP;
        used = true;
    }

    /** Lower edge of the last line, px. */
    int bottom() {
        return used ? y + 8 : y - LINE + 8;
    }
}
