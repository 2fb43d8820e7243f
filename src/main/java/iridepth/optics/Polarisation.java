package iridepth.optics;

/** Direction of the electric field against the plane of incidence. */
public enum Polarisation {
    /** Perpendicular to the plane of incidence. */
    S,
    /** In the plane of incidence. */
    P,
    /** Unpolarised: the mean of both. */
    NONE
}
