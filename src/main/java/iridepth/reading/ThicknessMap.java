package iridepth.reading;

import java.util.EnumMap;
import java.util.Map;

/**
 * The readings of a photograph, pixel by pixel, rows first.
 *
 * @param width      pixels
 * @param height     pixels
 * @param thickness  nm, NaN where not read
 * @param random     random part of the standard uncertainty, nm, NaN where not read
 * @param systematic systematic part of the standard uncertainty, nm, NaN where not read
 * @param state      code of the {@link State}
 */
public record ThicknessMap(int width, int height, float[] thickness, float[] random, float[] systematic, byte[] state) {
    /** An empty map: nothing read, everything excluded. */
    public static ThicknessMap blank(int width, int height) {
        int size = Math.multiplyExact(width, height);
        float[][] planes = new float[3][size];
        for (float[] plane : planes) {
            java.util.Arrays.fill(plane, Float.NaN);
        }
        byte[] state = new byte[size];
        java.util.Arrays.fill(state, State.EXCLUDED.code());
        return new ThicknessMap(width, height, planes[0], planes[1], planes[2], state);
    }

    /** Fills the map with readings as they come. */
    ReadingSink sink() {
        return new ReadingSink() {
            @Override
            public void readings(int firstRow, float[] d, float[] itsRandom, float[] itsSystematic, float[] margin) {
                int at = firstRow * width;
                System.arraycopy(d, 0, thickness, at, d.length);
                System.arraycopy(itsRandom, 0, random, at, d.length);
                System.arraycopy(itsSystematic, 0, systematic, at, d.length);
            }

            @Override
            public void restart() {
                // what comes again takes the place of what came before
            }

            @Override
            public void states(int firstRow, byte[] codes) {
                System.arraycopy(codes, 0, state, firstRow * width, codes.length);
            }
        };
    }

    /** Combined standard uncertainty of a pixel, nm. */
    public float uncertainty(int pixel) {
        return (float) Math.hypot(random[pixel], systematic[pixel]);
    }

    /** How many pixels are in each state. */
    public Map<State, Long> counts() {
        long[] counts = new long[State.values().length];
        for (byte code : state) {
            counts[code]++;
        }
        Map<State, Long> result = new EnumMap<>(State.class);
        for (State s : State.values()) {
            result.put(s, counts[s.ordinal()]);
        }
        return result;
    }
}
