package iridepth.photo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.color.ColorSpace;
import java.awt.color.ICC_ColorSpace;
import java.awt.color.ICC_Profile;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The reference is the colour management module of the JDK (Little CMS), which gives XYZ with 16 bit or so. */
class IccProfileTest {

    private static final double TOLERANCE = 1e-4;

    private static IccProfile parse(ProfileBytes profile) {
        return IccProfile.parse(profile.build(), "photo.tif");
    }

    private static void agreesWithTheColourModule(byte[] bytes) {
        IccProfile profile = IccProfile.parse(bytes, "photo.tif");
        ICC_ColorSpace reference = new ICC_ColorSpace(ICC_Profile.getInstance(bytes));
        double[][] matrix = profile.toXyz();
        for (float a : new float[] {0, 0.01f, 0.1f, 0.4f, 0.75f, 1}) {
            float[] file = profile.channels() == 1 ? new float[] {a} : new float[] {a, 1 - a, a * a};
            float[] expected = reference.toCIEXYZ(file);
            for (int i = 0; i < 3; i++) {
                double sum = 0;
                for (int c = 0; c < file.length; c++) {
                    sum += matrix[i][c] * profile.linear(c, file[c]);
                }
                assertEquals(expected[i], sum, TOLERANCE, "coordinate " + i + " of " + a);
            }
        }
    }

    @ParameterizedTest
    @ValueSource(ints = {ColorSpace.CS_sRGB, ColorSpace.CS_LINEAR_RGB})
    void builtInProfilesAgreeWithTheColourModule(int space) {
        agreesWithTheColourModule(ICC_Profile.getInstance(space).getData());
    }

    @Test
    void builtInGreyIsLinear() {
        IccProfile grey = IccProfile.parse(ICC_Profile.getInstance(ColorSpace.CS_GRAY).getData(), "photo.tif");
        assertEquals(1, grey.channels());
        assertEquals(0.3, grey.linear(0, 0.3), 1e-3);
        assertArrayEquals(new double[] {0.9642, 1, 0.8249},
                new double[] {grey.toXyz()[0][0], grey.toXyz()[1][0], grey.toXyz()[2][0]});
    }

    @Test
    void gammaAgreesWithTheColourModule() {
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.sampled(563)).build());
    }

    @Test
    void identityAgreesWithTheColourModule() {
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.sampled()).build());
    }

    @Test
    void tableAgreesWithTheColourModule() {
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.sampled(0, 900, 6000, 20000, 65535)).build());
    }

    @Test
    void everyFormulaAgreesWithTheColourModule() {
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.parametric(0, 1.8)).build());
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.parametric(1, 2.2, 0.9, 0.1)).build());
        agreesWithTheColourModule(ProfileBytes.rgb(ProfileBytes.parametric(2, 2.0, 0.8, 0.05, 0.1)).build());
        agreesWithTheColourModule(ProfileBytes.rgb(
                ProfileBytes.parametric(3, 2.4, 1 / 1.055, 0.055 / 1.055, 1 / 12.92, 0.04045)).build());
        agreesWithTheColourModule(ProfileBytes.rgb(
                ProfileBytes.parametric(4, 2.2, 0.9, 0.05, 0.1, 0.04, 0.02, 0.01)).build());
    }

    @Test
    void channelsHaveTheirOwnCurves() {
        IccProfile profile = parse(ProfileBytes.rgb(ProfileBytes.sampled(256)).tag("gTRC", ProfileBytes.sampled(512)));
        assertEquals(0.5, profile.linear(0, 0.5), 1e-12);
        assertEquals(0.25, profile.linear(1, 0.5), 1e-12);
    }

    @Test
    void adaptationIsGivenWhereTheProfileHasIt() {
        byte[] chad = ProfileBytes.fixed("sf32", 1.0479, 0.0229, -0.0502, 0.0296, 0.9905, -0.0171, -0.0092, 0.0151, 0.7517);
        IccProfile profile = parse(ProfileBytes.rgb(ProfileBytes.sampled(256)).tag("chad", chad));
        assertEquals(0.7517, profile.adaptation().orElseThrow()[2][2], 1e-5);
        assertTrue(parse(ProfileBytes.rgb(ProfileBytes.sampled(256))).adaptation().isEmpty());
    }

    @Test
    void nameIsReadFromBothVersions() {
        assertTrue(IccProfile.parse(ICC_Profile.getInstance(ColorSpace.CS_sRGB).getData(), "photo.tif").description()
                .contains("sRGB"));
        byte[] mluc = new byte[28 + 8];
        java.nio.ByteBuffer.wrap(mluc).put("mluc".getBytes(java.nio.charset.StandardCharsets.US_ASCII)).putInt(8, 1)
                .putInt(12, 12).putInt(20, 8).putInt(24, 28).put(28, "cam1".getBytes(java.nio.charset.StandardCharsets.UTF_16BE));
        assertEquals("cam1", parse(ProfileBytes.rgb(ProfileBytes.sampled(256)).tag("desc", mluc)).description());
    }

    private static void assertRefused(ProfileBytes profile, String reason) {
        assertRefused(profile.build(), reason);
    }

    private static void assertRefused(byte[] profile, String reason) {
        assertEquals("photo.tif: its embedded colour profile cannot be used (" + reason
                + "); convert the photo to sRGB or save the linear counts without a profile",
                assertThrows(PhotoException.class, () -> IccProfile.parse(profile, "photo.tif")).getMessage());
    }

    @Test
    void lookUpTablesAreRefused() {
        assertRefused(ProfileBytes.rgb(ProfileBytes.sampled(256)).tag("A2B0", new byte[32]),
                "it works by look-up tables, not by a matrix and tone curves");
        assertRefused(new ProfileBytes("scnr", "RGB ", "Lab "), "it works by look-up tables, not by a matrix and tone curves");
        assertRefused(ICC_Profile.getInstance(ColorSpace.CS_PYCC).getData(), "it is for 3CLR data, not RGB or grey");
    }

    @Test
    void otherKindsAreRefused() {
        assertRefused(new ProfileBytes("link", "RGB ", "XYZ "), "it is of class 'link', not a device or colour space");
        assertRefused(new ProfileBytes("prtr", "CMYK", "Lab "), "it is for CMYK data, not RGB or grey");
    }

    @Test
    void damagedProfilesAreRefused() {
        byte[] good = ProfileBytes.rgb(ProfileBytes.sampled(256)).build();
        assertRefused(new byte[10], "it is damaged");
        assertRefused(new byte[200], "it is damaged");
        assertRefused(java.util.Arrays.copyOf(good, good.length - 20), "it is cut short");
        assertRefused(ProfileBytes.rgb(ProfileBytes.sampled(256)).without("gXYZ"), "it lacks the tag 'gXYZ'");
        assertRefused(ProfileBytes.rgb(ProfileBytes.sampled(256)).tag("rXYZ", ProfileBytes.fixed("XYZ ", 1)),
                "a tag of type 'XYZ' is damaged");
    }

    @Test
    void toneCurvesThatCannotBeUsedAreRefused() {
        assertRefused(ProfileBytes.grey(ProfileBytes.sampled(0, 65535, 30000)), "a tone curve does not rise throughout");
        assertRefused(ProfileBytes.grey(ProfileBytes.sampled(500, 500)), "a tone curve is constant");
        assertRefused(ProfileBytes.grey(ProfileBytes.parametric(9, 1)), "a tone curve has an unknown formula 9");
        assertRefused(ProfileBytes.grey(ProfileBytes.parametric(3, 1)), "a tone curve is cut short");
        assertRefused(ProfileBytes.grey(ProfileBytes.fixed("XYZ ", 1, 1, 1)), "a tone curve is of an unknown type");
    }
}
