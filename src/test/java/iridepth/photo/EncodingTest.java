package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.color.ColorSpace;
import java.awt.color.ICC_Profile;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class EncodingTest {

    /** IEC 61966-2-1:1999: the two branches meet at 0.04045 (to 1e-7 or so), and a value of 0.5 is 0.214041 linear, by the formula. */
    @Test
    void srgbFollowsTheStandard() {
        Encoding srgb = Encoding.srgb(16);
        assertEquals(0, srgb.linear(0, 0));
        assertEquals(1, srgb.linear(0, 65535), 1e-12);
        assertEquals(0.04045 / 12.92, srgb.linear(0, 0.04045 * 65535), 1e-12);
        assertEquals(0.04045 / 12.92, srgb.linear(0, 0.0404501 * 65535), 1e-7);
        assertEquals(0.2140411, srgb.linear(0, 0.5 * 65535), 1e-7);
    }

    /** IEC 61966-2-1:1999: Y = 0.2126 R + 0.7152 G + 0.0722 B; the sRGB profile of the JDK has the matrix adapted to D50. */
    @Test
    void srgbMatrixAgreesWithTheProfileOfTheJdk() {
        double[][] matrix = Encoding.srgb(8).toXyz().orElseThrow();
        double[][] reference = IccProfile.parse(ICC_Profile.getInstance(ColorSpace.CS_sRGB).getData(), "sRGB").toXyz();
        for (int i = 0; i < 3; i++) {
            for (int c = 0; c < 3; c++) {
                assertEquals(reference[i][c], matrix[i][c], 4e-4, "row " + i + ", column " + c);
            }
        }
    }

    /** ICC.1:2022 annex E gives the Bradford matrix from D65 to D50; its values here as in the profile sRGB v4, from memory. */
    @Test
    void srgbAdaptationIsBradford() {
        double[][] expected = {{1.0479, 0.0229, -0.0502}, {0.0296, 0.9905, -0.0171}, {-0.0092, 0.0151, 0.7517}};
        double[][] adaptation = Encoding.srgb(8).adaptation().orElseThrow();
        for (int i = 0; i < 3; i++) {
            for (int c = 0; c < 3; c++) {
                assertEquals(expected[i][c], adaptation[i][c], 2e-4);
            }
        }
    }

    @Test
    void builtInProfileAgreesWithSrgb() {
        Encoding profile = Encoding.of(IccProfile.parse(ICC_Profile.getInstance(ColorSpace.CS_sRGB).getData(), "a"), 8);
        Encoding srgb = Encoding.srgb(8);
        for (int count = 0; count < 256; count++) {
            assertEquals(srgb.linear(2, count), profile.linear(2, count), 2e-4, "count " + count);
        }
    }

    @Test
    void tablesHoldTheCurve() {
        Encoding srgb = Encoding.srgb(8);
        for (int count = 0; count < 256; count++) {
            assertEquals((float) srgb.linear(1, count), srgb.table(1)[count]);
        }
        assertEquals(256, srgb.table(0).length);
    }

    @Test
    void linearCountsAreFractionsOfFullScale() {
        Encoding linear = Encoding.linear(4095);
        assertEquals(0.5, linear.linear(2, 2047.5), 1e-12);
        assertEquals(1 / 4095.0, linear.slope(0, 0.7), 1e-9);
        assertEquals(4095, linear.top());
        assertTrue(linear.toXyz().isEmpty());
    }

    /** The derivative of ((v + 0.055) / 1.055)^2.4 at v = 1 is 2.4 / 1.055; below the knee the slope is 1 / 12.92. */
    @Test
    void slopeIsThatOfTheCurve() {
        Encoding srgb = Encoding.srgb(16);
        assertEquals(2.4 / 1.055 / 65535, srgb.slope(0, 1), 1e-9);
        assertEquals(1 / 12.92 / 65535, srgb.slope(0, 0.001), 1e-9);
        assertEquals(1 / 12.92 / 65535, srgb.slope(0, -3), 1e-9);
        double v = 0.5;
        assertEquals(2.4 / 1.055 * Math.pow((v + 0.055) / 1.055, 1.4) / 65535, srgb.slope(0, srgb.linear(0, v * 65535)), 1e-9);
    }

    @Test
    void wrongArgumentsAreTold() {
        assertEquals("a full scale of 0.0 counts is out of range: give 1 to 65535",
                assertThrows(IllegalArgumentException.class, () -> Encoding.linear(0)).getMessage());
        assertEquals("a bit depth of 12 is not supported: give 8 or 16",
                assertThrows(IllegalArgumentException.class, () -> Encoding.srgb(12)).getMessage());
    }

    @Test
    void photosThatItDoesNotFitAreTold() {
        Path path = Path.of("a.tif");
        PhotoInfo sixteen = new PhotoInfo(path, 4, 3, 1, 16, 1, Double.NaN, Optional.empty(), false);
        assertEquals("a.tif: has 16 bit, but its encoding is one for 8 bit; give the encoding of this photo",
                assertThrows(PhotoException.class, () -> Encoding.srgb(8).requireFits(sixteen)).getMessage());
        Encoding rgb = Encoding.of(IccProfile.parse(ICC_Profile.getInstance(ColorSpace.CS_sRGB).getData(), "a"), 16);
        assertEquals("a.tif: its colour profile is for 3 channels, but it has 1; export the photo again",
                assertThrows(PhotoException.class, () -> rgb.requireFits(sixteen)).getMessage());
    }
}
