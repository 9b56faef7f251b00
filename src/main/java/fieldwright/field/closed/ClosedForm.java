package fieldwright.field.closed;

/**
 * A charged body whose field and potential have a closed form, in its own local frame.
 *
 * <p>Bare kernel, no 1/(4 pi eps0): E = ∫ density (r - r')/|r - r'|³, V = ∫ density/|r - r'|. Every body is an
 * immutable record that checks itself on entry; asking is thread-safe and keeps nothing.
 */
public sealed interface ClosedForm permits Rod, Polygon, Box, Ring, Disc, Tube, Cylinder, SphericalShell, Ball,
        EndlessLine, HalfEndlessLine, EndlessPlane, Strip, Slab, EndlessTube, EndlessCylinder {
    /**
     * Field and potential at a place of the local frame.
     *
     * <p>Errors: IllegalArgumentException if a coordinate or placeError is not finite or beyond 1e90.
     *
     * @param placeError how far the true place may lie from (x, y, z), in the unit of length: its rounding, and that of
     *        the move into the local frame. A place nearer than this to a charged surface, edge or line counts as on it.
     */
    Closed at(double x, double y, double z, double placeError);

    /** The same with the rounding of the place taken as one spacing of doubles at its largest coordinate or the body's. */
    default Closed at(double x, double y, double z) {
        return at(x, y, z, Rounding.ofPlace(x, y, z, reach()));
    }

    /** Largest coordinate of the body in its local frame (of what is finite of it): the scale its own numbers are rounded at. */
    double reach();
}
