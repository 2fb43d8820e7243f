package iridepth.simulation;

/**
 * How unevenly a rig lights its field: the cos^4 law 1 / (1 + v r^2)^2 about a centre, times a linear tilt. Distances are
 * in halves of the picture's longer side from its middle; the value at the shading's centre is 1.
 *
 * @param vignette v; 0 for none
 * @param tilt relative change of the light per unit of distance
 * @param direction towards which it grows, degrees from x to y
 * @param centreX where the vignette is centred
 * @param centreY where the vignette is centred
 * @param spread relative change of v from each channel to the next
 */
public record Shading(double vignette, double tilt, double direction, double centreX, double centreY, double spread) {

    /** Even light. */
    public static Shading none() {
        return new Shading(0, 0, 0, 0, 0, 0);
    }

    /** The light at a pixel relative to the centre of the shading. */
    public double at(double x, double y, int width, int height, int channel) {
        double half = Math.max(width, height) / 2.0;
        double u = (x + 0.5 - width / 2.0) / half - centreX;
        double v = (y + 0.5 - height / 2.0) / half - centreY;
        double strength = vignette * (1 + spread * channel);
        double fall = 1 + strength * (u * u + v * v);
        double angle = Math.toRadians(direction);
        return (1 + tilt * (u * Math.cos(angle) + v * Math.sin(angle))) / (fall * fall);
    }
}
