package iridepth.app.cli;

import iridepth.photo.Region;
import iridepth.quality.Position;
import java.util.Arrays;

/** Places on a map as a command line gives them: numbers with commas between, pixel centres at whole numbers. */
final class Coordinates {
    private Coordinates() {
    }

    /**
     * A point, {@code x,y}.
     *
     * @param option the option that gives it, for messages
     */
    static Position point(String option, String text) {
        double[] numbers = numbers(option, text, 2, "X,Y in pixels, as in 120,80");
        return new Position(numbers[0], numbers[1]);
    }

    /** A rectangle of whole pixels, {@code x,y,width,height}. */
    static Region region(String option, String text) {
        double[] numbers = numbers(option, text, 4, "X,Y,WIDTH,HEIGHT in whole pixels, as in 10,20,64,64");
        for (double number : numbers) {
            if (number != Math.rint(number) || Math.abs(number) > Integer.MAX_VALUE) {
                throw new IllegalArgumentException(option + " " + text + ": give X,Y,WIDTH,HEIGHT in whole pixels");
            }
        }
        return new Region((int) numbers[0], (int) numbers[1], (int) numbers[2], (int) numbers[3]);
    }

    /** Two points, {@code x0,y0,x1,y1}. */
    static Position[] line(String option, String text) {
        double[] numbers = numbers(option, text, 4, "X0,Y0,X1,Y1 in pixels, as in 10,20,10,200");
        return new Position[] {new Position(numbers[0], numbers[1]), new Position(numbers[2], numbers[3])};
    }

    /** Numbers with commas between, at least one. */
    static double[] list(String option, String text) {
        return numbers(option, text, text.split(",", -1).length, "numbers with commas between");
    }

    private static double[] numbers(String option, String text, int count, String form) {
        String[] parts = text.split(",", -1);
        if (parts.length == count) {
            try {
                double[] numbers = Arrays.stream(parts).mapToDouble(part -> Double.parseDouble(part.strip())).toArray();
                if (Arrays.stream(numbers).allMatch(Double::isFinite)) {
                    return numbers;
                }
            } catch (NumberFormatException e) {
                // told below, with the texts of another length
            }
        }
        throw new IllegalArgumentException(option + " " + text + ": give " + form);
    }
}
